import type { FoldResult, WidthRequirement } from '../model/assessment';
import type { SectionFrame } from '../geometry/section-frame';
import type { FoldProblem } from './fold-problem';

/**
 * A geometry class solved once. Questions about a number of acquired lines (and, for a slab, acquired partitions;
 * N_z when left out) are then cheap.
 */
export interface SolvedFold {
  readonly problem: FoldProblem;
  readonly frame: SectionFrame;
  /** False: no keep-clear area lies in any displayed section, so nothing can reach it. */
  readonly keepClearIsDisplayed: boolean;
  /** Forbidden widths, first and always clean width (real and on the scanner's grid), and what covering the body takes. */
  requirement(acquiredPartitions?: number): WidthRequirement;
  /** Whether nothing folds (or ghosts) into the keep-clear area, margin included. */
  isClean(acquiredLines: number, acquiredPartitions?: number): boolean;
  /** As isClean for any real width [mm]. */
  isWidthClean(widthMm: number, acquiredPartitions?: number): boolean;
  /** Smallest L_z on the scanner's grid (≥ N_z, ≤ its maximum) that is clean at this L; undefined: none. */
  smallestCleanPartitions(acquiredLines: number): number | undefined;
  /** What is left in the picture; remembered per (L, L_z). */
  leftover(acquiredLines: number, acquiredPartitions?: number): FoldResult;
}
