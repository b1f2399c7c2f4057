import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { axesOfPlane } from '@/lib/domain/case/lines';
import type { Acceleration, Prescription, PresaturationBand, Slab, SliceStack } from '@/lib/domain/case/model';
import { vec3Schema } from '@/lib/schemas/case/patient';
import { choice, count, flag, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';

type ShapeOf<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

export const FAMILIES = [
  'spin-echo', 'gradient-echo', 'echo-train-spin-echo', 'single-shot-echo-train', 'echo-planar', 'balanced',
  'gradient-echo-3d', 'echo-train-spin-echo-3d',
] as const;
export const TRAJECTORIES = [
  'cartesian', 'radial', 'spiral', 'rotating-blade', 'simultaneous-multi-slice', 'outer-volume-suppressed',
] as const;
export const UNFOLDINGS = [
  'k-space-self-calibrating', 'image-domain-grid-ends', 'image-domain-beyond', 'unknown',
] as const;
export const PLANES = ['axial', 'coronal', 'sagittal'] as const;
export const AXES = ['RL', 'AP', 'SI'] as const;
export const SIDE_NAMES = ['right', 'left', 'anterior', 'posterior', 'superior', 'inferior'] as const;
export const FAMILIES_3D: readonly Prescription['family'][] = ['gradient-echo-3d', 'echo-train-spin-echo-3d'];

export const accelerationShape = {
  factorPhase: quantity({ min: 1, max: 12, unit: '1', text: 'Acceleration factor along phase; 1 is none' }),
  factorSlice: quantity({ min: 1, max: 8, unit: '1', text: 'Acceleration factor along slice (3D); 1 is none' }),
  unfolding: choice(UNFOLDINGS, 'How the accelerated scan is unfolded; unknown is treated as a grid that ends at the acquired width.'),
  referenceLines: count({ min: 0, max: 256, unit: 'lines', text: 'Integrated reference lines; 0 with a separate calibration' }),
  referencePartitions: count({ min: 0, max: 256, unit: 'partitions', text: 'Integrated reference partitions' }),
  referenceInImage: flag('Reference lines enter the image and raise its SNR.'),
  calibrationS: quantity({ min: 0, max: 300, unit: 's', text: 'Separate calibration scan' }),
  geometryFactor: quantity({ min: 1, max: 20, unit: '1', text: 'Geometry factor where aliases overlap; left out: the policy’s range' })
    .optional(),
} satisfies ShapeOf<Acceleration>;

export const stackShape = {
  mode: z.literal('stack').describe('A stack of 2D slices.'),
  slices: count({ min: 1, max: 500, text: 'Slices' }),
  thicknessMm: quantity({ min: 0.1, max: 100, unit: 'mm', text: 'Slice thickness' }),
  gapMm: quantity({ min: 0, max: 100, unit: 'mm', text: 'Gap between slices' }),
} satisfies ShapeOf<SliceStack>;

export const slabShape = {
  mode: z.literal('slab').describe('A 3D slab.'),
  partitions: count({ min: 2, max: 1024, unit: 'partitions', text: 'Partitions in the nominal slab' }),
  partitionThicknessMm: quantity({ min: 0.1, max: 50, unit: 'mm', text: 'Acquired partition thickness' }),
  acquiredPartitions: count({ min: 2, max: 4096, unit: 'partitions', text: 'Partitions acquired with slice oversampling' }),
  selective: flag('The slab pulse selects the slab; false excites everything the coil sees.'),
  timeBandwidthProduct: quantity({ min: 1, max: 40, unit: '1', text: 'Time-bandwidth product of the slab pulse; left out: unknown' })
    .optional(),
  pulseDurationMs: quantity({ min: 0.05, max: 30, unit: 'ms', text: 'Duration of the slab pulse; left out: unknown' })
    .optional(),
  fatShiftTowards: choice(['low-end', 'high-end'], 'Slab end fat’s slab is shifted to (low: towards right, anterior or inferior); left out: unknown, both are taken.')
    .optional(),
  droppedPartitionsPerEnd: count({ min: 0, max: 256, unit: 'partitions', text: 'End partitions given up each end' }),
} satisfies ShapeOf<Slab>;

export const presaturationShape = {
  side: choice(SIDE_NAMES, 'Side of the patient the band lies on.'),
  innerEdgeMm: quantity({ min: -1000, max: 1000, unit: 'mm', text: 'Distance of the inner edge from the origin' }),
  thicknessMm: quantity({ min: 1, max: 500, unit: 'mm', text: 'Band thickness' }),
  nominalFlipDeg: quantity({ min: 1, max: 180, unit: 'degrees', text: 'Nominal flip angle' }),
  delayMs: quantity({ min: 0, max: 1000, unit: 'ms', text: 'Delay from the band’s pulse to excitation' }),
} satisfies ShapeOf<PresaturationBand>;

const fraction = (text: string) => quantity({ min: 0.51, max: 1, unit: '1', text });
const tilt = (text: string) => quantity({ min: -60, max: 60, unit: 'degrees', text });

export const prescriptionShape = {
  name: words(60, 'Name of the sequence, shown to people.'),
  family: choice(FAMILIES, 'Sequence family.'),
  trajectory: choice(TRAJECTORIES, 'How k-space is sampled; anything but cartesian is answered “not modelled”.'),
  plane: choice(PLANES, 'Plane before tilts.'),
  tiltAboutReadoutDeg: tilt('Tilt about the readout axis'),
  tiltAboutPhaseDeg: tilt('Tilt about the phase axis'),
  inPlaneRotationDeg: quantity({ min: -90, max: 90, unit: 'degrees', text: 'Rotation in the plane' }),
  centreMm: vec3Schema('FOV centre in patient coordinates [mm].'),
  phaseAxis: choice(AXES, 'Patient axis of the phase direction: RL, AP or SI; must lie in the plane.'),
  fovPhaseMm: quantity({ min: 10, max: 1000, unit: 'mm', text: 'Displayed FOV along phase' }),
  fovReadoutMm: quantity({ min: 10, max: 1000, unit: 'mm', text: 'Displayed FOV along readout' }),
  linesAcrossFov: count({ min: 8, max: 2048, unit: 'lines', text: 'Phase lines across the displayed phase FOV' }),
  readoutMatrix: count({ min: 8, max: 2048, text: 'Samples across the readout FOV' }),
  acquiredLines: count({ min: 8, max: 8192, unit: 'lines', text: 'Lines acquired with phase oversampling, before partial Fourier and acceleration' }),
  slices: z
    .discriminatedUnion('mode', [strict(stackShape), strict(slabShape)], {
      error: refused('slices whose mode is stack or slab'),
    })
    .describe('Stack of slices or 3D slab.'),
  trMs: quantity({ min: 0.5, max: 60000, unit: 'ms', text: 'Repetition time; for single-shot, time per slice' }),
  teMs: quantity({ min: 0.01, max: 2000, unit: 'ms', text: 'Echo time' }),
  flipDeg: quantity({ min: 0.1, max: 180, unit: 'degrees', text: 'Excitation flip angle' }),
  averages: count({ min: 1, max: 256, text: 'Averages' }),
  partialFourierPhase: fraction('Fraction of lines acquired along phase'),
  partialFourierSlice: fraction('Fraction of partitions acquired along slice'),
  partialFourierFill: choice(['conjugate', 'zero-filled'], 'How missing lines are filled.'),
  echoTrainLength: count({ min: 1, max: 1024, text: 'Echoes in a train; 1 without a train' }),
  echoSpacingMs: quantity({ min: 0, max: 100, unit: 'ms', text: 'Spacing of echoes in a train; 0 without a train' }),
  shots: count({ min: 1, max: 256, text: 'Shots of a segmented echo-planar readout; 1 is single shot' }),
  fatDisplacedTowards: choice(['low-end', 'high-end'], 'Phase end that EPI displaces fat to, by the polarity of its blips (low: towards right, anterior or inferior); left out: unknown, both are taken.')
    .optional(),
  volumes: count({ min: 1, max: 5000, text: 'Images an echo-planar series acquires: sum over b-values of directions × averages' }),
  bandwidthHzPerPixel: quantity({ min: 1, max: 20000, unit: 'Hz', text: 'Receiver bandwidth per pixel' }),
  sliceTimeMs: quantity({ min: 0, max: 60000, unit: 'ms', text: 'Time one slice takes inside TR: train, fat suppression, presaturation' }),
  preparationMs: quantity({ min: 0, max: 60000, unit: 'ms', text: 'Preparation per segment (3D)' }),
  segments: count({ min: 0, max: 10000, text: 'Segments that each begin with a preparation; 0 when none' }),
  fatSuppressed: flag('Fat-suppressed series.'),
  breathing: choice(['free', 'breath-hold', 'triggered'], 'How breathing is dealt with.'),
  breathsPerTr: count({ min: 1, max: 10, text: 'Breaths per TR of a triggered scan' }),
  acceleration: strict(accelerationShape, 'Parallel imaging.'),
  presaturation: z.array(strict(presaturationShape)).max(6).describe('Presaturation bands.'),
  coil: words(60, 'Receive coil.'),
  coilElements: z
    .array(words(60, 'Element of the coil, as the scanner describes it.'))
    .min(1)
    .max(64)
    .describe('Elements of the coil that are used; left out: all.')
    .optional(),
} satisfies ShapeOf<Prescription>;

/** Rules that hold between fields; the same for the form, the routes and the check. */
export function refinePrescription(value: Prescription, report: (path: string[], message: string) => void): void {
  const axes = axesOfPlane(value.plane);
  if (!axes.includes(value.phaseAxis)) {
    report(['phaseAxis'], `${value.phaseAxis} given; allowed in the ${value.plane} plane: ${axes.join(', ')}`);
  }
  if (value.acquiredLines < value.linesAcrossFov) {
    report(['acquiredLines'], `${value.acquiredLines} given; allowed: at least the ${value.linesAcrossFov} lines across the FOV`);
  }
  const is3d = FAMILIES_3D.includes(value.family);
  if (is3d !== (value.slices.mode === 'slab')) {
    report(['slices', 'mode'], `${value.slices.mode} given; allowed for ${value.family}: ${is3d ? 'slab' : 'stack'}`);
  }
  if (value.slices.mode === 'slab') {
    const { partitions, acquiredPartitions, droppedPartitionsPerEnd } = value.slices;
    if (acquiredPartitions < partitions) {
      report(['slices', 'acquiredPartitions'], `${acquiredPartitions} given; allowed: at least the ${partitions} partitions of the slab`);
    }
    if (2 * droppedPartitionsPerEnd >= partitions) {
      report(['slices', 'droppedPartitionsPerEnd'], `${droppedPartitionsPerEnd} given; allowed: fewer than half of ${partitions}`);
    }
  }
  if (!is3d && value.acceleration.factorSlice !== 1) {
    report(['acceleration', 'factorSlice'], `${value.acceleration.factorSlice} given; allowed for a stack of slices: 1`);
  }
  if (value.acceleration.referenceLines > value.acquiredLines) {
    report(['acceleration', 'referenceLines'], `${value.acceleration.referenceLines} given; allowed: up to the ${value.acquiredLines} lines acquired`);
  }
}

export const prescriptionSchema = strict(prescriptionShape, 'One sequence, as the engine takes it.').superRefine(
  (value, context) =>
    refinePrescription(value, (path, message) => context.addIssue({ code: 'custom', path, message })),
);
