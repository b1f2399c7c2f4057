import type { ImportedQuantity } from '@/lib/domain/import/import-row';
import type { LengthUnit, MassUnit } from '@/lib/domain/import/units';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';

export const LOINC = 'http://loinc.org';
export const UCUM = 'http://unitsofmeasure.org';
export const SNOMED = 'http://snomed.info/sct';

export type ObservedQuantity = Extract<ImportedQuantity, 'height-cm' | 'weight-kg' | 'girth-cm'> | 'body-mass-index';

/**
 * Observations that are read; every other one is passed over. 8280-0 is taken at the umbilicus by its own name; 56086-2
 * and 56114-2 name protocols that put the tape at the iliac crest (LOINC's names from memory).
 */
export const OBSERVATIONS: Readonly<Record<string, { readonly quantity: ObservedQuantity; readonly tapeSite?: TapeSite }>> = {
  '8302-2': { quantity: 'height-cm' },
  '29463-7': { quantity: 'weight-kg' },
  '8280-0': { quantity: 'girth-cm', tapeSite: 'umbilicus' },
  '56086-2': { quantity: 'girth-cm', tapeSite: 'iliac-crest' },
  '56114-2': { quantity: 'girth-cm', tapeSite: 'iliac-crest' },
  '39156-5': { quantity: 'body-mass-index' },
};

/** UCUM codes of lengths and masses, each with ours and what one of it is. */
export const UCUM_LENGTHS: Readonly<Record<string, { readonly unit: LengthUnit; readonly times: number }>> = {
  mm: { unit: 'mm', times: 1 }, cm: { unit: 'cm', times: 1 }, m: { unit: 'cm', times: 100 },
  '[in_i]': { unit: 'in', times: 1 }, '[ft_i]': { unit: 'in', times: 12 },
};
export const UCUM_MASSES: Readonly<Record<string, { readonly unit: MassUnit; readonly times: number }>> = {
  kg: { unit: 'kg', times: 1 }, g: { unit: 'kg', times: 0.001 }, '[lb_av]': { unit: 'lb', times: 1 },
};

/** Where a body site given beside the code puts the tape instead (SNOMED CT, from memory). */
export const BODY_SITES: Readonly<Record<string, TapeSite>> = {
  '29850006': 'iliac-crest',
  '78067005': 'umbilicus',
  '29836001': 'hips',
};
