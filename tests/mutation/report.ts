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

/** Topic of lib/physics a mutant belongs to. */
export const folderOf = ({ file }: Pick<Mutant, 'file'>): string => file.split('/').slice(0, 3).join('/');

export interface Score {
  readonly of: string;
  readonly mutants: number;
  readonly played: number;
  readonly killed: number;
  readonly equivalent: number;
  /** Killed share of those played that change an answer, per cent. */
  readonly killedPct: number;
}

const share = (killed: number, counted: number): number => (counted === 0 ? 100 : (100 * killed) / counted);

function scoreOf(name: string, played: readonly Result[], mutants: number): Score {
  const equivalent = played.filter(({ outcome }) => outcome === 'equivalent').length;
  const killed = played.filter(({ outcome }) => outcome === 'killed').length;
  return {
    of: name,
    mutants,
    played: played.length,
    killed,
    equivalent,
    killedPct: share(killed, played.length - equivalent),
  };
}

function scoresBy(
  group: (mutant: Mutant) => string,
  results: readonly Result[],
  all: readonly Mutant[],
): Score[] {
  return [...new Set(results.map(group))].map((name) =>
    scoreOf(
      name,
      results.filter((result) => group(result) === name),
      all.filter((mutant) => group(mutant) === name).length,
    ),
  );
}

/**
 * Scores by file, by folder and overall. `estimatePct` gives each folder the weight of all its mutants: where small folders
 * were drawn more densely, the plain share would not speak for the whole.
 */
export function scoresOf(results: readonly Result[], all: readonly Mutant[]) {
  const folders = scoresBy(folderOf, results, all);
  const weight = folders.reduce((sum, { mutants }) => sum + mutants, 0);
  return {
    files: scoresBy(({ file }) => file, results, all),
    folders,
    overall: scoreOf('all', results, all.length),
    estimatePct: folders.reduce((sum, { mutants, killedPct }) => sum + (mutants / weight) * killedPct, 0),
  };
}

function printScore({ of, mutants, played, killed, equivalent, killedPct }: Score): void {
  const figures = `${String(killed).padStart(5)} of ${String(played - equivalent).padStart(5)} ${killedPct.toFixed(1).padStart(6)} %`;
  const notes = [
    ...(played < mutants ? [`${mutants} mutants`] : []),
    ...(equivalent > 0 ? [`${equivalent} equivalent left out`] : []),
  ];
  console.log(`${of.padEnd(48)} ${figures}${notes.length === 0 ? '' : `  (${notes.join(', ')})`}`);
}

/** Survivors, tables by file and by folder, and what the list of equivalent mutants has wrong. */
export function printReport(results: readonly Result[], all: readonly Mutant[]): void {
  const list = (title: string, some: readonly Result[]) => {
    if (some.length > 0) console.log(`\n${title}`);
    for (const { file, line, code, mutated, by } of some)
      console.log(`  ${file}:${line}  ${code}  →  ${mutated}\n      ${by ?? 'no test reaches it'}`);
  };
  list(
    'Equivalent:',
    results.filter(({ outcome }) => outcome === 'equivalent'),
  );
  list('Survivors:', results.filter(isLeft));
  const { files, folders, overall, estimatePct } = scoresOf(results, all);
  console.log('\nKilled, of those that change an answer, by file:');
  files.forEach(printScore);
  console.log('\nby folder:');
  folders.forEach(printScore);
  printScore(overall);
  if (overall.played < overall.mutants)
    console.log(`Each folder by the number of its mutants: ${estimatePct.toFixed(1)} %`);
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
