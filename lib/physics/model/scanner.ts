import type { Unfolding } from './prescription';

/** The scanner's own grid of acquired lines: L is rounded up to it. */
export type LineStep =
  | { readonly kind: 'line' }
  | { readonly kind: 'even-lines' }
  /** Oversampling in whole multiples of `percent` of N; L itself is then rounded up to whole lines. */
  | { readonly kind: 'percent'; readonly percent: number }
  /** Only L = N or L = 2N. */
  | { readonly kind: 'doubling' };

/** The form in which this scanner takes oversampling (for the plan sheet). */
export type OversamplingForm =
  | 'percent'
  | 'factor'
  | 'doubling-switch'
  | 'doubling-switch-halved-averages'
  | 'mm-per-side';

export type SliceOversamplingForm = 'percent' | 'factor' | 'whole-partitions';

export interface ScannerLimits {
  readonly fovMinMm: number;
  readonly fovMaxMm: number;
  /** Largest usable FOV (imaging volume), mm: across the bore (x, y) and along z. */
  readonly usableFovMm: readonly [number, number, number];
  readonly matrixMax: number;
  readonly acquiredLinesMax: number;
  readonly phaseOversamplingMaxPct: number;
  readonly sliceOversamplingMaxPct: number;
  readonly accelerationPhaseMax: number;
  readonly accelerationSliceMax: number;
  readonly partialFourierMin: number;
  readonly averagesMax: number;
  readonly echoTrainMax: number;
  readonly tableLimitKg: number;
}

/** One element of a receive coil; it sees tissue between these, mm along z from the isocentre. */
export interface CoilElement {
  readonly name: string;
  readonly seesFromMm: number;
  readonly seesToMm: number;
}

export interface CoilDescription {
  /** As a prescription names it. */
  readonly name: string;
  readonly elements: readonly CoilElement[];
}

export interface Scanner {
  readonly name: string;
  readonly fieldStrengthT: number;
  readonly boreDiameterMm: number;
  /** h: table (pad compressed) below the bore's centre, mm. */
  readonly tableBelowCentreMm: number;
  /** Room the anterior coil takes above the patient, mm. */
  readonly anteriorCoilMm: number;
  readonly lineStep: LineStep;
  readonly oversamplingForm: OversamplingForm;
  readonly sliceOversamplingForm: SliceOversamplingForm;
  /** Partitions the scanner can add at a time (1: any whole number). */
  readonly partitionStep: number;
  readonly phaseFovMayExceedReadoutFov: boolean;
  /** How accelerated scans are unfolded here when the protocol does not say. */
  readonly unfolding: Unfolding;
  /** Tissue is seen this far either side of the isocentre along z, mm. */
  readonly tissueReachMm: number;
  /** Share w of a breath in which a triggered scan may acquire. */
  readonly respiratoryWindow: number;
  readonly limits: ScannerLimits;
  /** Coils whose elements the site has described; absent or not listed: no element can be left out. */
  readonly coils?: readonly CoilDescription[];
}
