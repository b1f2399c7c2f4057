import type { ArmPosition } from './patient';
import type { Prescription } from './prescription';
import type { Assessment, Reason } from './assessment';

export type RemedyKind =
  | 'phase-oversampling'
  | 'slice-oversampling'
  | 'swap'
  | 'larger-fov-same-matrix'
  | 'larger-fov-same-voxel'
  | 'recentre'
  | 'arms-up'
  | 'presaturation'
  | 'drop-end-partitions'
  | 'enlarge-slab'
  | 'sharper-pulse'
  | 'coil-elements'
  | 'regroup-breath-holds';

/** What pays the time back. */
export type PaybackKind = 'fewer-averages' | 'more-acceleration' | 'partial-fourier';

export type CostTermKind =
  | 'time'
  | 'snr'
  | 'voxel'
  | 'breath-hold'
  | 'side-effects'
  | 'effort'
  | 'leftover-fold';

/** Integer tenths of a cost point. */
export interface CostTerm {
  readonly kind: CostTermKind;
  readonly tenths: number;
  readonly text: string;
}

export interface Remedy {
  /** Fixed key, e.g. "phase-oversampling+fewer-averages"; unique in a ranking. */
  readonly key: string;
  readonly changes: readonly RemedyKind[];
  readonly payback?: PaybackKind;
  /** One sentence a radiographer would say. */
  readonly sentence: string;
  /** The whole prescription after the remedy, and the arms it needs. */
  readonly prescription: Prescription;
  readonly arms: ArmPosition;
  readonly assessment: Assessment;
  readonly costTenths: number;
  readonly terms: readonly CostTerm[];
  readonly sideEffects: readonly string[];
  /** Beaten in time, SNR, voxel, fold and effort by another: behind "show all". */
  readonly dominated: boolean;
  readonly physicalActions: number;
}

export interface RemedyNotPossible {
  readonly key: string;
  readonly changes: readonly RemedyKind[];
  readonly payback?: PaybackKind;
  readonly reason: Reason;
}

export interface Ranking {
  readonly now: Assessment;
  /** Ascending by cost, ties by physical actions, then key. */
  readonly remedies: readonly Remedy[];
  readonly notPossible: readonly RemedyNotPossible[];
  readonly candidates: number;
}
