import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { oneCheck, settle, vitestCounts } from './count-results';
import { readJson } from './local-files';
import { runStep, stopStepsOnSignal } from './run-step';

/** Full counts of what the short tests sample. A variable that is already set wins, so a count can be tried by hand. */
const FULL_COUNTS: Record<string, string> = {
  SELVEDGE_ORACLE_A: '100000',
  SELVEDGE_ORACLE_A_3D: '20000',
  SELVEDGE_ORACLE_B: '20000',
  SELVEDGE_PROPERTY_RUNS: '5000',
  SELVEDGE_PARITY: '20000',
  SELVEDGE_RANKINGS: '500',
  SELVEDGE_ELLIPSE_FFT: '1000',
  SELVEDGE_KILLS: '50',
  // Every figure of the reconstruction toolbox's file measured again, where it is installed.
  SELVEDGE_LONG: '1',
};

const FOLDERS = ['tests/physics', 'tests/domain', 'tests/external', 'tests/faults'];

/** `npm run test:long`: the same tests at full counts, and what was counted. */
export async function runLongTests(args: readonly string[]): Promise<void> {
  stopStepsOnSignal();
  const reports = await mkdtemp(path.join(os.tmpdir(), 'selvedge-reports-'));
  const tallies = path.join(reports, 'tallies');
  const file = path.join(reports, 'vitest.json');
  const counts = { ...FULL_COUNTS, ...process.env };
  try {
    const code = await runStep(
      [
        'node_modules/vitest/vitest.mjs', 'run', ...(args.length > 0 ? args : FOLDERS),
        '--testTimeout=3600000', '--reporter=default', '--reporter=json', `--outputFile.json=${file}`,
      ],
      { ...counts, SELVEDGE_TALLIES: tallies },
    );
    const report = await readJson<Parameters<typeof vitestCounts>[0]>(file);
    console.log('\nAsked for:');
    for (const name of Object.keys(FULL_COUNTS)) console.log(`  ${name.padEnd(26)} ${counts[name]}`);
    await printTallies(tallies);
    const { passed, failed } = settle(report && vitestCounts(report), code);
    console.log(`\n${passed} passed, ${failed} failed`);
    process.exitCode = failed === 0 ? oneCheck(code).failed : 1;
  } finally {
    await rm(reports, { recursive: true, force: true });
  }
}

/** What the tests themselves counted (tests/support/tally.ts), one JSON line each. */
async function printTallies(folder: string): Promise<void> {
  const files = await readdir(folder).catch(() => [] as string[]);
  const lines = (await Promise.all(files.map((name) => readFile(path.join(folder, name), 'utf8')))).join('').split('\n');
  const tallies = lines.filter(Boolean).map((line) => JSON.parse(line) as { name: string; cases: number; note: string });
  if (tallies.length === 0) return;
  console.log('\nCounted:');
  for (const { name, cases, note } of tallies.sort((a, b) => a.name.localeCompare(b.name))) {
    console.log(`  ${name.padEnd(48)} ${String(cases).padStart(9)}  ${note}`);
  }
}
