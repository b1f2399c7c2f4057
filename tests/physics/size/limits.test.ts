import { describe, expect, it } from 'vitest';
import { bodyMassIndex } from '@/lib/physics/size/body-mass-index';
import { bodyMeasure } from '@/lib/physics/size/body-regressions';
import { combineReadings } from '@/lib/physics/size/combine-readings';
import { hipBreadthFromHipGirth, hipGirthFromBmi } from '@/lib/physics/size/estimate-hips';
import {
  breadthFromGirth,
  breadthFromMeasuredGirthAndDepth,
  breadthFromWeightAndHeight,
  depthFromGirth,
  depthFromWeightAndHeight,
  girthFromWeightAndHeight,
} from '@/lib/physics/size/estimate-trunk';
import { olderDate } from '@/lib/physics/size/older-date';
import { populationPercentileMm } from '@/lib/physics/size/population';
import { dayNumber, readingAge } from '@/lib/physics/size/reading-age';
import { measured } from '@/tests/support/physics-cases';
import { expectLimits } from '@/tests/support/expect-limits';

describe('what a size may be', () => {
  it('weight 20 to 450 kg, height 80 to 250 cm', () => {
    expectLimits((kg) => bodyMassIndex(kg, 170), 'weight-out-of-range', 20, 450);
    expectLimits((cm) => bodyMassIndex(80, cm), 'height-out-of-range', 80, 250);
  });
  it('girth 400 to 2500 mm, hip girth 500 to 2500 mm, BMI 10 to 120, percentile 50 to 99', () => {
    expectLimits(
      (mm) => depthFromGirth(measured(mm), 'male', undefined, 'liver'),
      'girth-out-of-range',
      400,
      2500,
    );
    expectLimits((mm) => breadthFromGirth(measured(mm), 'male', undefined), 'girth-out-of-range', 400, 2500);
    expectLimits(
      (mm) => hipBreadthFromHipGirth(measured(mm), 'male', undefined),
      'girth-out-of-range',
      500,
      2500,
    );
    expectLimits((bmi) => hipGirthFromBmi(bmi, 'male'), 'bmi-out-of-range', 10, 120);
    expectLimits((p) => populationPercentileMm('depth', 'male', p), 'percentile-out-of-range', 0.5, 0.99);
  });
  it('spreads: 500 mm, 100 kg, 50 cm, never negative', () => {
    const code = 'spread-out-of-range';
    expectLimits((sd) => depthFromGirth(measured(1200, sd), 'male', undefined, 'liver'), code, 0, 500);
    expectLimits((sd) => hipBreadthFromHipGirth(measured(1200, sd), 'male', undefined), code, 0, 500);
    expectLimits(
      (sd) => breadthFromMeasuredGirthAndDepth(measured(1300), measured(320, sd), 'male', 40),
      code,
      0,
      500,
    );
    const body = (kg: number, cm: number) => ({ weightKg: measured(140, kg), heightCm: measured(175, cm) });
    expectLimits((sd) => depthFromWeightAndHeight(body(sd, 0), 'male', 'liver'), code, 0, 100);
    expectLimits((sd) => depthFromWeightAndHeight(body(0, sd), 'male', 'liver'), code, 0, 50);
    const one = (sd: number) => [{ reading: { ...measured(1, sd), takenOn: '2026-06-20' }, origin: 'a' }];
    expectLimits((sd) => combineReadings(one(sd), { today: '2026-06-30', expiryDays: 60 }), code, 0, 1e6);
  });
  it('an expiry is a whole number of days, 0 or more', () => {
    const age = (expiryDays: number) => readingAge(measured(1), { today: '2026-06-30', expiryDays });
    expect(age(0)).toBe('undated');
    for (const days of [-1, 1.5])
      expect(() => age(days)).toThrow(expect.objectContaining({ code: 'expiry-not-whole' }));
  });
  it('every month has its own last day', () => {
    [
      '01-31',
      '02-28',
      '03-31',
      '04-30',
      '05-31',
      '06-30',
      '07-31',
      '08-31',
      '09-30',
      '10-31',
      '11-30',
      '12-31',
    ].forEach((last) => {
      const [month, day] = last.split('-') as [string, string];
      expect(() => dayNumber('d', `2026-${last}`)).not.toThrow();
      expect(() => dayNumber('d', `2026-${month}-${Number(day) + 1}`)).toThrow(
        expect.objectContaining({ code: 'date-not-valid' }),
      );
    });
    expect(() => dayNumber('d', '2026-05-00')).toThrow(expect.objectContaining({ code: 'date-not-valid' }));
    expect(dayNumber('d', '2000-02-29') - dayNumber('d', '1900-02-28')).toBe(36525);
  });
});

