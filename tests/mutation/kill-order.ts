import type { Mutant } from './find-mutants';

export interface PlayableTest {
  readonly bundle: string;
  readonly test: number;
  readonly ms: number;
  readonly loadMs: number;
}

export interface PlannedTest {
  readonly bundle: string;
  readonly test: number;
  readonly allowedMs: number;
}

interface Tries {
  tried: number;
  killed: number;
}

/** Counts of the mutant's own file say more than those of all files. */
const OWN_FILE = 4;
/** Before anything is known a test is thought to kill one mutant in four. */
const PRIOR = { killed: 1, tried: 4 };
/** What a test costs at least, ms: none is free. */
const LEAST_MS = 2;

/**
 * The order in which tests are tried on a mutant: by kills to be expected for their time, learnt from the mutants before
 * it. The order changes how soon a mutant is killed, never whether: which tests are tried at all does not depend on it.
 */
export class KillOrder {
  private readonly records = new Map<string, Tries>();

  plan({ file }: Mutant, tests: readonly PlayableTest[], budgetMs: number): PlannedTest[] {
    return withinBudget(tests, budgetMs)
      .map((one) => ({ one, worth: this.chance(file, one) / (one.ms + one.loadMs + LEAST_MS) }))
      .sort((a, b) => b.worth - a.worth)
      .map(({ one: { bundle, test, ms, loadMs } }) => ({
        bundle,
        test,
        // Detours are given room; an endless loop is given up.
        allowedMs: 10 * (ms + loadMs) + 2000,
      }));
  }

  /** @param killer  place of the test that failed in the plan; those after it were not tried */
  note({ file }: Mutant, plan: readonly PlannedTest[], killer: number | undefined): void {
    plan.slice(0, killer === undefined ? undefined : killer + 1).forEach((test, i) => {
      for (const record of [this.record('', test), this.record(file, test)]) {
        record.tried += 1;
        if (i === killer) record.killed += 1;
      }
    });
  }

  private chance(file: string, test: PlayableTest): number {
    const all = this.record('', test);
    const own = this.record(file, test);
    return (
      (PRIOR.killed + all.killed + OWN_FILE * own.killed) / (PRIOR.tried + all.tried + OWN_FILE * own.tried)
    );
  }

  private record(file: string, { bundle, test }: { bundle: string; test: number }): Tries {
    const key = `${file} ${bundle} ${test}`;
    let record = this.records.get(key);
    if (!record) this.records.set(key, (record = { tried: 0, killed: 0 }));
    return record;
  }
}

/** The quickest tests that fit the budget; at least one. `tests` come quickest first. */
function withinBudget(tests: readonly PlayableTest[], budgetMs: number): PlayableTest[] {
  const loaded = new Set<string>();
  let spent = 0;
  return tests.filter(({ bundle, ms, loadMs }) => {
    const more = ms + (loaded.has(bundle) ? 0 : loadMs);
    if (spent > 0 && spent + more > budgetMs) return false;
    spent += more;
    loaded.add(bundle);
    return true;
  });
}
