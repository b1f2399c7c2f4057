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

/** Parses what came from outside, or ends in `invalid` with a message per field. */
export function parseInput<S extends z.ZodType>(schema: S, input: unknown): z.output<S> {
  const result = schema.safeParse(input);
  if (result.success) return result.data;
  throw new ServiceError('invalid', { fields: fieldErrorsOf(result.error) });
}
