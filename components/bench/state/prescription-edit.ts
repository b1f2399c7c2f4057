import { acquiredLinesFor, acquiredPartitionsFor, axesOfPlane } from '@/lib/domain/case/lines';
import type { Prescription, SequenceFamily, Slab, SliceStack } from '@/lib/physics/model/prescription';
import type { Scanner } from '@/lib/physics/model/scanner';
import { percentGiving } from '@/lib/presentation/oversampling-form';

export const FAMILIES_3D: readonly SequenceFamily[] = ['gradient-echo-3d', 'echo-train-spin-echo-3d'];

/** Phase oversampling as it would be asked of the scanner, percent. */
export function requestedOversamplingPct(prescription: Prescription, scanner: Pick<Scanner, 'lineStep'>): number {
  return Number(percentGiving(prescription.linesAcrossFov, prescription.acquiredLines, scanner.lineStep));
}

export function requestedSliceOversamplingPct(slab: Slab): number {
  return Number(percentGiving(slab.partitions, slab.acquiredPartitions, { kind: 'line' }));
}

/**
 * One edit with what follows from it. Lines, window and oversampling hang together: someone who changes one means
 * the others to stay what they were in the scanner's own terms, not in stored integers.
 */
export function tidyPrescription(
  before: Prescription,
  patch: Partial<Prescription>,
  scanner: Pick<Scanner, 'lineStep' | 'partitionStep'>,
): Prescription {
  let after: Prescription = { ...before, ...patch };
  if (patch.plane !== undefined && !axesOfPlane(after.plane).includes(after.phaseAxis)) {
    after = { ...after, phaseAxis: axesOfPlane(after.plane)[1] };
  } else if (patch.phaseAxis !== undefined && patch.phaseAxis !== before.phaseAxis && patch.plane === undefined) {
    after = { ...after, ...swapWindow(before, patch) };
  }
  if (after.linesAcrossFov !== before.linesAcrossFov && patch.acquiredLines === undefined) {
    const percent = requestedOversamplingPct(before, scanner);
    after = { ...after, acquiredLines: acquiredLinesFor(after.linesAcrossFov, percent, scanner.lineStep) };
  }
  if (after.acquiredLines < after.linesAcrossFov) after = { ...after, acquiredLines: after.linesAcrossFov };
  if (patch.family !== undefined) after = { ...after, slices: slicesFor(after.family, after.slices) };
  return { ...after, slices: tidySlices(before.slices, after.slices, scanner) };
}

/** The window stays where it is in the patient; each axis keeps its pixel. */
function swapWindow(before: Prescription, patch: Partial<Prescription>): Partial<Prescription> {
  return {
    fovPhaseMm: patch.fovPhaseMm ?? before.fovReadoutMm,
    fovReadoutMm: patch.fovReadoutMm ?? before.fovPhaseMm,
    linesAcrossFov: patch.linesAcrossFov ?? before.readoutMatrix,
    readoutMatrix: patch.readoutMatrix ?? before.linesAcrossFov,
  };
}

function tidySlices(
  before: SliceStack | Slab,
  after: SliceStack | Slab,
  scanner: Pick<Scanner, 'partitionStep'>,
): SliceStack | Slab {
  if (after.mode !== 'slab') return after;
  if (before.mode === 'slab' && after.partitions !== before.partitions && after.acquiredPartitions === before.acquiredPartitions) {
    const percent = requestedSliceOversamplingPct(before);
    return { ...after, acquiredPartitions: acquiredPartitionsFor(after.partitions, percent, scanner.partitionStep) };
  }
  return after.acquiredPartitions < after.partitions ? { ...after, acquiredPartitions: after.partitions } : after;
}

/** A 2D family has a stack, a 3D family a slab, of the same coverage. */
function slicesFor(family: SequenceFamily, slices: SliceStack | Slab): SliceStack | Slab {
  const is3d = FAMILIES_3D.includes(family);
  if (is3d === (slices.mode === 'slab')) return slices;
  if (slices.mode === 'slab') {
    return { mode: 'stack', slices: slices.partitions, thicknessMm: slices.partitionThicknessMm, gapMm: 0 };
  }
  const partitions = Math.max(2, slices.slices);
  return {
    mode: 'slab',
    partitions,
    partitionThicknessMm: slices.thicknessMm + slices.gapMm,
    acquiredPartitions: partitions,
    selective: true,
    droppedPartitionsPerEnd: 0,
  };
}

/** Percent Phase Field of View (DICOM 0018,0094): phase FOV over readout FOV. */
export function percentPhaseFov(prescription: Prescription): number {
  return (100 * prescription.fovPhaseMm) / prescription.fovReadoutMm;
}

/** Percent Sampling (DICOM 0018,0093): phase lines over the lines that square pixels would take. */
export function percentSampling(prescription: Prescription): number {
  const squarePixelLines = (prescription.fovPhaseMm / prescription.fovReadoutMm) * prescription.readoutMatrix;
  return (100 * prescription.linesAcrossFov) / squarePixelLines;
}

/** A new Percent Phase Field of View keeps the pixel, so the lines follow the window. */
export function withPercentPhaseFov(prescription: Prescription, percent: number): Partial<Prescription> {
  const fovPhaseMm = round4((percent / 100) * prescription.fovReadoutMm);
  const linesAcrossFov = Math.max(8, Math.round((prescription.linesAcrossFov * fovPhaseMm) / prescription.fovPhaseMm));
  return { fovPhaseMm, linesAcrossFov };
}

/** A new Percent Sampling keeps the window and changes the lines across it. */
export function withPercentSampling(prescription: Prescription, percent: number): Partial<Prescription> {
  const squarePixelLines = (prescription.fovPhaseMm / prescription.fovReadoutMm) * prescription.readoutMatrix;
  return { linesAcrossFov: Math.max(8, Math.round((percent / 100) * squarePixelLines)) };
}

function round4(value: number): number {
  return Math.round(value * 1e4) / 1e4;
}
