import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bodyMassIndex } from '@/lib/physics/size/body-mass-index';
import { BODY_REGRESSIONS, bodyMeasure, type BodyMeasure } from '@/lib/physics/size/body-regressions';
import { hipBreadthFromBmi, hipBreadthFromHipGirth, hipGirthFromBmi } from '@/lib/physics/size/estimate-hips';
import {
  breadthFromGirth,
  breadthFromWeightAndHeight,
  depthFromGirth,
  depthFromWeightAndHeight,
  girthFromWeightAndHeight,
} from '@/lib/physics/size/estimate-trunk';
import { populationEstimate, populationPercentileMm } from '@/lib/physics/size/population';
import { isEstimate, type Estimate, type Sex, type SizeAnswer } from '@/lib/physics/size/size-types';
import { readPublished } from '@/tests/support/read-published';
import { measured } from '@/tests/support/physics-cases';

const known = (answer: SizeAnswer): Estimate => {
  if (!isEstimate(answer)) throw new Error(answer.words);
  return answer;
};
const body = (weightKg: number, heightCm: number) => ({
  weightKg: measured(weightKg),
  heightCm: measured(heightCm),
});

/*
 * CDC/NCHS NHANES 2013–16 body measures, adults ≥ 20, regressions computed from the public files, unweighted.
 * Each expectation is the printed line worked out by hand, in cm; 1e-9 for the last bits of a double.
 */
describe('trunk from girth (NHANES 2013–16)', () => {
  it.each([
    ['male', undefined, 120, -3.06 + 0.261 * 120, 1.3],
    ['female', undefined, 120, -2.88 + 0.257 * 120, 1.5],
    ['male', 34.9, 120, 28.26, 1.3],
    ['male', 35, 120, 1.3 + 0.229 * 120, 1.5],
    ['female', 40, 150, 4.45 + 0.199 * 150, 1.7],
  ] as const)('%s, BMI %s, girth %d cm: depth', (sex, bmi, girth, depth, sd) => {
    const answer = depthFromGirth(measured(girth * 10), sex, bmi, 'iliac-crest');
    expect(answer.value).toBeCloseTo(10 * depth, 9);
    expect(answer.spread).toBeCloseTo(10 * sd, 9);
    expect(answer).toMatchObject({ source: 'girth', extrapolated: false, cautions: [] });
  });
  it('adds 1.5 cm of spread at liver level, in quadrature with the rest', () => {
    const reading = { ...measured(1200, 20), takenOn: '2026-05-02' };
    const answer = depthFromGirth(reading, 'male', undefined, 'liver');
    expect(answer.spread).toBeCloseTo(Math.hypot(13, 15, 0.261 * 20), 9);
    expect(answer.takenOn).toBe('2026-05-02');
  });
  it.each([
    ['male', 2.43],
    ['female', 2.26],
  ] as const)('%s: breadth %d + 0.341·WC, ± 2.5 cm', (sex, intercept) => {
    const answer = breadthFromGirth(measured(1300), sex, undefined);
    expect(answer.value).toBeCloseTo(10 * (intercept + 0.341 * 130), 9);
    expect(answer.spread).toBeCloseTo(25, 9);
  });
  it('says extrapolation above BMI 50', () => {
    const answer = depthFromGirth(measured(1600), 'female', 50.1, 'iliac-crest');
    expect(answer.extrapolated).toBe(true);
    expect(answer.cautions.join()).toContain('BMI above 50');
    expect(depthFromGirth(measured(1600), 'female', 50, 'iliac-crest').extrapolated).toBe(false);
  });
  it('mixes both sexes when the sex is not known, and says so with its spread', () => {
    const [man, woman, either] = (['male', 'female', undefined] as const).map((sex) =>
      depthFromGirth(measured(1200), sex, undefined, 'iliac-crest'),
    );
    expect(either!.value).toBeCloseTo((man!.value + woman!.value) / 2, 9);
    expect(either!.spread).toBeCloseTo(
      Math.sqrt((13 ** 2 + 15 ** 2) / 2 + ((man!.value - woman!.value) / 2) ** 2),
      9,
    );
    expect([man, woman, either].map((answer) => answer!.words)).toEqual([
      'depth from girth at the iliac crest (men, all)',
      'depth from girth at the iliac crest (women, all)',
      'depth from girth at the iliac crest (women and men, all)',
    ]);
    expect(depthFromGirth(measured(1200), 'male', 36, 'iliac-crest').words).toContain('BMI 35 and over');
  });
  it('grows with the girth', () => {
    fc.assert(
      fc.property(
        fc.constantFrom<Sex>('male', 'female'),
        fc.integer({ min: 600, max: 2000 }),
        fc.constantFrom(undefined, 28, 42),
        (sex, girth, bmi) => {
          const at = (mm: number) => depthFromGirth(measured(mm), sex, bmi, 'liver').value;
          expect(at(girth + 10)).toBeGreaterThan(at(girth));
          expect(breadthFromGirth(measured(girth + 10), sex, bmi).value).toBeGreaterThan(
            breadthFromGirth(measured(girth), sex, bmi).value,
          );
        },
      ),
      { seed: 20270 },
    );
  });
  it.each([[95], [2600], [Number.NaN]])('refuses a girth of %d mm (a slip of a unit)', (girth) => {
    expect(() => depthFromGirth(measured(girth), 'male', undefined, 'liver')).toThrow(
      expect.objectContaining({ code: 'girth-out-of-range' }),
    );
    expect(() => breadthFromGirth(measured(girth), 'male', undefined)).toThrow(
      expect.objectContaining({ code: 'girth-out-of-range' }),
    );
  });
});

