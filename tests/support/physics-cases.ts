/**
 * Builders of typical cases for the physics tests: one large-habitus abdomen, one scanner on a one-line grid,
 * and an abdomen prescription of every sequence family with plausible generic values (common practice, no source).
 * Every builder takes overrides, so a test states only what it is about.
 */
import type { Side } from '@/lib/physics/model/axes';
import type { Case } from '@/lib/physics/model/case';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Patient, Reading } from '@/lib/physics/model/patient';
import type { SitePolicy } from '@/lib/physics/model/policy';
import type {
  Acceleration,
  Prescription,
  SequenceFamily,
  Slab,
  SliceStack,
} from '@/lib/physics/model/prescription';
import type { Scanner, ScannerLimits } from '@/lib/physics/model/scanner';

export const measured = (value: number, spread = 0): Reading => ({ value, source: 'measured', spread });

export const extentsOf = (values: Partial<Record<Side, number>>): Patient['extents'] => ({
  right: measured(values.right ?? 240),
  left: measured(values.left ?? 240),
  anterior: measured(values.anterior ?? 170),
  posterior: measured(values.posterior ?? 170),
  superior: measured(values.superior ?? 250),
  inferior: measured(values.inferior ?? 250),
});

/** Body 480 × 340 mm, arms up, sizes measured without spread. */
export function typicalPatient(overrides: Partial<Patient> = {}): Patient {
  return {
    region: 'abdomen',
    extents: extentsOf({}),
    arms: { position: 'up', breadthMm: 90, depthMm: 100, gapMm: 15 },
    weightKg: measured(140),
    heightCm: measured(172),
    breathHoldS: measured(18),
    breathPeriodS: measured(4.2, 0.5),
    position: 'head-first-supine',
    lateralOffsetMm: 0,
    isocentreZMm: 0,
    ...overrides,
  };
}

export function typicalScanner(
  overrides: Omit<Partial<Scanner>, 'limits'> & { readonly limits?: Partial<ScannerLimits> } = {},
): Scanner {
  const { limits, ...rest } = overrides;
  return {
    name: 'Scanner A',
    fieldStrengthT: 1.5,
    boreDiameterMm: 700,
    tableBelowCentreMm: 170,
    anteriorCoilMm: 40,
    lineStep: { kind: 'line' },
    oversamplingForm: 'percent',
    sliceOversamplingForm: 'percent',
    partitionStep: 1,
    phaseFovMayExceedReadoutFov: false,
    unfolding: 'k-space-self-calibrating',
    tissueReachMm: 250,
    respiratoryWindow: 0.4,
    limits: {
      fovMinMm: 100,
      fovMaxMm: 520,
      usableFovMm: [520, 520, 500],
      matrixMax: 1024,
      acquiredLinesMax: 1024,
      phaseOversamplingMaxPct: 100,
      sliceOversamplingMaxPct: 100,
      accelerationPhaseMax: 4,
      accelerationSliceMax: 3,
      partialFourierMin: 0.625,
      averagesMax: 16,
      echoTrainMax: 400,
      tableLimitKg: 220,
      ...limits,
    },
    ...rest,
  };
}

export const NO_ACCELERATION: Acceleration = {
  factorPhase: 1,
  factorSlice: 1,
  unfolding: 'k-space-self-calibrating',
  referenceLines: 0,
  referencePartitions: 0,
  referenceInImage: false,
  calibrationS: 0,
};

export const accelerated = (factorPhase: number, overrides: Partial<Acceleration> = {}): Acceleration => ({
  ...NO_ACCELERATION,
  factorPhase,
  referenceLines: 24,
  referenceInImage: true,
  ...overrides,
});

export const stackOf = (slices: number, thicknessMm: number, gapMm = 1): SliceStack => ({
  mode: 'stack',
  slices,
  thicknessMm,
  gapMm,
});