describe('fixed figures of the model', () => {
  it('hip girth from BMI is sure to 50 mm (our judgement)', () => {
    expect(hipGirthFromBmi(38, 'male').spread).toBe(50);
    expect(hipGirthFromBmi(38, 'female').words).toBe('hip girth from BMI (women)');
  });
  it('the data set’s own ends, BMI 16.9 and 38.2, are inside it', () => {
    // 67.6 and 152.8 kg at 200 cm.
    for (const [kg, outside] of [
      [67.6, false],
      [67.5, true],
      [152.8, false],
      [152.9, true],
    ] as const) {
      expect(bodyMeasure('hipGirth', measured(kg), measured(200), 'male').extrapolated).toBe(outside);
    }
  });
  it('readings said to be exact count as sure to 0.5', () => {
    const exact = (value: number, origin: string) => ({
      reading: { ...measured(value), takenOn: '2026-06-20' },
      origin,
    });
    const { reading, conflicts } = combineReadings([exact(340, 'a'), exact(341, 'b')], {
      today: '2026-06-30',
      expiryDays: 60,
    });
    expect(reading).toMatchObject({ value: 340.5, spread: expect.closeTo(0.5, 12) as number });
    expect(conflicts).toEqual([]);
    // 1.96 · 0.5 · √2 = 1.386.
    const apart = (value: number) =>
      combineReadings([exact(340, 'a'), exact(value, 'b')], { today: '2026-06-30', expiryDays: 60 }).conflicts
        .length;
    expect([apart(341.38), apart(341.39)]).toEqual([0, 1]);
  });
  it('three readings that scatter widen the spread by √(χ²/2), two by √χ²', () => {
    const one = (value: number, origin: string) => ({
      reading: { ...measured(value, 10), takenOn: '2026-06-20' },
      origin,
    });
    const rule = { today: '2026-06-30', expiryDays: 60 };
    // 300, 340, 350 about 330: χ² = (900 + 100 + 400)/100 = 14, so √7 · 10/√3.
    expect(combineReadings([one(300, 'a'), one(340, 'b'), one(350, 'c')], rule).reading).toMatchObject({
      value: expect.closeTo(330, 9) as number,
      spread: expect.closeTo((Math.sqrt(7) * 10) / Math.sqrt(3), 9) as number,
    });
    // 300 and 340 about 320: χ² = 8.
    expect(combineReadings([one(300, 'a'), one(340, 'b')], rule).reading!.spread).toBeCloseTo(
      (Math.sqrt(8) * 10) / Math.sqrt(2),
      9,
    );
    // Each pair is told once.
    expect(combineReadings([one(300, 'a'), one(340, 'b'), one(345, 'c')], rule).conflicts).toHaveLength(2);
  });
  it('a BMI of exactly 35 is enough for weight and height', () => {
    // 140 kg at 200 cm is 35; 139.9 kg is not.
    const known = (kg: number) => ({ weightKg: measured(kg), heightCm: measured(200) });
    for (const estimate of [
      (kg: number) => depthFromWeightAndHeight(known(kg), 'male', 'liver'),
      (kg: number) => girthFromWeightAndHeight(known(kg), 'male'),
      (kg: number) => breadthFromWeightAndHeight(known(kg), 'male'),
    ]) {
      expect(estimate(140)).not.toHaveProperty('sizeNeeded');
      expect(estimate(139.9)).toHaveProperty('sizeNeeded', true);
    }
    // The girth's own line for the heavy begins there as well.
    expect(depthFromGirth(measured(1300), 'male', 35, 'iliac-crest').words).toContain('BMI 35 and over');
    expect(depthFromGirth(measured(1300), 'male', 34.99, 'iliac-crest').words).toContain('all');
  });
  it('an estimate is as old as the older of what it was worked out from, and undated where one of them is', () => {
    const on = (takenOn: string | undefined, value: number) => ({ ...measured(value), takenOn });
    expect(hipBreadthFromHipGirth(on('2026-05-02', 1200), 'male', 30).takenOn).toBe('2026-05-02');
    expect(hipBreadthFromHipGirth(measured(1200), 'male', 30)).not.toHaveProperty('takenOn');
    const both = (a: string | undefined, b: string | undefined) => olderDate(on(a, 1), on(b, 1));
    expect(both('2026-05-02', '2026-04-30')).toBe('2026-04-30');
    expect(both('2026-04-30', '2026-05-02')).toBe('2026-04-30');
    expect(both('2026-04-30', undefined)).toBeUndefined();
    expect(both(undefined, '2026-04-30')).toBeUndefined();
  });
  it('of one origin the surest stands; then the better kind, then the later', () => {
    const rule = { today: '2026-06-30', expiryDays: 60 };
    const of = (source: 'measured' | 'girth', spread: number, takenOn: string, value: number) => ({
      reading: { value, spread, source, takenOn },
      origin: 'one',
    });
    const best = (...list: Parameters<typeof combineReadings>[0]) =>
      combineReadings(list, rule).reading!.value;
    expect(best(of('girth', 10, '2026-06-01', 1), of('measured', 12, '2026-06-02', 2))).toBe(1);
    expect(best(of('girth', 10, '2026-06-02', 1), of('measured', 10, '2026-06-01', 2))).toBe(2);
    expect(best(of('measured', 10, '2026-06-01', 1), of('measured', 10, '2026-06-02', 2))).toBe(2);
    expect(best(of('measured', 10, '2026-06-02', 1), of('measured', 10, '2026-06-01', 2))).toBe(1);
    expect(best(of('measured', 10, '2026-06-02', 1), of('girth', 10, '2026-06-03', 2))).toBe(1);
  });
});
