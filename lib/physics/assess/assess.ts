import { foldShareWithMargin } from '../certainty/fold-probability';
import { sizesAt } from '../certainty/sizes-at';
import type { SolvedFold } from '../fold/solved-fold';
import { toMicrometres } from '../geometry/micrometres';
import { PLANE_AXES } from '../geometry/section-frame';
import type {
  Assessment,
  FoldResult,
  Reason,
  SamplingResult,
  SlabResult,
  TimeResult,
  Verdict,
  WidthRequirement,
} from '../model/assessment';
import type { PatientAxis } from '../model/axes';
import type { Case } from '../model/case';
import { DomainError } from '../model/domain-error';
import type { KeepClear } from '../model/keep-clear';
import type { Patient } from '../model/patient';
import type { SitePolicy } from '../model/policy';
import type { Prescription } from '../model/prescription';
import type { Scanner } from '../model/scanner';
import { scanTime } from '../sequence/scan-time';
import { assumptionsFor } from './assumptions';
import { ENGINE_VERSION } from './engine-version';
import { solveClass, type FrozenCase } from './geometry-class';
import { detailOf } from './detail-of';
import { hardLimits } from './hard-limits';
import { notModelledReason } from './not-modelled';
import { reasonsFor } from './reasons';
import { unfoldingOf, withUnfolding } from './resolve-unfolding';
import { slabResultOf } from './slab-result';
import { validateCase } from './validate-case';
import { figure } from './words';

const readoutAxisOf = (p: Prescription): PatientAxis =>
  PLANE_AXES[p.plane][0] === p.phaseAxis ? PLANE_AXES[p.plane][1] : PLANE_AXES[p.plane][0];

