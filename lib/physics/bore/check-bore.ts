import type { Patient, Reading } from '../model/patient';
import type { Scanner } from '../model/scanner';
import { hipBreadthFromBmi } from '../size/estimate-hips';
import { bodyMassIndex } from '../size/body-mass-index';
import { shouldersFromWeightAndHeight } from '../size/estimate-shoulders';
import { boreClearance, type BoreAnswer } from './bore-clearance';
import { bodySections, type BoreSizes } from './body-sections';
import { chordMm } from './chord';

/** Sizes beyond the size record, and what lies on the table; what is absent is estimated or said to be unknown. */
export interface BoreExtras extends Partial<Omit<BoreSizes, 'trunkBreadthMm' | 'trunkDepthMm' | 'arms'>> {
  /** Pad added on the table, compressed, mm. */
  readonly padMm?: number;
  /** Half the length of the narrow part, mm; absent: every section counts. */
  readonly halfLengthMm?: number;
}

export interface BoreCheck extends BoreAnswer {
  /** Sizes that would count and are not known, as shown: unknown is never passing. */
  readonly unknown: readonly string[];
  /** Width of the opening at the table. */
  readonly chordAtTableMm: number;
}

/** Two sides of one size: their errors are one error, so they add. */
const across = (a: Reading, b: Reading): Reading => ({
  value: a.value + b.value,
  spread: a.spread + b.spread,
  source: a.source,
  ...(a.takenOn === undefined ? {} : { takenOn: a.takenOn }),
});

const COIL_ON: Readonly<Record<Patient['region'], 'trunk' | 'hips' | 'none'>> = {
  abdomen: 'trunk',
  chest: 'trunk',
  pelvis: 'hips',
  hip: 'hips',
  head: 'none',
  shoulder: 'none',
  knee: 'none',
  breast: 'none',
};

/**
 * The patient in a scanner's opening: every section inside it with the target at the isocentre, from the size record,
 * weight and height. Hips and, head-first, shoulders are estimated from weight and height where not given.
 * @returns clearances [mm], the tightest place, and the sizes that are not known
 * @throws DomainError naming the argument
 * Valid: planning estimate only; trained staff decide.
 */
export function checkBore(patient: Patient, scanner: Scanner, extras: BoreExtras = {}): BoreCheck {
  const { extents, weightKg, heightCm, sex, position, arms } = patient;
  const { padMm = 0, halfLengthMm, ...given } = extras;
  const hips =
    weightKg && heightCm ? hipBreadthFromBmi(bodyMassIndex(weightKg.value, heightCm.value), sex) : undefined;
  const shoulders = weightKg && heightCm ? shouldersFromWeightAndHeight(weightKg, heightCm, sex) : undefined;
  const sizes: BoreSizes = {
    hipBreadthMm: hips,
    shoulderBreadthMm: shoulders?.breadth,
    shoulderDepthMm: shoulders?.depth,
    ...given,
    trunkBreadthMm: across(extents.right, extents.left),
    trunkDepthMm: across(extents.anterior, extents.posterior),
    arms,
  };
  const { sections, unknown } = bodySections(sizes, position, arms.position, COIL_ON[patient.region]);
  const answer = boreClearance(sections, {
    bore: {
      diameterMm: scanner.boreDiameterMm,
      tableBelowCentreMm: scanner.tableBelowCentreMm,
      halfLengthMm,
    },
    coilMm: scanner.anteriorCoilMm,
    padMm,
    lateralOffsetMm: patient.lateralOffsetMm,
  });
  return { ...answer, unknown, chordAtTableMm: chordMm(scanner.boreDiameterMm, scanner.tableBelowCentreMm) };
}
