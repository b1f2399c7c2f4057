import { DomainError } from '../model/domain-error';
import type { Reading } from '../model/patient';
import { requireWhole } from '../model/require-argument';

/** Whether a reading may still be leaned on; an undated one never counts as current. */
export type ReadingAge = 'current' | 'expired' | 'undated';

export interface ExpiryRule {
  /** Today, ISO 8601 (YYYY-MM-DD): physics has no clock. */
  readonly today: string;
  readonly expiryDays: number;
  /** Day of bariatric surgery: readings taken before it expire at once. */
  readonly surgeryOn?: string;
}

/**
 * Days from 1970-01-01 of a date in the Gregorian calendar (counted from March, so that the leap day comes last).
 * @throws DomainError "date-not-valid"
 */
export function dayNumber(argument: string, date: string): number {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date);
  const [year, month, day] = match ? [Number(match[1]), Number(match[2]), Number(match[3])] : [0, 0, 0];
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  const length = [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1];
  if (!match || length === undefined || day < 1 || day > length) {
    throw new DomainError('date-not-valid', argument, date, 'a date as YYYY-MM-DD');
  }
  const y = month <= 2 ? year - 1 : year;
  const fromMarch = (month + 9) % 12;
  const days = 365 * y + Math.floor(y / 4) - Math.floor(y / 100) + Math.floor(y / 400);
  return days + Math.floor((153 * fromMarch + 2) / 5) + day - 1 - 719468;
}

/**
 * Age of a reading under the site's rule. Population values and policy defaults have no date to expire.
 * A reading is current through its last day (age ≤ expiryDays) unless it was taken before surgery.
 * @throws DomainError "date-not-valid", "reading-in-the-future", "expiry-not-whole"
 */
export function readingAge(reading: Reading, { today, expiryDays, surgeryOn }: ExpiryRule): ReadingAge {
  requireWhole('expiry-not-whole', 'expiryDays', expiryDays, 0);
  if (reading.source === 'population' || reading.source === 'policy-default') return 'current';
  if (reading.takenOn === undefined) return 'undated';
  const taken = dayNumber('takenOn', reading.takenOn);
  const now = dayNumber('today', today);
  if (taken > now)
    throw new DomainError('reading-in-the-future', 'takenOn', reading.takenOn, `${today} or earlier`);
  if (surgeryOn !== undefined && taken < dayNumber('surgeryOn', surgeryOn)) return 'expired';
  return now - taken > expiryDays ? 'expired' : 'current';
}
