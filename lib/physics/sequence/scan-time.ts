import type { TimeResult } from '../model/assessment';
import type { Patient } from '../model/patient';
import type { Prescription } from '../model/prescription';
import type { Scanner } from '../model/scanner';
import { acquiredViewsOf } from './acquired-views';
import { ceilCount, requirePositive, requireRange, requireWhole } from '../model/require-argument';
import { acquiredWidthMmOf, epiDisplacementMm, minimumTeMs, trainMs } from './displacement';
import {
  echoPlanarTimeS,
  echoTrainShots,
  gradientEcho3dTimeS,
  interleavedTimeS,
  sequentialTimeS,
  singleShotTimeS,
} from './scan-time-formulas';
import { sequentialBreathHolds, sliceBatches, slicesPerTr } from './slice-groups';
import { triggeredTime } from './triggered-time';

/** Views, and excitations ("shots") one slice or volume takes in one average. */
interface Encoding {
  readonly views: number;
  readonly shots: number;
}

function encodingOf(p: Prescription): Encoding {
  const views = acquiredViewsOf(p);
  switch (p.family) {
    case 'echo-train-spin-echo':
    case 'echo-train-spin-echo-3d':
      return {
        views,
        shots: echoTrainShots(
          views,
          requireWhole('echo-train-not-whole', 'echoTrainLength', p.echoTrainLength, 1),
        ),
      };
    case 'single-shot-echo-train':
      return { views, shots: 1 };
    case 'echo-planar':
      return { views, shots: requireWhole('shots-not-whole', 'shots', p.shots, 1) };
    default:
      return { views, shots: views };
  }
}

interface Untriggered {
  readonly scanS: number;
  readonly batches: number;
  readonly breathHolds: number;
  readonly longestHoldS: number;
}

function untriggered(p: Prescription, { views, shots }: Encoding, limitS: number): Untriggered {
  const trS = p.trMs / 1000;
  const oneHold = (scanS: number): Untriggered => ({
    scanS,
    batches: 1,
    breathHolds: 1,
    longestHoldS: scanS,
  });
  const slices =
    p.slices.mode === 'stack' ? requireWhole('slices-not-whole', 'slices', p.slices.slices, 1) : 1;

  switch (p.family) {
    case 'spin-echo':
    case 'gradient-echo':
    case 'echo-train-spin-echo': {
      const batches = p.slices.mode === 'slab' ? 1 : sliceBatches(slices, slicesPerTr(p.trMs, p.sliceTimeMs));
      const scanS = interleavedTimeS(trS, shots, p.averages, batches);
      return { scanS, batches, breathHolds: batches, longestHoldS: scanS / batches };
    }
    case 'single-shot-echo-train':
    case 'balanced': {
      const scanS =
        p.family === 'balanced'
          ? sequentialTimeS(trS, views, slices, p.averages)
          : singleShotTimeS(trS, slices, p.averages);
      return { scanS, batches: 1, ...sequentialBreathHolds(slices, scanS / slices, limitS) };
    }
    case 'echo-planar':
      return oneHold(echoPlanarTimeS(trS, shots, requireWhole('volumes-not-whole', 'volumes', p.volumes, 1)));
    case 'gradient-echo-3d':
      return oneHold(gradientEcho3dTimeS(trS, views, p.averages, p.preparationMs / 1000, p.segments));
    case 'echo-train-spin-echo-3d':
      return oneHold(interleavedTimeS(trS, shots, p.averages, 1));
  }
}

/**
 * How long a prescription takes, in how many breath-holds, and what a longer train brings with it.
 * Forms and batches: scan-time-formulas.ts, slice-groups.ts; counts come from the stored acquiredLines and
 * acquiredPartitions only, never from a percentage. A separate calibration adds its own seconds to the scan, not to a
 * hold. Breath-holds: interleaved = batches; sequential = the smallest number inside the patient's limit; 3D and EPI =
 * one, not divisible; none when breathing freely or triggered.
 * @returns seconds, milliseconds, millimetres; scanRangeS (seconds) only when triggered
 * @throws DomainError naming the argument, among them "slice-does-not-fit" (not even one slice fits into TR or the
 * trigger's window) and "reference-lines-too-many"
 * Valid: Cartesian sampling. Pauses between breath-holds and dummy shots are not counted.
 */
