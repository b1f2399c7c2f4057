import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Reading } from '@/lib/physics/model/patient';
import { combineReadings } from '@/lib/physics/size/combine-readings';
import { dayNumber, readingAge } from '@/lib/physics/size/reading-age';
import { isEstimate } from '@/lib/physics/size/size-types';
import { extentsFromTrunk, workOutSize, type KnownSizes } from '@/lib/physics/size/work-out-size';
import { measured } from '@/tests/support/physics-cases';
import { runsOf } from '@/tests/support/tally';

const LIVER = { level: 'liver', allowPopulation: false } as const;
const heavy: KnownSizes = { sex: 'female', weightKg: measured(130), heightCm: measured(165) };

describe('the best route there is', () => {
  const sources = (known: KnownSizes, allowPopulation = false) => {
    const { depth, breadth } = workOutSize(known, { level: 'liver', allowPopulation });
    return [depth, breadth].map((answer) => (isEstimate(answer) ? answer.source : 'size-needed'));
  };
  it.each([
    [{ depthMm: measured(340), breadthMm: measured(480) }, ['measured', 'measured']],
    [{ depthMm: measured(340), girthMm: measured(1400) }, ['measured', 'girth-and-depth']],
    [{ girthMm: measured(1400) }, ['girth', 'girth']],
    [{ girthMm: measured(1400), ...heavy }, ['girth', 'girth']],
    [heavy, ['weight-and-height', 'weight-and-height']],
    [{ ...heavy, weightKg: measured(80) }, ['size-needed', 'size-needed']],
    [{}, ['size-needed', 'size-needed']],
  ] as const)('%o', (known, expected) => {
    expect(sources({ sex: 'female', ...known })).toEqual(expected);
  });
  it('falls back to the population only when allowed, and says whose size it is', () => {
    expect(sources({}, true)).toEqual(['population', 'population']);
    expect(sources({ ...heavy, weightKg: measured(80) }, true)).toEqual(['population', 'population']);
    const { breadth } = workOutSize({ sex: 'male' }, { level: 'liver', allowPopulation: true });
    expect(breadth).toMatchObject({
      value: expect.closeTo(10 * (2.43 + 0.341 * 101), 6) as number,
      words: expect.stringContaining('not of this patient') as string,
    });
  });
  it('uses the BMI ≥ 35 line for a girth when weight and height say so', () => {
    const { depth, bmi } = workOutSize({ ...heavy, girthMm: measured(1400) }, LIVER);
    expect(bmi).toBeCloseTo(47.75, 2);
    expect(depth).toMatchObject({ value: expect.closeTo(10 * (4.45 + 0.199 * 140), 6) as number });
  });
  it('hips: breadth, girth, BMI, or size needed', () => {
    const hips = (known: KnownSizes) => workOutSize(known, LIVER).hipBreadth;
    expect(hips({ ...heavy, hipBreadthMm: measured(470) })).toMatchObject({
      value: 470,
      words: 'hip breadth as measured',
    });
    expect(hips({ ...heavy, hipGirthMm: measured(1450) })).toMatchObject({
      source: 'girth',
      extrapolated: true,
    });
    expect(hips(heavy)).toMatchObject({ source: 'weight-and-height' });
    expect(hips({ sex: 'male' })).toMatchObject({ sizeNeeded: true });
  });
  it('says "reported" of what was reported', () => {
    expect(
      workOutSize({ depthMm: { value: 330, spread: 20, source: 'reported' } }, LIVER).depth,
    ).toMatchObject({ words: 'depth as reported', spread: 20 });
  });
  it('extents: half each side, with half the spread', () => {
    const extents = extentsFromTrunk(measured(480, 20), { ...measured(340, 30), takenOn: '2026-05-02' });
    expect(extents.left).toEqual({ value: 240, spread: 10, source: 'measured' });
    expect(extents.anterior).toEqual({ value: 170, spread: 15, source: 'measured', takenOn: '2026-05-02' });
    expect(extents.right).toEqual(extents.left);
    expect(extents.posterior).toEqual(extents.anterior);
  });
});

describe('age of a reading', () => {
  const on = (takenOn?: string, source: Reading['source'] = 'measured'): Reading => ({
    value: 1,
    spread: 0,
    source,
    takenOn,
  });
  const rule = { today: '2026-06-30', expiryDays: 60 };
  it.each([
    ['2026-06-30', 'current'],
    ['2026-05-01', 'current'],
    ['2026-04-30', 'expired'],
    [undefined, 'undated'],
  ] as const)('taken on %s: %s', (takenOn, age) => expect(readingAge(on(takenOn), rule)).toBe(age));
  it('expires at once with bariatric surgery after it', () => {
    const surgery = { ...rule, surgeryOn: '2026-06-15' };
    expect(readingAge(on('2026-06-14'), surgery)).toBe('expired');
    expect(readingAge(on('2026-06-15'), surgery)).toBe('current');
  });
  it('population and policy values have no date', () => {
    expect(readingAge(on(undefined, 'population'), rule)).toBe('current');
    expect(readingAge(on(undefined, 'policy-default'), rule)).toBe('current');
  });
  it('counts days as the calendar does', () => {
    expect(dayNumber('d', '1970-01-01')).toBe(0);
    fc.assert(
      fc.property(fc.integer({ min: -25_000, max: 60_000 }), (day) => {
        const date = new Date(day * 86_400_000).toISOString().slice(0, 10);
        expect(dayNumber('d', date)).toBe(day);
      }),
      { seed: 20273, numRuns: runsOf(500) },
    );
  });
  it.each(['2026-02-29', '2026-13-01', '2026-00-10', '2026-04-31', '26-04-30', 'yesterday', '2100-02-29'])(
    'refuses %s',
    (date) => {
      expect(() => dayNumber('takenOn', date)).toThrow(
        expect.objectContaining({ code: 'date-not-valid', argument: 'takenOn' }),
      );
    },
  );
  it('refuses a reading from the future', () => {
    expect(() => readingAge(on('2026-07-01'), rule)).toThrow(
      expect.objectContaining({ code: 'reading-in-the-future' }),
    );
  });
});

