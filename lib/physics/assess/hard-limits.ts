import type { Reason, TimeResult } from '../model/assessment';
import type { Case } from '../model/case';
import type { Prescription } from '../model/prescription';
import { isOnLineGrid, mostAcquiredLines } from './line-grid';
import { minimumTrMs } from '../sequence/scan-time';
import { figure } from './words';

/** Slack for numbers that went through a multiplication: far above a double's rounding, far below 1 µm. */
const SLACK = 1e-9;

const over = (value: number, limit: number): boolean => value > limit + SLACK;

function samplingLimits({ prescription: p, scanner }: Case): Reason[] {
  const { limits } = scanner;
  const reasons: Reason[] = [];
  const add = (code: string, text: string): void => void reasons.push({ code, text });
  for (const [name, fov] of [
    ['Phase', p.fovPhaseMm],
    ['Readout', p.fovReadoutMm],
  ] as const) {
    if (over(fov, limits.fovMaxMm))
      add(
        'fov-over-maximum',
        `${name} FOV ${figure(fov)} mm is over this scanner's ${figure(limits.fovMaxMm)} mm.`,
      );
    if (over(limits.fovMinMm, fov))
      add(
        'fov-under-minimum',
        `${name} FOV ${figure(fov)} mm is under this scanner's ${figure(limits.fovMinMm)} mm.`,
      );
  }
  if (!scanner.phaseFovMayExceedReadoutFov && over(p.fovPhaseMm, p.fovReadoutMm)) {
    add(
      'phase-fov-over-readout-fov',
      `Phase FOV ${figure(p.fovPhaseMm)} mm is larger than readout FOV ${figure(p.fovReadoutMm)} mm, which this scanner does not allow.`,
    );
  }
  const matrix = Math.max(p.linesAcrossFov, p.readoutMatrix);
  if (over(matrix, limits.matrixMax))
    add('matrix-over-maximum', `Matrix ${matrix} is over this scanner's ${limits.matrixMax}.`);
  if (over(p.acquiredLines, limits.acquiredLinesMax)) {
    add(
      'lines-over-maximum',
      `${p.acquiredLines} acquired lines are over this scanner's ${limits.acquiredLinesMax}.`,
    );
  }
  const phasePct = (p.acquiredLines / p.linesAcrossFov - 1) * 100;
  if (
    p.acquiredLines <= limits.acquiredLinesMax &&
    p.acquiredLines > mostAcquiredLines(p.linesAcrossFov, limits)
  ) {
    add(
      'phase-oversampling-over-maximum',
      `Phase oversampling ${figure(phasePct)} % is over this scanner's ${figure(limits.phaseOversamplingMaxPct)} %.`,
    );
  }
  if (!isOnLineGrid(p.acquiredLines, p.linesAcrossFov, scanner.lineStep)) {
    add('lines-off-grid', `${p.acquiredLines} acquired lines are not on this scanner's own step.`);
  }
  if (p.slices.mode === 'slab') {
    const slicePct = (p.slices.acquiredPartitions / p.slices.partitions - 1) * 100;
    if (over(slicePct, limits.sliceOversamplingMaxPct)) {
      add(
        'slice-oversampling-over-maximum',
        `Slice oversampling ${figure(slicePct)} % is over this scanner's ${figure(limits.sliceOversamplingMaxPct)} %.`,
      );
    }
  }
  return reasons;
}

function speedLimits({ prescription: p, scanner }: Case, time: TimeResult | undefined): Reason[] {
  const { limits } = scanner;
  const reasons: Reason[] = [];
  const add = (code: string, text: string): void => void reasons.push({ code, text });
  const { factorPhase, factorSlice } = p.acceleration;
  if (over(factorPhase, limits.accelerationPhaseMax)) {
    add(
      'acceleration-over-maximum',
      `Acceleration ${figure(factorPhase)} along phase is over this scanner's ${figure(limits.accelerationPhaseMax)}.`,
    );
  }
  if (over(factorSlice, limits.accelerationSliceMax)) {
    add(
      'acceleration-over-maximum',
      `Acceleration ${figure(factorSlice)} along slice is over this scanner's ${figure(limits.accelerationSliceMax)}.`,
    );
  }
  const fraction = Math.min(p.partialFourierPhase, p.partialFourierSlice);
  if (over(limits.partialFourierMin, fraction)) {
    add(
      'partial-fourier-under-minimum',
      `Partial Fourier ${fraction.toFixed(3)} is under this scanner's ${limits.partialFourierMin.toFixed(3)}.`,
    );
  }
  if (over(p.averages, limits.averagesMax))
    add('averages-over-maximum', `${p.averages} averages are over this scanner's ${limits.averagesMax}.`);
  const echoes = echoesInTrain(p, time);
  if (over(echoes, limits.echoTrainMax))
    add('train-over-maximum', `A train of ${echoes} echoes is over this scanner's ${limits.echoTrainMax}.`);
  const trMs = minimumTrMs(p);
  if (p.breathing !== 'triggered' && over(trMs, p.trMs)) {
    add('tr-under-minimum', `TR ${figure(p.trMs)} ms is under the ${figure(trMs)} ms this needs.`);
  }
  if (time?.minimumTeMs !== undefined && over(time.minimumTeMs, p.teMs)) {
    add(
      'te-under-minimum',
      `TE ${figure(p.teMs)} ms is under the ${figure(time.minimumTeMs)} ms this echo train needs.`,
    );
  }
  return reasons;
}

/** Echoes one excitation plays; 1 where there is no train. */
function echoesInTrain(p: Prescription, time: TimeResult | undefined): number {
  switch (p.family) {
    case 'single-shot-echo-train':
      return time?.acquiredViews ?? 1;
    case 'echo-planar':
      return Math.ceil((time?.acquiredViews ?? 1) / p.shots);
    case 'echo-train-spin-echo':
    case 'echo-train-spin-echo-3d':
      return p.echoTrainLength;
    default:
      return 1;
  }
}

function patientLimits(
  { patient, prescription, scanner, policy }: Case,
  time: TimeResult | undefined,
): Reason[] {
  const reasons: Reason[] = [];
  const weight = patient.weightKg?.value;
  if (weight !== undefined && over(weight, scanner.limits.tableLimitKg)) {
    reasons.push({
      code: 'table-load-over-limit',
      text: `Weight ${figure(weight)} kg is over this scanner's table limit of ${figure(scanner.limits.tableLimitKg)} kg.`,
    });
  }
  const hold = time?.longestHoldS ?? 0;
  if (
    policy.strictBreathHold &&
    prescription.breathing === 'breath-hold' &&
    over(hold, patient.breathHoldS.value)
  ) {
    reasons.push({
      code: 'breath-hold-over-limit',
      text: `A breath-hold of ${figure(hold)} s is over the ${figure(patient.breathHoldS.value)} s this patient can hold.`,
    });
  }
  return reasons;
}

/**
 * Everything that stops this prescription on this scanner for this patient, each with its number.
 * The table comes first: nothing overrides it. Unknown weight is no reason here; it is an assumption.
 * @param time worked out scan time; absent when it could not be worked out
 */
export function hardLimits(given: Case, time: TimeResult | undefined): readonly Reason[] {
  return [...patientLimits(given, time), ...samplingLimits(given), ...speedLimits(given, time)];
}