export const slabOf = (overrides: Partial<Slab> = {}): Slab => ({
  mode: 'slab',
  partitions: 64,
  partitionThicknessMm: 3.5,
  acquiredPartitions: 64,
  selective: true,
  timeBandwidthProduct: 8,
  pulseDurationMs: 1,
  droppedPartitionsPerEnd: 0,
  ...overrides,
});

/** Axial abdomen, echo-train spin echo, phase A–P over 300 mm in 240 lines, triggered. */
export function typicalPrescription(overrides: Partial<Prescription> = {}): Prescription {
  return {
    name: 'T2 echo-train spin echo',
    family: 'echo-train-spin-echo',
    trajectory: 'cartesian',
    plane: 'axial',
    tiltAboutReadoutDeg: 0,
    tiltAboutPhaseDeg: 0,
    inPlaneRotationDeg: 0,
    centreMm: [0, 0, 0],
    phaseAxis: 'AP',
    fovPhaseMm: 300,
    fovReadoutMm: 480,
    linesAcrossFov: 240,
    readoutMatrix: 384,
    acquiredLines: 240,
    slices: stackOf(30, 5),
    trMs: 4000,
    teMs: 85,
    flipDeg: 90,
    averages: 2,
    partialFourierPhase: 1,
    partialFourierSlice: 1,
    partialFourierFill: 'conjugate',
    echoTrainLength: 16,
    echoSpacingMs: 10,
    shots: 1,
    volumes: 1,
    bandwidthHzPerPixel: 200,
    sliceTimeMs: 130,
    preparationMs: 0,
    segments: 0,
    fatSuppressed: false,
    breathing: 'free',
    breathsPerTr: 1,
    acceleration: NO_ACCELERATION,
    presaturation: [],
    coil: 'body array',
    ...overrides,
  };
}

const FAMILY_VALUES: Readonly<Record<SequenceFamily, Partial<Prescription>>> = {
  'spin-echo': {
    name: 'T1 spin echo',
    trMs: 600,
    teMs: 12,
    sliceTimeMs: 19,
    averages: 2,
    echoTrainLength: 1,
  },
  'gradient-echo': {
    name: 'T1 gradient echo',
    trMs: 160,
    teMs: 4.6,
    flipDeg: 75,
    sliceTimeMs: 10,
    averages: 1,
    echoTrainLength: 1,
    linesAcrossFov: 160,
    acquiredLines: 160,
    readoutMatrix: 256,
    slices: stackOf(16, 7),
    breathing: 'breath-hold',
    acceleration: accelerated(2),
  },
  'echo-train-spin-echo': { breathing: 'triggered' },
  'single-shot-echo-train': {
    name: 'T2 single-shot',
    trMs: 1000,
    teMs: 90,
    averages: 1,
    linesAcrossFov: 200,
    acquiredLines: 200,
    readoutMatrix: 320,
    partialFourierPhase: 0.625,
    echoTrainLength: 70,
    echoSpacingMs: 4.2,
    sliceTimeMs: 700,
    bandwidthHzPerPixel: 600,
    breathing: 'breath-hold',
    acceleration: accelerated(2),
  },
  'echo-planar': {
    name: 'Diffusion EPI',
    trMs: 6000,
    teMs: 62,
    averages: 1,
    linesAcrossFov: 96,
    acquiredLines: 96,
    readoutMatrix: 154,
    echoSpacingMs: 0.6,
    echoTrainLength: 48,
    sliceTimeMs: 120,
    volumes: 28,
    bandwidthHzPerPixel: 1800,
    fatSuppressed: true,
    acceleration: accelerated(2, { referenceLines: 0, referenceInImage: false, calibrationS: 4 }),
  },
  balanced: {
    name: 'Balanced coronal',
    plane: 'coronal',
    phaseAxis: 'RL',
    fovPhaseMm: 400,
    fovReadoutMm: 400,
    linesAcrossFov: 224,
    acquiredLines: 224,
    readoutMatrix: 224,
    trMs: 4,
    teMs: 2,
    flipDeg: 60,
    averages: 1,
    slices: stackOf(20, 6, 0),
    bandwidthHzPerPixel: 900,
    breathing: 'breath-hold',
  },
  'gradient-echo-3d': {
    name: 'T1 3D gradient echo',
    trMs: 4.2,
    teMs: 1.9,
    flipDeg: 12,
    averages: 1,
    linesAcrossFov: 180,
    acquiredLines: 180,
    readoutMatrix: 288,
    slices: slabOf(),
    partialFourierPhase: 0.75,
    bandwidthHzPerPixel: 500,
    fatSuppressed: true,
    breathing: 'breath-hold',
    acceleration: accelerated(2),
  },
  'echo-train-spin-echo-3d': {
    name: 'T2 3D echo-train spin echo',
    trMs: 1800,
    teMs: 120,
    averages: 1,
    linesAcrossFov: 240,
    acquiredLines: 240,
    readoutMatrix: 384,
    slices: slabOf({ partitions: 60, acquiredPartitions: 60, partitionThicknessMm: 1.5 }),
    echoTrainLength: 80,
    echoSpacingMs: 4,
    breathing: 'free',
    acceleration: accelerated(2),
  },
};

