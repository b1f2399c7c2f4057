import type { Side } from '../model/axes';
import { SIDES } from '../model/axes';
import type { Patient, Reading } from '../model/patient';
import { normalQuantile } from './normal';

// A pure cache, so that asking twice gives the same object and caches by identity still hit.
const grownExtents = new WeakMap<
  Patient['extents'],
  { readonly sureAt: number; readonly extents: Patient['extents'] }
>();

function extentsAt(extents: Patient['extents'], sureAt: number): Patient['extents'] {
  const known = grownExtents.get(extents);
  if (known?.sureAt === sureAt) return known.extents;
  const z = normalQuantile(sureAt);
  const grown = (reading: Reading): Reading =>
    reading.spread === 0 ? reading : { ...reading, value: reading.value + z * reading.spread, spread: 0 };
  const made = Object.fromEntries(SIDES.map((side) => [side, grown(extents[side])])) as Record<Side, Reading>;
  grownExtents.set(extents, { sureAt, extents: made });
  return made;
}

/**
 * The patient with every extent taken at the size that a share p of such patients does not exceed:
 * value + z_p·spread, spread then counted. Readings without spread stay as they are.
 * @param sureAt p, 0.5–0.999; at 0.5 nothing changes
 * @returns the same object when nothing changes, so that caches by identity still hit
 * Valid: extents one girth decides grow together (one random variable for both sides), which taking every side at the
 * same quantile does. A body given as parts has no spread and is returned as it is.
 */
export function sizesAt(patient: Patient, sureAt: number): Patient {
  if (patient.parts !== undefined || sureAt <= 0.5) return patient;
  if (SIDES.every((side) => patient.extents[side].spread === 0)) return patient;
  return { ...patient, extents: extentsAt(patient.extents, sureAt) };
}