describe('trunk from weight and height, BMI ≥ 35 (NHANES 2013–16)', () => {
  it.each([
    ['male', 140, 175, 38.21 + 0.1525 * 140 - 0.1507 * 175, 138.2 + 0.637 * 140 - 0.507 * 175, 6.1],
    ['female', 120, 162, 37.39 + 0.1575 * 120 - 0.1588 * 162, 124.4 + 0.683 * 120 - 0.47 * 162, 7.3],
  ] as const)('%s, %d kg, %d cm', (sex, weight, height, depth, girth, girthSd) => {
    const depthAnswer = known(depthFromWeightAndHeight(body(weight, height), sex, 'iliac-crest'));
    expect(depthAnswer.value).toBeCloseTo(10 * depth, 9);
    expect(depthAnswer.spread).toBeCloseTo(20, 9);
    expect(depthAnswer.source).toBe('weight-and-height');
    const girthAnswer = known(girthFromWeightAndHeight(body(weight, height), sex));
    expect(girthAnswer.value).toBeCloseTo(10 * girth, 9);
    expect(girthAnswer.spread).toBeCloseTo(10 * girthSd, 9);
    const breadth = known(breadthFromWeightAndHeight(body(weight, height), sex));
    expect(breadth.value).toBeCloseTo(10 * ((sex === 'male' ? 2.43 : 2.26) + 0.341 * girth), 9);
    expect(breadth.spread).toBeCloseTo(10 * Math.hypot(2.5, 0.341 * girthSd), 9);
  });
  it('carries the errors of weight and height, dated by the older', () => {
    const answer = known(
      depthFromWeightAndHeight(
        {
          weightKg: { ...measured(140, 5), takenOn: '2026-05-02' },
          heightCm: { ...measured(175, 2), takenOn: '2025-01-09' },
        },
        'male',
        'liver',
      ),
    );
    expect(answer.spread).toBeCloseTo(Math.hypot(20, 1.525 * 5, 1.507 * 2, 15), 9);
    expect(answer.takenOn).toBe('2025-01-09');
  });
  it('has no route below BMI 35: size needed', () => {
    // 107.1 kg at 175 cm is 34.97; 107.3 kg is 35.04.
    for (const route of [
      (w: number) => depthFromWeightAndHeight(body(w, 175), 'male', 'liver'),
      (w: number) => girthFromWeightAndHeight(body(w, 175), 'male'),
      (w: number) => breadthFromWeightAndHeight(body(w, 175), 'male'),
    ]) {
      expect(route(107.1)).toMatchObject({
        sizeNeeded: true,
        words: expect.stringContaining('Size needed') as string,
      });
      expect(isEstimate(route(107.3))).toBe(true);
    }
  });
  it('says extrapolation above BMI 50', () => {
    // 50.0 at 175 cm is 153.1 kg.
    expect(known(depthFromWeightAndHeight(body(154, 175), 'male', 'liver')).extrapolated).toBe(true);
    expect(known(depthFromWeightAndHeight(body(153, 175), 'male', 'liver')).extrapolated).toBe(false);
  });
  it('BMI is W/H² and refuses slips of a unit', () => {
    expect(bodyMassIndex(140, 175)).toBeCloseTo(45.714, 3);
    expect(() => bodyMassIndex(140, 1.75)).toThrow(expect.objectContaining({ code: 'height-out-of-range' }));
    expect(() => bodyMassIndex(1400, 175)).toThrow(expect.objectContaining({ code: 'weight-out-of-range' }));
  });
});

