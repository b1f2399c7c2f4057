import { mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { LocalError } from '@/db/local';
import { type Counts, oneCheck, playwrightCounts, settle, sum, vitestCounts } from './count-results';
import { readJson } from './local-files';
import { runStep, stopStepsOnSignal, wasInterrupted } from './run-step';

const BIN = {
  eslint: 'node_modules/eslint/bin/eslint.js',
  tsc: 'node_modules/typescript/bin/tsc',
  next: 'node_modules/next/dist/bin/next',
  vitest: 'node_modules/vitest/vitest.mjs',
  playwright: 'node_modules/@playwright/test/cli.js',
};

type Suite = (reports: string) => Promise<Counts>;

const SUITES: Record<string, Suite> = {
  lint: async () => oneCheck(await runStep([BIN.eslint, '.', '--max-warnings', '0'])),
  types: async () => {
    // Route types are generated; a fresh clone has none yet.
    const generated = await runStep([BIN.next, 'typegen'], { NEXT_TELEMETRY_DISABLED: '1' });
    return oneCheck(generated || (await runStep([BIN.tsc, '--noEmit'])));
  },
  vitest: async (reports) => {
    const file = path.join(reports, 'vitest.json');
    const code = await runStep([BIN.vitest, 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${file}`]);
    const report = await readJson<Parameters<typeof vitestCounts>[0]>(file);
    return settle(report && vitestCounts(report), code);
  },
  e2e: async (reports) => {
    const file = path.join(reports, 'playwright.json');
    const code = await runStep([BIN.playwright, 'test', '--reporter=list,json'], { PLAYWRIGHT_JSON_OUTPUT_FILE: file });
    const report = await readJson<Parameters<typeof playwrightCounts>[0]>(file);
    return settle(report && playwrightCounts(report), code);
  },
};

/**
 * `npm test`: every short check, each against clusters of its own in folders of its own. `npm test -- lint vitest` runs
 * some. The last line is the sum; the exit code is 0 only when nothing failed.
 */
export async function runTests(args: readonly string[]): Promise<void> {
  const unknown = args.filter((name) => !(name in SUITES));
  if (unknown.length > 0) {
    throw new LocalError(`"${unknown.join('", "')}" is not a suite. Known: ${Object.keys(SUITES).join(', ')}.`);
  }
  stopStepsOnSignal();
  const reports = await mkdtemp(path.join(os.tmpdir(), 'selvedge-reports-'));
  const results: [string, Counts, number][] = [];
  try {
    for (const name of args.length > 0 ? args : Object.keys(SUITES)) {
      if (wasInterrupted()) break;
      console.log(`\n── ${name} ──`);
      const begun = Date.now();
      const counts = await SUITES[name]!(reports).catch((error: Error) => {
        console.error(error);
        return { passed: 0, failed: 1 };
      });
      results.push([name, counts, Date.now() - begun]);
    }
  } finally {
    await rm(reports, { recursive: true, force: true });
  }
  console.log();
  for (const [name, { passed, failed }, ms] of results) {
    console.log(`${name.padEnd(8)} ${String(passed).padStart(6)} passed ${String(failed).padStart(5)} failed ${(ms / 1000).toFixed(0).padStart(6)} s`);
  }
  const total = sum(results.map(([, counts]) => counts));
  const failed = total.failed + (wasInterrupted() ? 1 : 0);
  if (wasInterrupted()) console.log('Interrupted: what did not run counts as one failure.');
  console.log(`${total.passed} passed, ${failed} failed`);
  process.exit(failed === 0 && total.passed > 0 ? 0 : 1);
}
