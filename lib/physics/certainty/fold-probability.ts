import { freeze, solveOnce, type FrozenCase } from '../assess/geometry-class';
import { unfoldingOf, withUnfolding } from '../assess/resolve-unfolding';
import type { PerSide } from '../model/axes';
import type { Case } from '../model/case';
import { normalCumulative, normalQuantile } from './normal';
import { haltonPoints } from './quasi-random';
import { isTrunkOnly, patientAtDraw, sizeVariables, type SizeVariable } from './size-variables';

export interface FoldProbability {
  /** Share of such patients in whom something folds into the keep-clear area, [0, 1]. */
  readonly probability: number;
  /** 'exact': one threshold in one variable, 1 − Φ; 'quasi-random': share of a fixed set of sizes. */
  readonly method: 'certain' | 'exact' | 'quasi-random';
  readonly draws: number;
}

/** Sizes tried where no single threshold decides: the error is about 1/512. */
const POINTS = 512;
/** Beyond this many spreads nothing is looked for: 1 − Φ(8) is 6e-16. */
const FAR = 8;
const UNDILATED: PerSide = { right: 0, left: 0, anterior: 0, posterior: 0, superior: 0, inferior: 0 };

type Folds = (draws: readonly number[]) => boolean;

function foldsAt(given: FrozenCase, variables: readonly SizeVariable[]): Folds {
  const { prescription } = given;
  const partitions = prescription.slices.mode === 'slab' ? prescription.slices.acquiredPartitions : undefined;
  return (draws) => {
    const patient = patientAtDraw(given.patient, variables, draws);
    return !solveOnce({ ...given, patient }).isClean(prescription.acquiredLines, partitions);
  };
}

/** Draw at which a fold that only grows with size begins, by bisection to 1e-9 spreads. */
function threshold(folds: (draw: number) => boolean): number {
  if (folds(-FAR)) return -Infinity;
  if (!folds(FAR)) return Infinity;
  let [low, high] = [-FAR, FAR];
  while (high - low > 1e-9) {
    const middle = (low + high) / 2;
    if (folds(middle)) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}

/** Only a trunk: it grows about what it covers, so fold once begun stays. */
const onlyGrows = ({ patient }: Case): boolean =>
  isTrunkOnly(patient) &&
  (patient.arms.position === 'up' || patient.arms.breadthMm * patient.arms.depthMm === 0);

/** Whether moving the other variables leaves the first one's threshold where it is. */
function decidesAlone(folds: Folds, variables: readonly SizeVariable[], which: number): number | undefined {
  const at = (others: number): number =>
    threshold((draw) => folds(variables.map((_, index) => (index === which ? draw : others))));
  const middle = at(0);
  if (variables.length === 1) return middle;
  return [-2, 2].every((others) => {
    const other = at(others);
    return other === middle || Math.abs(other - middle) < 1e-6;
  })
    ? middle
    : undefined;
}

/**
 * P(fold in the keep-clear area) over the patient's sizes, without margin: P(W lies in a forbidden interval).
 *
 * One variable deciding alone gives P = 1 − Φ(z*), which for a trunk of half-width e at o and a keep-clear area of
 * half-width r at q is 1 − Φ((W − r − |o − q| − μ_e)/σ_e). Otherwise the share of 512 fixed quasi-random sizes.
 * σ_e is the side's own spread: half the depth's when the FOV follows the body, all of it with the back on the table.
 * @returns probability [0, 1]; the same on every machine
 * @throws DomainError as solving the geometry does
 * Valid: normal spreads; the margin is not part of it and is added by the verdict.
 */
export function foldProbability(given: Case): FoldProbability {
  const posed: FrozenCase = {
    ...freeze(given),
    prescription: withUnfolding(given, unfoldingOf(given)),
    policy: { ...given.policy, marginMm: UNDILATED },
  };
  const variables = sizeVariables(given.patient);
  const folds = foldsAt(posed, variables);
  if (variables.length === 0) return { probability: folds([]) ? 1 : 0, method: 'certain', draws: 1 };
  if (onlyGrows(given)) {
    for (let which = 0; which < variables.length; which++) {
      const at = decidesAlone(folds, variables, which);
      if (at !== undefined) return { probability: 1 - normalCumulative(at), method: 'exact', draws: 1 };
    }
  }
  return { probability: shareOf(folds, variables.length, POINTS), method: 'quasi-random', draws: POINTS };
}

/** Share of quasi-random sizes that fold. */
function shareOf(folds: Folds, dimensions: number, points: number): number {
  const hits = haltonPoints(points, dimensions).filter((point) => folds(point.map(normalQuantile)));
  return hits.length / points;
}

/** Sizes tried when a width is clean only in a gap: enough to tell 1 % from 5 %. */
const GAP_POINTS = 128;

/**
 * Share of sizes in which this width folds, margin included. Asked only where a width is clean in a gap between two
 * forbidden intervals: the gap lies elsewhere in patients of another size.
 */
export function foldShareWithMargin(given: FrozenCase): number {
  const variables = sizeVariables(given.patient);
  if (variables.length === 0) return 0;
  return shareOf(foldsAt(given, variables), variables.length, GAP_POINTS);
}
