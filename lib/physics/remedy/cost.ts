import type { Assessment } from '../model/assessment';
import type { Case } from '../model/case';
import type { CostTerm, CostTermKind } from '../model/remedy';
import { countEdits, slabCoverageLostMm } from './prescription-difference';
import { accelerationSteps, partialFourierSteps } from './payback-ladders';

/** A price before rounding: points and the words for them. */
interface Price {
  readonly points: number;
  readonly text: string;
}

const percentMore = (now: number, then: number): number =>
  now > 0 ? Math.max(0, (then / now - 1) * 100) : 0;

const shown = (value: number): string => (Math.round(value * 10) / 10).toFixed(1).replace(/\.0$/, '');

function timePrice(given: Case, now: Assessment, then: Assessment): Price[] {
  const grown = percentMore(now.time?.scanS ?? 0, then.time?.scanS ?? 0);
  return grown > 0 ? [{ points: grown * given.policy.weights.timePct, text: `time +${shown(grown)} %` }] : [];
}

function snrPrice(given: Case, now: Assessment, then: Assessment): Price[] {
  const before = now.detail?.snr ?? 0;
  const lost = before > 0 ? Math.max(0, (1 - (then.detail?.snr ?? 0) / before) * 100) : 0;
  return lost > 0 ? [{ points: lost * given.policy.weights.snrLostPct, text: `SNR −${shown(lost)} %` }] : [];
}

const voxelVolume = (assessment: Assessment): number =>
  assessment.detail === undefined
    ? 0
    : assessment.detail.voxelMm.reduce((product, edge) => product * edge, 1);

function voxelPrice(given: Case, now: Assessment, then: Assessment): Price[] {
  const grown = percentMore(voxelVolume(now), voxelVolume(then));
  return grown > 0
    ? [{ points: grown * given.policy.weights.voxelPct, text: `voxel volume +${shown(grown)} %` }]
    : [];
}

/** Seconds beyond what the patient can hold; 0 where the sequence is not held. */
export function holdExcessS(given: Case, assessment: Assessment): number {
  if (given.prescription.breathing !== 'breath-hold' || assessment.time === undefined) return 0;
  return Math.max(0, assessment.time.longestHoldS - given.patient.breathHoldS.value);
}

function breathHoldPrice(given: Case, now: Assessment, then: Assessment): Price[] {
  const { weights } = given.policy;
  const prices: Price[] = [];
  const excess = holdExcessS(given, then);
  if (excess > 0) {
    const limit = given.patient.breathHoldS.value;
    prices.push({
      points: excess * weights.breathHoldS,
      text: `breath-hold ${shown(excess)} s over the ${shown(limit)} s limit`,
    });
  }
  const more = Math.max(0, (then.time?.breathHolds ?? 0) - (now.time?.breathHolds ?? 0));
  if (more > 0)
    prices.push({
      points: more * weights.extraBreathHold,
      text: `${more} more breath-hold${more > 1 ? 's' : ''}`,
    });
  return prices;
}

function sideEffectPrice(given: Case, planned: Case, now: Assessment, then: Assessment): Price[] {
  const { weights } = given.policy;
  const before = given.prescription;
  const after = planned.prescription;
  const prices: Price[] = [];
  if (before.phaseAxis !== after.phaseAxis) {
    prices.push({
      points: weights.swap[given.patient.region],
      text: 'ghosts and chemical shift change direction',
    });
  }
  const bands = after.presaturation.length - before.presaturation.length;
  if (bands > 0)
    prices.push({ points: bands * weights.presaturationBand, text: 'presaturation: SAR and time per slice' });
  const averages = before.averages - after.averages;
  if (averages > 0) prices.push({ points: averages * weights.fewerAverages, text: 'motion averages less' });
  const acceleration = accelerationSteps(before.acceleration.factorPhase, after.acceleration.factorPhase);
  if (acceleration > 0)
    prices.push({ points: acceleration * weights.moreAcceleration, text: 'more acceleration' });
  const fourier = partialFourierSteps(before.partialFourierPhase, after.partialFourierPhase);
  if (fourier > 0) prices.push({ points: fourier * weights.partialFourier, text: 'partial Fourier' });
  const train = percentMore(now.time?.trainMs ?? 0, then.time?.trainMs ?? 0);
  const displaced = percentMore(
    now.time?.displacementPer100HzMm ?? 0,
    then.time?.displacementPer100HzMm ?? 0,
  );
  const longer = Math.max(train, displaced);
  if (longer > 0) {
    const what = displaced > train ? 'displacement' : 'echo train';
    prices.push({ points: longer * weights.trainPct, text: `${what} +${shown(longer)} %` });
  }
  return prices;
}

