import { DomainError } from '../model/domain-error';
import type { Reading } from '../model/patient';
import type { Prescription } from '../model/prescription';
import { requirePositive, requireRange, requireWhole } from '../model/require-argument';
import { sliceBatches, slicesPerTrigger } from './slice-groups';

export interface TriggeredTime {
  readonly scanS: number;
  /** Shortest and longest for a breath period within one standard deviation [s]. */
  readonly rangeS: readonly [number, number];
  readonly batches: number;
}

/** Triggers (of one TR each) one slice group takes. */
function triggersPerGroup(p: Prescription, views: number, shots: number): number {
  switch (p.family) {
    case 'single-shot-echo-train':
    case 'balanced':
      return p.averages;
    case 'echo-planar':
      return shots * p.volumes;
    case 'gradient-echo-3d':
      if (p.segments < 1) {
        throw new DomainError(
          'triggered-needs-segments',
          'segments',
          p.segments,
          'at least 1 segment a triggered 3D scan',
        );
      }
      return p.segments * p.averages;
    default:
      return shots * p.averages;
  }
}

/** Time one slice takes within a trigger: a balanced slice plays all its lines there. */
function sliceTimeWithinTriggerMs(p: Prescription, views: number): number {
  return p.family === 'balanced' ? p.trMs * views : p.sliceTimeMs;
}

/**
 * Triggered scan: TR = n breaths, each TR's trigger acquires ⌊w·breath/t_slice⌋ slices:
 * time = n·breath·(shots·averages)·⌈slices/slicesPerTrigger⌉.
 * The range is exact over breath ∈ [mean − SD, mean + SD]: the time is linear in the breath between the periods at
 * which one more slice fits (k·t_slice/w), so it is read at the ends and on both sides of each of those. Periods too
 * short for one slice are left out.
 * @throws DomainError "slice-does-not-fit" when not one slice fits into the window at the mean breath period
 */
export function triggeredTime(
  p: Prescription,
  encoding: { readonly views: number; readonly shots: number },
  breath: Reading,
  window: number,
): TriggeredTime {
  requireWhole('breaths-not-whole', 'breathsPerTr', p.breathsPerTr, 1);
  requirePositive('breath-not-positive', 'breathPeriodS', breath.value);
  requireRange('spread-out-of-range', 'breathPeriodS.spread', breath.spread, 0, 60);
  requireRange('window-out-of-range', 'respiratoryWindow', window, 0.01, 1);
  const triggers = triggersPerGroup(p, encoding.views, encoding.shots);
  const stack = p.slices.mode === 'stack' ? p.slices.slices : undefined;
  const sliceMs = sliceTimeWithinTriggerMs(p, encoding.views);
  const batchesAt = (breathS: number): number =>
    stack === undefined ? 1 : sliceBatches(stack, slicesPerTrigger(window, breathS, sliceMs));
  const timeAt = (breathS: number): number => p.breathsPerTr * breathS * triggers * batchesAt(breathS);

  const scanS = timeAt(breath.value);
  const shortest = stack === undefined ? 0 : sliceMs / 1000 / window;
  const low = Math.max(breath.value - breath.spread, shortest, Math.min(breath.value, 0.1));
  const high = breath.value + breath.spread;
  const times = [scanS, timeAt(low), timeAt(high)];
  if (stack !== undefined) {
    const step = sliceMs / 1000 / window;
    for (let k = Math.ceil(low / step); k <= stack && k * step <= high; k += 1) {
      times.push(timeAt(k * step));
      if (k * step > low && k > 1)
        times.push(p.breathsPerTr * k * step * triggers * sliceBatches(stack, k - 1));
    }
  }
  return { scanS, rangeS: [Math.min(...times), Math.max(...times)], batches: batchesAt(breath.value) };
}
