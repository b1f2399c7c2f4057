import type { ReadingSource } from '@/lib/domain/case/model';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';

/** One number that was written down about a patient; never changed, only followed by a newer one. */
export interface SizeReading {
  readonly id: string;
  readonly quantity: SizeQuantity;
  readonly value: number;
  readonly source: ReadingSource;
  readonly spread: number;
  /** YYYY-MM-DD. */
  readonly takenOn: string;
  /** Where a girth's tape went, as far as it was said. */
  readonly tapeSite?: TapeSite;
  readonly recordedAt: Date;
}

const DAY_MS = 86_400_000;

/** Facts that do not wear off. */
const LASTING: readonly SizeQuantity[] = ['sex', 'height-cm'];

/** Older than the policy allows on the day it is used. */
export function isExpired(reading: Pick<SizeReading, 'takenOn' | 'quantity'>, now: Date, expiryDays: number): boolean {
  if (LASTING.includes(reading.quantity)) return false;
  return (now.getTime() - Date.parse(`${reading.takenOn}T00:00:00Z`)) / DAY_MS > expiryDays;
}
