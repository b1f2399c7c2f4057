import '@/lib/schemas/fields/jitless';
import * as z from 'zod';

/** Unit of a number as people read it; '1' is a plain ratio. */
export type FieldUnit =
  | 'mm' | 'cm' | 'kg' | 's' | 'ms' | 'degrees' | 'percent' | 'T' | 'Hz' | '1' | 'lines' | 'partitions'
  | 'days' | 'points' | 'minutes';

interface NumberField {
  readonly min: number;
  readonly max: number;
  readonly unit: FieldUnit;
  readonly text: string;
}

function shown(value: unknown): string {
  const text = typeof value === 'string' ? `“${value}”` : JSON.stringify(value) ?? String(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}

/** Every message names what was given and what is allowed. */
function refused(allowed: string) {
  return (issue: { readonly input?: unknown }): string =>
    issue.input === undefined || issue.input === '' ? `nothing given; allowed: ${allowed}` : `${shown(issue.input)} given; allowed: ${allowed}`;
}

function span(field: NumberField): string {
  const unit = field.unit === '1' ? '' : ` ${field.unit}`;
  return `${field.min} to ${field.max}${unit}`;
}

/** A real number with its unit and allowed range, both in the description and in every refusal. */
export function quantity(field: NumberField) {
  const error = refused(`a number, ${span(field)}`);
  return z
    .number({ error })
    .min(field.min, { error })
    .max(field.max, { error })
    .describe(`${field.text} [${field.unit}], ${span(field)}.`);
}

/** A whole number with its allowed range. */
export function count(field: Omit<NumberField, 'unit'> & { readonly unit?: FieldUnit }) {
  const whole = { unit: '1' as const, ...field };
  const error = refused(`a whole number, ${span(whole)}`);
  return z
    .int({ error })
    .min(whole.min, { error })
    .max(whole.max, { error })
    .describe(`${whole.text} [${whole.unit}], whole, ${span(whole)}.`);
}

/** One of a closed list of words. */
export function choice<const T extends readonly [string, ...string[]]>(values: T, text: string) {
  return z.enum(values, { error: refused(`one of ${values.join(', ')}`) }).describe(text);
}

/** Yes or no. */
export function flag(text: string) {
  return z.boolean({ error: refused('true or false') }).describe(text);
}

/** A short line of text, 1 to `max` characters, no control characters. */
export function words(max: number, text: string) {
  const error = refused(`text of 1 to ${max} characters`);
  return z
    .string({ error })
    .trim()
    .min(1, { error })
    .max(max, { error })
    .regex(/^[^\p{Cc}]*$/u, { error: refused('text without control characters') })
    .describe(text);
}

/** An ISO 8601 calendar day. */
export function day(text: string) {
  return z.iso.date({ error: refused('a day written YYYY-MM-DD') }).describe(text);
}

/** Bookings of a year beyond are a slip of the keyboard; far beyond, no database takes them. */
const YEARS = { first: 2000, last: 2199 } as const;

/** An ISO 8601 moment with its offset, in a year a booking can be in. */
export function moment(text: string) {
  const error = refused(`a moment with its offset, such as 2026-12-01T10:40:00+01:00, in the years ${YEARS.first} to ${YEARS.last}`);
  return z.iso
    .datetime({ offset: true, error })
    .refine((written) => Number(written.slice(0, 4)) >= YEARS.first && Number(written.slice(0, 4)) <= YEARS.last, { error })
    .describe(text);
}

/** An object that refuses keys it does not know, naming them and the keys it takes. */
export function strict<const S extends z.ZodRawShape>(shape: S, text?: string) {
  const keys = Object.keys(shape);
  const schema = z.strictObject(shape, {
    error: (issue) => {
      if (issue.code === 'unrecognized_keys') {
        return `not known here: ${issue.keys.join(', ')}; allowed: ${keys.join(', ')}`;
      }
      if (issue.code === 'invalid_type') return refused(`an object with ${keys.join(', ')}`)(issue);
      return undefined;
    },
  });
  return text === undefined ? schema : schema.describe(text);
}

/** [low, high], low ≤ high. */
export function range(low: NumberField, text: string) {
  return z
    .tuple([quantity(low), quantity(low)], { error: refused(`two numbers, low then high, ${span(low)}`) })
    .refine(([from, to]) => from <= to, { error: refused('two numbers, low then high') })
    .describe(text);
}

export { refused };
