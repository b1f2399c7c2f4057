import { describe, expect, it } from 'vitest';
import { nextStep, planWords } from '@/components/booking/booking-row';
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
    expect(nextStep({ id, ...state })).toEqual({ label, href });
  });

  it('names the plan’s state in the words of plans', () => {
    expect(planWords(undefined)).toBe('no plan yet');
    expect(planWords('signed off')).toBe('plan: signed off');
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
