import { nextAcquiredLines } from '../fold/acquired-lines';
import type { LineStep, ScannerLimits } from '../model/scanner';

/** Largest L on the scanner's grid with N ≤ L ≤ `lines`; undefined when N itself is beyond. */
export function floorToLineGrid(lines: number, linesAcrossFov: number, step: LineStep): number | undefined {
  for (let candidate = Math.floor(lines + 1e-9); candidate >= linesAcrossFov; candidate--) {
    if (isOnLineGrid(candidate, linesAcrossFov, step)) return candidate;
  }
  return undefined;
}

/** Whether L is a value the scanner can be set to. L = N always is: an odd N on an even-line grid is its own start. */
export const isOnLineGrid = (acquiredLines: number, linesAcrossFov: number, step: LineStep): boolean =>
  acquiredLines === linesAcrossFov ||
  nextAcquiredLines(linesAcrossFov, acquiredLines, step) === acquiredLines;

/**
 * Most lines the scanner takes: its maximum percentage rounded up to whole lines is still that percentage
 * (33.3 % of 100 lines is 134).
 */
export const mostAcquiredLines = (linesAcrossFov: number, limits: ScannerLimits): number =>
  Math.min(
    limits.acquiredLinesMax,
    Math.ceil(linesAcrossFov * (1 + limits.phaseOversamplingMaxPct / 100) - 1e-9),
  );
