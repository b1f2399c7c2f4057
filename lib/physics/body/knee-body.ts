import type { Patient, SolidPart } from '../model/patient';
import { cylinder, isEstimated, part, partBox } from './make-part';

/** Gap between the knees when nobody said, mm; common practice, no source. */
const LEG_GAP_MM = 20;

/**
 * Knee: the imaged leg, and the other one beside it, as broad and deep. Where the side is not known the other leg is
 * assumed on both sides: the cautious answer.
 */
export function kneeBody(patient: Patient): SolidPart[] {
  const box = partBox(patient);
  const { right, left, anterior, posterior } = patient.extents;
  const apart = 2 * box.halfX + (patient.legGapMm ?? LEG_GAP_MM);
  const leg = (name: string, x: number, estimated: boolean) =>
    part(name, 'leg', cylinder(x, box.y, box.halfX, box.halfY), estimated);
  const imaged = leg('leg', box.x, isEstimated(right, left, anterior, posterior));
  const { pairedSide } = patient;
  if (pairedSide) return [imaged, leg('other leg', box.x + (pairedSide === 'right' ? apart : -apart), true)];
  return [
    imaged,
    leg('other leg, if to the right', box.x - apart, true),
    leg('other leg, if to the left', box.x + apart, true),
  ];
}
