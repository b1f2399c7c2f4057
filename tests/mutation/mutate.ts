import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { seededNumbers } from '@/tests/support/seeded-numbers';
import { bundleTests, instrumentPhysics, ROOT, type Bundle } from './bundle-tests';
import { EQUIVALENT } from './equivalent';
import type { Mutant } from './find-mutants';
import type { Answer, SurveyedTest } from './play-mutants';
import { COUNTS, Player } from './player';

type Outcome = 'killed' | 'survived' | 'not reached' | 'equivalent';

interface Result extends Mutant {
  readonly outcome: Outcome;
  /** The test that failed, or how the run ended; for an equivalent mutant the reason. */
  readonly by?: string;
}

type Surveyed = Extract<Answer, { kind: 'surveyed' }>;

interface PlayableTest {
  readonly bundle: string;
  readonly test: number;
  readonly ms: number;
  readonly loadMs: number;
}

const { values: options } = parseArgs({
  options: {
    sample: { type: 'string' },
    seed: { type: 'string', default: '1' },
    file: { type: 'string', multiple: true },
    budget: { type: 'string', default: '10' },
    survivors: { type: 'boolean', default: false },
    out: { type: 'string', default: '.data/mutation.json' },
  },
});

const OUT = path.resolve(ROOT, options.out);
const keyOf = ({ file, code, mutated }: Pick<Mutant, 'file' | 'code' | 'mutated'>): string =>
  JSON.stringify([file, code, mutated]);
const equivalentReason = new Map(EQUIVALENT.map((entry) => [keyOf(entry), entry.reason]));

/** The mutants asked for: of some files, of the last run's survivors, a seeded sample, or all. */
function choose(mutants: readonly Mutant[]): Mutant[] {
  let chosen = [...mutants];
  if (options.file) chosen = chosen.filter(({ file }) => options.file!.some((part) => file.includes(part)));
  if (options.survivors) {
    const last = JSON.parse(readFileSync(OUT, 'utf8')) as { results: Result[] };
    const survived = new Set(
      last.results.filter(({ outcome }) => outcome === 'survived' || outcome === 'not reached').map(keyOf),
    );
    chosen = chosen.filter((mutant) => survived.has(keyOf(mutant)));
  }
  if (options.sample !== undefined) {
    const next = seededNumbers(Number(options.seed));
    const drawn = chosen.map((mutant) => ({ mutant, at: next() })).sort((a, b) => a.at - b.at);
    chosen = drawn.slice(0, Number(options.sample)).map(({ mutant }) => mutant);
  }
  return chosen.sort((a, b) => a.id - b.id);
}

/** What is known of a bundle's tests; asked again only when the bundle is another one. */
async function survey(player: Player, bundle: string, mutants: number): Promise<Surveyed | undefined> {
  const hash = createHash('sha256')
    .update(readFileSync(bundle))
    .update(JSON.stringify(COUNTS))
    .digest('hex')
    .slice(0, 24);
  const kept = path.join(path.dirname(OUT), 'mutation-survey', `${hash}.json`);
  if (existsSync(kept)) return JSON.parse(readFileSync(kept, 'utf8')) as Surveyed;
  const answer = await player.ask({ kind: 'survey', bundle, mutants }, 900_000);
  if (answer === 'hung' || answer === 'died' || answer.kind !== 'surveyed') return undefined;
  mkdirSync(path.dirname(kept), { recursive: true });
  writeFileSync(kept, JSON.stringify(answer));
  return answer;
}

/** Which tests reach each mutant, quickest first. Tests that fail without any mutant are left out and named. */
async function surveyTests(
  player: Player,
  bundles: readonly Bundle[],
  mutants: number,
): Promise<PlayableTest[][]> {
  const reaching: PlayableTest[][] = Array.from({ length: mutants }, () => []);
  for (const { testFile, bundle } of bundles) {
    const answer = await survey(player, bundle, mutants);
    if (answer === undefined) {
      console.log(`left out: ${testFile}: it hangs, or ends the process`);
      continue;
    }
    answer.tests.forEach((test: SurveyedTest, index) => {
      if (test.error !== undefined) return console.log(`left out: ${testFile}: ${test.name}: ${test.error}`);
      for (const id of test.hits)
        reaching[id]!.push({ bundle, test: index, ms: test.ms, loadMs: answer.loadMs });
    });
  }
  for (const tests of reaching) tests.sort((a, b) => a.ms + a.loadMs - b.ms - b.loadMs);
  return reaching;
}