export const SEQUENCE_FAMILIES = Object.keys(FAMILY_VALUES) as readonly SequenceFamily[];

/** The abdomen prescription of one family. */
export const prescriptionOf = (family: SequenceFamily, overrides: Partial<Prescription> = {}): Prescription =>
  typicalPrescription({ family, ...FAMILY_VALUES[family], ...overrides });

/** Five sequences of a typical abdomen protocol. */
export const ABDOMEN_PROTOCOL: readonly SequenceFamily[] = [
  'single-shot-echo-train',
  'gradient-echo-3d',
  'echo-train-spin-echo',
  'echo-planar',
  'balanced',
];

export const WHOLE_PICTURE: KeepClear = { area: { kind: 'whole-picture' }, followsWindow: false };

/** Liver box: 190 mm right to 60 mm left, 140 mm anterior to 95 mm posterior, ± 60 mm along z. */
export const LIVER_BOX: KeepClear = {
  area: { kind: 'box', box: { xMm: [-190, 60], yMm: [-140, 95], zMm: [-60, 60] }, label: 'liver' },
  followsWindow: false,
};

export const NO_MARGIN: SitePolicy['marginMm'] = {
  anterior: 0,
  posterior: 0,
  right: 0,
  left: 0,
  superior: 0,
  inferior: 0,
};

export const evenMargin = (mm: number): SitePolicy['marginMm'] => ({
  anterior: mm,
  posterior: mm,
  right: mm,
  left: mm,
  superior: mm,
  inferior: mm,
});

/** The default policy of a site that has measured its presaturation bands and found them true. */
export const typicalPolicy = (overrides: Partial<SitePolicy> = {}): SitePolicy => ({
  ...DEFAULT_POLICY,
  presaturationB1Scale: 1,
  ...overrides,
});

export function typicalCase(overrides: Partial<Case> = {}): Case {
  return {
    patient: typicalPatient(),
    prescription: prescriptionOf('echo-train-spin-echo'),
    keepClear: WHOLE_PICTURE,
    scanner: typicalScanner(),
    policy: typicalPolicy(),
    ...overrides,
  };
}

/** The worked case: 480 × 340, axial, phase A–P, FOV 300 × 480, 256 lines, whole FOV, margin 0. */
export const workedCase = (overrides: Partial<Prescription> = {}): Case =>
  typicalCase({
    prescription: typicalPrescription({ linesAcrossFov: 256, acquiredLines: 256, ...overrides }),
    policy: typicalPolicy({ marginMm: NO_MARGIN }),
  });

/** The bench sketch's case: margin 5 every side, keep-clear the liver box, FOV 300 A–P in 240 lines. */
export const sketchCase = (overrides: Partial<Case> = {}): Case =>
  typicalCase({
    prescription: typicalPrescription(),
    keepClear: LIVER_BOX,
    policy: typicalPolicy({ marginMm: evenMargin(5) }),
    ...overrides,
  });