describe('population (NHANES 2013–16; men’s depth p95 31.2 in Kahn 2014 PLoS One 9:e108707)', () => {
  it.each([
    ['depth', 'male', 22.9, 31.2, 35.7],
    ['depth', 'female', 21.6, 30.4, 34.7],
    ['girth', 'male', 101.0, 130.9, 149.5],
    ['girth', 'female', 96.0, 129.9, 146.4],
  ] as const)('%s, %s: p50, p95, p99', (measure, sex, p50, p95, p99) => {
    [p50, p95, p99].forEach((cm, i) => {
      expect(populationPercentileMm(measure, sex, [0.5, 0.95, 0.99][i]!)).toBeCloseTo(10 * cm, 6);
    });
    const answer = populationEstimate(measure, sex);
    expect(answer.value).toBeCloseTo(10 * p50, 9);
    // 1.6449: the normal deviate of 95 %.
    expect(answer.spread).toBeCloseTo((10 * (p95 - p50)) / 1.6448536, 5);
    expect(answer.source).toBe('population');
    expect(answer.cautions).toHaveLength(1);
  });
  it('says whose median it is', () => {
    expect(
      (['male', 'female', undefined] as const).map((sex) => populationEstimate('girth', sex).words),
    ).toEqual([
      'median of adults (men), not of this patient',
      'median of adults (women), not of this patient',
      'median of adults, not of this patient',
    ]);
  });
  it('rises with p, and refuses percentiles the table does not hold', () => {
    let previous = 0;
    for (let p = 0.5; p < 0.99; p += 0.01) {
      const mm = populationPercentileMm('depth', 'female', p);
      expect(mm).toBeGreaterThan(previous);
      previous = mm;
    }
    expect(() => populationPercentileMm('depth', 'male', 0.49)).toThrow(
      expect.objectContaining({ code: 'percentile-out-of-range' }),
    );
    expect(() => populationPercentileMm('depth', 'male', 0.995)).toThrow(
      expect.objectContaining({ code: 'percentile-out-of-range' }),
    );
  });
});

describe('hips (girth: NHANES 2013–16; breadth: ANSUR II)', () => {
  it.each([
    ['male', 51.5, 1.82, 4.65, 0.294],
    ['female', 51.3, 1.92, 1.56, 0.331],
  ] as const)('%s', (sex, a, b, c, d) => {
    expect(hipGirthFromBmi(38, sex).value).toBeCloseTo(10 * (a + b * 38), 9);
    expect(hipBreadthFromHipGirth(measured(1200), sex, 38).value).toBeCloseTo(10 * (c + d * 120), 9);
    expect(hipBreadthFromBmi(38, sex).value).toBeCloseTo(10 * (c + d * (a + b * 38)), 9);
    expect(hipBreadthFromBmi(38, sex).spread).toBeCloseTo(10 * Math.hypot(1, d * 5), 9);
    expect(hipBreadthFromHipGirth(measured(1200, 30), sex, 38).spread).toBeCloseTo(Math.hypot(10, d * 30), 9);
  });
  it('says extrapolation above BMI 40', () => {
    expect(hipBreadthFromBmi(40, 'female').extrapolated).toBe(false);
    expect(hipBreadthFromBmi(40.1, 'female').extrapolated).toBe(true);
    expect(hipBreadthFromHipGirth(measured(1500), 'female', 45).cautions.join()).toContain('BMI above 40');
  });
  it('refuses slips of a unit', () => {
    expect(() => hipGirthFromBmi(3.8, 'male')).toThrow(expect.objectContaining({ code: 'bmi-out-of-range' }));
    expect(() => hipBreadthFromHipGirth(measured(120), 'male', undefined)).toThrow(
      expect.objectContaining({ code: 'girth-out-of-range' }),
    );
  });
});

describe('regressions of the data set `body` against fixtures/published/body-regressions', () => {
  const rows = readPublished('body-regressions');
  it('covers every published line', () => {
    expect(Object.values(BODY_REGRESSIONS).map(({ column }) => column)).toEqual(
      rows.map((row) => row.text('y')),
    );
  });
  for (const [name, line] of Object.entries(BODY_REGRESSIONS)) {
    it(`${name} (${line.column}) within 1e-6`, () => {
      const row = rows.find((one) => one.text('y') === line.column)!;
      const pairs = [
        [line.intercept, 'intercept'],
        [line.perCm, 'height'],
        [line.perKg, 'weight'],
        [line.male, 'male'],
        [line.residualSd, 'resid_sd'],
      ] as const;
      for (const [value, column] of pairs)
        expect(Math.abs(value - row.number(column))).toBeLessThanOrEqual(1e-6);
      const expected =
        row.number('intercept') + row.number('height') * 178 + row.number('weight') * 82 + row.number('male');
      expect(bodyMeasure(name as BodyMeasure, measured(82), measured(178), 'male').value).toBeCloseTo(
        10 * expected,
        6,
      );
    });
  }
  it('says extrapolation outside BMI 16.9 to 38.2 and carries the errors of weight and height', () => {
    expect(bodyMeasure('chestGirth', measured(82), measured(178), 'female').extrapolated).toBe(false);
    expect(bodyMeasure('chestGirth', measured(140), measured(172), 'female').extrapolated).toBe(true);
    expect(bodyMeasure('chestGirth', measured(50), measured(178), 'female').extrapolated).toBe(true);
    const r = BODY_REGRESSIONS.chestGirth;
    expect(bodyMeasure('chestGirth', measured(82, 4), measured(178, 3), 'female').spread).toBeCloseTo(
      10 * Math.hypot(r.residualSd, r.perKg * 4, r.perCm * 3),
      9,
    );
  });
});
