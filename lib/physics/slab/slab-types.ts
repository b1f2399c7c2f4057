import type { RangeMm } from '../model/axes';

/** What a profile is made from. */
export interface SlabProfileSpec {
  /** Time-bandwidth product of the slab pulse [1], 1–40. Not used by 'non-selective'. */
  readonly timeBandwidthProduct: number;
  /** Flip angle at the slab centre [degree], 0 < flip ≤ 150. */
  readonly flipDeg: number;
  readonly kind: 'single-pulse' | 'spoiled' | 'non-selective';
  /** Repetition time [ms] and T1 [ms]; only 'spoiled' uses them, and then both are required. */
  readonly trMs?: number;
  readonly t1Ms?: number;
}

/** Signal across a slab, relative to the slab centre. Positions are in slab thicknesses S from its centre. */
export interface SlabProfile {
  readonly kind: SlabProfileSpec['kind'];
  readonly timeBandwidthProduct: number;
  readonly flipDeg: number;
  /** M(z)/M(0); z = ±0.5 are the nominal edges. Symmetric. */
  at(zOverSlab: number): number;
  /**
   * How far beyond a nominal edge the outermost crossing of `threshold` lies, in slab thicknesses, ≥ 0.
   * Infinite for a non-selective slab. @param threshold share of the centre signal, 0.001–0.9
   */
  skirtShare(threshold: number): number;
}

/** One tissue's excitation: its profile, and where its slab sits (chemical shift moves fat's). */
export interface SlabSource {
  readonly tissue: 'parenchyma' | 'fat';
  readonly profile: SlabProfile;
  /** Displacement of this tissue's slab towards the high end, in slab thicknesses (signed). */
  readonly shiftShare: number;
}

/** Tissue along the slice axis, in mm from the slab centre. */
export interface TissueAlongSlab {
  /** Nothing lies outside this range (isocentre ± the site's reach, cut to the body). */
  readonly rangeMm: RangeMm;
  /** Weight of tissue at an offset, ≥ 0: 1 in the body, 0 outside; absent: 1 in the whole range. */
  readonly weightAt?: (offsetMm: number) => number;
}

export interface SlabQuestion {
  /** N_z partitions of thickness d make the nominal slab S = N_z·d. */
  readonly partitions: number;
  readonly partitionThicknessMm: number;
  /** L_z ≥ N_z; the acquired slab width is W_z = L_z·d. */
  readonly acquiredPartitions: number;
  /** The first source gives `signal`, `dim` and `bright`; `alias` is the worst over all. */
  readonly sources: readonly SlabSource[];
  readonly tissue: TissueAlongSlab;
  /** Contaminated above this share of the plateau. */
  readonly tolerance: number;
  /** Keep-clear range along the slice axis, mm from the slab centre; absent: no partition is in it. */
  readonly keepClearMm?: RangeMm;
  /** Partitions given up at each end: outside the keep-clear area whatever its range. */
  readonly droppedPartitionsPerEnd: number;
}
