import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { seededNumbers } from '@/tests/support/seeded-numbers';
import { bundleTests, instrumentPhysics, ROOT, sourceText, type Bundle } from './bundle-tests';
import type { Mutant } from './find-mutants';
import type { Answer } from './play-mutants';
import { COUNTS, Player } from './player';
import { equivalentReason, isLeft, keyOf, printReport, type Result } from './report';

type Surveyed = Extract<Answer, { kind: 'surveyed' }>;

interface PlayableTest {
  readonly bundle: string;
  readonly test: number;
  readonly ms: number;
  readonly loadMs: number;
}

interface Options {
  readonly sample?: number;
  readonly seed: number;
  readonly files: readonly string[];
  readonly budgetMs: number;
  readonly resume: boolean;
  readonly out: string;
}

function readOptions(args: readonly string[]): Options {
  const { values } = parseArgs({
    args: [...args],
    options: {
      sample: { type: 'string' },
      seed: { type: 'string', default: '1' },
      file: { type: 'string', multiple: true, default: [] },
      budget: { type: 'string', default: '10' },
      resume: { type: 'boolean', default: false },
      out: { type: 'string', default: '.data/mutation.json' },
    },
  });
  return {
    ...(values.sample === undefined ? {} : { sample: Number(values.sample) }),
    seed: Number(values.seed),
    files: values.file,
    budgetMs: Number(values.budget) * 1000,
    resume: values.resume,
    out: path.resolve(ROOT, values.out),
  };
}

const hashOf = (text: string): string => createHash('sha256').update(text).digest('hex').slice(0, 24);

/** The mutants asked for: of some files, a seeded sample of them, or all. */
function choose(mutants: readonly Mutant[], { files, sample, seed }: Options): Mutant[] {
  const chosen = mutants.filter(
    ({ file }) => files.length === 0 || files.some((part) => file.includes(part)),
  );
  if (sample === undefined) return chosen;
  const next = seededNumbers(seed);
  const drawn = chosen.map((mutant) => ({ mutant, at: next() })).sort((a, b) => a.at - b.at);
  return drawn
    .slice(0, sample)
    .map(({ mutant }) => mutant)
    .sort((a, b) => a.id - b.id);
}

/** What is known of a bundle's tests; asked again only when the bundle is another one. */
async function survey(
  player: Player,
  bundle: string,
  mutants: number,
  out: string,
): Promise<Surveyed | undefined> {
  const kept = path.join(
    path.dirname(out),
    'mutation-survey',
    `${hashOf(readFileSync(bundle, 'utf8') + JSON.stringify(COUNTS))}.json`,
  );
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
  out: string,
): Promise<PlayableTest[][]> {
  const reaching: PlayableTest[][] = Array.from({ length: mutants }, () => []);
  for (const { testFile, bundle } of bundles) {
    const answer = await survey(player, bundle, mutants, out);
    if (answer === undefined) {
      console.log(`left out: ${testFile}: it hangs, or ends the process`);
      continue;
    }
    answer.tests.forEach((test, index) => {
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
    plan.push({ bundle, test, allowedMs: 20 * (ms + loadMs) + 8000 });
  }
  return plan;
}

async function playOne(
  player: Player,
  mutant: Mutant,
  tests: readonly PlayableTest[],
  budgetMs: number,
): Promise<Result> {
  const from = hashOf(sourceText(mutant.file));
  if (tests.length === 0) return { ...mutant, from, outcome: 'not reached' };
  const answer = await player.ask({ kind: 'play', id: mutant.id, tests: planOf(tests, budgetMs) }, 60_000);
  if (answer === 'hung' || answer === 'died') return { ...mutant, from, outcome: 'killed', by: answer };
  if (answer.kind === 'played' && answer.killedBy !== undefined)
    return { ...mutant, from, outcome: 'killed', by: answer.killedBy };
  const reason = equivalentReason(mutant);
  return reason === undefined
    ? { ...mutant, from, outcome: 'survived' }
    : { ...mutant, from, outcome: 'equivalent', by: reason };
}

/** The last run's killed mutants of files that are still the same. */
function killedBefore({ resume, out }: Options): Map<string, Result> {
  if (!resume || !existsSync(out)) return new Map();
  const { results } = JSON.parse(readFileSync(out, 'utf8')) as { results: Result[] };
  const same = results.filter(
    ({ outcome, file, from }) => outcome === 'killed' && from === hashOf(sourceText(file)),
  );
  return new Map(same.map((result) => [keyOf(result), result]));
}

/**
 * `npm run mutate`: changes one sign, limit, constant or connective of lib/physics after another and runs the tests that
 * reach it; what no test notices is listed. --sample N --seed S draws some; --file PART takes some files; --resume plays
 * only what the last run left; --budget S is the most
 * processor time a mutant may cost.
 */
export async function mutate(args: readonly string[]): Promise<void> {
  const options = readOptions(args);
  const began = Date.now();
  const at = () => `${Math.round((Date.now() - began) / 1000)} s`;
  const { mutants, codeOf } = instrumentPhysics();
  const { folder, bundles } = await bundleTests(codeOf);
  const player = new Player(ROOT);
  const results: Result[] = [];
  const keep = () => {
    mkdirSync(path.dirname(options.out), { recursive: true });
    writeFileSync(
      options.out,
      JSON.stringify({ at: new Date().toISOString(), sample: options.sample ?? 'all', results }, null, 1),
    );
  };
  try {
    console.log(`${mutants.length} mutants in ${codeOf.size} files, ${bundles.length} test files (${at()})`);
    const reaching = await surveyTests(player, bundles, mutants.length, options.out);
    console.log(`tests surveyed (${at()})`);
    const before = killedBefore(options);
    const chosen = choose(mutants, options);
    for (const mutant of chosen) {
      const known = before.get(keyOf(mutant));
      results.push(known ?? (await playOne(player, mutant, reaching[mutant.id]!, options.budgetMs)));
      if (results.length % 200 !== 0) continue;
      console.log(
        `${results.length} of ${chosen.length}, ${results.filter(isLeft).length} survive (${at()})`,
      );
      keep();
    }
    keep();
    printReport(results, mutants);
  } finally {
    player.stop();
    await rm(folder, { recursive: true, force: true });
  }
}
