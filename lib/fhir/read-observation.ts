import type { ImportedReading } from '@/lib/domain/import/import-row';
import { toCm, toKg } from '@/lib/domain/import/units';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import { BODY_SITES, LOINC, OBSERVATIONS, type ObservedQuantity, SNOMED, UCUM, UCUM_LENGTHS, UCUM_MASSES } from './codes';
import { asObject, asText, codingsOf, type Json } from './values';

/** A size as a bundle gives it; a body mass index is only a way to a weight. */
export interface Observed {
  readonly quantity: ObservedQuantity;
  readonly value: number;
  readonly takenOn?: string;
  readonly tapeSite?: ImportedReading['tapeSite'];
}

const FINAL = new Set(['final', 'amended', 'corrected']);

function valueOf(quantity: ObservedQuantity, { value, code, system }: Json): number | undefined {
  if (typeof value !== 'number' || !Number.isFinite(value) || asText(system) !== UCUM) return undefined;
  const unit = asText(code);
  if (quantity === 'body-mass-index') return unit === 'kg/m2' && value > 5 && value < 150 ? value : undefined;
  const known = quantity === 'weight-kg' ? UCUM_MASSES : UCUM_LENGTHS;
  if (!Object.hasOwn(known, unit)) return undefined;
  const converted = quantity === 'weight-kg'
    ? toKg(value * UCUM_MASSES[unit]!.times, UCUM_MASSES[unit]!.unit)
    : toCm(value * UCUM_LENGTHS[unit]!.times, UCUM_LENGTHS[unit]!.unit);
  const { min, max } = QUANTITY_FACTS[quantity];
  return converted >= min && converted <= max ? converted : undefined;
}

/** The day of an observation: its own, in the offset it was written with. */
function dayOf({ effectiveDateTime, effectivePeriod }: Json): string | undefined {
  const text = asText(effectiveDateTime) || asText(asObject(effectivePeriod).start);
  const day = /^(\d{4}-\d{2}-\d{2})(?:T|$)/.exec(text)?.[1];
  return day && Number.isFinite(Date.parse(`${day}T00:00:00Z`)) ? day : undefined;
}

export type ReadObservation = { readonly observed: Observed } | { readonly skipped: string } | undefined;

/** A size of an Observation; undefined for one that is none of ours. */
export function readObservation(resource: Json): ReadObservation {
  const code = codingsOf(resource.code).find(({ system, code }) => system === LOINC && Object.hasOwn(OBSERVATIONS, code))?.code;
  if (code === undefined) return undefined;
  const { quantity, tapeSite } = OBSERVATIONS[code]!;
  if (!FINAL.has(asText(resource.status))) return { skipped: `Observation ${code}: its status is not final, amended or corrected` };
  const value = valueOf(quantity, asObject(resource.valueQuantity));
  if (value === undefined) {
    const allowed = quantity === 'body-mass-index' ? 'kg/m2' : Object.keys(quantity === 'weight-kg' ? UCUM_MASSES : UCUM_LENGTHS).join(', ');
    return { skipped: `Observation ${code}: no value in range with a UCUM unit; allowed: ${allowed}` };
  }
  const site = codingsOf(resource.bodySite).find(({ system, code }) => system === SNOMED && Object.hasOwn(BODY_SITES, code))?.code;
  const takenOn = dayOf(resource);
  const at = quantity === 'girth-cm' ? (site ? BODY_SITES[site] : tapeSite) : undefined;
  return { observed: { quantity, value, ...(takenOn ? { takenOn } : {}), ...(at ? { tapeSite: at } : {}) } };
}