const moved = (given: Case, planned: Case): boolean =>
  given.prescription.centreMm.some((value, axis) => value !== planned.prescription.centreMm[axis]);

function effortPrice(given: Case, planned: Case): Price[] {
  const { weights } = given.policy;
  const prices: Price[] = [];
  const edits = countEdits(given.prescription, planned.prescription);
  if (edits > 0)
    prices.push({ points: edits * weights.edit, text: `${edits} setting${edits > 1 ? 's' : ''} to change` });
  if (moved(given, planned)) prices.push({ points: weights.recentre, text: 'FOV centre to move' });
  if (given.patient.arms.position !== planned.patient.arms.position) {
    prices.push({ points: weights.armsUp, text: 'arms to raise' });
  }
  if (given.prescription.coilElements !== planned.prescription.coilElements) {
    prices.push({ points: weights.coilElements, text: 'coil elements to choose' });
  }
  const lost = slabCoverageLostMm(given.prescription, planned.prescription);
  if (lost > 0)
    prices.push({ points: lost * weights.coverageMm, text: `${shown(lost)} mm of coverage given up` });
  return prices;
}

interface FoldShares {
  readonly displayedPct: number;
  readonly keepClearPct: number;
}

/**
 * Shares under fold in percent. In a plane the worst slice stands for all. Along a slab only the contaminated
 * partitions are wholly under fold, so the displayed share is theirs; in the keep-clear area the worst one counts.
 */
function foldShares({ fold, slab }: Assessment): FoldShares {
  const displayed = Math.min(1, fold?.displayedShare ?? 0);
  const keepClear = Math.min(1, fold?.keepClearShare ?? 0);
  const partitions = slab?.partitions.length ?? 0;
  if (slab === undefined || slab.contaminated === 0)
    return { displayedPct: displayed * 100, keepClearPct: keepClear * 100 };
  return {
    displayedPct: (displayed * 100 * slab.contaminated) / partitions,
    keepClearPct: Math.max(keepClear * 100, (100 * slab.contaminatedInKeepClear) / partitions),
  };
}

/** Whether anything, in plane or through the slab, still folds onto the keep-clear area. */
export const leavesFoldInKeepClear = (assessment: Assessment): boolean =>
  assessment.verdict === 'fold-in-keep-clear' ||
  (assessment.fold?.inKeepClear ?? false) ||
  (assessment.slab?.contaminatedInKeepClear ?? 0) > 0;

function foldPrice(given: Case, then: Assessment): Price[] {
  const { weights } = given.policy;
  const { displayedPct: displayed, keepClearPct } = foldShares(then);
  // Fold that only the margin catches has no area of its own, yet must never look free: it counts as 1 %.
  const inKeepClear = Math.max(keepClearPct, leavesFoldInKeepClear(then) ? 1 : 0);
  const prices: Price[] = [];
  if (displayed > 0)
    prices.push({
      points: displayed * weights.foldDisplayedPct,
      text: `${shown(displayed)} % of the picture under fold`,
    });
  if (inKeepClear > 0) {
    prices.push({
      points: inKeepClear * weights.foldKeepClearPct,
      text: `${shown(inKeepClear)} % of the keep-clear area under fold`,
    });
  }
  return prices;
}

function toTerm(kind: CostTermKind, prices: readonly Price[]): CostTerm[] {
  if (prices.length === 0) return [];
  const points = prices.reduce((sum, price) => sum + price.points, 0);
  // 1e-9 keeps a price that is exactly half a tenth in decimals from falling on either side by its last bit.
  return [
    { kind, tenths: Math.round(points * 10 + 1e-9), text: prices.map((price) => price.text).join(', ') },
  ];
}

/**
 * Cost of a plan against what is prescribed now, in integer tenths of a cost point (1 point: as bad as 1 % more scan
 * time). Each term is rounded once; the total is the sum of the rounded terms. A saving earns nothing.
 * @param given the case as it stands; planned the same case after the remedy
 * @returns terms that cost something, in a fixed order
 */
export function costTerms(
  given: Case,
  planned: Case,
  now: Assessment,
  then: Assessment,
): readonly CostTerm[] {
  return [
    ...toTerm('time', timePrice(given, now, then)),
    ...toTerm('snr', snrPrice(given, now, then)),
    ...toTerm('voxel', voxelPrice(given, now, then)),
    ...toTerm('breath-hold', breathHoldPrice(given, now, then)),
    ...toTerm('side-effects', sideEffectPrice(given, planned, now, then)),
    ...toTerm('effort', effortPrice(given, planned)),
    ...toTerm('leftover-fold', foldPrice(given, then)),
  ].filter((term) => term.tenths > 0);
}

export const totalTenths = (terms: readonly CostTerm[]): number =>
  terms.reduce((sum, term) => sum + term.tenths, 0);
