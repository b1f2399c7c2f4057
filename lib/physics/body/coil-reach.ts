import type { Case } from '../model/case';
import type { CoilDescription } from '../model/scanner';
import { DomainError } from '../model/domain-error';

/** How far along z coil and magnet see: |z − isocentreZMm| ≤ tissueReachMm, patient coordinates. */
export interface ReachAlongZ {
  readonly isocentreZMm: number;
  readonly tissueReachMm: number;
}

/** The prescription's coil, where the site has described its elements. */
export const describedCoil = ({
  prescription,
  scanner,
}: Pick<Case, 'prescription' | 'scanner'>): CoilDescription | undefined =>
  scanner.coils?.find((coil) => coil.name === prescription.coil);

/**
 * What is seen along z: the site's reach about the isocentre, cut to what the coil elements in use see between them.
 * @throws DomainError "coil-element-unknown", "no-coil-element"
 * Valid: elements that see a range along z; what they see across the body is not modelled.
 */
export function reachAlongZ(given: Pick<Case, 'patient' | 'prescription' | 'scanner'>): ReachAlongZ {
  const whole = { isocentreZMm: given.patient.isocentreZMm, tissueReachMm: given.scanner.tissueReachMm };
  const coil = describedCoil(given);
  const used = given.prescription.coilElements;
  if (coil === undefined || used === undefined) return whole;
  if (used.length === 0)
    throw new DomainError('no-coil-element', 'prescription.coilElements', 'none', 'at least one element');
  const elements = used.map((name) => {
    const element = coil.elements.find((candidate) => candidate.name === name);
    if (element !== undefined) return element;
    const allowed = coil.elements.map((candidate) => candidate.name).join(', ');
    throw new DomainError('coil-element-unknown', 'prescription.coilElements', name, allowed);
  });
  const low = Math.max(-whole.tissueReachMm, Math.min(...elements.map((element) => element.seesFromMm)));
  const high = Math.min(whole.tissueReachMm, Math.max(...elements.map((element) => element.seesToMm)));
  if (!(low < high))
    throw new DomainError(
      'no-coil-element',
      'prescription.coilElements',
      used.join(', '),
      'elements that see something',
    );
  return { isocentreZMm: whole.isocentreZMm + (low + high) / 2, tissueReachMm: (high - low) / 2 };
}