function samplingOf(p: Prescription): SamplingResult {
  return {
    acquiredLines: p.acquiredLines,
    acquiredWidthMm: (p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov,
    phaseOversampling: p.acquiredLines / p.linesAcrossFov - 1,
    ...(p.slices.mode === 'stack'
      ? {}
      : {
          acquiredPartitions: p.slices.acquiredPartitions,
          acquiredSlabMm: p.slices.acquiredPartitions * p.slices.partitionThicknessMm,
          sliceOversampling: p.slices.acquiredPartitions / p.slices.partitions - 1,
        }),
  };
}

/** Scan time, or the reason why it cannot be played at all. */
function timeOf({ prescription, patient, scanner }: Case): {
  readonly time?: TimeResult;
  readonly stops: readonly Reason[];
} {
  try {
    return { time: scanTime(prescription, patient, scanner), stops: [] };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { stops: [{ code: error.code, text: `${error.message}.` }] };
  }
}

function verdictOf(
  hard: readonly Reason[],
  fold: FoldResult,
  slab: SlabResult | undefined,
  gap: Reason | undefined,
): Verdict {
  if (hard.length > 0) return 'cannot-be-scanned';
  if (fold.inKeepClear || gap !== undefined || (slab?.contaminatedInKeepClear ?? 0) > 0)
    return 'fold-in-keep-clear';
  if (fold.outsideKeepClear || (slab?.contaminated ?? 0) > 0) return 'fold-outside-keep-clear';
  return 'no-fold-expected';
}

/**
 * A width that is clean only in a gap between two forbidden intervals has its gap elsewhere in a patient of another
 * size: it counts as clean only where it is so for the asked share of sizes.
 */
function gapReason(given: FrozenCase, width: WidthRequirement, fold: FoldResult): Reason | undefined {
  const { prescription: p, policy, patient } = given;
  const widthMm = (p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov;
  if (fold.inKeepClear || toMicrometres(widthMm) >= toMicrometres(width.alwaysCleanMm)) return undefined;
  if (sizesAt(patient, policy.sureAt) === patient) return undefined;
  const share = foldShareWithMargin({ ...given, prescription: withUnfolding(given, unfoldingOf(given)) });
  if (share <= 1 - policy.sureAt + 1e-9) return undefined;
  return {
    code: 'clean-only-at-this-size',
    text:
      `${figure(widthMm)} mm lies in a gap between trunk and arm that moves with the size: it folds in ` +
      `${figure(share * 100)} % of such patients. From ${figure(width.alwaysCleanMm)} mm on it holds.`,
  };
}

/** The case the geometry sees: sizes at the policy's certainty, unknown unfolding taken cautiously. */
export function geometryCase(given: FrozenCase): FrozenCase {
  const patient = sizesAt(given.patient, given.policy.sureAt);
  const prescription = withUnfolding(given, unfoldingOf(given));
  return patient === given.patient && prescription === given.prescription
    ? given
    : { ...given, patient, prescription };
}

/** A case's geometry, solved: what assessing and sizing start from. */
export interface SolvedGeometry {
  readonly seen: FrozenCase;
  readonly solved: SolvedFold;
}

export function solveGeometry(given: FrozenCase): SolvedGeometry {
  const seen = geometryCase(given);
  return { seen, solved: solveClass(seen) };
}

/**
 * Answers a case that is already known to be inside its domain.
 * @param withAssumptions false leaves them out: in a ranking they are those of the case itself
 * @param geometry the solved geometry, where it is at hand
 */
export function assessChecked(
  given: FrozenCase,
  withAssumptions: boolean,
  geometry?: SolvedGeometry,
): Assessment {
  const { prescription: p, policy } = given;
  const unmodelled = notModelledReason(p);
  if (unmodelled !== undefined)
    return {
      engineVersion: ENGINE_VERSION,
      policyVersion: policy.version,
      phaseAxis: p.phaseAxis,
      readoutAxis: readoutAxisOf(p),
      verdict: 'not-modelled',
      reasons: [unmodelled],
      assumptions: [],
    };

  const { time, stops } = timeOf(given);
  const hard = [...hardLimits(given, time), ...stops];
  const { seen, solved } = geometry ?? solveGeometry(given);
  const partitions = p.slices.mode === 'slab' ? p.slices.acquiredPartitions : undefined;
  const width = solved.requirement(partitions);
  const fold = solved.leftover(p.acquiredLines, partitions);
  const slab = slabResultOf(seen);
  const gap = gapReason(given, width, fold);
  const fatShare = solved.problem.fatShares?.[0];
  const verdict = verdictOf(hard, fold, slab, gap);
  // Filled in place: asked for every candidate of a ranking.
  const answer: { -readonly [K in keyof Assessment]: Assessment[K] } = {
    engineVersion: ENGINE_VERSION,
    policyVersion: policy.version,
    phaseAxis: p.phaseAxis,
    readoutAxis: readoutAxisOf(p),
    verdict,
    reasons: reasonsFor({
      verdict,
      hard: gap === undefined ? hard : [...hard, gap],
      prescription: p,
      width,
      fold,
      slab,
      keepClearIsDisplayed: solved.keepClearIsDisplayed,
      fatShare: fatShare === undefined ? undefined : Math.abs(fatShare),
    }),
    assumptions: withAssumptions ? assumptionsFor(given) : [],
    sampling: samplingOf(p),
    width,
    fold,
  };
  if (slab !== undefined) answer.slab = slab;
  if (time !== undefined) answer.time = time;
  answer.detail = detailOf(seen);
  return answer;
}

/**
 * The one question: what folds where, whether it can be scanned, how long it takes and what it shows.
 *
 * Also callable as assess(patient, prescription, keepClear, scanner, policy).
 * @returns lengths mm, times s, shares [1]; verdict with the deciding reason first; 'not-modelled' where sampling is not
 * Cartesian, never "no fold"
 * @throws DomainError naming the argument, the value given and what is allowed
 * Valid: Cartesian sampling; planning estimate for rigid tissue and a margin that stands for breathing.
 */
export function assess(given: Case): Assessment;
export function assess(
  patient: Patient,
  prescription: Prescription,
  keepClear: KeepClear,
  scanner: Scanner,
  policy: SitePolicy,
): Assessment;
export function assess(
  first: Case | Patient,
  prescription?: Prescription,
  keepClear?: KeepClear,
  scanner?: Scanner,
  policy?: SitePolicy,
): Assessment {
  const given =
    prescription === undefined
      ? (first as Case)
      : ({ patient: first, prescription, keepClear, scanner, policy } as Case);
  validateCase(given);
  return assessChecked(given, true);
}
