/**
 * The process that plays mutants. It gets bundles of instrumented test files, first notes which test reaches which place,
 * then for each mutant evaluates the bundles afresh with it switched on and stops at the first test that fails.
 */
import { createRequire } from 'node:module';
import vm from 'node:vm';
import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { vitestFor, type RegisteredTest } from './harness';
import type { MutationControl } from './switch';

export type Request =
  | { readonly kind: 'survey'; readonly bundle: string; readonly mutants: number }
  | {
      readonly kind: 'play';
      readonly id: number;
      readonly tests: readonly {
        readonly bundle: string;
        readonly test: number;
        readonly allowedMs: number;
      }[];
    };

export interface SurveyedTest {
  readonly name: string;
  readonly ms: number;
  readonly error?: string;
  readonly hits: readonly number[];
}

export type Answer =
  | { readonly kind: 'surveyed'; readonly loadMs: number; readonly tests: readonly SurveyedTest[] }
  | { readonly kind: 'begun'; readonly allowedMs: number }
  /** `killer` is the place of the test that failed in what was asked. */
  | { readonly kind: 'played'; readonly killedBy?: string; readonly killer?: number };

const require = createRequire(import.meta.url);
const scripts = new Map<string, vm.Script>();
const say = (answer: Answer): void => void process.send!(answer);
// A counterexample is enough; nobody reads the smallest.
fc.configureGlobal({ endOnFailure: true });

function evaluate(bundle: string, control: MutationControl): RegisteredTest[] {
  let script = scripts.get(bundle);
  if (!script) {
    script = new vm.Script(`(function (exports, require, module) {${readFileSync(bundle, 'utf8')}\n})`, {
      filename: bundle,
    });
    scripts.set(bundle, script);
  }
  (globalThis as { mutationControl?: MutationControl }).mutationControl = control;
  const tests: RegisteredTest[] = [];
  const vitest = vitestFor(tests);
  const loaded = { exports: {} };
  const load = script.runInThisContext() as (
    exports: object,
    require: (name: string) => unknown,
    module: object,
  ) => void;
  load(loaded.exports, (name) => (name === 'vitest' ? vitest : require(name)), loaded);
  return tests;
}

/** Of the processor: others may be using the machine. */
const spentMs = (since: NodeJS.CpuUsage): number => {
  const { user, system } = process.cpuUsage(since);
  return (user + system) / 1000;
};

const LONG_MS = 1000;

async function survey(bundle: string, mutants: number): Promise<void> {
  const hits = new Uint8Array(mutants);
  const reached = () => [...hits.keys()].filter((id) => hits[id] === 1);
  const begun = process.cpuUsage();
  const tests = evaluate(bundle, { active: -1, hits });
  const loadMs = spentMs(begun);
  const atLoad = new Set(reached());
  const surveyed: SurveyedTest[] = [];
  for (const { name, run } of tests) {
    hits.fill(0);
    const started = process.cpuUsage();
    const error = await failure(run);
    const ms = spentMs(started);
    const found = [...new Set([...atLoad, ...reached()])];
    surveyed.push({ name, ms, hits: found, ...(error === undefined ? {} : { error }) });
  }
  // The short ones timed again without the notes, warm as they will be then.
  const plain = evaluate(bundle, { active: -1, hits: undefined });
  for (let i = 0; i < plain.length; i++) {
    if (surveyed[i]!.ms > LONG_MS) continue;
    const started = process.cpuUsage();
    await failure(plain[i]!.run);
    surveyed[i] = { ...surveyed[i]!, ms: spentMs(started) };
  }
  say({ kind: 'surveyed', loadMs, tests: surveyed });
}

async function failure(run: () => unknown): Promise<string | undefined> {
  try {
    await run();
    return undefined;
  } catch (error) {
    return String((error as Error)?.message ?? error).slice(0, 300) || 'thrown';
  }
}

async function play({ id, tests }: Extract<Request, { kind: 'play' }>): Promise<void> {
  const evaluated = new Map<string, RegisteredTest[]>();
  for (const [killer, { bundle, test, allowedMs }] of tests.entries()) {
    say({ kind: 'begun', allowedMs });
    let registered: RegisteredTest[] | undefined = evaluated.get(bundle);
    let error: string | undefined;
    if (!registered) {
      error = await failure(() => {
        registered = evaluate(bundle, { active: id, hits: undefined });
        evaluated.set(bundle, registered);
      });
    }
    error ??=
      registered?.[test] === undefined ? 'the test is not registered' : await failure(registered[test].run);
    // Another program that had no time to start says nothing about the mutant.
    if (error !== undefined && !/spawnSync .*ETIMEDOUT/.test(error))
      return say({
        kind: 'played',
        killer,
        killedBy: `${registered?.[test]?.name ?? 'loading'}: ${error}`,
      });
  }
  say({ kind: 'played' });
}

process.on('message', (request: Request) => {
  void (request.kind === 'survey' ? survey(request.bundle, request.mutants) : play(request));
});
// Whoever asked is gone.
process.on('disconnect', () => process.exit());
