import type { SequenceFamily } from '@/lib/physics/model/prescription';
import type { ProtocolForm } from '@/lib/schemas/protocol';
import { familyFields } from './sequence-facts';

export type SequenceForm = ProtocolForm['sequences'][number];

const STACK: SequenceForm['slices'] = { mode: 'stack', slices: 30, thicknessMm: 6, gapMm: 1 };

const SLAB: SequenceForm['slices'] = {
  mode: 'slab',
  partitions: 64,
  partitionThicknessMm: 3,
  acquiredPartitions: 64,
  selective: true,
  droppedPartitionsPerEnd: 0,
};

/** Generic figures a family is usually near (common practice, no source): a start to be typed over. */
const TYPICAL: Readonly<Record<SequenceFamily, Partial<SequenceForm>>> = {
  'spin-echo': { trMs: 600, teMs: 12, flipDeg: 90, sliceTimeMs: 18 },
  'gradient-echo': { trMs: 180, teMs: 4.5, flipDeg: 70, sliceTimeMs: 7 },
  'echo-train-spin-echo': {
    trMs: 4000,
    teMs: 80,
    flipDeg: 90,
    echoTrainLength: 16,
    echoSpacingMs: 8,
    sliceTimeMs: 140,
  },
  'single-shot-echo-train': { trMs: 1000, teMs: 80, flipDeg: 90, echoSpacingMs: 4, partialFourierPhase: 0.6 },
  'echo-planar': {
    trMs: 5000,
    teMs: 60,
    flipDeg: 90,
    echoSpacingMs: 0.6,
    volumes: 8,
    sliceTimeMs: 100,
    linesAcrossFov: 96,
    acquiredLines: 96,
    readoutMatrix: 128,
    bandwidthHzPerPixel: 1800,
    fatSuppressed: true,
  },
  balanced: { trMs: 3.6, teMs: 1.8, flipDeg: 50, bandwidthHzPerPixel: 900 },
  'gradient-echo-3d': {
    trMs: 4,
    teMs: 1.9,
    flipDeg: 10,
    bandwidthHzPerPixel: 500,
    fatSuppressed: true,
    breathing: 'breath-hold',
  },
  'echo-train-spin-echo-3d': {
    trMs: 1800,
    teMs: 100,
    flipDeg: 90,
    echoTrainLength: 60,
    echoSpacingMs: 4,
    bandwidthHzPerPixel: 500,
  },
};

/** A sequence to start from. Its name is left for the person to give. */
export function newSequence(family: SequenceFamily = 'echo-train-spin-echo'): SequenceForm {
  return {
    name: '',
    family,
    trajectory: 'cartesian',
    plane: 'axial',
    tiltAboutReadoutDeg: 0,
    tiltAboutPhaseDeg: 0,
    inPlaneRotationDeg: 0,
    centreMm: [0, 0, 0],
    phaseAxis: 'AP',
    fovPhaseMm: 300,
    fovReadoutMm: 400,
    linesAcrossFov: 192,
    readoutMatrix: 256,
    acquiredLines: 192,
    slices: familyFields(family).slab ? SLAB : STACK,
    trMs: 500,
    teMs: 10,
    flipDeg: 90,
    averages: 1,
    partialFourierPhase: 1,
    partialFourierSlice: 1,
    partialFourierFill: 'conjugate',
    echoTrainLength: 1,
    echoSpacingMs: 0,
    shots: 1,
    volumes: 1,
    bandwidthHzPerPixel: 300,
    sliceTimeMs: 0,
    preparationMs: 0,
    segments: 0,
    fatSuppressed: false,
    breathing: 'free',
    breathsPerTr: 1,
    acceleration: {
      factorPhase: 1,
      factorSlice: 1,
      unfolding: 'unknown',
      referenceLines: 0,
      referencePartitions: 0,
      referenceInImage: true,
      calibrationS: 0,
    },
    presaturation: [],
    coil: 'body array',
    ...TYPICAL[family],
  };
}

/**
 * The same sequence as another family: window, plane and breathing stay; what the new family does not have goes
 * back to its neutral value and its own timing starts from typical figures.
 */
export function asFamily(sequence: SequenceForm, family: SequenceFamily): SequenceForm {
  const fresh = newSequence(family);
  const sameSlices = (sequence.slices.mode === 'slab') === familyFields(family).slab;
  return {
    ...sequence,
    family,
    slices: sameSlices ? sequence.slices : fresh.slices,
    trMs: fresh.trMs,
    teMs: fresh.teMs,
    flipDeg: fresh.flipDeg,
    echoTrainLength: fresh.echoTrainLength,
    echoSpacingMs: fresh.echoSpacingMs,
    shots: fresh.shots,
    volumes: fresh.volumes,
    sliceTimeMs: fresh.sliceTimeMs,
    preparationMs: fresh.preparationMs,
    segments: fresh.segments,
    partialFourierSlice: fresh.partialFourierSlice,
    bandwidthHzPerPixel: fresh.bandwidthHzPerPixel,
    acceleration: familyFields(family).slab
      ? sequence.acceleration
      : { ...sequence.acceleration, factorSlice: 1, referencePartitions: 0 },
  };
}

export const NEW_PROTOCOL: ProtocolForm = {
  name: '',
  region: 'abdomen',
  keepClearPreset: 'whole-picture',
  keepClear: { area: { kind: 'whole-picture' }, followsWindow: false },
  sequences: [newSequence()],
};
