import { assessChecked } from '../assess/assess';
import { freeze, type FrozenCase } from '../assess/geometry-class';
import { validateCase } from '../assess/validate-case';
import { windowRegion } from '../geometry/oriented-region';
import type { Assessment, Reason } from '../model/assessment';
import type { Case } from '../model/case';
import type { PaybackKind, Ranking, Remedy, RemedyKind, RemedyNotPossible } from '../model/remedy';
import type { TargetedCase } from './change';
import { CHANGE_SETS, type ChangeOption, type ChangeSet } from './change-list';
import { costTerms, holdExcessS, leavesFoldInKeepClear, totalTenths } from './cost';
import { markDominated } from './dominance';
import { geometrySolver } from './geometry-solver';
import { outcomeKey } from './outcome-key';
import { PAYBACK_KINDS } from './paybacks';
import { planCandidate, planUnpaid, TakenSteps, type PlannedCandidate } from './plan-candidate';
import { remedySentence } from './sentence';

export interface RankFilters {
  /** Only remedies made of these changes. */
  readonly changes?: readonly RemedyKind[];
  /** Only these ways of paying time back; [] for none. */
  readonly paybacks?: readonly PaybackKind[];
}

const PHYSICAL: ReadonlySet<RemedyKind> = new Set(['arms-up']);

const keyOf = (options: readonly ChangeOption[], payback: PaybackKind | undefined): string =>
  [...options.map((option) => option.key), ...(payback === undefined ? [] : [payback])].join('+');

/** Whether there is anything to put right. */
const needsRemedy = (given: Case, now: Assessment): boolean =>
  now.verdict === 'fold-in-keep-clear' ||
  now.verdict === 'fold-outside-keep-clear' ||
  now.verdict === 'cannot-be-scanned' ||
  holdExcessS(given, now) > 0;

/** Where only the rest of the picture folds, sizing keeps the whole picture free; otherwise the keep-clear area. */
const targeted = (frozen: FrozenCase, now: Assessment): TargetedCase =>
  now.verdict === 'fold-outside-keep-clear'
    ? { ...frozen, target: windowRegion(frozen.prescription) }
    : frozen;

/** Why an assessed candidate is no remedy here; undefined: it is one. */
function whyNot(given: Case, assessment: Assessment): Reason | undefined {
  if (assessment.verdict === 'cannot-be-scanned' || assessment.verdict === 'not-modelled')
    return assessment.reasons[0];
  const tolerated = given.policy.tolerateFoldOutsidePct;
  const outside = (assessment.fold?.displayedShare ?? 0) * 100;
  if (outside <= tolerated + 1e-9) return undefined;
  return {
    code: 'fold-outside-over-tolerance',
    text: `${outside.toFixed(1)} % of the picture would stay under fold; this site tolerates ${tolerated} %.`,
  };
}

function toRemedy(
  given: TargetedCase,
  now: Assessment,
  options: readonly ChangeOption[],
  payback: PaybackKind | undefined,
  { planned, sideEffects }: PlannedCandidate,
  assessment: Assessment,
): Remedy {
  const terms = costTerms(given, planned, now, assessment);
  const changes = options.map((option) => option.kind);
  return {
    key: keyOf(options, payback),
    changes,
    ...(payback === undefined ? {} : { payback }),
    sentence: remedySentence(changes, payback, given, planned),
    prescription: planned.prescription,
    arms: planned.patient.arms.position,
    assessment,
    costTenths: totalTenths(terms),
    terms,
    sideEffects,
    dominated: false,
    physicalActions: changes.filter((kind) => PHYSICAL.has(kind)).length,
  };
}

/** Total order: fold left in the keep-clear area last, then cost, then physical actions, then key. */
export function compareRemedies(a: Remedy, b: Remedy): number {
  const left = Number(leavesFoldInKeepClear(a.assessment)) - Number(leavesFoldInKeepClear(b.assessment));
  if (left !== 0) return left;
  return (
    a.costTenths - b.costTenths ||
    a.physicalActions - b.physicalActions ||
    (a.key < b.key ? -1 : a.key > b.key ? 1 : 0)
  );
}

/** A refusal already told for a part of this set is not told again. */
function isTold(told: readonly Told[], parts: readonly string[], code: string): boolean {
  return told.some((entry) => entry.code === code && entry.parts.every((part) => parts.includes(part)));
}

interface Told {
  readonly code: string;
  readonly parts: readonly string[];
}

/**
 * Every remedy of the candidate set (at most two changes, and one payback), assessed, priced and put in order.
 *
 * Equal outcomes are merged under the one with fewest changes; a remedy beaten in everything by another is marked
 * dominated; what a limit forbids is listed with its reason. The order is total and the same on every machine.
 * @returns `now` as assess() gives it; `candidates` counts the combinations that were worked out to a prescription
 * @throws DomainError as assess()
 */
export function rankRemedies(
  given: Case,
  { filters = {} }: { readonly filters?: RankFilters } = {},
): Ranking {
  validateCase(given);
  const frozen = freeze(given);
  const now = assessChecked(frozen, true);
  if (!needsRemedy(given, now) || now.time === undefined)
    return { now, remedies: [], notPossible: [], candidates: 0 };
  const start = targeted(frozen, now);
  const solver = geometrySolver(start);
  const steps = new TakenSteps(start, now.time, solver);
  const remedies: Remedy[] = [];
  const notPossible: RemedyNotPossible[] = [];
  const told: Told[] = [];
  const seen = new Set<string>([outcomeKey(start)]);
  let candidates = 0;

  const paybacks = PAYBACK_KINDS.filter((kind) => filters.paybacks?.includes(kind) ?? true);
  const refuse = (
    options: readonly ChangeOption[],
    payback: PaybackKind | undefined,
    reason: Reason,
  ): void => {
    const key = keyOf(options, payback);
    const parts = key.split('+');
    if (isTold(told, parts, reason.code)) return;
    told.push({ code: reason.code, parts });
    const changes = options.map((option) => option.kind);
    notPossible.push({
      key,
      changes,
      ...(payback === undefined ? {} : { payback }),
      reason: { code: reason.code, text: reason.text },
    });
  };

  const works: { readonly set: ChangeSet; readonly unpaid: PlannedCandidate }[] = [];
  for (const set of CHANGE_SETS) {
    if (
      filters.changes !== undefined &&
      !set.options.every((option) => filters.changes!.includes(option.kind))
    )
      continue;
    const planning = planUnpaid(set, steps);
    if (planning.outcome === 'planned') works.push({ set, unpaid: planning.candidate });
    else if (planning.outcome === 'refused') refuse(set.options, undefined, planning.reason);
  }
  for (const payback of [undefined, ...paybacks]) {
    for (const { set, unpaid } of works) {
      const { options } = set;
      const planning = planCandidate(set, unpaid, payback, steps);
      if (planning.outcome === 'nothing-to-change') continue;
      if (planning.outcome === 'refused') {
        refuse(planning.paybackAlone ? [] : options, payback, planning.reason);
        continue;
      }
      candidates++;
      const key = outcomeKey(planning.candidate.planned);
      if (seen.has(key)) continue;
      seen.add(key);
      const assessment = solver.assess(planning.candidate.planned);
      const reason = whyNot(given, assessment);
      if (reason === undefined)
        remedies.push(toRemedy(start, now, options, payback, planning.candidate, assessment));
      else refuse(options, payback, reason);
    }
  }
  return { now, remedies: markDominated(remedies).sort(compareRemedies), notPossible, candidates };
}
