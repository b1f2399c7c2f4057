import type { Verdict } from '@/lib/domain/case/model';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';

/** What a check of a booking comes to, from what needs nothing to what nobody but a lead can answer. */
export const PRE_CHECK_RESULTS = ['as-booked', 'plan-needed', 'size-needed', 'another-scanner', 'escalate'] as const;
export type PreCheckResult = (typeof PRE_CHECK_RESULTS)[number];

/** Higher is worse; lists sort by it. 0 is kept for "not checked yet". */
export const resultRank = (result: PreCheckResult): number => PRE_CHECK_RESULTS.indexOf(result) + 1;

export function worstResult(results: readonly PreCheckResult[]): PreCheckResult {
  return results.reduce((worst, one) => (resultRank(one) > resultRank(worst) ? one : worst), 'as-booked');
}

export type Subject = 'sizes' | 'table' | 'opening' | 'largest-fov' | 'arms' | 'breath-hold' | 'fold' | 'minutes' | 'session' | 'limits';

/** One thing that was looked at, with what it alone would call for. */
export interface Finding {
  readonly subject: Subject;
  readonly code: string;
  readonly text: string;
  readonly calls: PreCheckResult;
  /** Readings that would answer it. */
  readonly needs?: readonly SizeQuantity[];
  /** Only a measured value will do. */
  readonly measuredOnly?: true;
}

export const NEXT_ACTION_KINDS = ['none', 'plan', 'finish-plan', 'ask-sizes', 'measure', 'propose', 'propose-time', 'escalate'] as const;
export type NextActionKind = (typeof NEXT_ACTION_KINDS)[number];

export interface NextAction {
  readonly kind: NextActionKind;
  readonly text: string;
  readonly needs?: readonly SizeQuantity[];
  /** The scanner to propose. */
  readonly scannerId?: string;
}

/** Figures of one limit: what is asked of it, and the limit. */
export interface Load {
  readonly value: number;
  readonly limit: number;
  readonly measured: boolean;
}

export interface SequenceCheck {
  readonly name: string;
  readonly verdict: Verdict;
  readonly reason: string;
  /** Share of such patients in whom something folds into the keep-clear area, without margin; absent: not worked out. */
  readonly foldProbability?: number;
  /** Cheapest remedy that leaves nothing in the keep-clear area. */
  readonly remedy?: string;
  readonly scanMinutes: number;
  readonly longestHoldS: number;
}

/** One booking on one scanner. */
export interface ScannerCheck {
  readonly scannerId: string;
  readonly scannerName: string;
  readonly calls: PreCheckResult;
  readonly findings: readonly Finding[];
  readonly table?: Load;
  readonly opening?: { readonly clearanceMm: number; readonly spreadMm: number; readonly section: string };
  readonly largestFov?: Load;
  readonly sequences: readonly SequenceCheck[];
  readonly scanMinutes: number;
}

export interface Alternative {
  readonly scannerId: string;
  readonly scannerName: string;
  /** 'fits' as far as is known; 'open' while a size is missing; 'ruled-out' with the reason. */
  readonly standing: 'fits' | 'open' | 'ruled-out';
  readonly reason: string;
  /** Findings that a size would answer; what to ask for while it is open. */
  readonly open: readonly Finding[];
}

export interface PreCheck {
  readonly result: PreCheckResult;
  /** Worst first. */
  readonly findings: readonly Finding[];
  readonly next: NextAction;
  readonly booked: ScannerCheck;
  /** Worked out only where the booked scanner is ruled out. */
  readonly alternatives: readonly Alternative[];
  /** Scan and set-up together. */
  readonly minutesNeeded: number;
  /** Beyond the slot; 0 when it is long enough. */
  readonly minutesOver: number;
  /** What it rests on, in words. */
  readonly basis: readonly string[];
}
