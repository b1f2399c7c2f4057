import type { Patient, SolidPart } from '../model/patient';
import {
  armsBeside,
  cylinder,
  endIsKnown,
  isEstimated,
  neckAndHead,
  part,
  partBox,
  raisedArms,
  ADULT,
} from './make-part';

const extentsEstimated = ({ extents: { right, left, anterior, posterior } }: Patient) =>
  isEstimated(right, left, anterior, posterior);

/** Abdomen, pelvis: one trunk, and the arms unless they are up. The trunk never ends along z. */
export function abdomenBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const trunk = part(
    'trunk',
    'trunk',
    cylinder(box.x, box.y, box.halfX, box.halfY),
    extentsEstimated(patient),
  );
  return patient.arms.position === 'up' ? [trunk] : [trunk, ...armsBeside(patient, box)];
}

/**
 * Chest: as the abdomen up to the shoulder top (the superior extent, when known); above it neck and head, and the arms
 * beside the head when they are up.
 */
export function chestBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const { superior } = patient.extents;
  if (!endIsKnown(superior)) return abdomenBody(patient);
  const top = superior.value;
  const ends = { toMm: top };
  const armsUp = patient.arms.position === 'up';
  return [
    part('trunk', 'trunk', cylinder(box.x, box.y, box.halfX, box.halfY, ends), extentsEstimated(patient)),
    ...neckAndHead(box.x, box.y, top),
    ...(armsUp
      ? raisedArms(patient, box.x, box.y, top, ADULT.headHalfBreadth)
      : armsBeside(patient, box, ends)),
  ];
}

/** How far below their top the shoulders reach their full breadth, mm; our judgement of a deltoid's height. */
const SHOULDER_ROUND_MM = 100;
/** A trunk between the arms is at least this share of the breadth over the shoulders; our judgement. */
const TRUNK_SHARE = 0.5;

/**
 * Shoulder: the extents run to the skin over both deltoids (one-sided about the imaged joint) and to the shoulder top.
 * An ellipsoid rounds the shoulders off over their last 100 mm, so sections shrink along a stack; below lie trunk and arms
 * within the same breadth, above neck and head.
 */
export function shoulderBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const { superior } = patient.extents;
  const estimated = extentsEstimated(patient);
  if (!endIsKnown(superior))
    return [part('shoulders', 'trunk', cylinder(box.x, box.y, box.halfX, box.halfY), estimated)];
  const top = superior.value;
  const full = top - SHOULDER_ROUND_MM;
  const { position, breadthMm, gapMm } = patient.arms;
  const trunkHalf = Math.max(TRUNK_SHARE * box.halfX, box.halfX - gapMm - breadthMm);
  const innerHalf = Math.max(0, box.halfX - gapMm - breadthMm);
  const ends = { toMm: full };
  return [
    part(
      'shoulders',
      'trunk',
      {
        type: 'ellipsoid',
        centreMm: [box.x, box.y, full],
        semiAxesMm: [box.halfX, box.halfY, SHOULDER_ROUND_MM],
      },
      estimated,
    ),
    part(
      'trunk',
      'trunk',
      cylinder(box.x, box.y, breadthMm > 0 ? trunkHalf : box.halfX, box.halfY, ends),
      true,
    ),
    ...(position === 'up'
      ? raisedArms(patient, box.x, box.y, top, ADULT.headHalfBreadth)
      : armsBeside(patient, { ...box, halfX: innerHalf }, ends)),
    ...neckAndHead(box.x, box.y, top),
  ];
}

/** Hip: the pelvis from its lower edge (the inferior extent, when known) upwards, both thighs below it, the arms beside. */
export function hipBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const { inferior } = patient.extents;
  if (!endIsKnown(inferior)) return abdomenBody(patient);
  const crotch = -inferior.value;
  const thigh = (side: 'right' | 'left') => {
    const x = box.x + (side === 'left' ? 1 : -1) * (box.halfX / 2);
    return part(`${side} leg`, 'leg', cylinder(x, box.y, box.halfX / 2, box.halfY, { toMm: crotch }), true);
  };
  return [
    part(
      'trunk',
      'trunk',
      cylinder(box.x, box.y, box.halfX, box.halfY, { fromMm: crotch }),
      extentsEstimated(patient),
    ),
    thigh('right'),
    thigh('left'),
    ...(patient.arms.position === 'up' ? [] : armsBeside(patient, box)),
  ];
}

/** Most that a breast hangs or lies in front of the chest wall, mm, and its share of the whole depth; our judgement. */
const BREAST_DEPTH_MM = 110;
const BREAST_SHARE = 0.35;

/**
 * Breast: the anterior extent runs to the most anterior breast skin. The chest wall lies behind it by a third of the
 * depth at most; two ellipsoids rooted in it fill the rest.
 */
export function breastBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const hang = Math.min(BREAST_DEPTH_MM, BREAST_SHARE * 2 * box.halfY);
  const front = box.y - box.halfY;
  const trunkHalfY = box.halfY - hang / 2;
  const trunkY = box.y + hang / 2;
  const breast = (side: 'right' | 'left') =>
    part(
      `${side} breast`,
      'breast',
      {
        type: 'ellipsoid',
        centreMm: [box.x + (side === 'left' ? 0.45 : -0.45) * box.halfX, front + hang, 0],
        semiAxesMm: [0.42 * box.halfX, hang, 90],
      },
      true,
    );
  return [
    part('trunk', 'trunk', cylinder(box.x, trunkY, box.halfX, trunkHalfY), extentsEstimated(patient)),
    breast('right'),
    breast('left'),
    ...(patient.arms.position === 'up' ? [] : armsBeside(patient, { ...box, y: trunkY })),
  ];
}
