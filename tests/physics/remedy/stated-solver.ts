import type { ChangeResult, Solver, TargetedCase } from '@/lib/physics/remedy/change';

/** A geometry whose answers are stated by the test; what it does not state is not to be asked. */
export const solverThat = (answers: Partial<Solver>): Solver =>
  new Proxy(answers as Solver, {
    get: (target, name) =>
      target[name as keyof Solver] ??
      (() => {
        throw new Error(`${String(name)} was asked`);
      }),
  });

/** What a change leads to; fails where it changes nothing. */
export function planned(result: ChangeResult): TargetedCase {
  if (result.outcome !== 'changed') throw new Error(JSON.stringify(result));
  return result.planned;
}

/** The outcome, or the code of a refusal. */
export const codeOf = (result: ChangeResult): string =>
  result.outcome === 'refused' ? result.reason.code : result.outcome;
