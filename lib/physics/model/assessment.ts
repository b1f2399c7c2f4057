import type { PatientAxis, RangeMm, Side } from './axes';

export type Verdict =
  | 'no-fold-expected'
  | 'fold-outside-keep-clear'
  | 'fold-in-keep-clear'
  | 'cannot-be-scanned'
  | 'not-modelled';

/** A machine-readable reason with the sentence a person reads. */
export interface Reason {
  readonly code: string;
  readonly text: string;
}

/** An assumption that stood in for something unknown, and what would change if it were known. */
export interface Assumption {
  readonly field: string;
  readonly used: string;
  readonly text: string;
}

/** Open interval (from, to) of widths, mm. */
export type OpenInterval = readonly [number, number];

export interface SamplingResult {
  readonly acquiredLines: number;
  readonly acquiredWidthMm: number;
  readonly phaseOversampling: number;
  /** Slab only. */
  readonly acquiredPartitions?: number;
  readonly acquiredSlabMm?: number;
  readonly sliceOversampling?: number;
}

/** What widths are enough along phase, at the present slice sampling. */
export interface WidthRequirement {
  /** Forbidden widths, merged, ascending, for W ≥ the displayed FOV (rounded to 1 µm). */
  readonly forbiddenMm: readonly OpenInterval[];
  /** Smallest feasible real W ≥ F. */
  readonly firstCleanMm: number;
  /** From here on every width is clean. */
  readonly alwaysCleanMm: number;
  /** On the scanner's grid; absent when beyond its maximum. */
  readonly firstCleanLines?: number;
  readonly alwaysCleanLines?: number;
  /** What covering the whole body would take, for comparison. */
  readonly coverBodyMm: number;
  readonly coverBodyLines: number;
}

/** Fold that lands in the picture; areas summed over the worst slice, mm². */
export interface FoldResult {
  readonly inKeepClear: boolean;
  readonly outsideKeepClear: boolean;
  /** Deepest reach into the keep-clear area along phase, mm, with margin and without. */
  readonly depthWithMarginMm: number;
  readonly depthMm: number;
  readonly displayedAreaMm2: number;
  readonly keepClearAreaMm2: number;
  readonly displayedShare: number;
  readonly keepClearShare: number;
  /** Part and side the deepest intruder comes from, and how far it travelled (|n|·W). */
  readonly from?: {
    readonly part: string;
    readonly side: Side;
    readonly order: number;
    readonly distanceMm: number;
    /** EPI: it is fat, displaced by so much along phase before it folded (counted in the distance). */
    readonly fatDisplacedMm?: number;
  };
  readonly placeUncertain: boolean;
  /** Ghosts of image-domain unfolding reach the keep-clear area. */
  readonly ghosts: boolean;
}

export type PartitionState = 'clean' | 'contaminated';

export interface PartitionResult {
  readonly index: number;
  /** Centre of the partition along the slice axis from the slab centre, mm. */
  readonly offsetMm: number;
  /** Own signal relative to slab centre, and the sum of what wraps onto it. */
  readonly signal: number;
  readonly alias: number;
  readonly state: PartitionState;
  readonly dim: boolean;
  readonly bright: boolean;
  readonly inKeepClear: boolean;
}

export interface SlabResult {
  readonly timeBandwidthProduct: number;
  readonly profileKind: 'single-pulse' | 'spoiled' | 'non-selective';
  readonly skirtShareLow: number;
  readonly skirtShareHigh: number;
  readonly fatShiftShare?: number;
  readonly partitions: readonly PartitionResult[];
  readonly contaminated: number;
  readonly contaminatedInKeepClear: number;
  /** First whole L_z on the scanner's grid that leaves every keep-clear partition clean. */
  readonly smallestCleanPartitions?: number;
}

export interface TimeResult {
  readonly scanS: number;
  /** Triggered scans: range from the breath period's spread. */
  readonly scanRangeS?: RangeMm;
  readonly shots: number;
  readonly acquiredViews: number;
  readonly batches: number;
  readonly breathHolds: number;
  readonly longestHoldS: number;
  /** Echo train along phase, ms, and minimum TE it asks for. */
  readonly trainMs?: number;
  readonly minimumTeMs?: number;
  /** EPI displacement at 100 Hz, mm along phase. */
  readonly displacementPer100HzMm?: number;
}

export interface DetailResult {
  readonly voxelMm: readonly [number, number, number];
  /** SNR in arbitrary units; only ratios between two assessments mean anything. */
  readonly snr: number;
  /** Lower and upper SNR when g is a range. */
  readonly snrRange: RangeMm;
}

export interface Assessment {
  readonly engineVersion: string;
  readonly policyVersion: number;
  readonly verdict: Verdict;
  /** First entry is the one shown beside the verdict. */
  readonly reasons: readonly Reason[];
  readonly assumptions: readonly Assumption[];
  readonly phaseAxis: PatientAxis;
  readonly readoutAxis: PatientAxis;
  readonly sampling?: SamplingResult;
  readonly width?: WidthRequirement;
  readonly fold?: FoldResult;
  readonly slab?: SlabResult;
  readonly time?: TimeResult;
  readonly detail?: DetailResult;
}
