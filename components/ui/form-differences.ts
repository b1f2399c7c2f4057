import type * as z from 'zod';
import { wordsAt } from './schema-facts';

export interface Difference {
  readonly path: string;
  readonly words: string;
  readonly theirs: string;
  readonly mine: string;
}

function leaves(value: unknown, path: readonly string[] = []): [string[], unknown][] {
  if (value !== null && typeof value === 'object') {
    return Object.entries(value).flatMap(([key, inner]) => leaves(inner, [...path, key]));
  }
  return value === undefined ? [] : [[[...path], value]];
}

function shown(value: unknown): string {
  if (value === undefined || value === '') return 'nothing';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return String(value);
}

/** "sequences.1.trMs" → "2 · Repetition time": the place in each list, then the schema's own words. */
function wordsOf(schema: z.ZodType, path: readonly string[]): string {
  const places = path
    .slice(0, -1)
    .filter((key) => /^\d+$/.test(key))
    .map((key) => String(Number(key) + 1));
  return [...places, wordsAt(schema, path) ?? path.at(-1)].join(' · ');
}

/** Every field in which two forms differ, with the words people read beside it. */
export function formDifferences(schema: z.ZodType, theirs: unknown, mine: unknown): Difference[] {
  const a = new Map(leaves(theirs).map(([path, value]) => [path.join('.'), value]));
  const b = new Map(leaves(mine).map(([path, value]) => [path.join('.'), value]));
  return [...new Set([...a.keys(), ...b.keys()])]
    .filter((path) => !Object.is(a.get(path), b.get(path)))
    .map((path) => ({
      path,
      words: wordsOf(schema, path.split('.')),
      theirs: shown(a.get(path)),
      mine: shown(b.get(path)),
    }));
}
