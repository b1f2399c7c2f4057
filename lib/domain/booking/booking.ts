import type { Assessment, BodyRegion, Verdict } from '@/lib/domain/case/model';
import type { PlanState } from '@/lib/domain/plan/states';
import type { NextActionKind, PreCheckResult } from '@/lib/domain/pre-check/result';

export interface BookingRecord {
  readonly siteId: string;
  readonly id: string;
  readonly accession: string;
  readonly scheduledAt: Date;
  readonly slotMinutes: number;
  readonly region: BodyRegion;
  readonly scannerId: string;
  readonly protocolId: string;
}

/** What lists show of a booking, rewritten whenever something it rests on changes. */
export interface BookingState {
  readonly verdict?: Verdict;
  readonly planState?: PlanState;
  readonly minutesNeeded?: number;
  /** What the last check came to; absent until the first. */
  readonly check?: {
    readonly result: PreCheckResult;
    readonly minutesOver: number;
    readonly next: { readonly kind: NextActionKind; readonly text: string };
  };
  /** Something it rests on changed since: the next check is on its way. */
  readonly stale?: boolean;
  /** A lead was asked to decide, or has. */
  readonly escalation?: 'open' | 'decided';
}

/** From the one that stops a scan to the one that needs nothing. */
const WORST_FIRST: readonly Verdict[] = [
  'cannot-be-scanned', 'not-modelled', 'fold-in-keep-clear', 'fold-outside-keep-clear', 'no-fold-expected',
];

/** The worst verdict of a set; undefined for none. */
export function worstVerdict(assessments: readonly Pick<Assessment, 'verdict'>[]): Verdict | undefined {
  return WORST_FIRST.find((verdict) => assessments.some((assessment) => assessment.verdict === verdict));
}

/** Scan minutes of all sequences together, without pauses and set-up. */
export function scanMinutes(assessments: readonly Pick<Assessment, 'time'>[]): number {
  return assessments.reduce((seconds, { time }) => seconds + (time?.scanS ?? 0), 0) / 60;
}
