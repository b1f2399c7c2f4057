export interface Counts {
  readonly passed: number;
  readonly failed: number;
}

export const sum = (counts: readonly Counts[]): Counts =>
  counts.reduce((a, b) => ({ passed: a.passed + b.passed, failed: a.failed + b.failed }), { passed: 0, failed: 0 });

/** A step that is one check as a whole. */
export const oneCheck = (exitCode: number): Counts => (exitCode === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 });

/**
 * A suite that says it failed must count at least one failure, however it died: before it wrote its report, in a hook,
 * or with an unhandled error after its last test. A suite in which nothing ran has failed too.
 */
export function settle(counts: Counts | null, exitCode: number): Counts {
  const known = counts ?? { passed: 0, failed: 0 };
  const mustFail = exitCode !== 0 || known.passed + known.failed === 0;
  return mustFail && known.failed === 0 ? { ...known, failed: 1 } : known;
}

interface VitestReport {
  readonly testResults: readonly {
    readonly status: string;
    readonly assertionResults: readonly { readonly status: string }[];
  }[];
}

/** Counts of Vitest's JSON report. A file that failed without a failed test in it (it did not load) counts as one. */
export function vitestCounts(report: VitestReport): Counts {
  return sum(
    report.testResults.map(({ status, assertionResults }) => {
      const passed = assertionResults.filter((test) => test.status === 'passed').length;
      // Skipped tests are not allowed here, so whatever did not pass has failed.
      const failed = assertionResults.length - passed;
      return { passed, failed: failed === 0 && status === 'failed' ? 1 : failed };
    }),
  );
}

interface PlaywrightReport {
  readonly stats: { readonly expected: number; readonly unexpected: number; readonly flaky: number; readonly skipped: number };
  readonly errors: readonly unknown[];
}

/** Counts of Playwright's JSON report. A test that passed only when tried again, or did not run, has failed. */
export function playwrightCounts({ stats, errors }: PlaywrightReport): Counts {
  return { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped + errors.length };
}
