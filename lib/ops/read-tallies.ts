import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';

/** What a test counted (tests/support/tally.ts). */
export interface Tally {
  readonly name: string;
  readonly cases: number;
  readonly note: string;
}

/**
 * One JSON line each, the last of a name counts: what is still running says how far it is under its own name. A line cut
 * short by a kill, or being written just now, is left out.
 */
export async function readTallies(folder: string): Promise<Tally[]> {
  const files = await readdir(folder).catch(() => [] as string[]);
  const texts = await Promise.all(files.map((name) => readFile(path.join(folder, name), 'utf8').catch(() => '')));
  const last = new Map<string, Tally>();
  for (const line of texts.join('').split('\n').filter(Boolean)) {
    try {
      const tally = JSON.parse(line) as Tally;
      last.set(tally.name, tally);
    } catch {
      continue;
    }
  }
  return [...last.values()].sort((a, b) => a.name.localeCompare(b.name));
}
