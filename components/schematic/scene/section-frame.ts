import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import { AXIS_SIDES, AXIS_VECTOR, dot, scale } from '@/lib/physics/geometry/vector';
import type { PatientAxis, Side, Vec3 } from '@/lib/physics/model/axes';
import type { Plane, Prescription } from '@/lib/physics/model/prescription';

/** A point of the picture, mm: u to the right of the screen, v down. */
export type ScreenPoint = readonly [number, number];

export interface ScreenSides {
  readonly left: Side;
  readonly right: Side;
  readonly top: Side;
  readonly bottom: Side;
}

/**
 * How a section is laid on the screen, as the trade reads it: the patient's left on the right of axial and coronal
 * pictures, anterior on the left of sagittal ones, superior at the top. Tilts lean u and v with the plane; in-plane
 * rotation turns the window on the screen instead, so that the body stands still.
 */
export interface ScreenFrame {
  readonly plane: Plane;
  /** Unit vectors in patient coordinates (LPS). */
  readonly u: Vec3;
  readonly v: Vec3;
  readonly normal: Vec3;
  readonly sides: ScreenSides;
}

const SIDES_OF_PLANE: Readonly<Record<Plane, ScreenSides>> = {
  axial: { left: 'right', right: 'left', top: 'anterior', bottom: 'posterior' },
  coronal: { left: 'right', right: 'left', top: 'superior', bottom: 'inferior' },
  sagittal: { left: 'anterior', right: 'posterior', top: 'superior', bottom: 'inferior' },
};

/** The patient axis that runs along the screen's horizontal, and the one along its vertical. */
export function screenAxes(plane: Plane): { readonly horizontal: PatientAxis; readonly vertical: PatientAxis } {
  if (plane === 'axial') return { horizontal: 'RL', vertical: 'AP' };
  if (plane === 'coronal') return { horizontal: 'RL', vertical: 'SI' };
  return { horizontal: 'AP', vertical: 'SI' };
}

export function screenFrame(prescription: Prescription): ScreenFrame {
  const { plane } = prescription;
  const frame = sectionFrame({ ...prescription, inPlaneRotationDeg: 0 });
  const { horizontal, vertical } = screenAxes(plane);
  const along = (axis: PatientAxis): Vec3 => (frame.phaseAxis === axis ? frame.phase : frame.readout);
  return {
    plane,
    u: along(horizontal),
    v: vertical === 'SI' ? scale(along(vertical), -1) : along(vertical),
    normal: frame.slice,
    sides: SIDES_OF_PLANE[plane],
  };
}

/** Left, right, top, bottom. */
export function sidesOfPlane(plane: Plane): readonly Side[] {
  const { left, right, top, bottom } = SIDES_OF_PLANE[plane];
  return [left, right, top, bottom];
}

export function toScreen(frame: ScreenFrame, point: Vec3): ScreenPoint {
  return [plain(dot(frame.u, point)), plain(dot(frame.v, point))];
}

/** Patient coordinates of a picture point, at the given position along the slice axis. */
export function toPatient(frame: ScreenFrame, [u, v]: ScreenPoint, alongNormalMm = 0): Vec3 {
  const at = (i: 0 | 1 | 2): number =>
    plain(frame.u[i] * u + frame.v[i] * v + frame.normal[i] * alongNormalMm);
  return [at(0), at(1), at(2)];
}

/** Unit vector from the origin towards a side of the patient. */
export function sideVector(side: Side): Vec3 {
  for (const axis of ['RL', 'AP', 'SI'] as const) {
    const [negative, positive] = AXIS_SIDES[axis];
    if (side === positive) return AXIS_VECTOR[axis];
    if (side === negative) return scale(AXIS_VECTOR[axis], -1);
  }
  throw new Error(`No such side: ${side as string}`);
}

/** −0 would be stored and compared as something else than 0. */
function plain(value: number): number {
  return value === 0 ? 0 : value;
}
