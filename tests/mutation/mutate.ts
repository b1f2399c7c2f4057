import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { availableParallelism } from 'node:os';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { seededNumbers } from '@/tests/support/seeded-numbers';
import { bundleTests, instrumentPhysics, ROOT, sourceText, type Bundle } from './bundle-tests';
import type { Mutant } from './find-mutants';
import { KillOrder, type PlayableTest } from './kill-order';
import type { Answer } from './play-mutants';
import { COUNTS, Player } from './player';
import { equivalentReason, folderOf, isLeft, keyOf, printReport, scoresOf, type Result } from './report';

type Surveyed = Extract<Answer, { kind: 'surveyed' }>;

interface Options {
  readonly sample?: number;
  readonly seed: number;
  readonly files: readonly string[];
  readonly leastPerFolder: number;
  readonly players: number;
  readonly budgetMs: number;
  readonly resume: boolean;
  readonly again: boolean;
  readonly out: string;
}

function readOptions(args: readonly string[]): Options {
  const { values } = parseArgs({
    args: [...args],
    options: {
      sample: { type: 'string' },
      seed: { type: 'string', default: '1' },
      least: { type: 'string', default: '0' },
      players: { type: 'string', default: String(Math.min(2, availableParallelism())) },
      file: { type: 'string', multiple: true, default: [] },
      budget: { type: 'string', default: '10' },
      resume: { type: 'boolean', default: false },
      again: { type: 'boolean', default: false },
      out: { type: 'string', default: '.data/mutation.json' },
    },
  });
  return {
    ...(values.sample === undefined ? {} : { sample: Number(values.sample) }),
    seed: Number(values.seed),
    leastPerFolder: Number(values.least),
    players: Number(values.players),
    files: values.file,
    budgetMs: Number(values.budget) * 1000,
    resume: values.resume,
    again: values.again,
    out: path.resolve(ROOT, values.out),
  };
}

const hashOf = (text: string): string => createHash('sha256').update(text).digest('hex').slice(0, 24);

function lastResults({ out }: Options): readonly Result[] {
  if (!existsSync(out)) return [];
  return (JSON.parse(readFileSync(out, 'utf8')) as { results: Result[] }).results;
}

/** The mutants asked for: of some files, a seeded sample of them with so many of each folder at least, or all. */
function choose(mutants: readonly Mutant[], options: Options): Mutant[] {
  const { files, sample, seed, leastPerFolder } = options;
  if (options.again) {
    const left = new Set(lastResults(options).filter(isLeft).map(keyOf));
    return mutants.filter((mutant) => left.has(keyOf(mutant)));
  }
  const chosen = mutants.filter(
    ({ file }) => files.length === 0 || files.some((part) => file.includes(part)),
  );
  if (sample === undefined) return chosen;
  const next = seededNumbers(seed);
  const drawn = chosen
    .map((mutant) => ({ mutant, at: next() }))
    .sort((a, b) => a.at - b.at)
    .map(({ mutant }) => mutant);
  const taken = new Map<string, number>();
  const kept = drawn.flatMap((mutant, rank) => {
    const folder = folderOf(mutant);
    const before = taken.get(folder) ?? 0;
    if (rank >= sample && before >= leastPerFolder) return [];
    taken.set(folder, before + 1);
    return [{ mutant, folder, before }];
  });
  // Folders in step, so that a run cut short speaks for all of them.
  return kept
    .sort((a, b) => a.before / taken.get(a.folder)! - b.before / taken.get(b.folder)!)
    .map(({ mutant }) => mutant);
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
  players: readonly Player[],
  bundles: readonly Bundle[],
  mutants: number,
  out: string,
): Promise<PlayableTest[][]> {
  const reaching: PlayableTest[][] = Array.from({ length: mutants }, () => []);
  let next = 0;
  const work = async (player: Player) => {
    while (next < bundles.length) {
      const { testFile, bundle } = bundles[next++]!;
      const answer = await survey(player, bundle, mutants, out);
      if (answer === undefined) {
        console.log(`left out: ${testFile}: it hangs, or ends the process`);
        continue;
      }
      answer.tests.forEach((test, index) => {
        if (test.error !== undefined)
          return console.log(`left out: ${testFile}: ${test.name}: ${test.error}`);
        const { loadMs } = answer;
        for (const id of test.hits) reaching[id]!.push({ bundle, test: index, ms: test.ms, loadMs });
      });
    }
  };
  await Promise.all(players.map(work));
  for (const tests of reaching) tests.sort((a, b) => a.ms + a.loadMs - b.ms - b.loadMs);
  return reaching;
}

