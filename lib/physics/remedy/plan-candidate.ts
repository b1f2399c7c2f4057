import type { Reason, TimeResult } from '../model/assessment';
import { DomainError } from '../model/domain-error';
import type { PaybackKind } from '../model/remedy';
import { carryTiming, scanTime } from '../sequence/scan-time';
import { figure } from '../assess/words';
import type { Change, ChangeResult, Solver, TargetedCase } from './change';
import type { ChangeSet } from './change-list';
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
 * What one ranking has worked out already, by the case it was asked about: pairs share their first change, so most of a
 * ranking's steps have been taken before. Forgotten with the ranking.
 */
export class TakenSteps {
  private readonly results = new Map<TargetedCase, Map<Change, ChangeResult>>();
  private readonly levels = new Map<TargetedCase, Map<PaybackLevel, TargetedCase>>();
  private readonly choices = new Map<PaybackKind, PaybackChoice>();
  private readonly times = new Map<TargetedCase, TimeResult>();

  /** @param given the case before any change; solver what changes are worked out with */
  constructor(
    readonly given: TargetedCase,
    readonly now: TimeResult,
    readonly solver: Solver,
  ) {}

  change(change: Change, planned: TargetedCase): ChangeResult {
    return within(this.results, planned, change, () => change(planned, this.solver));
  }

  level(level: PaybackLevel, planned: TargetedCase): TargetedCase {
    return within(this.levels, planned, level, () => level.apply(planned));
  }

  choice(payback: PaybackKind): PaybackChoice {
    return orMake(this.choices, payback, () => PAYBACKS[payback](this.given));
  }

  /** Scan time after settling; what a payback is judged by. */
  time(planned: TargetedCase): TimeResult {
    return orMake(this.times, planned, () =>
      scanTime(carryTiming(this.given.prescription, planned.prescription), planned.patient, planned.scanner),
    );
  }
}

function orMake<K, V>(known: Map<K, V>, key: K, make: () => V): V {
  let value = known.get(key);
  if (value === undefined) {
    value = make();
    known.set(key, value);
  }
  return value;
}

const within = <A, B, V>(known: Map<A, Map<B, V>>, outer: A, inner: B, make: () => V): V =>
  orMake(
    orMake(known, outer, () => new Map<B, V>()),
    inner,
    make,
  );

/** Applies changes one after another; one that finds nothing to change means the set is really a smaller one. */
function applyAll(start: PlannedCandidate, changes: readonly Change[], steps: TakenSteps): Planning {
  let candidate = start;
  for (const change of changes) {
    const result: ChangeResult = steps.change(change, candidate.planned);
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

/** What has been paid too much, worst first: hold beyond the limit, scan time and train beyond what they are now. */
function debt({ given, now }: TakenSteps, time: TimeResult): readonly [number, number, number] {
  const over = (value: number, limit: number): number => Math.max(0, Math.round((value - limit) * 1e6) / 1e6);
  const holdLimit =
    given.prescription.breathing === 'breath-hold' ? given.patient.breathHoldS.value : Infinity;
  return [
    over(time.longestHoldS, holdLimit),
    over(time.scanS, now.scanS),
    over(time.trainMs ?? 0, now.trainMs ?? 0),
  ];
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
function spendOnLines(steps: TakenSteps, candidate: PlannedCandidate): PlannedCandidate {
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
    if (isPaid(debt(steps, steps.time(withLines(middle))))) least = middle;
    else most = middle - 1;
  }
  for (let lines = fillTo(planned, least); lines !== undefined; lines = fillTo(planned, lines - 1)) {
    const filled = withLines(lines);
    if (steps.solver.isClean(filled)) return { ...candidate, planned: filled };
  }
  return candidate;
}

/** Settings, then the payback (if any), then sizing in the geometry those two make. */
function planAt(
  set: ChangeSet,
  payback: PaybackKind | undefined,
  level: PaybackLevel | undefined,
  steps: TakenSteps,
): Planning {
  const settled = applyAll({ planned: steps.given, sideEffects: [] }, set.settings, steps);
  if (settled.outcome !== 'planned') return settled;
  const { planned, sideEffects } = settled.candidate;
  const paid =
    level === undefined
      ? settled.candidate
      : { planned: steps.level(level, planned), sideEffects: [...sideEffects, level.sideEffect] };
  const sized = applyAll(paid, set.sizings, steps);
  if (sized.outcome !== 'planned') return sized;
  const fills =
    payback === 'fewer-averages' &&
    set.oversamplesPhase &&
    steps.now.trainMs === undefined &&
    isPaid(debt(steps, steps.time(sized.candidate.planned)));
  return fills ? { outcome: 'planned', candidate: spendOnLines(steps, sized.candidate) } : sized;
}

/** A set of changes without any payback. */
export const planUnpaid = (set: ChangeSet, steps: TakenSteps): Planning =>
  guarded(() => planAt(set, undefined, undefined, steps));

/** The mildest level that pays everything back; where none does, the one that leaves least owed. */
function planPaidBack(
  set: ChangeSet,
  unpaid: PlannedCandidate,
  payback: PaybackKind,
  steps: TakenSteps,
): Planning {
  let owed = debt(steps, steps.time(unpaid.planned));
  if (isPaid(owed)) return NOTHING;
  const choice = steps.choice(payback);
  if (choice.outcome === 'refused') return { outcome: 'refused', reason: choice, paybackAlone: true };
  let best: Planning = NOTHING;
  for (const level of choice.levels) {
    const planning = planAt(set, payback, level, steps);
    if (planning.outcome !== 'planned') continue;
    const left = debt(steps, steps.time(planning.candidate.planned));
    if (isLess(left, owed)) {
      owed = left;
      best = planning;
    }
    if (isPaid(left)) break;
  }
  return best;
}

/** What the sequence cannot play is refused with the reason the timing gives. */
function guarded(plan: () => Planning): Planning {
  try {
    return plan();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { outcome: 'refused', reason: { code: error.code, text: `${error.message}.` } };
  }
}

/**
 * Works out one candidate: which prescription and arms a set of changes, and a payback, lead to.
 * @param unpaid what the set leads to without a payback
 */
export function planCandidate(
  set: ChangeSet,
  unpaid: PlannedCandidate,
  payback: PaybackKind | undefined,
  steps: TakenSteps,
): Planning {
  if (set.options.length === 0 && payback === undefined) return NOTHING;
  return guarded(() => {
    const planning: Planning =
      payback === undefined
        ? { outcome: 'planned', candidate: unpaid }
        : planPaidBack(set, unpaid, payback, steps);
    if (planning.outcome !== 'planned') return planning;
    const candidate = settle(steps.given, planning.candidate);
    const leaves = steps.solver.leavesPicture(candidate.planned);
    return leaves === undefined ? { outcome: 'planned', candidate } : { outcome: 'refused', reason: leaves };
  });
}
