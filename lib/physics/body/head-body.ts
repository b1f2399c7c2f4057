import type { Patient, SolidPart } from '../model/patient';
import {
  ADULT,
  cylinder,
  endIsKnown,
  isEstimated,
  part,
  partBox,
  raisedArms,
  shoulderHalves,
} from './make-part';

/** How far the nose stands out from the face, mm; from memory, rounded up. The anterior extent runs to its tip. */
const NOSE_MM = 25;

/**
 * Head: an ellipsoid that fills the extents from the crown (superior) to the chin (inferior), the nose at its front,
 * the neck below, then the shoulders as far as coil and magnet see; arms beside the head only when they are raised.
 * Without a known crown and chin the head is an elliptic cylinder: the cautious answer for sections across it.
 */
export function headBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const { right, left, anterior, posterior, superior, inferior } = patient.extents;
  if (!endIsKnown(superior) || !endIsKnown(inferior)) {
    const shape = cylinder(box.x, box.y, box.halfX, box.halfY);
    return [part('head', 'head', shape, isEstimated(right, left, anterior, posterior))];
  }
  const nose = Math.min(NOSE_MM, box.halfY / 2);
  const y = box.y + nose / 2;
  const halfY = box.halfY - nose / 2;
  const front = -anterior.value;
  const shoulderTop = -inferior.value - ADULT.neckLength;
  const [shoulderHalfX, shoulderHalfY] = shoulderHalves(patient);
  const neckHalfX = Math.min(ADULT.neckHalfBreadth, 0.8 * box.halfX);
  const neckHalfY = Math.min(ADULT.neckHalfDepth, 0.7 * halfY);
  const backOfNeck = y + halfY - neckHalfY;
  return [
    part(
      'head',
      'head',
      { type: 'ellipsoid', centreMm: [box.x, y, box.z], semiAxesMm: [box.halfX, halfY, box.halfZ] },
      isEstimated(right, left, anterior, posterior, superior, inferior),
    ),
    part(
      'nose',
      'nose',
      {
        type: 'ellipsoid',
        centreMm: [box.x, front + 2 * nose, box.z - 0.2 * box.halfZ],
        semiAxesMm: [0.7 * nose, 2 * nose, nose],
      },
      true,
    ),
    part(
      'neck',
      'other',
      cylinder(box.x, (y + backOfNeck) / 2, neckHalfX, neckHalfY, { fromMm: shoulderTop - 1, toMm: box.z }),
      true,
    ),
    part('shoulders', 'trunk', cylinder(box.x, y, shoulderHalfX, shoulderHalfY, { toMm: shoulderTop }), true),
    ...(patient.arms.position === 'up' ? raisedArms(patient, box.x, y, shoulderTop, box.halfX) : []),
  ];
}
