import { axesOfPlane, sliceAxisOf } from '@/lib/domain/case/lines';
import type { PatientAxis, PatientBox, Prescription, RangeMm } from '@/lib/domain/case/model';

const INDEX: Record<PatientAxis, 0 | 1 | 2> = { RL: 0, AP: 1, SI: 2 };

/** Width the slices cover along the slice axis, mm. */
export function stackWidthMm(slices: Prescription['slices']): number {
  return slices.mode === 'slab'
    ? slices.partitions * slices.partitionThicknessMm
    : slices.slices * slices.thicknessMm + (slices.slices - 1) * slices.gapMm;
}

/** The displayed window as a box in the patient, before tilts. */
export function displayedBox(prescription: Prescription): PatientBox {
  const [first, second] = axesOfPlane(prescription.plane);
  const readoutAxis = prescription.phaseAxis === first ? second : first;
  const around = (axis: PatientAxis, widthMm: number): RangeMm => {
    const centre = prescription.centreMm[INDEX[axis]];
    return [centre - widthMm / 2, centre + widthMm / 2];
  };
  const ranges = new Map<PatientAxis, RangeMm>([
    [prescription.phaseAxis, around(prescription.phaseAxis, prescription.fovPhaseMm)],
    [readoutAxis, around(readoutAxis, prescription.fovReadoutMm)],
    [sliceAxisOf(prescription.plane), around(sliceAxisOf(prescription.plane), stackWidthMm(prescription.slices))],
  ]);
  const of = (axis: PatientAxis): RangeMm => ranges.get(axis) ?? [0, 0];
  return { xMm: of('RL'), yMm: of('AP'), zMm: of('SI') };
}
