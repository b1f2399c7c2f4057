import type { Prescription } from '../model/prescription';

const FIELDS = [
  'phaseAxis',
  'fovPhaseMm',
  'fovReadoutMm',
  'readoutMatrix',
  'trMs',
  'teMs',
  'averages',
  'partialFourierPhase',
  'coilElements',
] as const;

const oversampling = (p: Prescription): string => (p.acquiredLines / p.linesAcrossFov).toFixed(6);

function slabEdits(before: Prescription, after: Prescription): number {
  if (before.slices.mode !== 'slab' || after.slices.mode !== 'slab') return 0;
  const a = before.slices;
  const b = after.slices;
  const ratio = (slab: typeof a) => (slab.acquiredPartitions / slab.partitions).toFixed(6);
  return (
    (a.partitions === b.partitions ? 0 : 1) +
    (ratio(a) === ratio(b) ? 0 : 1) +
    (a.timeBandwidthProduct === b.timeBandwidthProduct ? 0 : 1)
  );
}

/**
 * How many settings a person changes at the console to get from one prescription to the other. After a swap the FOVs
 * and matrices follow by themselves and are one setting; oversampling counts when its share changes, not its lines.
 */
export function countEdits(before: Prescription, after: Prescription): number {
  const swapped = before.phaseAxis !== after.phaseAxis;
  const followsSwap = new Set<string>(swapped ? ['fovPhaseMm', 'fovReadoutMm', 'readoutMatrix'] : []);
  let edits = FIELDS.filter((field) => !followsSwap.has(field) && before[field] !== after[field]).length;
  if (!swapped && before.linesAcrossFov !== after.linesAcrossFov) edits++;
  if (oversampling(before) !== oversampling(after)) edits++;
  if (before.acceleration.factorPhase !== after.acceleration.factorPhase) edits++;
  if (before.presaturation.length !== after.presaturation.length) edits++;
  return edits + slabEdits(before, after);
}

/** Slab thickness given up by dropping end partitions, both ends together [mm]; 0 for a stack. */
export function slabCoverageLostMm(before: Prescription, after: Prescription): number {
  if (before.slices.mode !== 'slab' || after.slices.mode !== 'slab') return 0;
  const dropped = after.slices.droppedPartitionsPerEnd - before.slices.droppedPartitionsPerEnd;
  return Math.max(0, 2 * dropped * after.slices.partitionThicknessMm);
}
