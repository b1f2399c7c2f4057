import type { EntryKind } from '@/lib/domain/booking/entry';
import type { PreCheckResult } from '@/lib/domain/pre-check/result';
import type { HistoryLine } from '@/lib/schemas/booking-entry';

export const RESULT_WORDS: Readonly<Record<PreCheckResult | 'unchecked', string>> = {
  'as-booked': 'As booked',
  'plan-needed': 'Plan needed',
  'size-needed': 'Size needed',
  'another-scanner': 'Another scanner',
  escalate: 'Escalate',
  unchecked: 'Not checked yet',
};

export const STANDING_WORDS = { fits: 'Can be proposed', open: 'A size is needed first', 'ruled-out': 'Ruled out' } as const;

export const ENTRY_WORDS: Readonly<Record<HistoryLine['kind'] & (EntryKind | 'result' | 'sizes' | 'added'), string>> = {
  note: 'Note',
  booked: 'The booking system changed the booking',
  'move-proposed': 'Move proposed',
  'move-withdrawn': 'Proposed move taken back',
  'move-agreed': 'The booking system followed the proposed move',
  surgery: 'Surgery that changes the body’s size',
  escalated: 'A lead was asked to decide',
  decided: 'A lead decided',
  result: 'Pre-check',
  sizes: 'Sizes recorded',
  added: 'Booking added',
};

/** Said wherever a check is shown. */
export const PLANNING_ESTIMATE = 'A planning estimate. Trained staff, implant screening, equipment labelling and local policy decide.';

/** A probability as people read it: never 0 % for what only looks like it. */
export function shareWords(share: number): string {
  if (share === 0) return '0 %';
  if (share < 0.005) return '< 1 %';
  if (share > 0.995 && share < 1) return '> 99 %';
  return `${Math.round(share * 100)} %`;
}
