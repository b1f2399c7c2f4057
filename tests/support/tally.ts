import { appendFileSync, mkdirSync } from 'node:fs';
import path from 'node:path';

/** Tells the long run how many cases a test really tried, for its table. Silent in the short run. */
export function tally(name: string, cases: number, note = ''): void {
  const folder = process.env.SELVEDGE_TALLIES;
  if (!folder) return;
  mkdirSync(folder, { recursive: true });
  appendFileSync(path.join(folder, `${process.pid}.jsonl`), `${JSON.stringify({ name, cases, note })}\n`);
}

/** Time a test of many cases may take: it is the machine's load that decides, and nobody waits for the long run. */
export const NO_HURRY_MS = 12 * 3600_000;

/**
 * How far a long count is, now and then; the count itself follows under the same name. Gives way to the runner, which
 * takes a worker that does not answer for minutes for dead.
 */
export async function progress(name: string, done: number, of: number, every = 250): Promise<void> {
  if (done % every !== 0) return;
  tally(name, done, `of ${of} so far, none differs`);
  await new Promise((resolve) => setImmediate(resolve));
}

/** How many cases to try: the short count here, more when the variable asks for it. */
export function countOf(variable: string, short: number): number {
  const asked = process.env[variable];
  if (asked === undefined || asked === '') return short;
  const count = Number(asked);
  if (!Number.isInteger(count) || count < 1) throw new Error(`${variable} is "${asked}"; allowed is a whole number from 1.`);
  return count;
}

/** Runs of a property: at least the short count, more when SELVEDGE_PROPERTY_RUNS asks for it. */
export const runsOf = (short: number): number => Math.max(short, countOf('SELVEDGE_PROPERTY_RUNS', short));
