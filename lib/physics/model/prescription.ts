import type { PatientAxis, Vec3 } from './axes';

export type SequenceFamily =
  | 'spin-echo'
  | 'gradient-echo'
  | 'echo-train-spin-echo'
  | 'single-shot-echo-train'
  | 'echo-planar'
  | 'balanced'
  | 'gradient-echo-3d'
  | 'echo-train-spin-echo-3d';

/** Anything but 'cartesian' is answered "not modelled". */
export type Trajectory =
  | 'cartesian'
  | 'radial'
  | 'spiral'
  | 'rotating-blade'
  | 'simultaneous-multi-slice'
  | 'outer-volume-suppressed';

export type Plane = 'axial' | 'coronal' | 'sagittal';

/** How an accelerated scan is unfolded; 'unknown' is treated as 'image-domain-grid-ends' and said so. */
export type Unfolding =
  | 'k-space-self-calibrating'
  | 'image-domain-grid-ends'
  | 'image-domain-beyond'
  | 'unknown';

export interface Acceleration {
  /** R along phase and along slice, ≥ 1; 1 and 1 is no acceleration. */
  readonly factorPhase: number;
  readonly factorSlice: number;
  readonly unfolding: Unfolding;
  /** Integrated reference lines (and partitions); 0 with separate calibration. */
  readonly referenceLines: number;
  readonly referencePartitions: number;
  /** Whether reference lines enter the image (they then raise SNR). */
  readonly referenceInImage: boolean;
  /** Seconds of a separate calibration scan, 0 if integrated. */
  readonly calibrationS: number;
  /** Geometry factor where aliases overlap; absent: site table, else a range. */
  readonly geometryFactor?: number;
}

export interface SliceStack {
  readonly mode: 'stack';
  readonly slices: number;
  readonly thicknessMm: number;
  readonly gapMm: number;
}

export interface Slab {
  readonly mode: 'slab';
  /** N_z, partitions in the nominal slab, and their acquired thickness d. */
  readonly partitions: number;
  readonly partitionThicknessMm: number;
  /** L_z ≥ N_z, the stored integer. Slice oversampling is L_z / N_z − 1. */
  readonly acquiredPartitions: number;
  readonly selective: boolean;
  /** Time-bandwidth product of the slab pulse; absent: unknown, the policy's cautious value is used. */
  readonly timeBandwidthProduct?: number;
  /** Pulse duration, ms; absent: fat's slab shift is not worked out and said so. */
  readonly pulseDurationMs?: number;
  /** Slab end (low: towards −slice axis) that fat's slab is shifted to; absent: unknown, both are taken. */
  readonly fatShiftTowards?: 'low-end' | 'high-end';
  /** End partitions given up each end, out of the keep-clear area. */
  readonly droppedPartitionsPerEnd: number;
}

export interface Prescription {
  readonly name: string;
  readonly family: SequenceFamily;
  readonly trajectory: Trajectory;
  readonly plane: Plane;
  /** Tilts of the plane about its readout and phase axes, and rotation in the plane, degrees. */
  readonly tiltAboutReadoutDeg: number;
  readonly tiltAboutPhaseDeg: number;
  readonly inPlaneRotationDeg: number;
  /** FOV centre in patient coordinates, mm. */
  readonly centreMm: Vec3;
  /** Patient axis of the phase direction before tilts; must lie in the plane. Readout is the plane's other axis. */
  readonly phaseAxis: PatientAxis;
  readonly fovPhaseMm: number;
  readonly fovReadoutMm: number;
  /** N, phase lines across the displayed phase FOV; its pixel is fovPhaseMm / linesAcrossFov. */
  readonly linesAcrossFov: number;
  readonly readoutMatrix: number;
  /** L ≥ N, the stored integer. Phase oversampling is L / N − 1; acquired width W = L · fovPhaseMm / N. */
  readonly acquiredLines: number;
  readonly slices: SliceStack | Slab;

  readonly trMs: number;
  readonly teMs: number;
  readonly flipDeg: number;
  readonly averages: number;
  /** Fraction of lines acquired, 0.5 < f ≤ 1, along phase and along slice. */
  readonly partialFourierPhase: number;
  readonly partialFourierSlice: number;
  /** 'conjugate' synthesis or 'zero-filled'. */
  readonly partialFourierFill: 'conjugate' | 'zero-filled';
  readonly echoTrainLength: number;
  readonly echoSpacingMs: number;
  /** Shots of a segmented echo-planar readout; 1 is single shot. */
  readonly shots: number;
  /** Phase end that fat is displaced to in EPI, by the polarity of the blips; absent: unknown, both are taken. */
  readonly fatDisplacedTowards?: 'low-end' | 'high-end';
  /** Images an EPI series acquires: Σ over b-values of directions · averages, or volumes; 1 elsewhere. */
  readonly volumes: number;
  readonly bandwidthHzPerPixel: number;
  /** Time one slice takes inside TR: train, fat suppression, presaturation, ms. 2D interleaved families. */
  readonly sliceTimeMs: number;
  /** Preparation per segment (3D), ms, and segments; 0 when none. */
  readonly preparationMs: number;
  readonly segments: number;
  readonly fatSuppressed: boolean;
  /** 'breath-hold' needs each hold inside the patient's limit; 'triggered' sets TR = breathsPerTr · breath period. */
  readonly breathing: 'free' | 'breath-hold' | 'triggered';
  readonly breathsPerTr: number;
  readonly acceleration: Acceleration;
  /** Presaturation bands; a band on a side keeps the tissue's weight of physics.md §1, never 0. */
  readonly presaturation: readonly PresaturationBand[];
  /** Coil sensitivity is unknown in the foundation: every weight is ≥ 1. */
  readonly coil: string;
  /** Elements of it that are used; absent: all. */
  readonly coilElements?: readonly string[];
}

export interface PresaturationBand {
  readonly side: 'right' | 'left' | 'anterior' | 'posterior' | 'superior' | 'inferior';
  /** Distance of the band's inner edge from the origin along that side, mm, and its thickness. */
  readonly innerEdgeMm: number;
  readonly thicknessMm: number;
  readonly nominalFlipDeg: number;
  readonly delayMs: number;
}
