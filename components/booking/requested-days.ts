import { addDays, dayKey } from '@/lib/presentation/moment';

/** In the years a booking can be in: beyond, days before and after could not be named. */
const DAY = /^2[01]\d{2}-\d{2}-\d{2}$/;
/** Yesterday is still written up; a fortnight ahead is what is planned. */
const BACK = 1;
const AHEAD = 14;

const asDay = (text: string | undefined): string | undefined =>
  text && DAY.test(text) && !Number.isNaN(Date.parse(`${text}T12:00:00Z`)) ? text : undefined;

/** The days asked for in the address, in order; yesterday to a fortnight ahead when nothing usable is asked. */
export function dayRange(query: { from?: string; to?: string }, now: Date): { from: string; to: string } {
  const from = asDay(query.from) ?? dayKey(addDays(now, -BACK));
  const to = asDay(query.to) ?? dayKey(addDays(new Date(`${from}T12:00:00`), BACK + AHEAD));
  return from <= to ? { from, to } : { from: to, to: from };
}
