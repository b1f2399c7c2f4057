import type { PatientAxis, Side, Vec3 } from '@/lib/physics/model/axes';
import type { Plane } from '@/lib/physics/model/prescription';

/** A point of the picture, mm: u to the right of the screen, v down. */
export type ScreenPoint = readonly [number, number];

/**
 * How a plane is shown, as the trade reads it: the patient's left on the right of axial and coronal pictures,
 * anterior on the left of sagittal ones, superior at the top. Unit vectors in patient coordinates (LPS).
 */
export interface SectionFrame {
  readonly plane: Plane;
  readonly u: Vec3;
  readonly v: Vec3;
  readonly normal: Vec3;
  readonly sides: { readonly left: Side; readonly right: Side; readonly top: Side; readonly bottom: Side };
}

const FRAMES: Readonly<Record<Plane, SectionFrame>> = {
  axial: {
    plane: 'axial',
    u: [1, 0, 0],
    v: [0, 1, 0],
    normal: [0, 0, 1],
    sides: { left: 'right', right: 'left', top: 'anterior', bottom: 'posterior' },
  },
  coronal: {
    plane: 'coronal',
    u: [1, 0, 0],
    v: [0, 0, -1],
    normal: [0, 1, 0],
    sides: { left: 'right', right: 'left', top: 'superior', bottom: 'inferior' },
  },
  sagittal: {
    plane: 'sagittal',
    u: [0, 1, 0],
    v: [0, 0, -1],
    normal: [1, 0, 0],
    sides: { left: 'anterior', right: 'posterior', top: 'superior', bottom: 'inferior' },
  },
};

export function frameOf(plane: Plane): SectionFrame {
  return FRAMES[plane];
}

export function toScreen(frame: SectionFrame, point: Vec3): ScreenPoint {
  return [dot(frame.u, point), dot(frame.v, point)];
}

/** Patient coordinates of a picture point, at the given position along the slice axis. */
export function toPatient(frame: SectionFrame, [u, v]: ScreenPoint, alongNormalMm = 0): Vec3 {
  return [0, 1, 2].map(
    (i) => frame.u[i as 0]! * u + frame.v[i as 0]! * v + frame.normal[i as 0]! * alongNormalMm,
  ) as unknown as Vec3;
}

export function dot(a: Vec3, b: Vec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

/** Unit vector from the origin towards a side of the patient. */
export function sideVector(side: Side): Vec3 {
  switch (side) {
    case 'right':
      return [-1, 0, 0];
    case 'left':
      return [1, 0, 0];
    case 'anterior':
      return [0, -1, 0];
    case 'posterior':
      return [0, 1, 0];
    case 'superior':
      return [0, 0, 1];
    case 'inferior':
      return [0, 0, -1];
  }
}

export function oppositeSide(side: Side): Side {
  const pairs: Readonly<Record<Side, Side>> = {
    right: 'left',
    left: 'right',
    anterior: 'posterior',
    posterior: 'anterior',
    superior: 'inferior',
    inferior: 'superior',
  };
  return pairs[side];
}

/** Sides a patient axis runs between: the one at its negative end in LPS first. */
export function sidesOfAxis(axis: PatientAxis): readonly [Side, Side] {
  return axis === 'RL' ? ['right', 'left'] : axis === 'AP' ? ['anterior', 'posterior'] : ['inferior', 'superior'];
}

/** The patient axis that runs along the screen's horizontal, and the one along its vertical. */
export function screenAxes(plane: Plane): { readonly horizontal: PatientAxis; readonly vertical: PatientAxis } {
  if (plane === 'axial') return { horizontal: 'RL', vertical: 'AP' };
  if (plane === 'coronal') return { horizontal: 'RL', vertical: 'SI' };
  return { horizontal: 'AP', vertical: 'SI' };
}
