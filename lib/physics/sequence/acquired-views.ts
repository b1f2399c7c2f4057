import { DomainError } from '../model/domain-error';
import type { Prescription } from '../model/prescription';
import { ceilCount, requireRange, requireWhole } from '../model/require-argument';

/** Returns the fraction when 0.5 < f ≤ 1; DomainError "partial-fourier-out-of-range" otherwise. */
export function requirePartialFourier(fraction: number): number {
  if (!(fraction > 0.5 && fraction <= 1)) {
    throw new DomainError('partial-fourier-out-of-range', 'partialFourier', fraction, 'above 0.5, at most 1');
  }
  return fraction;
}

/**
 * Lines left after partial Fourier: Y = ⌈L·f⌉.
 * @param lines L, whole, ≥ 1
 * @param fraction f, 0.5 < f ≤ 1
 * @returns whole, 1 … L
 * @throws DomainError "lines-not-whole", "partial-fourier-out-of-range"
 */
export function partialFourierLines(lines: number, fraction: number): number {
  requireWhole('lines-not-whole', 'lines', lines, 1);
  return ceilCount(lines * requirePartialFourier(fraction));
}

/**
 * Integrated reference lines must lie in the centre that partial Fourier samples on both sides: ref ≤ min(Y, L(2f−1)).
 * @throws DomainError "reference-lines-too-many"
 */
export function requireReferenceFits(
  argument: string,
  reference: number,
  lines: number,
  fraction: number,
): number {
  requireWhole('reference-lines-not-whole', argument, reference, 0);
  const most = Math.min(partialFourierLines(lines, fraction), lines * (2 * fraction - 1));
  if (reference > most + 1e-9) {
    throw new DomainError('reference-lines-too-many', argument, reference, `0 to ${Math.floor(most + 1e-9)}`);
  }
  return reference;
}

/**
 * Lines played with acceleration along phase only and integrated reference lines:
 * Y_acq = ⌈(Y − ref)/R⌉ + ref.
 * @param lines L; fraction f; factor R ≥ 1; reference ref, whole, ≥ 0 (0: calibrated separately)
 * @returns whole
 * @throws DomainError "acceleration-out-of-range", "reference-lines-too-many"
 */
export function acquiredLinesOneWay(
  lines: number,
  fraction: number,
  factor: number,
  reference: number,
): number {
  const kept = partialFourierLines(lines, fraction);
  requireRange('acceleration-out-of-range', 'factorPhase', factor, 1, 64);
  if (factor === 1) return kept;
  const ref = requireReferenceFits('referenceLines', reference, lines, fraction);
  return ceilCount((kept - ref) / factor) + ref;
}

export interface PhaseEncoding {
  readonly count: number;
  readonly fraction: number;
  readonly factor: number;
  readonly reference: number;
}

/**
 * Views of a 3D acquisition (phase lines × partitions):
 * N_acq = ⌈(Y·Z − ref_y·ref_z)/(R_y·R_z)⌉ + ref_y·ref_z; with one accelerated direction only, that direction's
 * Y_acq times the other's whole count (the reference block then spans the other direction).
 * 256 × 64, 2 × 2, block 24 × 24: 4528.
 * @throws DomainError as acquiredLinesOneWay
 */
export function acquiredViewsTwoWay(phase: PhaseEncoding, slice: PhaseEncoding): number {
  if (slice.factor === 1 || phase.factor === 1) {
    return (
      acquiredLinesOneWay(phase.count, phase.fraction, phase.factor, phase.reference) *
      acquiredLinesOneWay(slice.count, slice.fraction, slice.factor, slice.reference)
    );
  }
  const y = partialFourierLines(phase.count, phase.fraction);
  const z = partialFourierLines(slice.count, slice.fraction);
  requireRange('acceleration-out-of-range', 'factorPhase', phase.factor, 1, 64);
  requireRange('acceleration-out-of-range', 'factorSlice', slice.factor, 1, 64);
  const block =
    requireReferenceFits('referenceLines', phase.reference, phase.count, phase.fraction) *
    requireReferenceFits('referencePartitions', slice.reference, slice.count, slice.fraction);
  return ceilCount((y * z - block) / (phase.factor * slice.factor)) + block;
}

/** L_z: acquired partitions of a slab, 1 for a stack. */
export function partitionsOf(prescription: Prescription): number {
  return prescription.slices.mode === 'slab' ? prescription.slices.acquiredPartitions : 1;
}

/** Lines (2D) or views (3D) one image or volume acquires, from the stored integers only. */
export function acquiredViewsOf(p: Prescription): number {
  const phase = {
    count: p.acquiredLines,
    fraction: p.partialFourierPhase,
    factor: p.acceleration.factorPhase,
    reference: p.acceleration.referenceLines,
  };
  if (p.slices.mode === 'stack') {
    return acquiredLinesOneWay(phase.count, phase.fraction, phase.factor, phase.reference);
  }
  return acquiredViewsTwoWay(phase, {
    count: p.slices.acquiredPartitions,
    fraction: p.partialFourierSlice,
    factor: p.acceleration.factorSlice,
    reference: p.acceleration.referencePartitions,
  });
}
