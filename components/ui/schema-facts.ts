import type * as z from 'zod';

export interface NumberFacts {
  readonly text: string;
  readonly unit?: string;
  readonly min?: number;
  readonly max?: number;
  readonly whole: boolean;
  readonly optional: boolean;
}

/** Units as they are printed beside a number; a plain ratio has none. */
const PRINTED: Record<string, string | undefined> = { percent: '%', degrees: '°', '1': undefined };

function unwrap(schema: z.ZodType): { inner: z.ZodType; optional: boolean } {
  let inner = schema;
  let optional = false;
  while (['optional', 'nullable', 'default'].includes(inner.def.type)) {
    if (inner.def.type !== 'default') optional = true;
    inner = (inner.def as unknown as { innerType: z.ZodType }).innerType;
  }
  return { inner, optional };
}

/** Label, unit and limits of a number, from the schema that will judge it: the form and the server cannot disagree. */
export function numberFacts(schema: z.ZodType): NumberFacts {
  const { inner, optional } = unwrap(schema);
  const number = inner as z.ZodNumber;
  const [, text = '', unit = '1'] = /^(.*?) \[([^\]]+)\]/.exec(inner.description ?? '') ?? [];
  return {
    text,
    unit: unit in PRINTED ? PRINTED[unit] : unit,
    min: finite(number.minValue),
    max: finite(number.maxValue),
    whole: inner.def.type === 'number' && (number.format === 'safeint' || number.isInt === true),
    optional,
  };
}

function finite(value: number | null | undefined): number | undefined {
  return typeof value === 'number' && Math.abs(value) < Number.MAX_SAFE_INTEGER ? value : undefined;
}

/** The schema at a path such as ['limits', 'usableFovMm', '0']; undefined where there is none. */
export function schemaAt(schema: z.ZodType, path: readonly string[]): z.ZodType | undefined {
  let at: z.ZodType | undefined = schema;
  for (const key of path) {
    if (!at) return undefined;
    const { inner } = unwrap(at);
    const def = inner.def as unknown as {
      shape?: Record<string, z.ZodType>;
      element?: z.ZodType;
      items?: z.ZodType[];
      options?: z.ZodType[];
    };
    at =
      def.shape?.[key] ??
      def.items?.[Number(key)] ??
      def.element ??
      def.options?.map((option) => schemaAt(option, [key])).find((found) => found !== undefined);
  }
  return at;
}

/** Words for a field: its description without unit and range. */
export function wordsAt(schema: z.ZodType, path: readonly string[]): string | undefined {
  const found = schemaAt(schema, path);
  if (!found) return undefined;
  const described = found.description ?? unwrap(found).inner.description;
  return described?.replace(/ \[[^\]]+\].*$/, '').replace(/\.$/, '');
}
