import type { PartitionResult } from '../model/assessment';
import { DomainError } from '../model/domain-error';
import type { SlabQuestion, SlabSource, TissueAlongSlab } from './slab-types';

/** Shares are rounded to 1 / this before they are compared, so that browser and server agree. */
const SHARES_PER_UNIT = 1e6;
const DIM_BELOW = 0.9;
const BRIGHT_ABOVE = 1.1;

const rounded = (share: number): number => Math.round(share * SHARES_PER_UNIT) / SHARES_PER_UNIT;

function tissueWeight(tissue: TissueAlongSlab, offsetMm: number): number {
  if (offsetMm < tissue.rangeMm[0] || offsetMm > tissue.rangeMm[1]) return 0;
  return tissue.weightAt ? tissue.weightAt(offsetMm) : 1;
}

/** Centre of partition `index` of `count`, mm from the slab centre. */
export function partitionCentreMm(index: number, count: number, thicknessMm: number): number {
  return (index - (count - 1) / 2) * thicknessMm;
}

/**
 * What wraps onto one place: Σ_{j≠0} M(z + j·W_z)·inBody(z + j·W_z).
 * @param offsetMm z from the slab centre [mm]; slabMm S; acquiredSlabMm W_z, any real width ≥ S
 * @returns share of the plateau, ≥ 0
 */
export function aliasAt(
  offsetMm: number,
  slabMm: number,
  acquiredSlabMm: number,
  source: SlabSource,
  tissue: TissueAlongSlab,
): number {
  let sum = 0;
  const first = Math.ceil((tissue.rangeMm[0] - offsetMm) / acquiredSlabMm);
  const last = Math.floor((tissue.rangeMm[1] - offsetMm) / acquiredSlabMm);
  for (let j = first; j <= last; j += 1) {
    if (j === 0) continue;
    const at = offsetMm + j * acquiredSlabMm;
    const weight = tissueWeight(tissue, at);
    if (weight > 0) sum += weight * source.profile.at(at / slabMm - source.shiftShare);
  }
  return sum;
}

export function requireSlabQuestion(q: SlabQuestion): void {
  const whole = (argument: string, value: number, low: number): void => {
    if (!Number.isInteger(value) || value < low) {
      throw new DomainError('partitions-not-whole', argument, value, `a whole number, ${low} or more`);
    }
  };
  whole('partitions', q.partitions, 1);
  whole('acquiredPartitions', q.acquiredPartitions, q.partitions);
  whole('droppedPartitionsPerEnd', q.droppedPartitionsPerEnd, 0);
  if (!(q.partitionThicknessMm > 0) || !Number.isFinite(q.partitionThicknessMm)) {
    throw new DomainError(
      'thickness-not-positive',
      'partitionThicknessMm',
      q.partitionThicknessMm,
      'a number above 0 mm',
    );
  }
  if (!(q.tolerance > 0 && q.tolerance < 1)) {
    throw new DomainError('tolerance-out-of-range', 'tolerance', q.tolerance, 'between 0 and 1');
  }
  if (q.sources.length === 0) throw new DomainError('no-source', 'sources', 0, 'at least one tissue');
  const [low, high] = q.tissue.rangeMm;
  if (!(low <= high) || !Number.isFinite(low) || !Number.isFinite(high)) {
    throw new DomainError('tissue-range-invalid', 'tissue.rangeMm', q.tissue.rangeMm, 'finite, low ≤ high');
  }
}

/** Partitions that belong to the keep-clear area: they overlap its range and are not given up. */
function keptIndices(q: SlabQuestion): readonly boolean[] {
  const half = q.partitionThicknessMm / 2;
  return Array.from({ length: q.partitions }, (_, index) => {
    if (!q.keepClearMm) return false;
    if (index < q.droppedPartitionsPerEnd || index >= q.partitions - q.droppedPartitionsPerEnd) return false;
    const centre = partitionCentreMm(index, q.partitions, q.partitionThicknessMm);
    // Touching is not overlapping; a micrometre keeps browser and server alike.
    return centre + half > q.keepClearMm[0] + 1e-3 && centre - half < q.keepClearMm[1] - 1e-3;
  });
}

