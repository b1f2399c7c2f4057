import { createHash } from 'node:crypto';

/** JSON with sorted keys and without undefined: equal questions give equal text, however they were built. */
export function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value === 'object' && value !== null) {
    const entries = Object.entries(value).filter(([, each]) => each !== undefined);
    entries.sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0));
    return `{${entries.map(([key, each]) => `${JSON.stringify(key)}:${canonicalJson(each)}`).join(',')}}`;
  }
  return JSON.stringify(value) ?? 'null';
}

/** SHA-256 of a question, hexadecimal: two answers with one hash were asked the same. */
export function inputHash(question: unknown): string {
  return createHash('sha256').update(canonicalJson(question)).digest('hex');
}