export function scanTime(prescription: Prescription, patient: Patient, scanner: Scanner): TimeResult {
  const p = prescription;
  requirePositive('tr-not-positive', 'trMs', p.trMs);
  requireWhole('averages-not-whole', 'averages', p.averages, 1);
  requireRange('preparation-out-of-range', 'preparationMs', p.preparationMs, 0, 60_000);
  requireWhole('segments-not-whole', 'segments', p.segments, 0);
  const calibrationS = requireRange(
    'calibration-out-of-range',
    'calibrationS',
    p.acceleration.calibrationS,
    0,
    3600,
  );

  const encoding = encodingOf(p);
  const train = trainMs(p);
  const echoPlanar = p.family === 'echo-planar';
  const factor = p.acceleration.factorPhase;
  // Asked for every candidate of a ranking: filled in place, where spreading optional parts took half its time.
  const result: Draft<TimeResult> = { shots: encoding.shots, acquiredViews: encoding.views };
  if (train !== undefined) {
    const shots = echoPlanar ? p.shots : 1;
    result.trainMs = train;
    result.minimumTeMs = minimumTeMs(
      p.partialFourierPhase,
      p.acquiredLines,
      p.echoSpacingMs,
      factor,
      shots,
    );
  }
  if (echoPlanar)
    result.displacementPer100HzMm = epiDisplacementMm(
      100,
      p.echoSpacingMs,
      acquiredWidthMmOf(p),
      factor,
      p.shots,
    );

  if (p.breathing === 'triggered') {
    const { scanS, rangeS, batches } = triggeredTime(
      p,
      encoding,
      patient.breathPeriodS,
      scanner.respiratoryWindow,
    );
    result.scanS = scanS + calibrationS;
    result.scanRangeS = [rangeS[0] + calibrationS, rangeS[1] + calibrationS];
    result.batches = batches;
    result.breathHolds = 0;
    result.longestHoldS = 0;
    return result as TimeResult;
  }
  const held = p.breathing === 'breath-hold';
  // Held freely the limit plays no part; any positive number keeps the arithmetic defined.
  const limitS = held
    ? requirePositive('breath-hold-not-positive', 'breathHoldS', patient.breathHoldS.value)
    : 1;
  const { scanS, batches, breathHolds, longestHoldS } = untriggered(p, encoding, limitS);
  result.scanS = scanS + calibrationS;
  result.batches = batches;
  result.breathHolds = held ? breathHolds : 0;
  result.longestHoldS = held ? longestHoldS : 0;
  return result as TimeResult;
}

/** A result while its parts are filled in. */
type Draft<T> = { -readonly [K in keyof T]?: T[K] };

/**
 * Smallest TR that holds what is played inside it [ms]: EPI: slices·t_slice; single shot: t_slice; other families: one
 * slice's t_slice (more batches pay for the rest); 0 where t_slice plays no part (3D, balanced).
 */
export function minimumTrMs(p: Prescription): number {
  if (p.slices.mode === 'slab') return 0;
  switch (p.family) {
    case 'echo-planar':
      return p.slices.slices * p.sliceTimeMs;
    case 'single-shot-echo-train':
    case 'spin-echo':
    case 'gradient-echo':
    case 'echo-train-spin-echo':
      return p.sliceTimeMs;
    default:
      return 0;
  }
}

/**
 * A prescription whose sampling was changed keeps stored fields that depended on the old sampling: the slice time
 * contains the train, the number of prepared segments follows the views, an EPI series' volumes follow its averages.
 * Returns `after` with those carried over: t_slice' = t_slice + (train' − train), segments' = ⌈segments·N_acq'/N_acq⌉,
 * volumes' = volumes·averages'/averages when that is whole (otherwise DomainError "volumes-not-whole").
 */
export function carryTiming(before: Prescription, after: Prescription): Prescription {
  const trainChange = (trainMs(after) ?? 0) - (trainMs(before) ?? 0);
  const segments =
    before.segments > 0
      ? ceilCount((before.segments * acquiredViewsOf(after)) / acquiredViewsOf(before))
      : after.segments;
  const volumes =
    after.family === 'echo-planar' && after.averages !== before.averages
      ? requireWhole('volumes-not-whole', 'volumes', (before.volumes * after.averages) / before.averages, 1)
      : after.volumes;
  return { ...after, sliceTimeMs: after.sliceTimeMs + trainChange, segments, volumes };
}
