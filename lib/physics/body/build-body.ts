import type { Patient, PartShape, Reading, SolidPart } from '../model/patient';
import type { Scanner } from '../model/scanner';
import { DomainError } from '../model/domain-error';
import { SIDES } from '../model/axes';

const MEASURED: ReadonlySet<Reading['source']> = new Set(['measured', 'localiser']);

/** Whether any of these readings is worked out, reported or assumed rather than measured. */
export function isEstimated(...readings: readonly Reading[]): boolean {
  return readings.some((reading) => !MEASURED.has(reading.source));
}

/** An elliptic cylinder along z filling a right–left and an anterior–posterior range. */
export function cylinderAlongZ(
  rightMm: number,
  leftMm: number,
  anteriorMm: number,
  posteriorMm: number,
  z: { readonly fromMm?: number; readonly toMm?: number } = {},
): PartShape {
  return {
    type: 'elliptic-cylinder',
    along: 'z',
    centreMm: [(leftMm - rightMm) / 2, (posteriorMm - anteriorMm) / 2, 0],
    semiAxesMm: [(leftMm + rightMm) / 2, (anteriorMm + posteriorMm) / 2],
    ...z,
  };
}

function requireExtents(patient: Patient): void {
  for (const side of SIDES) {
    const { value } = patient.extents[side];
    if (!Number.isFinite(value) || value < 0) {
      throw new DomainError('extent-not-allowed', `extents.${side}`, value, 'a finite length ≥ 0 mm');
    }
  }
  const { right, left, anterior, posterior } = patient.extents;
  if (!(right.value + left.value > 0)) {
    throw new DomainError('body-without-breadth', 'extents.right + extents.left', right.value + left.value, '> 0 mm');
  }
  if (!(anterior.value + posterior.value > 0)) {
    throw new DomainError('body-without-depth', 'extents.anterior + extents.posterior', anterior.value + posterior.value, '> 0 mm');
  }
}

function trunk(patient: Patient): SolidPart {
  const { right, left, anterior, posterior } = patient.extents;
  return {
    name: 'trunk',
    kind: 'trunk',
    shape: cylinderAlongZ(right.value, left.value, anterior.value, posterior.value),
    signalWeight: 1,
    estimated: isEstimated(right, left, anterior, posterior),
  };
}

/** Arms beside the trunk, level with its mid-depth, as far along z as coil and magnet see. */
function armsAtTheSide(patient: Patient): SolidPart[] {
  const { right, left, anterior, posterior } = patient.extents;
  const { breadthMm, depthMm, gapMm } = patient.arms;
  if (!(breadthMm > 0) || !(depthMm > 0)) return [];
  if (!(gapMm >= 0)) throw new DomainError('arm-gap-negative', 'arms.gapMm', gapMm, '≥ 0 mm');
  const middle = (posterior.value - anterior.value) / 2;
  const arm = (name: string, innerMm: number, sign: 1 | -1): SolidPart => ({
    name,
    kind: 'arm',
    shape: {
      type: 'elliptic-cylinder',
      along: 'z',
      centreMm: [sign * (innerMm + gapMm + breadthMm / 2), middle, 0],
      semiAxesMm: [breadthMm / 2, depthMm / 2],
    },
    signalWeight: 1,
    estimated: true,
  });
  return [arm('right arm', right.value, -1), arm('left arm', left.value, 1)];
}

/**
 * The body as named solid parts in patient coordinates [mm], from the six one-sided extents of the size record.
 * Along z every part reaches as far as coil and magnet see (|z − isocentre| ≤ the scanner's tissue reach, applied where
 * sections are cut), never "the body's end". `patient.parts`, when given, is the whole body and is returned as it is.
 * @throws DomainError "extent-not-allowed", "body-without-breadth", "body-without-depth", "arm-gap-negative"
 * Validity: elliptic cross-section; breathing and padding are covered by the policy's margin, not here.
 */
export function buildBody(patient: Patient, _scanner?: Scanner): readonly SolidPart[] {
  if (patient.parts) return patient.parts;
  requireExtents(patient);
  const parts: SolidPart[] = [trunk(patient)];
  if (patient.arms.position !== 'up') parts.push(...armsAtTheSide(patient));
  return parts;
}
