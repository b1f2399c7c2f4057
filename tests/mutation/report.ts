import { EQUIVALENT } from './equivalent';
import type { Mutant } from './find-mutants';

export type Outcome = 'killed' | 'survived' | 'not reached' | 'equivalent';

export interface Result extends Mutant {
  /** Hash of the file it was made from. */
  readonly from: string;
  readonly outcome: Outcome;
  /** The test that failed, or how the run ended; for an equivalent mutant the reason. */
  readonly by?: string;
}

type Place = Pick<Mutant, 'file' | 'within' | 'code' | 'mutated'>;
export const keyOf = ({ file, within, code, mutated }: Place): string =>
  JSON.stringify([file, within, code, mutated]);

const REASONS = new Map(EQUIVALENT.map((entry) => [keyOf(entry), entry.reason]));
export const equivalentReason = (mutant: Mutant): string | undefined => REASONS.get(keyOf(mutant));

export const isLeft = ({ outcome }: Result): boolean => outcome === 'survived' || outcome === 'not reached';

function printRow(name: string, of: readonly Result[]): void {
  const equivalent = of.filter(({ outcome }) => outcome === 'equivalent').length;
  const counted = of.length - equivalent;
  const killed = of.filter(({ outcome }) => outcome === 'killed').length;
  const share = counted === 0 ? '' : `${((100 * killed) / counted).toFixed(1)} %`;
  const figures = `${String(killed).padStart(5)} of ${String(counted).padStart(5)} ${share.padStart(8)}`;
  console.log(
    `${name.padEnd(52)} ${figures}${equivalent === 0 ? '' : `  (${equivalent} equivalent left out)`}`,
  );
}

/** Survivors, a table by file, and what the list of equivalent mutants has wrong. */
export function printReport(results: readonly Result[], all: readonly Mutant[]): void {
  console.log('\nSurvivors:');
  for (const { file, line, code, mutated, outcome } of results.filter(isLeft)) {
    console.log(
      `  ${file}:${line}  ${code}  →  ${mutated}${outcome === 'not reached' ? '  (not reached)' : ''}`,
    );
  }
  console.log('\nKilled, of those that change an answer:');
  for (const file of new Set(results.map((result) => result.file))) {
    printRow(
      file,
      results.filter((result) => result.file === file),
    );
  }
  printRow('all', results);
  const present = new Set(all.map(keyOf));
  for (const entry of EQUIVALENT) {
    if (!present.has(keyOf(entry)))
      console.log(`equivalent.ts names what is not there: ${entry.file}: ${entry.code} → ${entry.mutated}`);
  }
  for (const { file, line, code, mutated, by } of results.filter(
    (result) => result.outcome === 'killed' && REASONS.has(keyOf(result)),
  )) {
    console.log(`Called equivalent, yet killed: ${file}:${line} ${code} → ${mutated} by ${by}`);
  }
}
