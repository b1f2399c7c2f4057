import { toMicrometres } from '../geometry/micrometres';
import type { OpenInterval } from '../model/assessment';
import type { Interval } from './displacement';

/** Forbidden widths as open intervals of whole micrometres, merged and ascending: [low0, high0, low1, high1, …]. */
export type WidthSet = readonly number[];

export const EVERY_WIDTH: WidthSet = [0, Infinity];

/**
 * Widths W ≥ `fromMm` at which (n/R + κ)·W lies in the displacement interval for some whole n ≠ 0: for each n the
 * interval divided by n/R + κ. Appends pairs to `into` (µm).
 * @param share  κ, between −1/R and 1/R (n/R + κ keeps the sign of n): see fatShares; 0 where nothing is displaced
 */
export function appendForbidden(
  interval: Interval,
  factor: number,
  share: number,
  fromMm: number,
  into: number[],
): void {
  const offset = share * factor;
  appendOneSign(interval[0], interval[1], factor, offset, fromMm, into);
  appendOneSign(-interval[1], -interval[0], factor, -offset, fromMm, into);
}

function appendOneSign(
  low: number,
  high: number,
  factor: number,
  offset: number,
  from: number,
  into: number[],
): void {
  // Past n = factor·high/from the interval lies below the widths asked for.
  for (let n = 1; (high * factor) / (n + offset) > from; n++) {
    appendInterval((low * factor) / (n + offset), (high * factor) / (n + offset), into);
    // An interval that begins at or below zero holds those of every larger n.
    if (low <= 0) return;
  }
}

export function appendInterval(lowMm: number, highMm: number, into: number[]): void {
  const low = Math.max(0, toMicrometres(lowMm));
  const high = toMicrometres(highMm);
  if (high > low) into.push(low, high);
}

/** Merges overlapping open intervals. Two that only touch leave the width between them clean. */
export function mergeWidths(pairs: readonly number[]): WidthSet {
  if (pairs.length <= 2) return pairs;
  const order = Array.from({ length: pairs.length / 2 }, (_, i) => i).sort(
    (a, b) => pairs[2 * a]! - pairs[2 * b]!,
  );
  const merged: number[] = [];
  for (const i of order) {
    const low = pairs[2 * i]!;
    const high = pairs[2 * i + 1]!;
    const end = merged.length - 1;
    if (end >= 0 && low < merged[end]!) merged[end] = Math.max(merged[end]!, high);
    else merged.push(low, high);
  }
  return merged;
}

/** End [mm] of the forbidden interval that holds this width, or undefined when it is clean. */
export function forbiddenUntilMm(set: WidthSet, widthMm: number): number | undefined {
  const width = toMicrometres(widthMm);
  for (let i = 0; i < set.length; i += 2) {
    if (width <= set[i]!) return undefined;
    if (width < set[i + 1]!) return set[i + 1]! / 1000;
  }
  return undefined;
}

/** The intervals that matter for W ≥ fovMm, in mm. The first may begin below the FOV: its true end is kept. */
export function forbiddenFrom(set: WidthSet, fovMm: number): OpenInterval[] {
  const from = toMicrometres(fovMm);
  const intervals: OpenInterval[] = [];
  for (let i = 0; i < set.length; i += 2) {
    if (set[i + 1]! > from) intervals.push([set[i]! / 1000, set[i + 1]! / 1000]);
  }
  return intervals;
}
