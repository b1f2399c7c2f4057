import type { Acceleration, Prescription } from '@/lib/domain/case/model';

export const NO_ACCELERATION: Acceleration = {
  factorPhase: 1,
  factorSlice: 1,
  unfolding: 'unknown',
  referenceLines: 0,
  referencePartitions: 0,
  referenceInImage: true,
  calibrationS: 0,
};

/** Twice as fast along phase with integrated reference lines; how it is unfolded is the scanner's to say. */
export function accelerated(factorPhase: number, referenceLines: number): Acceleration {
  return { ...NO_ACCELERATION, factorPhase, referenceLines };
}

type Given = Partial<Prescription> &
  Pick<Prescription, 'name' | 'family' | 'fovPhaseMm' | 'fovReadoutMm' | 'linesAcrossFov' | 'readoutMatrix' | 'slices'>;

/** A sequence with what most of them share; each states what makes it what it is. */
export function demoPrescription(given: Given): Prescription {
  return {
    trajectory: 'cartesian',
    plane: 'axial',
    tiltAboutReadoutDeg: 0,
    tiltAboutPhaseDeg: 0,
    inPlaneRotationDeg: 0,
    centreMm: [0, 0, 0],
    phaseAxis: 'AP',
    acquiredLines: given.linesAcrossFov,
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
    sliceTimeMs: 100,
    preparationMs: 0,
    segments: 0,
    fatSuppressed: false,
    breathing: 'free',
    breathsPerTr: 1,
    acceleration: NO_ACCELERATION,
    presaturation: [],
    coil: 'body array',
    ...given,
  };
}
