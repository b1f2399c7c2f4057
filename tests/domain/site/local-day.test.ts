import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sessionsOf } from '@/components/booking/coordinator-forms';
import { atClock, dayOf, localDay, startOfDay } from '@/lib/domain/site/local-day';
import { formatTime } from '@/lib/presentation/moment';

const HOUR_MS = 3_600_000;
const hoursOf = (day: string) => (startOfDay(day, 1).getTime() - startOfDay(day).getTime()) / HOUR_MS;

/** Node reads TZ anew when it is set, so each zone is tried in this process. */
describe.each([
  // Clocks change at 01:00 UTC on the last Sundays of March and October, in Sydney on the first of October and April (tz database).
  ['Europe/Berlin', '2027-03-28', '2027-10-31'],
  ['America/New_York', '2027-03-14', '2027-11-07'],
  ['Australia/Sydney', '2027-10-03', '2027-04-04'],
])('days of a site whose server keeps the time of %s', (zone, short, long) => {
  const before = process.env.TZ;
  beforeAll(() => {
    process.env.TZ = zone;
  });
  afterAll(() => {
    if (before === undefined) delete process.env.TZ;
    else process.env.TZ = before;
  });

  it('have 23 hours when clocks go forward, 25 when they go back, and follow each other without a gap', () => {
    expect([short, long, '2027-06-15'].map(hoursOf)).toEqual([23, 25, 24]);
    for (const day of [short, long]) {
      const { from, before: until } = dayOf(atClock(day, '12:00'));
      expect([from, until]).toEqual([startOfDay(day), startOfDay(day, 1)]);
      expect(localDay(from)).toBe(day);
      expect(localDay(new Date(from.getTime() - 1))).not.toBe(day);
      expect(localDay(new Date(until.getTime() - 1))).toBe(day);
      expect(dayOf(until).from).toEqual(until);
    }
  });

  it('keep a clock time what it is, and are the days that times are shown in', () => {
    for (const day of [short, long, '2027-01-01', '2027-12-31']) {
      for (const time of ['00:00', '08:20', '23:59']) {
        const moment = atClock(day, time);
        expect(localDay(moment)).toBe(day);
        expect(`${String(moment.getHours()).padStart(2, '0')}:${String(moment.getMinutes()).padStart(2, '0')}`).toBe(time);
      }
    }
    expect(localDay(startOfDay('2027-12-31', 1))).toBe('2028-01-01');
  });

  it('let a weekly session begin at one clock time across the change', () => {
    const week = new Date(startOfDay(short).getTime() - 3 * 24 * HOUR_MS);
    const sessions = sessionsOf({ day: localDay(week), from: '08:00', to: '12:30', weeks: 2 });
    expect(sessions.map(({ startsAt, endsAt }) => [new Date(startsAt).getHours(), new Date(endsAt).getHours()])).toEqual([[8, 12], [8, 12]]);
    const apart = Date.parse(sessions[1]!.startsAt) - Date.parse(sessions[0]!.startsAt);
    expect(apart).toBe((7 * 24 - 1) * HOUR_MS);
  });
});

it('times are shown in the zone the days are of', () => {
  const moment = new Date('2027-07-01T22:30:00Z');
  expect(formatTime(moment)).toBe(`${String(moment.getHours()).padStart(2, '0')}:${String(moment.getMinutes()).padStart(2, '0')}`);
});
