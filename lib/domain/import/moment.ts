export type DateOrder = 'day-first' | 'month-first';

export interface Day {
  readonly year: number;
  readonly month: number;
  readonly day: number;
}

function real({ year, month, day }: Day): Day | undefined {
  const date = new Date(Date.UTC(year, month - 1, day));
  return year >= 2000 && year < 2100 && date.getUTCMonth() === month - 1 && date.getUTCDate() === day ? { year, month, day } : undefined;
}

/** A calendar day: 2026-12-01 and 20261201 mean one thing; with the year last the order must be known. */
export function readDay(text: string, order: DateOrder): Day | undefined {
  const iso = /^(\d{4})([-/.]?)(\d{2})\2(\d{2})$/.exec(text.trim());
  if (iso) return real({ year: Number(iso[1]), month: Number(iso[3]), day: Number(iso[4]) });
  const last = /^(\d{1,2})([-/.])(\d{1,2})\2(\d{4})$/.exec(text.trim());
  if (!last) return undefined;
  const [first, second, year] = [Number(last[1]), Number(last[3]), Number(last[4])];
  return real(order === 'day-first' ? { year, day: first, month: second } : { year, month: first, day: second });
}

/** What the days of a column tell about their order; undefined when none tells, or they contradict each other. */
export function dateOrderOf(texts: readonly string[]): DateOrder | undefined {
  const found = new Set<DateOrder>();
  for (const text of texts) {
    const parts = /^(\d{1,2})([-/.])(\d{1,2})\2\d{4}/.exec(text.trim());
    if (!parts) continue;
    if (Number(parts[1]) > 12) found.add('day-first');
    if (Number(parts[3]) > 12) found.add('month-first');
  }
  return found.size === 1 ? [...found][0] : undefined;
}

/** Hours and minutes, 24 hours or with am and pm. */
export function readTime(text: string): { readonly hour: number; readonly minute: number } | undefined {
  const match = /^(\d{1,2})[:.h](\d{2})(?::\d{2}(?:\.\d{1,6})?)?\s*([ap])?\.?(?:m\.?)?$/i.exec(text.trim());
  if (!match) return undefined;
  let hour = Number(match[1]);
  const minute = Number(match[2]);
  const half = match[3]?.toLowerCase();
  if (half !== undefined) {
    if (hour < 1 || hour > 12) return undefined;
    hour = (hour % 12) + (half === 'p' ? 12 : 0);
  }
  return hour < 24 && minute < 60 ? { hour, minute } : undefined;
}

const formats = new Map<string, Intl.DateTimeFormat>();

/** What clocks on the wall show at a moment, as if it were UTC: ms. */
function wallClock(at: number, zone: string): number {
  let format = formats.get(zone);
  if (!format) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone: zone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', second: '2-digit',
    });
    formats.set(zone, format);
  }
  const part = Object.fromEntries(format.formatToParts(at).map(({ type, value }) => [type, Number(value)]));
  return Date.UTC(part.year!, part.month! - 1, part.day!, part.hour!, part.minute!, part.second!);
}

/** The moment at which clocks of a zone show this; undefined for an hour that is skipped in spring. */
export function momentInZone(day: Day, time: { readonly hour: number; readonly minute: number }, zone: string): string | undefined {
  const wanted = Date.UTC(day.year, day.month - 1, day.day, time.hour, time.minute);
  // Two steps: the offset at the first guess may be the one of the other side of a change of clocks.
  let at = wanted;
  for (let step = 0; step < 2; step += 1) at = wanted - (wallClock(at, zone) - at);
  return wallClock(at, zone) === wanted ? new Date(at).toISOString() : undefined;
}

/** A day and time in one cell: ISO 8601 with its offset, or without one as wall-clock time of the zone. */
export function readMoment(text: string, order: DateOrder, zone: string): string | undefined {
  const trimmed = text.trim();
  if (/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(?::\d{2}(?:\.\d{1,9})?)?(?:Z|[+-]\d{2}:?\d{2})$/.test(trimmed)) {
    const day = readDay(trimmed.slice(0, 10), order);
    const at = Date.parse(trimmed);
    return day && Number.isFinite(at) ? new Date(at).toISOString() : undefined;
  }
  const match = /^(\S+?)[T\s,]+(\d.*)$/.exec(trimmed);
  const day = match && readDay(match[1]!, order);
  const time = match && readTime(match[2]!);
  return day && time ? momentInZone(day, time, zone) : undefined;
}

export const dayText = ({ year, month, day }: Day): string =>
  `${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