describe('several readings of one size', () => {
  const rule = { today: '2026-06-30', expiryDays: 60 };
  const reading = (
    value: number,
    spread: number,
    takenOn = '2026-06-20',
    source: Reading['source'] = 'measured',
  ): Reading => ({ value, spread, source, takenOn });
  const from = (...list: readonly Reading[]) =>
    list.map((one, i) => ({ reading: one, origin: `reading ${i}` }));

  it('weights by 1/SD² and dates the result by its oldest part', () => {
    const {
      reading: mean,
      conflicts,
      words,
    } = combineReadings(from(reading(340, 10), reading(350, 20, '2026-06-01', 'girth')), rule);
    expect(mean!.value).toBeCloseTo((340 * 4 + 350) / 5, 9);
    expect(mean!.spread).toBeCloseTo(Math.sqrt(1 / (1 / 100 + 1 / 400)), 9);
    expect(mean).toMatchObject({ source: 'measured', takenOn: '2026-06-01' });
    expect(conflicts).toEqual([]);
    expect(words).toBe('Weighted mean of 2 readings.');
  });
  it('shows a conflict and widens the spread by √(χ²/(n − 1))', () => {
    const {
      reading: mean,
      conflicts,
      words,
    } = combineReadings(from(reading(300, 10), reading(360, 10)), rule);
    expect(mean!.value).toBe(330);
    expect(mean!.spread).toBeCloseTo((10 / Math.SQRT2) * Math.sqrt(18), 9);
    expect(conflicts).toHaveLength(1);
    expect(conflicts[0]!.deviations).toBeCloseTo(60 / Math.hypot(10, 10), 9);
    expect(words).toContain('disagree');
    // The mean ± its spread reaches both readings.
    expect(mean!.value + mean!.spread).toBeGreaterThanOrEqual(360 - 1e-9);
  });
  it('two readings worked out from one girth are one reading', () => {
    const one = combineReadings([{ reading: reading(340, 10), origin: 'girth' }], rule);
    const both = combineReadings(
      [
        { reading: reading(344, 15), origin: 'girth' },
        { reading: reading(340, 10), origin: 'girth' },
      ],
      rule,
    );
    expect(both.reading).toEqual(one.reading);
    expect(both.used).toHaveLength(1);
  });
  it('leaves out expired and undated ones and lists them', () => {
    const undated: Reading = { value: 310, spread: 5, source: 'measured' };
    const result = combineReadings(from(reading(340, 10), reading(300, 10, '2025-06-20'), undated), rule);
    expect(result.reading).toEqual(reading(340, 10));
    expect(result.expired.map(({ value }) => value)).toEqual([300]);
    expect(result.undated.map(({ value }) => value)).toEqual([310]);
    expect(combineReadings(from(undated), rule).reading).toBeUndefined();
  });
  it('uses the population only when nothing is known of the patient', () => {
    const population: Reading = { value: 229, spread: 50, source: 'population' };
    expect(combineReadings(from(population, reading(340, 10)), rule).reading).toEqual(reading(340, 10));
    expect(combineReadings(from(population), rule).reading).toEqual(population);
  });
  it('never lies outside its readings, is in any order the same, and is no less sure than its best when they agree', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 200, max: 500 }), fc.integer({ min: 0, max: 40 })), {
          minLength: 1,
          maxLength: 5,
        }),
        (list) => {
          const readings = from(...list.map(([value, spread]) => reading(value, spread)));
          const { reading: mean, conflicts } = combineReadings(readings, rule);
          const values = list.map(([value]) => value);
          expect(mean!.value).toBeGreaterThanOrEqual(Math.min(...values) - 1e-9);
          expect(mean!.value).toBeLessThanOrEqual(Math.max(...values) + 1e-9);
          const back = combineReadings([...readings].reverse(), rule);
          expect(back.reading!.value).toBeCloseTo(mean!.value, 9);
          expect(back.conflicts).toHaveLength(conflicts.length);
        },
      ),
      { seed: 20274 },
    );
  });
  it('refuses an empty list and a negative spread', () => {
    expect(() => combineReadings([], rule)).toThrow(expect.objectContaining({ code: 'no-readings' }));
    expect(() => combineReadings(from(reading(340, -1)), rule)).toThrow(
      expect.objectContaining({ code: 'spread-out-of-range' }),
    );
  });
});
