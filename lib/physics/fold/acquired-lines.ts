import { toMicrometres } from '../geometry/micrometres';
import { DomainError } from '../model/domain-error';
import type { LineStep } from '../model/scanner';

/** Guards ⌈N(1+s)⌉ against 256 · 1.1 = 281.600…03 turning a whole result into the next one. */
const CEIL_GUARD = 1e-9;

function requireWhole(argument: string, value: number): void {
  if (!Number.isInteger(value) || value < 1)
    throw new DomainError('not-a-whole-number', argument, value, 'a whole number ≥ 1');
}

/**
 * Smallest number of lines on the scanner's grid that is ≥ `atLeast` and ≥ N.
 * @returns undefined when the grid ends before (doubling: beyond 2N)
 */
export function nextAcquiredLines(
  linesAcrossFov: number,
  atLeast: number,
  step: LineStep,
): number | undefined {
  requireWhole('linesAcrossFov', linesAcrossFov);
  const needed = Math.max(linesAcrossFov, Math.ceil(atLeast - CEIL_GUARD));
  switch (step.kind) {
    case 'line':
      return needed;
    case 'even-lines':
      return needed + (needed % 2);
    case 'doubling':
      if (needed <= linesAcrossFov) return linesAcrossFov;
      return needed <= 2 * linesAcrossFov ? 2 * linesAcrossFov : undefined;
    case 'percent': {
      if (!(step.percent > 0))
        throw new DomainError('step-not-positive', 'step.percent', step.percent, '> 0 %');
      const linesAt = (k: number) => Math.ceil(linesAcrossFov * (1 + (k * step.percent) / 100) - CEIL_GUARD);
      let k = Math.max(0, Math.floor(((needed / linesAcrossFov - 1) * 100) / step.percent) - 1);
      while (linesAt(k) < needed) k++;
      return linesAt(k);
    }
  }
}

/**
 * Acquired lines for a requested phase oversampling: L = ⌈N(1+s)⌉ rounded up to the scanner's step. L is what is
 * stored; s never is.
 * @param oversampling s [1], 0 is none, 0.25 is 25 %
 * @throws DomainError "oversampling-negative", "oversampling-beyond-step"
 */
export function acquiredLines(linesAcrossFov: number, oversampling: number, step: LineStep): number {
  if (!(oversampling >= 0))
    throw new DomainError('oversampling-negative', 'oversampling', oversampling, '≥ 0');
  if (step.kind === 'percent') {
    // The step is in percent of N, so the percentage is rounded up first and whole lines come last.
    const steps = Math.ceil((oversampling * 100) / step.percent - CEIL_GUARD);
    const lines = Math.ceil(linesAcrossFov * (1 + (steps * step.percent) / 100) - CEIL_GUARD);
    return Math.max(lines, linesAcrossFov);
  }
  const lines = nextAcquiredLines(linesAcrossFov, linesAcrossFov * (1 + oversampling), step);
  if (lines === undefined) {
    throw new DomainError(
      'oversampling-beyond-step',
      'oversampling',
      oversampling,
      'at most 1 (doubling) on this scanner',
    );
  }
  return lines;
}

/** Acquired width W = L · F / N [mm]. */
export function acquiredWidthMm(lines: number, linesAcrossFov: number, fovMm: number): number {
  return (lines * fovMm) / linesAcrossFov;
}

/** The oversampling that is really acquired, L/N − 1 [1]; every cost uses this one. */
export function effectiveOversampling(lines: number, linesAcrossFov: number): number {
  return lines / linesAcrossFov - 1;
}

/**
 * Smallest L on the scanner's grid whose width is at least `minWidthMm`, compared after rounding to 1 µm.
 * @returns undefined when the grid ends before
 */
export function smallestAcquiredLines(question: {
  readonly linesAcrossFov: number;
  readonly fovMm: number;
  readonly minWidthMm: number;
  readonly step: LineStep;
}): number | undefined {
  const { linesAcrossFov, fovMm, minWidthMm, step } = question;
  const wanted = toMicrometres(minWidthMm);
  const enough = (lines: number) => toMicrometres(acquiredWidthMm(lines, linesAcrossFov, fovMm)) >= wanted;
  // One line below the exact quotient: rounding to 1 µm may already accept it.
  let lines = nextAcquiredLines(linesAcrossFov, Math.floor((minWidthMm * linesAcrossFov) / fovMm) - 1, step);
  while (lines !== undefined && !enough(lines)) lines = nextAcquiredLines(linesAcrossFov, lines + 1, step);
  return lines;
}

/** Smallest L_z = N_z + k·step that is ≥ `atLeast`. */
export function nextAcquiredPartitions(partitions: number, atLeast: number, step: number): number {
  requireWhole('partitions', partitions);
  requireWhole('partitionStep', step);
  const added = Math.max(0, Math.ceil(atLeast - partitions - CEIL_GUARD));
  return partitions + Math.ceil(added / step) * step;
}

/** Acquired partitions L_z for a requested slice oversampling [1], whole partitions on the scanner's step. */
export function acquiredPartitions(partitions: number, oversampling: number, step: number): number {
  if (!(oversampling >= 0))
    throw new DomainError('oversampling-negative', 'oversampling', oversampling, '≥ 0');
  return nextAcquiredPartitions(partitions, partitions * (1 + oversampling), step);
}

/** Acquired slab W_z = L_z · d [mm]. */
export function acquiredSlabMm(acquired: number, partitionThicknessMm: number): number {
  return acquired * partitionThicknessMm;
}

/** Smallest L_z on the grid whose W_z is at least `minSlabMm`, compared after rounding to 1 µm. */
export function smallestAcquiredPartitions(question: {
  readonly partitions: number;
  readonly partitionThicknessMm: number;
  readonly minSlabMm: number;
  readonly step: number;
}): number {
  const { partitions, partitionThicknessMm, minSlabMm, step } = question;
  const wanted = toMicrometres(minSlabMm);
  let acquired = nextAcquiredPartitions(partitions, Math.floor(minSlabMm / partitionThicknessMm) - 1, step);
  while (toMicrometres(acquiredSlabMm(acquired, partitionThicknessMm)) < wanted) {
    acquired = nextAcquiredPartitions(partitions, acquired + 1, step);
  }
  return acquired;
}
