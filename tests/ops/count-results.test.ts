import { describe, expect, it } from 'vitest';
import { playwrightCounts, settle, sum, vitestCounts } from '@/lib/ops/count-results';

const file = (status: string, ...tests: string[]) => ({
  status,
  assertionResults: tests.map((each) => ({ status: each })),
});

describe('counting', () => {
  it('adds up files, and counts one that did not load as a failure', () => {
    const report = { testResults: [file('passed', 'passed', 'passed'), file('failed', 'passed', 'failed'), file('failed')] };
    expect(vitestCounts(report)).toEqual({ passed: 3, failed: 2 });
  });

  it('counts a skipped test as a failure', () => {
    expect(vitestCounts({ testResults: [file('passed', 'passed', 'skipped')] })).toEqual({ passed: 1, failed: 1 });
  });

  it('counts a journey that needed a second try, or did not run, as a failure', () => {
    const stats = { expected: 4, unexpected: 1, flaky: 1, skipped: 1 };
    expect(playwrightCounts({ stats, errors: [{}] })).toEqual({ passed: 4, failed: 4 });
  });

  it.each([
    ['it died before its report', null, 1, { passed: 0, failed: 1 }],
    ['it died after its last test', { passed: 9, failed: 0 }, 1, { passed: 9, failed: 1 }],
    ['it failed tests', { passed: 9, failed: 2 }, 1, { passed: 9, failed: 2 }],
    ['nothing ran', { passed: 0, failed: 0 }, 0, { passed: 0, failed: 1 }],
    ['all is well', { passed: 9, failed: 0 }, 0, { passed: 9, failed: 0 }],
  ])('settles a suite when %s', (_, counts, code, expected) => {
    expect(settle(counts, code)).toEqual(expected);
  });

  it('sums suites', () => {
    expect(sum([{ passed: 1, failed: 2 }, { passed: 3, failed: 4 }])).toEqual({ passed: 4, failed: 6 });
  });
});
