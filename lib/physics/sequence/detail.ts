import type { DetailResult } from '../model/assessment';
import type { RangeMm } from '../model/axes';
import type { Prescription } from '../model/prescription';
import { partialFourierLines, partitionsOf, requirePartialFourier } from './acquired-views';
import { requirePositive, requireRange, requireWhole } from '../model/require-argument';

/**
 * SNR factor of partial Fourier: conjugate synthesis h = √(0.5/(1.5 − f)) (6/8: 0.8165; √f would say 0.866);
 * zero-filled at nominal voxel h = 1/√f (the noise of the missing lines is missing too; the picture is blurred).
 * @param fraction 0.5 < f ≤ 1
 * @returns [1]; 1 at f = 1
 * Source: [noll-1991], [macovski-1996]; measured in fixtures/published/snr-time.
 */
export function partialFourierSnr(fraction: number, fill: 'conjugate' | 'zero-filled'): number {
  requirePartialFourier(fraction);
  return fill === 'conjugate' ? Math.sqrt(0.5 / (1.5 - fraction)) : 1 / Math.sqrt(fraction);
}

/**
 * SNR factor of parallel imaging: 1/√(R·g²·(1 − ρ) + ρ), ρ the share of used k-space in reference lines that enter
 * the image. N 64, R 2, ref 16 (ρ = 0.25), g 1.22: 0.635.
 * @param factor R = R_y·R_z ≥ 1; geometryFactor g ≥ 1; referenceShare 0 ≤ ρ ≤ 1
 * Source: [pruessmann-1999].
 */
export function parallelImagingSnr(factor: number, geometryFactor: number, referenceShare: number): number {
  requireRange('acceleration-out-of-range', 'factor', factor, 1, 4096);
  requireRange('geometry-factor-out-of-range', 'geometryFactor', geometryFactor, 1, 100);
  requireRange('reference-share-out-of-range', 'referenceShare', referenceShare, 0, 1);
  return 1 / Math.sqrt(factor * geometryFactor ** 2 * (1 - referenceShare) + referenceShare);
}

/** ρ: share of used k-space (after partial Fourier) in reference lines that enter the image. */
export function referenceShareOf(p: Prescription): number {
  const a = p.acceleration;
  if (!a.referenceInImage || a.factorPhase * a.factorSlice === 1) return 0;
  const usedY = partialFourierLines(p.acquiredLines, p.partialFourierPhase);
  const usedZ =
    p.slices.mode === 'slab' ? partialFourierLines(p.slices.acquiredPartitions, p.partialFourierSlice) : 1;
  // A direction without acceleration is sampled whole, so the reference block spans it.
  const y = a.factorPhase === 1 ? usedY : Math.min(a.referenceLines, usedY);
  const z = p.slices.mode === 'stack' || a.factorSlice === 1 ? usedZ : Math.min(a.referencePartitions, usedZ);
  return (y * z) / (usedY * usedZ);
}

/** Δx (readout), Δy (phase), Δz (slice thickness or acquired partition thickness) [mm]. */
export function voxelMmOf(p: Prescription): readonly [number, number, number] {
  requireWhole('lines-not-whole', 'readoutMatrix', p.readoutMatrix, 1);
  requireWhole('lines-not-whole', 'linesAcrossFov', p.linesAcrossFov, 1);
  return [
    requirePositive('fov-not-positive', 'fovReadoutMm', p.fovReadoutMm) / p.readoutMatrix,
    requirePositive('fov-not-positive', 'fovPhaseMm', p.fovPhaseMm) / p.linesAcrossFov,
    requirePositive(
      'thickness-not-positive',
      'thickness',
      p.slices.mode === 'slab' ? p.slices.partitionThicknessMm : p.slices.thicknessMm,
    ),
  ];
}

export interface DetailOptions {
  /** g where aliases overlap: one number, or [low, high]; 1 where they do not (m = 1). Ignored without acceleration. */
  readonly geometryFactor: number | RangeMm;
}

/**
 * Voxel and SNR: SNR ∝ Δx·Δy·Δz·√(L·L_z·averages·T_ro)·h/√(R·g²(1 − ρ) + ρ), T_ro = 1/(bandwidth per pixel).
 * @returns SNR in arbitrary units (mm³·√s); only ratios mean anything. snrRange is [at highest g, at lowest g], snr the
 * value at the middle of g.
 * @throws DomainError naming the argument
 * Valid: same coil, field, tissue, TR, TE and flip in both assessments compared. For single-shot trains √(1+s) is an
 * upper bound (later echoes carry less signal). Source: [edelstein-1986], [macovski-1996], [pruessmann-1999], [noll-1991].
 */
export function detail(prescription: Prescription, { geometryFactor }: DetailOptions): DetailResult {
  const p = prescription;
  const voxelMm = voxelMmOf(p);
  requireWhole('lines-not-whole', 'acquiredLines', p.acquiredLines, 1);
  requireWhole('averages-not-whole', 'averages', p.averages, 1);
  requirePositive('bandwidth-not-positive', 'bandwidthHzPerPixel', p.bandwidthHzPerPixel);
  const samples = (p.acquiredLines * partitionsOf(p) * p.averages) / p.bandwidthHzPerPixel;
  const fourier =
    partialFourierSnr(p.partialFourierPhase, p.partialFourierFill) *
    (p.slices.mode === 'slab' ? partialFourierSnr(p.partialFourierSlice, p.partialFourierFill) : 1);
  const plain = voxelMm[0] * voxelMm[1] * voxelMm[2] * Math.sqrt(samples) * fourier;

  const factor = p.acceleration.factorPhase * (p.slices.mode === 'slab' ? p.acceleration.factorSlice : 1);
  if (factor === 1) return { voxelMm, snr: plain, snrRange: [plain, plain] };
  const share = referenceShareOf(p);
  const [low, high] = typeof geometryFactor === 'number' ? [geometryFactor, geometryFactor] : geometryFactor;
  return {
    voxelMm,
    snr: plain * parallelImagingSnr(factor, (low + high) / 2, share),
    snrRange: [
      plain * parallelImagingSnr(factor, high, share),
      plain * parallelImagingSnr(factor, low, share),
    ],
  };
}

/**
 * SNR after over SNR before, and its range from g. One coil decides both g's, so low goes with low and high with high.
 */
export function snrRatio(
  before: DetailResult,
  after: DetailResult,
): { readonly ratio: number; readonly range: RangeMm } {
  const ends = [after.snrRange[0] / before.snrRange[0], after.snrRange[1] / before.snrRange[1]] as const;
  return { ratio: after.snr / before.snr, range: [Math.min(...ends), Math.max(...ends)] };
}
