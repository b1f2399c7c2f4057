import type { Reason, TimeResult } from '../model/assessment';
import { DomainError } from '../model/domain-error';
import type { PaybackKind } from '../model/remedy';
import { carryTiming, scanTime } from '../sequence/scan-time';
import { figure } from '../assess/words';
import type { Change, ChangeResult, Solver, TargetedCase } from './change';
import type { ChangeOption } from './change-list';
import { fillTo, PAYBACKS, type PaybackChoice, type PaybackLevel } from './paybacks';

/** A candidate worked out but not yet assessed. */
export interface PlannedCandidate {
  readonly planned: TargetedCase;
  readonly sideEffects: readonly string[];
}

export type Planning =
  | { readonly outcome: 'planned'; readonly candidate: PlannedCandidate }
  | { readonly outcome: 'nothing-to-change' }
  /** paybackAlone: whatever it would pay for, this payback is not to be had. */
  | { readonly outcome: 'refused'; readonly reason: Reason; readonly paybackAlone?: true };

const NOTHING: Planning = { outcome: 'nothing-to-change' };

/**
 * Results of changes by the case they were applied to: pairs share their first change, so most of a ranking's steps
 * have been taken before.
 */
const taken = new WeakMap<TargetedCase, Map<Change, ChangeResult>>();

function take(change: Change, given: TargetedCase, solver: Solver): ChangeResult {
  const steps = taken.get(given) ?? new Map<Change, ChangeResult>();
  taken.set(given, steps);
  let result = steps.get(change);
  if (result === undefined) {
    result = change(given, solver);
    steps.set(change, result);
  }
  return result;
}

const levelled = new WeakMap<TargetedCase, Map<PaybackLevel, TargetedCase>>();

function applyLevel(level: PaybackLevel, given: TargetedCase): TargetedCase {
  const known = levelled.get(given) ?? new Map<PaybackLevel, TargetedCase>();
  levelled.set(given, known);
  let applied = known.get(level);
  if (applied === undefined) {
    applied = level.apply(given);
    known.set(level, applied);
  }
  return applied;
}

const choices = new WeakMap<TargetedCase, Map<PaybackKind, PaybackChoice>>();

function choiceOf(payback: PaybackKind, given: TargetedCase): PaybackChoice {
  const known = choices.get(given) ?? new Map<PaybackKind, PaybackChoice>();
  choices.set(given, known);
  const choice = known.get(payback) ?? PAYBACKS[payback](given);
  known.set(payback, choice);
  return choice;
}

const times = new WeakMap<TargetedCase, TimeResult>();

/** Applies changes one after another; one that finds nothing to change means the set is really a smaller one. */
function applyAll(start: PlannedCandidate, changes: readonly Change[], solver: Solver): Planning {
  let candidate = start;
  for (const change of changes) {
    const result: ChangeResult = take(change, candidate.planned, solver);
    if (result.outcome !== 'changed') return result;
    candidate = { planned: result.planned, sideEffects: [...candidate.sideEffects, ...result.sideEffects] };
  }
  return { outcome: 'planned', candidate };
}

/** Stored fields that follow from the sampling, and a TE the longer train can reach. */
function settle(given: TargetedCase, { planned, sideEffects }: PlannedCandidate): PlannedCandidate {
  const carried = carryTiming(given.prescription, planned.prescription);
  const minimumTeMs = scanTime(carried, planned.patient, planned.scanner).minimumTeMs ?? 0;
  if (minimumTeMs <= carried.teMs) return { planned: { ...planned, prescription: carried }, sideEffects };
  const teMs = Math.ceil(minimumTeMs);
  return {
    planned: { ...planned, prescription: { ...carried, teMs } },
    sideEffects: [...sideEffects, `TE ${figure(carried.teMs)} → ${figure(teMs)} ms: the echo train needs it`],
  };
}

/** Scan time after settling; what a payback is judged by. */
function settledTime(given: TargetedCase, planned: TargetedCase): TimeResult {
  let time = times.get(planned);
  if (time === undefined) {
    time = scanTime(carryTiming(given.prescription, planned.prescription), planned.patient, planned.scanner);
    times.set(planned, time);
  }
  return time;
}

/** What has been paid too much, worst first: hold beyond the limit, scan time and train beyond what they are now. */
function debt(given: TargetedCase, now: TimeResult, time: TimeResult): readonly [number, number, number] {
  const over = (value: number, limit: number): number => Math.max(0, Math.round((value - limit) * 1e6) / 1e6);
  const holdLimit = given.prescription.breathing === 'breath-hold' ? given.patient.breathHoldS.value : Infinity;
  return [over(time.longestHoldS, holdLimit), over(time.scanS, now.scanS), over(time.trainMs ?? 0, now.trainMs ?? 0)];
}

