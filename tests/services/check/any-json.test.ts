import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ServiceError } from '@/lib/domain/errors';
import { CHECK_EXAMPLES } from '@/lib/schemas/openapi/examples';
import { checkCase } from '@/lib/services/check/check-case';
import { parseCase } from '@/lib/schemas/case';

type Path = readonly (string | number)[];

/** Every place in a JSON value. */
function places(value: unknown, path: Path = []): Path[] {
  if (typeof value !== 'object' || value === null) return [path];
  return [path, ...Object.entries(value).flatMap(([key, each]) => places(each, [...path, Array.isArray(value) ? Number(key) : key]))];
}

function put(value: unknown, [key, ...rest]: Path, change: unknown): unknown {
  if (key === undefined) return change;
  if (Array.isArray(value)) return value.map((each, index) => (index === key ? put(each, rest, change) : each));
  const object = value as Record<string, unknown>;
  return { ...object, [key]: put(object[key], rest, change) };
}

/** What hands and programs get wrong: other types, other orders of magnitude, the ends of ranges, nothing. */
const slips = fc.oneof(
  fc.constantFrom<unknown>(null, '', 'NaN', true, [], {}, 0, -0, -1, 0.5, 1, 2, 1e-9, 1e9, 1e308, -1e308, 4096, 60_000),
  fc.double({ noNaN: true, noDefaultInfinity: true, min: -2000, max: 2000 }),
  fc.integer({ min: 0, max: 600 }),
  fc.jsonValue({ maxDepth: 2 }),
);

describe('any JSON at all', () => {
  it('is answered, or refused with words for each field; it never fails otherwise', () => {
    const cases = Object.values(CHECK_EXAMPLES).flatMap(({ value }) => [value as unknown, parseCase(value) as unknown]);
    const changed = fc.constantFrom(...cases).chain((example) => fc.tuple(fc.constant(example), fc.constantFrom(...places(example)), slips));
    let answered = 0;
    let refused = 0;
    fc.assert(
      fc.property(changed, ([example, path, slip]) => {
        const json = JSON.parse(JSON.stringify(put(example, path, slip)) ?? 'null');
        try {
          expect(checkCase(json).inputHash).toMatch(/^[0-9a-f]{64}$/);
          answered += 1;
        } catch (error) {
          if (!(error instanceof ServiceError)) throw error;
          expect(error.code).toBe('invalid');
          expect(Object.values(error.fields!).every((text) => text.length > 0)).toBe(true);
          refused += 1;
        }
      }),
      { seed: 20260504, numRuns: 400 },
    );
    // Both happen often, or the slips are the wrong ones.
    expect(answered).toBeGreaterThan(40);
    expect(refused).toBeGreaterThan(40);
  });
});
