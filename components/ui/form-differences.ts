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
  if (value === undefined || value === null || value === '') return 'nothing';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return String(value).replace(/^-(?=\d)/, '\u2212');
}

const isPlace = (key: string | undefined): boolean => key !== undefined && /^\d+$/.test(key);

/** "sequences.1.trMs" → "sequence 2 · Repetition time": the place in each list, then the schema's own words. */
function wordsOf(schema: z.ZodType, path: readonly string[]): string {
  const places = path.flatMap((key, index) => {
    const list = path[index - 1];
    return isPlace(key) && index < path.length - 1 && list
      ? [`${list.replace(/s$/, '')} ${Number(key) + 1}`]
      : [];
  });
  const last = path.at(-1);
  // One number of a pair says little by itself: the pair's words, then which of the two.
  const words = isPlace(last)
    ? `${wordsAt(schema, path.slice(0, -1)) ?? path.at(-2)} (${Number(last) + 1})`
    : (wordsAt(schema, path) ?? last);
  return [...places, words].join(' · ');
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