const isPaid = (owed: readonly number[]): boolean => owed.every((value) => value === 0);

const isLess = (a: readonly number[], b: readonly number[]): boolean => {
  const at = a.findIndex((value, index) => value !== b[index]);
  return at >= 0 && a[at]! < b[at]!;
};

/**
 * Averages given up leave time over: it is spent on as many clean lines as fit, which keeps the SNR (100 % with half
 * the averages costs nothing of either).
 */
function spendOnLines(given: TargetedCase, now: TimeResult, candidate: PlannedCandidate, solver: Solver): PlannedCandidate {
  const { planned } = candidate;
  const needed = planned.prescription.acquiredLines;
  const withLines = (acquiredLines: number): TargetedCase => ({
    ...planned,
    prescription: { ...planned.prescription, acquiredLines },
  });
  let least = needed;
  let most = fillTo(planned, 2 * planned.prescription.linesAcrossFov) ?? needed;
  while (least < most) {
    const middle = Math.ceil((least + most) / 2);
    if (isPaid(debt(given, now, settledTime(given, withLines(middle))))) least = middle;
    else most = middle - 1;
  }
  for (let lines = fillTo(planned, least); lines !== undefined; lines = fillTo(planned, lines - 1)) {
    if (solver.isClean(withLines(lines))) return { ...candidate, planned: withLines(lines) };
  }
  return candidate;
}

interface Question {
  readonly given: TargetedCase;
  readonly now: TimeResult;
  readonly options: readonly ChangeOption[];
  readonly payback?: PaybackKind;
}

const changesOf = (options: readonly ChangeOption[], stage: ChangeOption['stage']): Change[] =>
  options.filter((option) => option.stage === stage).map((option) => option.change);

/** Settings, then the payback (if any), then sizing in the geometry those two make. */
function planAt(question: Question, level: PaybackLevel | undefined, solver: Solver): Planning {
  const { given, options, now, payback } = question;
  const set = applyAll({ planned: given, sideEffects: [] }, changesOf(options, 'setting'), solver);
  if (set.outcome !== 'planned') return set;
  const paid =
    level === undefined
      ? set.candidate
      : { planned: applyLevel(level, set.candidate.planned), sideEffects: [...set.candidate.sideEffects, level.sideEffect] };
  const sized = applyAll(paid, changesOf(options, 'sizing'), solver);
  if (sized.outcome !== 'planned') return sized;
  const fills =
    payback === 'fewer-averages' &&
    now.trainMs === undefined &&
    options.some((option) => option.kind === 'phase-oversampling') &&
    isPaid(debt(given, now, settledTime(given, sized.candidate.planned)));
  return { outcome: 'planned', candidate: fills ? spendOnLines(given, now, sized.candidate, solver) : sized.candidate };
}

/** The mildest level that pays everything back; where none does, the one that leaves least owed. */
function planPaidBack(question: Question, payback: PaybackKind, solver: Solver): Planning {
  const { given, now } = question;
  const unpaid = planAt(question, undefined, solver);
  if (unpaid.outcome !== 'planned') return unpaid;
  let owed = debt(given, now, settledTime(given, unpaid.candidate.planned));
  if (isPaid(owed)) return NOTHING;
  const choice = choiceOf(payback, given);
  if (choice.outcome === 'refused') return { outcome: 'refused', reason: choice, paybackAlone: true };
  let best: Planning = NOTHING;
  for (const level of choice.levels) {
    const planning = planAt(question, level, solver);
    if (planning.outcome !== 'planned') continue;
    const left = debt(given, now, settledTime(given, planning.candidate.planned));
    if (isLess(left, owed)) {
      owed = left;
      best = planning;
    }
    if (isPaid(left)) break;
  }
  return best;
}

/**
 * Works out one candidate: which prescription and arms a set of changes and a payback lead to.
 * A combination the sequence cannot play is refused with the reason the timing gives.
 */
export function planCandidate(question: Question, solver: Solver): Planning {
  const { given, options, payback } = question;
  if (options.length === 0 && payback === undefined) return NOTHING;
  try {
    const planning = payback === undefined ? planAt(question, undefined, solver) : planPaidBack(question, payback, solver);
    if (planning.outcome !== 'planned') return planning;
    const candidate = settle(given, planning.candidate);
    const leaves = solver.leavesPicture(candidate.planned);
    return leaves === undefined ? { outcome: 'planned', candidate } : { outcome: 'refused', reason: leaves };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { outcome: 'refused', reason: { code: error.code, text: `${error.message}.` } };
  }
}
