import type { Side } from '../model/axes';
import type { Patient, Reading } from '../model/patient';

/** Sides that one random variable moves together, each by its own spread. */
export type SizeVariable = readonly Side[];

/** Smallest extent a draw may give, mm: sizes stay positive however unlikely the draw. */
const LEAST_EXTENT_MM = 1;

function pair(patient: Patient, low: Side, high: Side): SizeVariable[] {
  const [a, b] = [patient.extents[low], patient.extents[high]];
  const uncertain = [low, high].filter((side) => patient.extents[side].spread > 0);
  if (uncertain.length < 2) return uncertain.length === 0 ? [] : [uncertain];
  // Two sides got the same way come from one girth or depth: an error in it moves both.
  return a.source === b.source ? [[low, high]] : [[low], [high]];
}

/** Only a trunk and arms, reaching along z as far as coil and magnet see. */
export const isTrunkOnly = ({ region }: Patient): boolean => region === 'abdomen' || region === 'pelvis';

/**
 * The independent random variables of a patient's sizes. A trunk's superior and inferior extents play no part. A body
 * given as parts has no spread.
 */
export function sizeVariables(patient: Patient): readonly SizeVariable[] {
  if (patient.parts !== undefined) return [];
  const across = [...pair(patient, 'anterior', 'posterior'), ...pair(patient, 'right', 'left')];
  return isTrunkOnly(patient) ? across : [...across, ...pair(patient, 'inferior', 'superior')];
}

/** The patient with each variable at its number of spreads from the mean; spread itself then counts no more. */
export function patientAtDraw(
  patient: Patient,
  variables: readonly SizeVariable[],
  draws: readonly number[],
): Patient {
  const extents: Record<Side, Reading> = { ...patient.extents };
  variables.forEach((sides, index) => {
    for (const side of sides) {
      const { value, spread } = patient.extents[side];
      extents[side] = {
        ...patient.extents[side],
        value: Math.max(LEAST_EXTENT_MM, value + (draws[index] ?? 0) * spread),
        spread: 0,
      };
    }
  });
  return { ...patient, extents };
}
