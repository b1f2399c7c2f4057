/**
 * Patient axes are DICOM's LPS: x to the patient's left, y posterior, z superior. Millimetres throughout.
 * The origin of patient coordinates is the point the size record was taken from: the FOV centre of the
 * booked protocol. A prescription's own centre is an offset from it.
 */
export type Vec3 = readonly [number, number, number];

/** A patient axis as the trade writes a direction: right–left, anterior–posterior, superior–inferior. */
export type PatientAxis = 'RL' | 'AP' | 'SI';

export type Side = 'right' | 'left' | 'anterior' | 'posterior' | 'superior' | 'inferior';

export const SIDES: readonly Side[] = ['right', 'left', 'anterior', 'posterior', 'superior', 'inferior'];

/** One value a side, in mm, each ≥ 0 unless stated. */
export type PerSide = Readonly<Record<Side, number>>;

/** Closed range [low, high] in mm, low ≤ high. */
export type RangeMm = readonly [number, number];

/** Box in patient coordinates. */
export interface PatientBox {
  readonly xMm: RangeMm;
  readonly yMm: RangeMm;
  readonly zMm: RangeMm;
}
