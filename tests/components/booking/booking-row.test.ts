import { describe, expect, it } from 'vitest';
import { checkedStep, nextStep, planWords } from '@/components/booking/booking-row';
import { sessionFormSchema, sessionsOf } from '@/components/booking/coordinator-forms';
import { nextSort, tableHref, tableQuery } from '@/components/booking/table-query';
import { dayRange } from '@/components/booking/requested-days';

const id = '3f0c';

describe('the next step of a booking', () => {
  it.each([
    [{}, 'Enter sizes', '/bookings/3f0c#sizes'],
    [{ verdict: 'fold-in-keep-clear' }, 'Plan on the bench', '/bench/3f0c'],
    [{ verdict: 'not-modelled' }, 'Plan on the bench', '/bench/3f0c'],
    [{ verdict: 'no-fold-expected' }, 'Look at the bench', '/bench/3f0c'],
    [{ verdict: 'fold-in-keep-clear', planState: 'draft', planId: 'p1' }, 'Finish the plan', '/bench/3f0c'],
    [{ verdict: 'no-fold-expected', planState: 'for use', planId: 'p1' }, 'Open the plan', '/plans/p1'],
    [{ verdict: 'no-fold-expected', planState: 'used', planId: 'p1' }, 'Open the plan', '/plans/p1'],
  ] as const)('%j: %s', (state, label, href) => {
    expect(nextStep({ id, ...state }, true)).toEqual({ label, href });
  });

  it('names the plan’s state in the words of plans', () => {
    expect(planWords(undefined)).toBe('no plan yet');
    expect(planWords('signed off')).toBe('plan: signed off');
  });
});

describe('what a check says to do', () => {
  it.each([
    ['plan', 'Plan on the bench', '/bench/3f0c'],
    ['ask-sizes', 'Enter or ask for sizes', '/bookings/3f0c#sizes'],
    ['measure', 'Have it measured', '/bookings/3f0c#sizes'],
    ['propose', 'Propose Scanner B', '/bookings/3f0c#move'],
    ['escalate', 'Ask a lead to decide', '/bookings/3f0c#lead'],
  ] as const)('%s: %s', (kind, label, href) => {
    expect(checkedStep({ id, result: 'escalate', next: { kind, text: label } }, true)).toEqual({ label, href });
  });

  it('is nothing where nothing is to do, or nothing was checked', () => {
    expect(checkedStep({ id, result: 'as-booked', next: { kind: 'none', text: 'Nothing to do' } }, true)).toBeUndefined();
    expect(checkedStep({ id }, true)).toBeUndefined();
  });
});

describe('for who does not plan', () => {
  const booking = { label: 'Open the booking', href: '/bookings/3f0c' };
  it('planning is nobody’s next step, the rest is the same', () => {
    expect(nextStep({ id, verdict: 'fold-in-keep-clear' }, false)).toEqual(booking);
    expect(nextStep({ id, verdict: 'fold-in-keep-clear', planState: 'draft', planId: 'p1' }, false)).toEqual(booking);
    for (const kind of ['plan', 'finish-plan'] as const) expect(checkedStep({ id, result: 'plan-needed', next: { kind, text: 'x' } }, false)).toEqual(booking);
    for (const kind of ['ask-sizes', 'propose', 'escalate'] as const) {
      const asked = { id, result: 'escalate', next: { kind, text: 'x' } } as const;
      expect(checkedStep(asked, false)).toEqual(checkedStep(asked, true));
    }
  });
});

describe('the address of the table', () => {
  const now = new Date(2026, 11, 1, 9, 30);
  it('says what is asked for and leaves out what is no answer', () => {
    expect(tableQuery({ result: 'escalate', sort: '-over', find: '  HB-2 ' }, now)).toEqual({ from: '2026-11-30', to: '2026-12-15', result: 'escalate', sort: 'over', descending: true, find: 'HB-2' });
    expect(tableQuery({ result: 'ready', sort: 'name', scanner: "' or 1=1" }, now)).toEqual({ from: '2026-11-30', to: '2026-12-15' });
  });

  it('starts a new question on its first page and keeps the rest', () => {
    expect(tableHref({ from: '2026-12-01', after: 'x', sort: '-over' }, { result: 'escalate' })).toBe('/bookings?from=2026-12-01&sort=-over&result=escalate');
    expect(tableHref({ result: 'escalate' }, { result: undefined })).toBe('/bookings');
  });

  it('a header goes worst first, then the other way, then back', () => {
    expect([nextSort('over', undefined), nextSort('over', '-over'), nextSort('over', 'over')]).toEqual(['-over', 'over', undefined]);
    expect([nextSort('time', undefined), nextSort('time', '-time')]).toEqual(['-time', undefined]);
  });
});

describe('sessions as they are typed', () => {
  it('are one a week at the same time of day', () => {
    const typed = sessionsOf({ day: '2026-12-01', from: '08:00', to: '12:30', weeks: 3 });
    expect(typed.map(({ startsAt }) => new Date(startsAt).getDate())).toEqual([1, 8, 15]);
    expect(typed.every(({ startsAt, endsAt }) => Date.parse(endsAt) - Date.parse(startsAt) === 4.5 * 3_600_000)).toBe(true);
  });

  it('end after they begin', () => {
    const form = { scannerId: '3f0c3f0c-3f0c-4f0c-8f0c-3f0c3f0c3f0c', day: '2026-12-01', from: '12:00', to: '12:00', weeks: 1 };
    expect(sessionFormSchema.safeParse(form).success).toBe(false);
    expect(sessionFormSchema.safeParse({ ...form, to: '12:05' }).success).toBe(true);
  });
});

describe('the days asked for', () => {
  const now = new Date(2026, 11, 1, 9, 30);

  it('are yesterday to a fortnight ahead by themselves', () => {
    expect(dayRange({}, now)).toEqual({ from: '2026-11-30', to: '2026-12-15' });
  });

  it('are those of the address, put in order', () => {
    expect(dayRange({ from: '2026-12-05', to: '2026-12-02' }, now)).toEqual({
      from: '2026-12-02',
      to: '2026-12-05',
    });
    expect(dayRange({ from: '2026-12-05' }, now)).toEqual({ from: '2026-12-05', to: '2026-12-20' });
  });

  it.each(['yesterday', '2026-13-40', "2026-12-01' or 1=1", ''])('ignore %j', (from) => {
    expect(dayRange({ from }, now).from).toBe('2026-11-30');
  });
});
