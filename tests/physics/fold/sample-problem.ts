import type { FoldProblem } from '@/lib/physics/fold/fold-problem';
import { windowRegion, type OrientedRegion } from '@/lib/physics/geometry/oriented-region';
import type { PatientBox, PerSide } from '@/lib/physics/model/axes';
import type { SolidPart } from '@/lib/physics/model/patient';
import type { Prescription } from '@/lib/physics/model/prescription';

export const NO_MARGIN_MM: PerSide = {
  right: 0,
  left: 0,
  anterior: 0,
  posterior: 0,
  superior: 0,
  inferior: 0,
};

/** An axial, unaccelerated single slice with phase A–P; every test states what it changes. */
export function samplePrescription(changes: Partial<Prescription> = {}): Prescription {
  return {
    name: 'axial',
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
    linesAcrossFov: 256,
    readoutMatrix: 384,
    acquiredLines: 256,
    slices: { mode: 'stack', slices: 1, thicknessMm: 5, gapMm: 0 },
    trMs: 4000,
    teMs: 90,
    flipDeg: 90,
    averages: 1,
    partialFourierPhase: 1,
    partialFourierSlice: 1,
    partialFourierFill: 'conjugate',
    echoTrainLength: 16,
    echoSpacingMs: 8,
    shots: 1,
    volumes: 1,
    bandwidthHzPerPixel: 200,
    sliceTimeMs: 150,
    preparationMs: 0,
    segments: 0,
    fatSuppressed: false,
    breathing: 'free',
    breathsPerTr: 1,
    acceleration: {
      factorPhase: 1,
      factorSlice: 1,
      unfolding: 'k-space-self-calibrating',
      referenceLines: 0,
      referencePartitions: 0,
      referenceInImage: false,
      calibrationS: 0,
    },
    presaturation: [],
    coil: 'body',
    ...changes,
  };
}

export function ellipsePart(
  name: string,
  centre: readonly [number, number],
  semiAxes: readonly [number, number],
  changes: Partial<SolidPart> = {},
): SolidPart {
  return {
    name,
    kind: name.includes('arm') ? 'arm' : 'trunk',
    shape: {
      type: 'elliptic-cylinder',
      along: 'z',
      centreMm: [centre[0], centre[1], 0],
      semiAxesMm: semiAxes,
    },
    signalWeight: 1,
    estimated: false,
    ...changes,
  };
}

/** A rectangular prism from patient ranges, as an uploaded outline. */
export function boxPart(name: string, box: PatientBox, changes: Partial<SolidPart> = {}): SolidPart {
  const [x0, x1] = box.xMm;
  const [y0, y1] = box.yMm;
  return {
    name,
    kind: 'other',
    shape: {
      type: 'outline-prism',
      along: 'z',
      rings: [
        [
          [x0, y0],
          [x1, y0],
          [x1, y1],
          [x0, y1],
        ],
      ],
      fromMm: box.zMm[0],
      toMm: box.zMm[1],
    },
    signalWeight: 1,
    estimated: false,
    ...changes,
  };
}

export function sampleProblem(
  parts: readonly SolidPart[],
  prescription: Prescription = samplePrescription(),
  changes: Partial<FoldProblem> = {},
): FoldProblem {
  const keepClear: OrientedRegion = changes.keepClear ?? windowRegion(prescription);
  return {
    parts,
    prescription,
    keepClear,
    marginMm: NO_MARGIN_MM,
    tissueTolerance: 0.05,
    slabTolerance: 0.05,
    tissueReachMm: 250,
    isocentreZMm: 0,
    usable: { centreMm: [0, 0, 0], halfMm: [1000, 1000, 1000] },
    lineStep: { kind: 'line' },
    acquiredLinesMax: 4096,
    partitionStep: 1,
    acquiredPartitionsMax: 4096,
    presaturatedT1Ms: [800, 300],
    presaturationB1Scale: 1,
    ...changes,
  };
}
