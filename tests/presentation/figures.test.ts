import { describe, expect, it } from 'vitest';
import { formatClock, formatClockChange, formatClockRange, formatEchoTime, formatHold } from '@/lib/presentation/duration';
import { formatPercent, formatProbability, formatSignedPercent } from '@/lib/presentation/percent';
import { formatQuantity, formatShort, roundToQuantum } from '@/lib/presentation/round';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';

describe('figures as people read them', () => {
  it('writes scan time as a clock and lets minutes run past the hour', () => {
    expect(formatClock(128)).toBe('2:08');
    expect(formatClock(19.4)).toBe('0:19');
    expect(formatClock(59.6)).toBe('1:00');
    expect(formatClock(3725)).toBe('62:05');
  });

  it('says a range only where its ends read differently', () => {
    expect(formatClockRange([120.1, 120.4])).toBe('2:00');
    expect(formatClockRange([108, 132])).toBe('1:48–2:12');
  });

  it('writes changes with their sign and no change in words', () => {
    expect(formatClockChange(8.2)).toBe('+0:08');
    expect(formatClockChange(-70)).toBe('−1:10');
    expect(formatClockChange(0.3)).toBe('no change');
    expect(formatSignedPercent(1, 1.0247)).toBe('+2 %');
    expect(formatSignedPercent(1, 0.7071)).toBe('−29 %');
    expect(formatSignedPercent(1, 1.004)).toBe('±0 %');
  });

  it('rounds halves away from zero, and binary noise does not decide', () => {
    expect(roundToQuantum(0.5, 1)).toBe(1);
    expect(roundToQuantum(-0.5, 1)).toBe(-1);
    expect(roundToQuantum(1.005, 0.01)).toBe(1.01);
    expect(Object.is(roundToQuantum(-0.2, 1), 0)).toBe(true);
  });

  it('keeps columns aligned or short, as asked', () => {
    expect(formatQuantity(1.25, 'voxelMm')).toBe('1.25');
    expect(formatQuantity(18, 'holdS')).toBe('18.0');
    expect(formatHold(18.44)).toBe('18.4 s');
    expect(formatShort(300, 0.1)).toBe('300');
    expect(formatShort(-3.25, 0.1)).toBe('−3.3');
    expect(formatEchoTime(4000)).toBe('4 s');
    expect(formatEchoTime(85)).toBe('85 ms');
    expect(formatPercent(7.03125, 2)).toBe('7.03 %');
  });

  it('never calls a near certainty certain', () => {
    expect(formatProbability(0.004)).toBe('< 1 %');
    expect(formatProbability(0.996)).toBe('> 99 %');
    expect(formatProbability(0)).toBe('0 %');
    expect(formatProbability(0.31)).toBe('31 %');
  });

  it('keeps the verdict words whole', () => {
    expect(Object.values(VERDICT_WORDS)).toEqual([
      'No fold expected',
      'Fold outside the keep-clear area',
      'Fold in the keep-clear area',
      'Cannot be scanned as planned',
      'Not modelled',
    ]);
  });
});
