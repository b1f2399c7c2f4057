import type { BodyRegion, Case, KeepClear, PatientBox, Prescription, Reading, Scanner, Side } from '@/lib/domain/case/model';
import { DEFAULT_POLICY, SIDES } from '@/lib/domain/case/model';

/*
 * Bodies, scanner and sequences of the set pieces: invented, round, without spread or margin, so that what is read off
 * the picture can be worked out on a board.
 */

const exact = (value: number): Reading => ({ value, source: 'policy-default', spread: 0 });

const SCANNER: Scanner = {
  name: 'Scanner',
  fieldStrengthT: 3,
  boreDiameterMm: 700,
  tableBelowCentreMm: 175,
  anteriorCoilMm: 35,
  lineStep: { kind: 'line' },
  oversamplingForm: 'percent',
  sliceOversamplingForm: 'percent',
  partitionStep: 1,
  phaseFovMayExceedReadoutFov: true,
  unfolding: 'k-space-self-calibrating',
  tissueReachMm: 250,
  respiratoryWindow: 0.4,
  limits: {
    fovMinMm: 50,
    fovMaxMm: 560,
    usableFovMm: [640, 640, 640],
    matrixMax: 1024,
    acquiredLinesMax: 2048,
    phaseOversamplingMaxPct: 100,
    sliceOversamplingMaxPct: 100,
    accelerationPhaseMax: 4,
    accelerationSliceMax: 2,
    partialFourierMin: 0.6,
    averagesMax: 8,
    echoTrainMax: 320,
    tableLimitKg: 250,
  },
};

export interface InventedBody {
  readonly region: BodyRegion;
  readonly extents: Readonly<Record<Side, number>>;
  readonly arms?: 'up' | 'down';
}

type Sequence = Partial<Prescription> &
  Pick<Prescription, 'name' | 'family' | 'fovPhaseMm' | 'fovReadoutMm' | 'linesAcrossFov' | 'readoutMatrix'>;

export const WHOLE_PICTURE: KeepClear = { area: { kind: 'whole-picture' }, followsWindow: false };

export const boxOf = (box: PatientBox): KeepClear => ({ area: { kind: 'box', box }, followsWindow: false });

/** A stack of one slice where nothing else is asked for. */
export function inventedCase(body: InventedBody, sequence: Sequence, keepClear: KeepClear): Case {
  const none = Object.fromEntries(SIDES.map((side) => [side, 0])) as Record<Side, number>;
  return {
    patient: {
      region: body.region,
      extents: Object.fromEntries(SIDES.map((side) => [side, exact(body.extents[side])])) as Record<Side, Reading>,
      arms: { position: body.arms ?? 'up', breadthMm: 90, depthMm: 100, gapMm: 10 },
      breathHoldS: exact(20),
      breathPeriodS: exact(4),
      weightKg: exact(110),
      position: 'head-first-supine',
      lateralOffsetMm: 0,
      isocentreZMm: 0,
    },
    prescription: {
      trajectory: 'cartesian',
      plane: 'axial',
      tiltAboutReadoutDeg: 0,
      tiltAboutPhaseDeg: 0,
      inPlaneRotationDeg: 0,
      centreMm: [0, 0, 0],
      phaseAxis: 'AP',
      acquiredLines: sequence.linesAcrossFov,
      slices: { mode: 'stack', slices: 1, thicknessMm: 5, gapMm: 0 },
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
      acceleration: {
        factorPhase: 1, factorSlice: 1, unfolding: 'k-space-self-calibrating',
        referenceLines: 0, referencePartitions: 0, referenceInImage: true, calibrationS: 0,
      },
      presaturation: [],
      coil: 'coil',
      ...sequence,
    },
    keepClear,
    scanner: SCANNER,
    policy: { ...DEFAULT_POLICY, marginMm: none },
  };
}
