import { describe, expect, it } from 'vitest';
import * as z from 'zod';
import { numberFacts, schemaAt, wordsAt } from '@/components/ui/schema-facts';
import { policyShape, weightsShape } from '@/lib/schemas/case/policy';
import { prescriptionShape, slabShape } from '@/lib/schemas/case/prescription';
import { scannerLimitsShape, scannerShape } from '@/lib/schemas/case/scanner';
import { scannerFormSchema } from '@/lib/schemas/scanner';

const shapes = { scannerShape, scannerLimitsShape, prescriptionShape, slabShape, policyShape, weightsShape };
const numbers = Object.entries(shapes).flatMap(([shape, fields]) =>
  Object.entries(fields as Record<string, z.ZodType>)
    .filter(
      ([, schema]) => (schema instanceof z.ZodOptional ? schema.unwrap() : schema) instanceof z.ZodNumber,
    )
    .map(([key, schema]): [string, z.ZodType] => [`${shape}.${key}`, schema]),
);

it('there are numbers to look at', () => expect(numbers.length).toBeGreaterThan(60));

describe.each(numbers)('%s', (_name, schema) => {
  it('has words and a range, and the range is the one the schema enforces', () => {
    const facts = numberFacts(schema);
    expect(facts.text.length).toBeGreaterThan(2);
    expect(facts.min).toBeTypeOf('number');
    expect(facts.max).toBeTypeOf('number');
    expect(schema.safeParse(facts.min).success).toBe(true);
    expect(schema.safeParse(facts.max).success).toBe(true);
    expect(schema.safeParse(facts.min! - 1).success).toBe(false);
    expect(schema.safeParse(facts.max! + 1).success).toBe(false);
    expect(schema.safeParse(facts.min! + (facts.max! - facts.min!) / Math.PI).success).toBe(!facts.whole);
    expect(schema.safeParse(undefined).success).toBe(facts.optional);
  });
});

it('finds a field by its path through tuples and alternatives', () => {
  expect(numberFacts(schemaAt(scannerFormSchema, ['scanner', 'limits', 'usableFovMm', '2'])!)).toMatchObject({
    unit: 'mm',
    min: 50,
  });
  expect(numberFacts(schemaAt(scannerFormSchema, ['scanner', 'lineStep', 'percent'])!).unit).toBe('%');
  expect(schemaAt(scannerFormSchema, ['scanner', 'no-such-field'])).toBeUndefined();
  expect(wordsAt(scannerFormSchema, ['scanner', 'fieldStrengthT'])).toBe('Field strength');
});
