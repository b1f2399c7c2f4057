import type { TargetedCase } from './change';

/** Everything a remedy can change, as one string: equal strings are equal outcomes. */
export function outcomeKey({ prescription: p, patient }: TargetedCase): string {
  const { slices } = p;
  const slab =
    slices.mode === 'slab'
      ? `${slices.partitions}/${slices.acquiredPartitions}/${slices.droppedPartitionsPerEnd}/${slices.timeBandwidthProduct}`
      : '';
  const bands = p.presaturation
    .map((band) => `${band.side}/${band.innerEdgeMm}/${band.thicknessMm}`)
    .join(';');
  return [
    patient.arms.position,
    p.phaseAxis,
    p.fovPhaseMm,
    p.fovReadoutMm,
    p.linesAcrossFov,
    p.readoutMatrix,
    p.acquiredLines,
    p.centreMm.join('/'),
    p.trMs,
    p.teMs,
    p.averages,
    p.partialFourierPhase,
    p.acceleration.factorPhase,
    p.coilElements?.join('/'),
    slab,
    bands,
  ].join('|');
}
