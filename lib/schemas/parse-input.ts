import { ServiceError } from '@/lib/domain/errors';
import type * as z from 'zod';

/** First message per field: one control shows one error. `''` is the form as a whole. */
export function fieldErrorsOf(error: z.ZodError): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) {
    const path = issue.path.map(String).join('.');
    fields[path] ??= issue.message;
  }
  return fields;
}

/** Half of a surrogate pair, or the character of code 0: no UTF-8 holds the one and no database text the other. */
const UNSTORABLE = /\p{Surrogate}|\0/u;

/** Where a text stands that cannot be stored; undefined: nowhere. */
function unstorablePath(value: unknown, path: readonly string[] = []): string | undefined {
  if (typeof value === 'string') return UNSTORABLE.test(value) ? path.join('.') : undefined;
  if (typeof value !== 'object' || value === null) return undefined;
  for (const [key, each] of Object.entries(value)) {
    const found = UNSTORABLE.test(key) ? path.join('.') : unstorablePath(each, [...path, key]);
    if (found !== undefined) return found;
  }
  return undefined;
}

/** Parses what came from outside, or ends in `invalid` with a message per field. */
export function parseInput<S extends z.ZodType>(schema: S, input: unknown): z.output<S> {
  const result = schema.safeParse(input);
  if (result.success) {
    const path = unstorablePath(result.data);
    if (path === undefined) return result.data;
    throw new ServiceError('invalid', { fields: { [path]: 'a character given that is no text (code 0, or half of a pair); allowed: any other' } });
  }
  throw new ServiceError('invalid', { fields: fieldErrorsOf(result.error) });
}
