/**
 * Moments are shown in the zone of the machine the reader's site runs on: server and scanner stand in one building.
 * Formatted on the server only, so that a browser in another zone prints the same page.
 */
const LOCALE = 'en-GB';

const TIME = new Intl.DateTimeFormat(LOCALE, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });
const DAY = new Intl.DateTimeFormat(LOCALE, { weekday: 'short', day: 'numeric', month: 'short' });
const LONG_DAY = new Intl.DateTimeFormat(LOCALE, { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric' });
const DATE = new Intl.DateTimeFormat(LOCALE, { day: 'numeric', month: 'short', year: 'numeric' });

export const formatTime = (moment: Date): string => TIME.format(moment);
export const formatDay = (moment: Date): string => DAY.format(moment);
export const formatLongDay = (moment: Date): string => LONG_DAY.format(moment);
export const formatDate = (moment: Date): string => DATE.format(moment);
export const formatMoment = (moment: Date): string => `${DATE.format(moment)}, ${TIME.format(moment)}`;

export { localDay as dayKey } from '@/lib/domain/site/local-day';

/** The same wall-clock day so many days later; noon keeps clear of the hours a clock change skips or repeats. */
export function addDays(moment: Date, days: number): Date {
  return new Date(moment.getFullYear(), moment.getMonth(), moment.getDate() + days, 12);
}