/** The quickest tests that fit the budget; at least one. */
function planOf(tests: readonly PlayableTest[], budgetMs: number) {
  const plan: { bundle: string; test: number; allowedMs: number }[] = [];
  const loaded = new Set<string>();
  let spent = 0;
  for (const { bundle, test, ms, loadMs } of tests) {
    const more = ms + (loaded.has(bundle) ? 0 : loadMs);
    if (spent > 0 && spent + more > budgetMs) continue;
    spent += more;
    loaded.add(bundle);
    // Slow machines and detours are given room; an endless loop is given up.
    plan.push({ bundle, test, allowedMs: 8 * (ms + loadMs) + 4000 });
  }
  return plan;
}

async function playAll(
  player: Player,
  chosen: readonly Mutant[],
  reaching: readonly PlayableTest[][],
): Promise<Result[]> {
  const results: Result[] = [];
  const budgetMs = Number(options.budget) * 1000;
  const begun = Date.now();
  for (const mutant of chosen) {
    results.push(await playOne(player, mutant, reaching[mutant.id]!, budgetMs));
    if (results.length % 100 === 0) {
      const left = results.filter(
        ({ outcome }) => outcome === 'survived' || outcome === 'not reached',
      ).length;
      console.log(
        `${results.length} of ${chosen.length}, ${left} survive, ${Math.round((Date.now() - begun) / 1000)} s`,
      );
    }
  }
  return results;
}

async function playOne(
  player: Player,
  mutant: Mutant,
  tests: readonly PlayableTest[],
  budgetMs: number,
): Promise<Result> {
  const reason = equivalentReason.get(keyOf(mutant));
  if (tests.length === 0) return { ...mutant, outcome: 'not reached' };
  const answer = await player.ask({ kind: 'play', id: mutant.id, tests: planOf(tests, budgetMs) }, 60_000);
  if (answer === 'hung' || answer === 'died') return { ...mutant, outcome: 'killed', by: answer };
  if (answer.kind === 'played' && answer.killedBy !== undefined)
    return { ...mutant, outcome: 'killed', by: answer.killedBy };
  return reason === undefined
    ? { ...mutant, outcome: 'survived' }
    : { ...mutant, outcome: 'equivalent', by: reason };
}

function report(results: readonly Result[], all: readonly Mutant[]): void {
  const files = [...new Set(results.map(({ file }) => file))];
  const row = (name: string, of: readonly Result[]) => {
    const counted = of.filter(({ outcome }) => outcome !== 'equivalent');
    const killed = counted.filter(({ outcome }) => outcome === 'killed').length;
    const share = counted.length === 0 ? '' : `${((100 * killed) / counted.length).toFixed(1)} %`;
    console.log(
      `${name.padEnd(52)} ${String(killed).padStart(5)} of ${String(counted.length).padStart(5)} ${share.padStart(8)} ${String(of.length - counted.length).padStart(4)} equivalent`,
    );
  };
  console.log('\nSurvivors:');
  for (const { file, line, code, mutated, outcome } of results) {
    if (outcome === 'survived' || outcome === 'not reached')
      console.log(
        `  ${file}:${line}  ${code}  →  ${mutated}${outcome === 'not reached' ? '  (not reached)' : ''}`,
      );
  }
  console.log();
  for (const file of files)
    row(
      file,
      results.filter((result) => result.file === file),
    );
  row('all', results);
  const present = new Set(all.map(keyOf));
  for (const entry of EQUIVALENT)
    if (!present.has(keyOf(entry)))
      console.log(`equivalent.ts names what is not there: ${entry.file}: ${entry.code} → ${entry.mutated}`);
  const killed = results.filter(
    (result) => result.outcome === 'killed' && equivalentReason.has(keyOf(result)),
  );
  for (const { file, line, code, mutated, by } of killed)
    console.log(`called equivalent, yet killed: ${file}:${line} ${code} → ${mutated} by ${by}`);
}

const began = Date.now();
const at = () => `${Math.round((Date.now() - began) / 1000)} s`;
const { mutants, codeOf } = instrumentPhysics();
const { folder, bundles } = await bundleTests(codeOf);
const player = new Player(ROOT);
try {
  console.log(`${mutants.length} mutants in ${codeOf.size} files, ${bundles.length} test files (${at()})`);
  const reaching = await surveyTests(player, bundles, mutants.length);
  console.log(`tests surveyed (${at()})`);
  const results = await playAll(player, choose(mutants), reaching);
  report(results, mutants);
  mkdirSync(path.dirname(OUT), { recursive: true });
  writeFileSync(
    OUT,
    JSON.stringify({ at: new Date().toISOString(), sample: options.sample ?? 'all', results }, null, 1),
  );
} finally {
  player.stop();
  await rm(folder, { recursive: true, force: true });
}
