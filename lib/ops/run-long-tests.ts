import { mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { type Counts, settle, sum, vitestCounts } from './count-results';
import { dataFolder, readJson, writePrivateJson } from './local-files';
import { readTallies, type Tally } from './read-tallies';
import { runStep, stopStepsOnSignal, wasInterrupted } from './run-step';

/** Full counts of what the short tests sample. A variable that is already set wins, so a count can be tried by hand. */
const FULL_COUNTS: Record<string, string> = {
  SELVEDGE_ORACLE_A: '100000',
  SELVEDGE_ORACLE_A_3D: '20000',
  SELVEDGE_ORACLE_B: '20000',
  SELVEDGE_PROPERTY_RUNS: '5000',
  SELVEDGE_EPI_PICTURES: '400',
  SELVEDGE_PARITY: '20000',
  SELVEDGE_RANKINGS: '500',
  SELVEDGE_ELLIPSE_FFT: '1000',
  SELVEDGE_POPULATION: '1000',
  SELVEDGE_KILLS: '50',
  // Every figure of the reconstruction toolbox's file measured again, where it is installed.
  SELVEDGE_LONG: '1',
};

/** One after another, each in a process of its own: one that fails or dies does not stop the others. The longest come last. */
const SUITES: Readonly<Record<string, readonly string[]>> = {
  'engine, everything but fold and remedies': [
    'tests/physics/acceleration', 'tests/physics/assess', 'tests/physics/body', 'tests/physics/bore', 'tests/physics/certainty',
    'tests/physics/geometry', 'tests/physics/image', 'tests/physics/kept', 'tests/physics/section', 'tests/physics/sequence',
    'tests/physics/size', 'tests/physics/slab',
  ],
  'rules of the domain, population': ['tests/domain'],
  'remedies against exhaustive search': ['tests/physics/remedy'],
  'outside checks, browser parity': ['tests/external'],
  kills: ['tests/faults'],
  'fold against cells and points': ['tests/physics/fold'],
};

export interface SuiteState extends Counts {
  readonly name: string;
  readonly state: 'waiting' | 'running' | 'done';
  readonly seconds: number;
  readonly failures: readonly string[];
}

interface Report {
  readonly testResults: readonly {
    readonly name?: string;
    readonly status: string;
    readonly assertionResults: readonly { readonly status: string; readonly fullName?: string }[];
  }[];
}

/** Where a run says how far it is, to be read meanwhile: <data folder>/long-tests.json. */
const stateFile = () => path.join(dataFolder(), 'long-tests.json');
const STATE_EVERY_MS = 10_000;

function failuresOf(report: Report | null, code: number): string[] {
  if (!report) return [`ended with code ${code} before it wrote its report`];
  return report.testResults.flatMap(({ name = '', status, assertionResults }) => {
    const failed = assertionResults.filter((test) => test.status !== 'passed').map((test) => test.fullName ?? name);
    return failed.length === 0 && status === 'failed' ? [`${name} did not load`] : failed;
  });
}

/** Writes the state down; a run without a place to write goes on without it. */
async function write(begun: Date, suites: readonly SuiteState[], tallies: readonly Tally[]): Promise<void> {
  const { passed, failed } = sum(suites);
  await writePrivateJson(stateFile(), { begun: begun.toISOString(), written: new Date().toISOString(), passed, failed, suites, tallies }).catch(
    (error: unknown) => console.error(`The state of the run was not written: ${String(error)}`),
  );
}

/** `npm run test:long`: the same tests at full counts, what was counted, and one total. Arguments choose files instead. */
export async function runLongTests(args: readonly string[]): Promise<void> {
  stopStepsOnSignal();
  const reports = await mkdtemp(path.join(os.tmpdir(), 'selvedge-reports-'));
  const tallies = path.join(reports, 'tallies');
  const counts = { ...FULL_COUNTS, ...Object.fromEntries(Object.entries(process.env).filter(([, value]) => value !== undefined && value !== '')) };
  const chosen: typeof SUITES = args.length > 0 ? { chosen: args } : SUITES;
  const suites: SuiteState[] = Object.keys(chosen).map((name) => ({ name, state: 'waiting', passed: 0, failed: 0, seconds: 0, failures: [] }));
  const begun = new Date();
  const save = async () => write(begun, suites, await readTallies(tallies));
  const timer = setInterval(() => void save(), STATE_EVERY_MS);
  try {
    for (const [index, [name, files]] of Object.entries(chosen).entries()) {
      const started = Date.now();
      const seconds = () => Math.round((Date.now() - started) / 1000);
      suites[index] = { ...suites[index]!, state: 'running' };
      console.log(`\n— ${name} —`);
      await save();
      const file = path.join(reports, `${index}.json`);
      const code = wasInterrupted() ? 1 : await runStep(
        [
          'node_modules/vitest/vitest.mjs', 'run', ...files,
          '--testTimeout=14400000', '--reporter=default', '--reporter=json', `--outputFile.json=${file}`,
        ],
        { ...counts, SELVEDGE_TALLIES: tallies },
      );
      // A report cut short by a kill is no report.
      const report = await readJson<Report>(file).catch(() => null);
      suites[index] = { name, state: 'done', seconds: seconds(), ...settle(report && vitestCounts(report), code), failures: failuresOf(report, code) };
      await save();
    }
    print(suites, counts, await readTallies(tallies));
    process.exitCode = sum(suites).failed === 0 ? 0 : 1;
  } finally {
    clearInterval(timer);
    await rm(reports, { recursive: true, force: true });
  }
}

function print(suites: readonly SuiteState[], counts: Readonly<Record<string, string | undefined>>, tallies: readonly Tally[]): void {
  console.log('\nAsked for:');
  for (const name of Object.keys(FULL_COUNTS)) console.log(`  ${name.padEnd(26)} ${counts[name]}`);
  if (tallies.length > 0) console.log('\nCounted:');
  for (const { name, cases, note } of tallies) console.log(`  ${name.padEnd(48)} ${String(cases).padStart(9)}  ${note}`);
  console.log('\nSuites:');
  for (const { name, passed, failed, seconds, failures } of suites) {
    console.log(`  ${name.padEnd(48)} ${String(passed).padStart(5)} passed ${String(failed).padStart(3)} failed ${String(seconds).padStart(7)} s`);
    for (const failure of failures) console.log(`    failed: ${failure}`);
  }
  const { passed, failed } = sum(suites);
  console.log(`\n${passed} passed, ${failed} failed`);
}
