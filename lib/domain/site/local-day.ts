/**
 * Days and clock times of a site are those of the zone its server runs in (TZ): server and scanner stand in one
 * building. Everything that asks which day a moment lies in asks here. A day has 23, 24 or 25 hours.
 */
const two = (value: number): string => String(value).padStart(2, '0');

/** The calendar day a moment lies in, YYYY-MM-DD. */
export const localDay = (moment: Date): string => `${moment.getFullYear()}-${two(moment.getMonth() + 1)}-${two(moment.getDate())}`;

/** The moment a day begins, so many days later. The day is YYYY-MM-DD and real. */
export function startOfDay(day: string, daysLater = 0): Date {
  const [year, month, date] = day.split('-').map(Number) as [number, number, number];
  return new Date(year, month - 1, date + daysLater);
}

/** The day a moment lies in, from its first moment to that of the next. */
export function dayOf(moment: Date): { readonly from: Date; readonly before: Date } {
  const day = localDay(moment);
  return { from: startOfDay(day), before: startOfDay(day, 1) };
}

/** The moment at which clocks show this on a day; in the hour that spring skips, the moment an hour later. */
export const atClock = (day: string, time: string): Date => new Date(`${day}T${time}:00`);