async function playOne(
  player: Player,
  mutant: Mutant,
  tests: readonly PlayableTest[],
  order: KillOrder,
  budgetMs: number,
): Promise<Result> {
  const from = hashOf(sourceText(mutant.file));
  if (tests.length === 0) return { ...mutant, from, outcome: 'not reached' };
  const plan = order.plan(mutant, tests, budgetMs);
  const answer = await player.ask({ kind: 'play', id: mutant.id, tests: plan }, 20_000);
  if (answer === 'hung' || answer === 'died') return { ...mutant, from, outcome: 'killed', by: answer };
  if (answer.kind !== 'played') throw new Error('a player was asked to play and surveyed');
  order.note(mutant, plan, answer.killer);
  if (answer.killedBy !== undefined) return { ...mutant, from, outcome: 'killed', by: answer.killedBy };
  const reason = equivalentReason(mutant);
  if (reason !== undefined) return { ...mutant, from, outcome: 'equivalent', by: reason };
  const unplayed = tests.length - plan.length;
  return {
    ...mutant,
    from,
    outcome: 'survived',
    by: `passes ${plan.length} tests that reach it${unplayed === 0 ? '' : `, ${unplayed} slow ones not played`}`,
  };
}

/** The last run's killed mutants of files that are still the same. */
function killedBefore(options: Options): Map<string, Result> {
  if (!options.resume) return new Map();
  const same = lastResults(options).filter(
    ({ outcome, file, from }) => outcome === 'killed' && from === hashOf(sourceText(file)),
  );
  return new Map(same.map((result) => [keyOf(result), result]));
}

/**
 * `npm run mutate`: changes one sign, limit, constant or connective of lib/physics after another and runs the tests that
 * reach it; what no test notices is listed. --sample N --seed S draws some, --least N of each folder at least; --file PART
 * takes some files; --resume takes over what the last run killed; --again plays what it left, and nothing else;
 * --budget S is the most processor time a mutant may cost; --players N processes play side by side.
 */
export async function mutate(args: readonly string[]): Promise<void> {
  const options = readOptions(args);
  const began = Date.now();
  const at = () => `${Math.round((Date.now() - began) / 1000)} s`;
  const { mutants, codeOf } = instrumentPhysics();
  const { folder, bundles } = await bundleTests(codeOf);
  const players = Array.from({ length: options.players }, () => new Player(ROOT));
  const done: (Result | undefined)[] = [];
  const finished = () => done.filter((result) => result !== undefined);
  const keep = () => {
    const { sample, seed, leastPerFolder } = options;
    if (options.again) return;
    const results = finished();
    mkdirSync(path.dirname(options.out), { recursive: true });
    writeFileSync(
      options.out,
      JSON.stringify(
        {
          at: new Date().toISOString(),
          sample: sample === undefined ? 'all' : { of: mutants.length, sample, seed, leastPerFolder },
          scores: scoresOf(results, mutants),
          results,
        },
        null,
        1,
      ),
    );
  };
  try {
    console.log(`${mutants.length} mutants in ${codeOf.size} files, ${bundles.length} test files (${at()})`);
    const reaching = await surveyTests(players, bundles, mutants.length, options.out);
    console.log(`tests surveyed (${at()})`);
    const before = killedBefore(options);
    const chosen = choose(mutants, options);
    const order = new KillOrder();
    let next = 0;
    const work = async (player: Player) => {
      while (next < chosen.length) {
        const index = next++;
        const mutant = chosen[index]!;
        done[index] =
          before.get(keyOf(mutant)) ??
          (await playOne(player, mutant, reaching[mutant.id]!, order, options.budgetMs));
        const results = finished();
        if (results.length % 50 !== 0) continue;
        console.log(
          `${results.length} of ${chosen.length}, ${results.filter(isLeft).length} survive (${at()})`,
        );
        keep();
      }
    };
    await Promise.all(players.map(work));
    keep();
    printReport(finished(), mutants);
  } finally {
    for (const player of players) player.stop();
    await rm(folder, { recursive: true, force: true });
  }
}
