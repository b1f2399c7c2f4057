import type { PatientAxis, PatientBox, RangeMm, Side } from '@/lib/physics/model/axes';
import type { Prescription } from '@/lib/physics/model/prescription';
import { sliceAxisOf } from '@/lib/domain/case/lines';

/** Length of the stack or slab along the slice axis, mm. */
export function coverageMm(prescription: Prescription): number {
  const { slices } = prescription;
  if (slices.mode === 'slab') return slices.partitions * slices.partitionThicknessMm;
  return slices.slices * slices.thicknessMm + (slices.slices - 1) * slices.gapMm;
}

/** The displayed window as a box in the patient, before tilts and rotation. */
export function windowBox(prescription: Prescription): PatientBox {
  const lengthAlong = (axis: PatientAxis): number => {
    if (axis === prescription.phaseAxis) return prescription.fovPhaseMm;
    if (axis === sliceAxisOf(prescription.plane)) return coverageMm(prescription);
    return prescription.fovReadoutMm;
  };
  const range = (axis: PatientAxis, centre: number): RangeMm => {
    const half = lengthAlong(axis) / 2;
    return [centre - half, centre + half];
  };
  const [x, y, z] = prescription.centreMm;
  return { xMm: range('RL', x), yMm: range('AP', y), zMm: range('SI', z) };
}

/** Distance of a box's edge from the origin towards a side, mm; negative when the edge lies beyond the origin. */
export function edgeOf(box: PatientBox, side: Side): number {
  switch (side) {
    case 'right':
      return -box.xMm[0];
    case 'left':
      return box.xMm[1];
    case 'anterior':
      return -box.yMm[0];
    case 'posterior':
      return box.yMm[1];
    case 'inferior':
      return -box.zMm[0];
    case 'superior':
      return box.zMm[1];
  }
}

/** Least thickness of a box, so that its edges cannot cross while one is dragged. */
const LEAST_MM = 1;

export function withEdge(box: PatientBox, side: Side, valueMm: number): PatientBox {
  switch (side) {
    case 'right':
      return { ...box, xMm: [Math.min(-valueMm, box.xMm[1] - LEAST_MM), box.xMm[1]] };
    case 'left':
      return { ...box, xMm: [box.xMm[0], Math.max(valueMm, box.xMm[0] + LEAST_MM)] };
    case 'anterior':
      return { ...box, yMm: [Math.min(-valueMm, box.yMm[1] - LEAST_MM), box.yMm[1]] };
    case 'posterior':
      return { ...box, yMm: [box.yMm[0], Math.max(valueMm, box.yMm[0] + LEAST_MM)] };
    case 'inferior':
      return { ...box, zMm: [Math.min(-valueMm, box.zMm[1] - LEAST_MM), box.zMm[1]] };
    case 'superior':
      return { ...box, zMm: [box.zMm[0], Math.max(valueMm, box.zMm[0] + LEAST_MM)] };
  }
}
