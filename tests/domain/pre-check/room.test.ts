import { describe, expect, it } from 'vitest';
import { freeSlots, freeSpans, minutesFree, sessionStanding } from '@/lib/domain/pre-check/room';

const at = (time: string) => new Date(`2026-05-20T${time}:00Z`);
const session = (from: string, to: string) => ({ startsAt: at(from), endsAt: at(to) });
const taken = (from: string, minutes: number) => ({ startsAt: at(from), minutes });

describe('room on a scanner', () => {
  const day = [session('08:00', '12:00'), session('13:00', '17:00')];

  it('is its sessions without what is booked', () => {
    const spans = freeSpans(day, [taken('08:00', 45), taken('10:00', 150), taken('16:30', 60)]);
    expect(spans).toEqual([session('08:45', '10:00'), session('13:00', '16:30')]);
    expect(minutesFree(spans)).toBe(75 + 210);
    expect(freeSlots(spans, 60, 5)).toEqual([at('08:45'), at('13:00')]);
    expect(freeSlots(spans, 90, 5)).toEqual([at('13:00')]);
    expect(freeSlots(spans, 300, 5)).toEqual([]);
  });

  it('bookings that overlap one another are taken once', () => {
    expect(minutesFree(freeSpans([session('08:00', '10:00')], [taken('08:00', 60), taken('08:30', 60)]))).toBe(30);
  });

  it.each([
    ['08:00', 240, 'inside'], ['11:30', 45, 'outside'], ['12:00', 30, 'outside'], ['16:59', 1, 'inside'],
  ])('a slot at %s for %i min lies %s', (from, minutes, standing) => {
    expect(sessionStanding(taken(from, minutes), day)).toBe(standing);
  });

  it('is unknown while no session is entered', () => {
    expect(sessionStanding(taken('08:00', 30), [])).toBe('room unknown');
  });
});
