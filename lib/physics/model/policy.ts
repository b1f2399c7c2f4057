import type { PerSide } from './axes';

/** Cost points per unit; 1 point = as bad as 1 % more scan time. All ≥ 0. */
export interface CostWeights {
  /** per 1 % more scan time; a saving earns nothing, so no term is negative. */
  readonly timePct: number;
  /** per 1 % of SNR lost (a gain costs nothing and earns nothing). */
  readonly snrLostPct: number;
  /** per 1 % of voxel volume gained. */
  readonly voxelPct: number;
  /** per second of breath-hold beyond the patient's limit, and for each further breath-hold. */
  readonly breathHoldS: number;
  readonly extraBreathHold: number;
  /** per 1 % of the displayed area, and of the keep-clear area, still under fold. */
  readonly foldDisplayedPct: number;
  readonly foldKeepClearPct: number;
  /** Fixed prices of a side effect or an act. */
  readonly swap: Readonly<Record<'abdomen' | 'pelvis' | 'chest' | 'head' | 'shoulder' | 'hip' | 'knee' | 'breast', number>>;
  readonly presaturationBand: number;
  readonly edit: number;
  readonly recentre: number;
  readonly armsUp: number;
  readonly reposition: number;
  readonly coilElements: number;
  /** per average given up (motion averages less), and for each step of acceleration or partial Fourier added. */
  readonly fewerAverages: number;
  readonly moreAcceleration: number;
  readonly partialFourier: number;
  /** per mm of coverage given up. */
  readonly coverageMm: number;
  /** per 1 % longer echo train or EPI displacement. */
  readonly trainPct: number;
}

export interface SitePolicy {
  readonly version: number;
  /** Safety margin: dilation of tissue, mm a side. */
  readonly marginMm: PerSide;
  /** Tissue lighter than this share of trunk signal does not count. */
  readonly tissueTolerance: number;
  /** Partition contaminated above this share of plateau. */
  readonly slabTolerance: number;
  /** Sure at p, 0.5–0.999. */
  readonly sureAt: number;
  /** Cautious time-bandwidth product used when a scanner's slab pulse is unknown. */
  readonly unknownTimeBandwidthProduct: number;
  readonly tissueT1Ms: { readonly parenchyma: number; readonly fat: number };
  /**
   * True over nominal flip of presaturation bands over outlying tissue, as measured on site, 0.3–2; absent: not measured,
   * and the cautious CAUTIOUS_B1_SCALE is taken.
   */
  readonly presaturationB1Scale?: number;
  /** Geometry factor range by overlap count m (index 2, 3, 4) when the site has no table. */
  readonly geometryFactorByOverlap: Readonly<Record<'2' | '3' | '4', readonly [number, number]>>;
  readonly strictBreathHold: boolean;
  /** Largest share of the displayed picture that may stay under fold outside the keep-clear area in a remedy, percent. */
  readonly tolerateFoldOutsidePct: number;
  readonly readingExpiryDays: number;
  readonly signOffAlways: boolean;
  readonly weights: CostWeights;
}