/** Worst alias over the sources, at a real acquired width. */
function worstAlias(q: SlabQuestion, offsetMm: number, acquiredSlabMm: number): number {
  const slabMm = q.partitions * q.partitionThicknessMm;
  let worst = 0;
  for (const source of q.sources)
    worst = Math.max(worst, aliasAt(offsetMm, slabMm, acquiredSlabMm, source, q.tissue));
  return rounded(worst);
}

/**
 * Every partition's own signal and what wraps onto it at W_z = S·(1 + s), s any real ≥ 0: the engine at a width no
 * scanner's whole partitions need reach.
 * @throws DomainError "oversampling-negative" and those of slabPartitions
 */
export function slabPartitionsAt(q: SlabQuestion, sliceOversampling: number): readonly PartitionResult[] {
  requireSlabQuestion(q);
  if (!(sliceOversampling >= 0) || !Number.isFinite(sliceOversampling)) {
    throw new DomainError(
      'oversampling-negative',
      'sliceOversampling',
      sliceOversampling,
      'a number, 0 or more',
    );
  }
  const slabMm = q.partitions * q.partitionThicknessMm;
  const kept = keptIndices(q);
  const own = q.sources[0]!;
  return kept.map((inKeepClear, index) => {
    const offsetMm = partitionCentreMm(index, q.partitions, q.partitionThicknessMm);
    const signal = rounded(own.profile.at(offsetMm / slabMm - own.shiftShare));
    const alias = worstAlias(q, offsetMm, slabMm * (1 + sliceOversampling));
    return {
      index,
      offsetMm,
      signal,
      alias,
      state: alias > q.tolerance ? 'contaminated' : 'clean',
      dim: signal < DIM_BELOW,
      bright: signal > BRIGHT_ABOVE,
      inKeepClear,
    };
  });
}

/**
 * Every partition of the slab, sampled at its centre: own signal relative to the slab centre, the sum of what wraps
 * onto it (the worse of the tissues), contaminated above the tolerance; dim (< 0.9) and bright (> 1.1), which is not wrap.
 * @param q mm and shares; see SlabQuestion
 * @returns one entry a partition, low end first
 * @throws DomainError "partitions-not-whole", "thickness-not-positive", "tolerance-out-of-range", "no-source",
 * "tissue-range-invalid"
 * Valid: slice direction alone (where phase folds at the same time see the fold model's pairs of widths).
 */
export function slabPartitions(q: SlabQuestion): readonly PartitionResult[] {
  requireSlabQuestion(q);
  return slabPartitionsAt(q, q.acquiredPartitions / q.partitions - 1);
}

/** Whether every partition of the keep-clear area is clean with `acquiredPartitions`. */
function allKeptClean(q: SlabQuestion, kept: readonly boolean[], acquiredPartitions: number): boolean {
  const acquiredSlabMm = acquiredPartitions * q.partitionThicknessMm;
  return kept.every(
    (inKeepClear, index) =>
      !inKeepClear ||
      worstAlias(q, partitionCentreMm(index, q.partitions, q.partitionThicknessMm), acquiredSlabMm) <=
        q.tolerance,
  );
}

/**
 * Smallest slice oversampling that is enough: the first L_z = N_z + k·step, k = 0, 1, …, at which every keep-clear
 * partition is clean. Contamination need not fall steadily as L_z grows (side lobes), so each is tried.
 * @param grid.partitionStep partitions the scanner adds at a time, whole ≥ 1
 * @param grid.mostPartitions the scanner's largest L_z
 * @returns whole partitions, or undefined when none up to mostPartitions is enough
 * @throws DomainError as slabPartitions
 */
export function smallestCleanPartitions(
  q: SlabQuestion,
  grid: { readonly partitionStep: number; readonly mostPartitions: number },
): number | undefined {
  requireSlabQuestion(q);
  if (!Number.isInteger(grid.partitionStep) || grid.partitionStep < 1) {
    throw new DomainError(
      'partition-step-not-whole',
      'partitionStep',
      grid.partitionStep,
      'a whole number, 1 or more',
    );
  }
  const kept = keptIndices(q);
  for (let acquired = q.partitions; acquired <= grid.mostPartitions; acquired += grid.partitionStep) {
    if (allKeptClean(q, kept, acquired)) return acquired;
  }
  return undefined;
}
