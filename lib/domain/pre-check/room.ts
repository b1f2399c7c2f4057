/** When a scanner is staffed, as entered. */
export interface Session {
  readonly startsAt: Date;
  readonly endsAt: Date;
}

/** Time that is taken on a scanner: a booking, or a move that is proposed. */
export interface Taken {
  readonly startsAt: Date;
  readonly minutes: number;
}

const MINUTE_MS = 60_000;
const endOf = ({ startsAt, minutes }: Taken): number => startsAt.getTime() + minutes * MINUTE_MS;

export type SessionStanding = 'inside' | 'outside' | 'room unknown';

/** Whether a slot lies within a session; without any session entered for its scanner and day nobody knows. */
export function sessionStanding(slot: Taken, sessionsOfDay: readonly Session[]): SessionStanding {
  if (sessionsOfDay.length === 0) return 'room unknown';
  const inside = sessionsOfDay.some(
    ({ startsAt, endsAt }) => slot.startsAt >= startsAt && endOf(slot) <= endsAt.getTime(),
  );
  return inside ? 'inside' : 'outside';
}

/** What is left of the sessions once what is taken is out, in order. */
export function freeSpans(sessions: readonly Session[], taken: readonly Taken[]): Session[] {
  const busy = [...taken].sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
  return [...sessions]
    .sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime())
    .flatMap(({ startsAt, endsAt }) => {
      const free: Session[] = [];
      let at = startsAt.getTime();
      for (const one of busy) {
        const [from, to] = [one.startsAt.getTime(), endOf(one)];
        if (to <= at || from >= endsAt.getTime()) continue;
        if (from > at) free.push({ startsAt: new Date(at), endsAt: new Date(from) });
        at = Math.max(at, to);
      }
      if (at < endsAt.getTime()) free.push({ startsAt: new Date(at), endsAt });
      return free;
    });
}

export function minutesFree(spans: readonly Session[]): number {
  return spans.reduce((sum, { startsAt, endsAt }) => sum + (endsAt.getTime() - startsAt.getTime()) / MINUTE_MS, 0);
}

/** Starts of free places long enough, on whole five minutes, at most `limit`. */
export function freeSlots(spans: readonly Session[], minutes: number, limit: number): Date[] {
  const grid = 5 * MINUTE_MS;
  const found: Date[] = [];
  for (const { startsAt, endsAt } of spans) {
    const start = Math.ceil(startsAt.getTime() / grid) * grid;
    if (start + minutes * MINUTE_MS <= endsAt.getTime()) found.push(new Date(start));
    if (found.length === limit) break;
  }
  return found;
}
