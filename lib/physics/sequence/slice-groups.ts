import { DomainError } from '../model/domain-error';
import { ceilCount, floorCount, requirePositive, requireWhole } from '../model/require-argument';

/**
 * Slices that fit into one TR: ⌊TR/t_slice⌋; 0 when not even one fits.
 * @param trMs [ms] > 0; sliceTimeMs t_slice [ms] > 0: train, fat suppression, presaturation
 */
export function slicesPerTr(trMs: number, sliceTimeMs: number): number {
  requirePositive('tr-not-positive', 'trMs', trMs);
  requirePositive('slice-time-not-positive', 'sliceTimeMs', sliceTimeMs);
  return floorCount(trMs / sliceTimeMs);
}

/**
 * Slices one respiratory trigger may acquire: ⌊w·breath/t_slice⌋; 0 when not even one fits.
 * @param window w, share of a breath, 0 < w ≤ 1; breathS [s] > 0; sliceTimeMs [ms] > 0
 */
export function slicesPerTrigger(window: number, breathS: number, sliceTimeMs: number): number {
  requirePositive('window-not-positive', 'window', window);
  requirePositive('breath-not-positive', 'breathS', breathS);
  requirePositive('slice-time-not-positive', 'sliceTimeMs', sliceTimeMs);
  return floorCount((window * breathS * 1000) / sliceTimeMs);
}

/**
 * Slice batches: ⌈slices/per⌉.
 * @throws DomainError "slice-does-not-fit": not even one slice fits into TR (or the trigger's window)
 */
export function sliceBatches(slices: number, perBatch: number): number {
  requireWhole('slices-not-whole', 'slices', slices, 1);
  if (perBatch < 1) {
    throw new DomainError(
      'slice-does-not-fit',
      'slices in one TR or trigger',
      perBatch,
      'room for at least one slice',
    );
  }
  return ceilCount(slices / perBatch);
}

export interface BreathHolds {
  readonly breathHolds: number;
  readonly longestHoldS: number;
}

/**
 * Breath-holds of slices played one after another: the smallest number that keeps each hold inside the limit.
 * When a single slice is already longer than the limit, one hold a slice, and longestHoldS says by how much.
 * @param slices whole ≥ 1; perSliceS [s] > 0; limitS [s] > 0
 */
export function sequentialBreathHolds(slices: number, perSliceS: number, limitS: number): BreathHolds {
  requireWhole('slices-not-whole', 'slices', slices, 1);
  requirePositive('slice-time-not-positive', 'perSliceS', perSliceS);
  requirePositive('breath-hold-not-positive', 'limitS', limitS);
  const perHold = Math.min(slices, Math.max(1, floorCount(limitS / perSliceS)));
  const breathHolds = ceilCount(slices / perHold);
  // Slices are shared out evenly, so the longest hold can be shorter than the limit would allow.
  return { breathHolds, longestHoldS: ceilCount(slices / breathHolds) * perSliceS };
}
