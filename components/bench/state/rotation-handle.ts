import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { inWindow, windowFrame } from '@/components/schematic/scene/window-frame';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { BenchHandle } from './handles';

export const ROTATION_ID = 'fov-rotation';
export const ROTATION_MAX_DEG = 90;

const angleOf = ([u, v]: ScreenPoint): number => (Math.atan2(v, u) * 180) / Math.PI;

/** The window's corner that lies top right while the window is not turned, relative to its centre. */
function corner(prescription: Prescription, inPlaneRotationDeg: number): ScreenPoint {
  const straight = windowFrame({ ...prescription, inPlaneRotationDeg: 0 });
  const turned = windowFrame({ ...prescription, inPlaneRotationDeg });
  const alongPhase = straight.phase[0] - straight.phase[1] > 0 ? 1 : -1;
  const alongReadout = straight.readout[0] - straight.readout[1] > 0 ? 1 : -1;
  const at = inWindow(turned, alongPhase * turned.halfPhaseMm, alongReadout * turned.halfReadoutMm);
  return [at[0] - turned.centre[0], at[1] - turned.centre[1]];
}

/** Which way a positive rotation turns on the screen: 1 clockwise, −1 anticlockwise. */
function sense(prescription: Prescription): 1 | -1 {
  const a = corner(prescription, 0);
  const b = corner(prescription, 10);
  return a[0] * b[1] - a[1] * b[0] > 0 ? 1 : -1;
}

/** Rotation in the plane is held at a corner of the window. */
export function rotationHandle(prescription: Prescription): BenchHandle {
  const now = prescription.inPlaneRotationDeg;
  const { centre } = windowFrame(prescription);
  const [u, v] = corner(prescription, now);
  return {
    id: ROTATION_ID,
    kind: 'fov-rotation',
    label: 'Rotation of the window in its plane, degrees',
    at: [centre[0] + u, centre[1] + v],
    figure: `rotation ${Math.round(now)}°`,
    value: { now, min: -ROTATION_MAX_DEG, max: ROTATION_MAX_DEG },
  };
}

const within = (deg: number): number => Math.min(ROTATION_MAX_DEG, Math.max(-ROTATION_MAX_DEG, deg)) || 0;

/** The rotation that puts the corner in the direction of a point of the picture; whole degrees. */
export function rotationTowards(prescription: Prescription, to: ScreenPoint): number {
  const { centre } = windowFrame(prescription);
  const turned = angleOf([to[0] - centre[0], to[1] - centre[1]]) - angleOf(corner(prescription, 0));
  const nearest = turned - 360 * Math.round(turned / 360);
  return within(Math.round(sense(prescription) * nearest));
}

/** One arrow key: right and down turn clockwise, left and up back; 1 degree for each millimetre another handle would move. */
export function nudgedRotation(prescription: Prescription, by: ScreenPoint): number {
  return within(prescription.inPlaneRotationDeg + sense(prescription) * (by[0] + by[1]));
}
