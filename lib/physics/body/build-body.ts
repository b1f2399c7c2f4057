import type { BodyRegion, Patient, SolidPart } from '../model/patient';
import type { Scanner } from '../model/scanner';
import { DomainError } from '../model/domain-error';
import { SIDES } from '../model/axes';
import { headBody } from './head-body';
import { kneeBody } from './knee-body';
import { abdomenBody, breastBody, chestBody, hipBody, shoulderBody } from './trunk-bodies';

const BODIES: Readonly<Record<BodyRegion, (patient: Patient) => SolidPart[]>> = {
  abdomen: abdomenBody,
  pelvis: abdomenBody,
  chest: chestBody,
  head: headBody,
  shoulder: shoulderBody,
  hip: hipBody,
  knee: kneeBody,
  breast: breastBody,
};

/**
 * The body as named solid parts in patient coordinates [mm], from the six one-sided extents of the size record.
 * Along z every part reaches as far as coil and magnet see (|z − isocentre| ≤ the scanner's tissue reach, applied where
 * sections are cut), never "the body's end". Parts that no reading describes are adults' means and marked estimated.
 * `patient.parts`, when given, is the whole body and is returned as it is.
 * @throws DomainError "extent-not-allowed", "body-without-breadth", "body-without-depth", "arm-gap-negative"
 * Validity: elliptic cross-sections; breathing and padding are covered by the policy's margin, not here.
 */
export function buildBody(patient: Patient, _scanner?: Scanner): readonly SolidPart[] {
  if (patient.parts) return patient.parts;
  requireExtents(patient);
  return BODIES[patient.region](patient);
}

function requireExtents({ extents, arms }: Patient): void {
  for (const side of SIDES) {
    const { value } = extents[side];
    if (!Number.isFinite(value) || value < 0) {
      throw new DomainError('extent-not-allowed', `extents.${side}`, value, 'a finite length ≥ 0 mm');
    }
  }
  const breadth = extents.right.value + extents.left.value;
  const depth = extents.anterior.value + extents.posterior.value;
  if (!(breadth > 0))
    throw new DomainError('body-without-breadth', 'extents.right + extents.left', breadth, '> 0 mm');
  if (!(depth > 0))
    throw new DomainError('body-without-depth', 'extents.anterior + extents.posterior', depth, '> 0 mm');
  if (!(arms.gapMm >= 0)) throw new DomainError('arm-gap-negative', 'arms.gapMm', arms.gapMm, '≥ 0 mm');
}
