import type { RangeMm } from '../model/axes';
import type { SlabResult } from '../model/assessment';
import type { SitePolicy } from '../model/policy';
import type { Prescription, Slab } from '../model/prescription';
import type { Scanner } from '../model/scanner';
import { slabPartitions, smallestCleanPartitions } from './contaminated-partitions';
import { fatShiftShare } from './fat-shift';
import { slabProfile } from './slab-profile';
import type { SlabProfileSpec, SlabQuestion, SlabSource, TissueAlongSlab } from './slab-types';

/** An echo train is excited at 90°, whatever its refocusing flip. */
const ECHO_TRAIN_EXCITATION_DEG = 90;

/** Time-bandwidth product used for a slab: the prescription's, or the policy's cautious value when unknown. */
export function timeBandwidthProductOf(slab: Slab, policy: SitePolicy): number {
  return slab.timeBandwidthProduct ?? policy.unknownTimeBandwidthProduct;
}

/** Which profile a family's slab has. */
export function profileKindOf(p: Prescription, slab: Slab): SlabProfileSpec['kind'] {
  if (!slab.selective) return 'non-selective';
  return p.family === 'gradient-echo-3d' ? 'spoiled' : 'single-pulse';
}

/**
 * Tissues that can wrap: parenchyma in the nominal slab, fat with its own T1 in its shifted slab; the worse counts.
 * Where the gradient's polarity is unknown (slab.fatShiftTowards absent) fat is taken shifted either way.
 */
export function slabSources(
  p: Prescription,
  slab: Slab,
  scanner: Scanner,
  policy: SitePolicy,
): readonly SlabSource[] {
  const kind = profileKindOf(p, slab);
  const timeBandwidthProduct = timeBandwidthProductOf(slab, policy);
  const flipDeg = p.family === 'gradient-echo-3d' ? p.flipDeg : ECHO_TRAIN_EXCITATION_DEG;
  const profile = (t1Ms: number) => slabProfile({ timeBandwidthProduct, flipDeg, kind, trMs: p.trMs, t1Ms });
  const parenchyma: SlabSource = {
    tissue: 'parenchyma',
    profile: profile(policy.tissueT1Ms.parenchyma),
    shiftShare: 0,
  };
  if (kind === 'non-selective') return [parenchyma];
  const fat = profile(policy.tissueT1Ms.fat);
  const share = fatShiftOf(slab, scanner, policy) ?? 0;
  const sides =
    share === 0
      ? [0]
      : slab.fatShiftTowards === 'low-end'
        ? [-1]
        : slab.fatShiftTowards === 'high-end'
          ? [1]
          : [-1, 1];
  return [
    parenchyma,
    ...sides.map((side): SlabSource => ({ tissue: 'fat', profile: fat, shiftShare: side * share })),
  ];
}

/** |Δz|/S of fat, or undefined when the pulse's duration is unknown or the slab is not selective. */
export function fatShiftOf(slab: Slab, scanner: Scanner, policy: SitePolicy): number | undefined {
  if (!slab.selective || slab.pulseDurationMs === undefined) return undefined;
  return fatShiftShare(scanner.fieldStrengthT, slab.pulseDurationMs, timeBandwidthProductOf(slab, policy));
}

/**
 * Reach of any source beyond the nominal low and high edge at the policy's tolerance, as shares of the slab.
 * Both 0.5-based: [low, high], each ≥ 0; infinite for a non-selective slab.
 */
export function slabSkirts(
  sources: readonly SlabSource[],
  tolerance: number,
): { readonly low: number; readonly high: number } {
  let low = 0;
  let high = 0;
  for (const { profile, shiftShare } of sources) {
    const skirt = profile.skirtShare(tolerance);
    low = Math.max(low, skirt - shiftShare);
    high = Math.max(high, skirt + shiftShare);
  }
  return { low, high };
}

export interface SlabSurroundings {
  /** Tissue along the slice axis, mm from the slab centre. */
  readonly tissue: TissueAlongSlab;
  /** Keep-clear range along the slice axis, mm from the slab centre. */
  readonly keepClearMm?: RangeMm;
}

/** The question slabPartitions answers, from a prescription and what surrounds its slab. */
export function slabQuestionOf(
  p: Prescription,
  slab: Slab,
  scanner: Scanner,
  policy: SitePolicy,
  { tissue, keepClearMm }: SlabSurroundings,
): SlabQuestion {
  return {
    partitions: slab.partitions,
    partitionThicknessMm: slab.partitionThicknessMm,
    acquiredPartitions: slab.acquiredPartitions,
    sources: slabSources(p, slab, scanner, policy),
    tissue,
    tolerance: policy.slabTolerance,
    ...(keepClearMm ? { keepClearMm } : {}),
    droppedPartitionsPerEnd: slab.droppedPartitionsPerEnd,
  };
}

/** Largest L_z the scanner takes for a slab: ⌊N_z·(1 + max slice oversampling)⌋. */
export function mostPartitions(slab: Slab, scanner: Scanner): number {
  return Math.floor(slab.partitions * (1 + scanner.limits.sliceOversamplingMaxPct / 100) + 1e-9);
}

/**
 * Slice wrap of a 3D slab as prescribed, and the smallest whole L_z on the scanner's step that leaves every keep-clear
 * partition clean.
 * @returns shares of plateau, mm from the slab centre; smallestCleanPartitions absent when none within the scanner's
 * slice oversampling is enough; fatShiftShare absent when the pulse's duration is unknown
 * @throws DomainError as slabProfile and slabPartitions
 */
export function assessSlab(
  p: Prescription,
  slab: Slab,
  scanner: Scanner,
  policy: SitePolicy,
  surroundings: SlabSurroundings,
): SlabResult {
  const question = slabQuestionOf(p, slab, scanner, policy, surroundings);
  const partitions = slabPartitions(question);
  const skirts = slabSkirts(question.sources, policy.slabTolerance);
  const fat = fatShiftOf(slab, scanner, policy);
  const smallest = smallestCleanPartitions(question, {
    partitionStep: scanner.partitionStep,
    mostPartitions: mostPartitions(slab, scanner),
  });
  const contaminated = partitions.filter(({ state }) => state === 'contaminated');
  return {
    timeBandwidthProduct: timeBandwidthProductOf(slab, policy),
    profileKind: profileKindOf(p, slab),
    skirtShareLow: skirts.low,
    skirtShareHigh: skirts.high,
    ...(fat === undefined ? {} : { fatShiftShare: fat }),
    partitions,
    contaminated: contaminated.length,
    contaminatedInKeepClear: contaminated.filter(({ inKeepClear }) => inKeepClear).length,
    ...(smallest === undefined ? {} : { smallestCleanPartitions: smallest }),
  };
}
