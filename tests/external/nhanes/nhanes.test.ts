/**
 * The population table and the regressions on it against what others published of the same survey
 * (fixtures/published/abdominal-diameter), and against each other: they were fitted to the same people.
 */
import { describe, expect, it } from 'vitest';
import { POPULATION_CM, populationPercentileMm, type PopulationMeasure } from '@/lib/physics/size/population';
import {
  DEPTH_FROM_GIRTH,
  DEPTH_FROM_GIRTH_BMI_35,
  DEPTH_FROM_WEIGHT_HEIGHT,
  fromWeightHeight,
  GIRTH_FROM_WEIGHT_HEIGHT,
  linear,
} from '@/lib/physics/size/regressions';
import type { Sex } from '@/lib/physics/size/size-types';
import { readPublished } from '@/tests/support/read-published';

const published = readPublished('abdominal-diameter');
const rowsOf = (source: string, sex: string) =>
  published.filter((row) => row.text('source') === source && row.text('sex') === sex);
const SEXES: readonly Sex[] = ['male', 'female'];

/** Mean standing height of US adults, cm (National Health and Nutrition Examination Survey 2011–14; from memory). */
const MEAN_HEIGHT_CM: Readonly<Record<Sex, number>> = { male: 175.7, female: 161.8 };

describe('population percentiles against a second statement', () => {
  it('men: depth at the median and the 75th and 95th percentiles', () => {
    const rows = rowsOf('kahn-2014', 'male');
    expect(rows).toHaveLength(3);
    for (const row of rows) {
      const ours = populationPercentileMm('depth', 'male', row.number('p')) / 10;
      // 0.5 cm: other survey years, weighted there and unweighted here; its 95 % interval of the median is ± 0.5 cm.
      expect(Math.abs(ours - row.number('value')), `p ${row.number('p')}: ${ours}`).toBeLessThan(0.55);
    }
  });

  it('both sexes: the published percentile is that share of an even mixture of our men and women', () => {
    // The table begins at the median. Just below it the density is that of a normal of the published 25th and 50th
    // percentiles (20.1 and 22.7 cm, men): 0.674/2.6 standard deviations a cm.
    const densityAtMedian = (0.3989 * 0.6745) / 2.6;
    const shareUpTo = (sex: Sex, cm: number): number => {
      const medianCm = populationPercentileMm('depth', sex, 0.5) / 10;
      if (medianCm > cm) return 0.5 - (medianCm - cm) * densityAtMedian;
      let [low, high] = [0.5, 0.99];
      for (let i = 0; i < 50; i++) {
        const middle = (low + high) / 2;
        if (populationPercentileMm('depth', sex, middle) / 10 < cm) low = middle;
        else high = middle;
      }
      return low;
    };
    for (const row of rowsOf('kahn-2014', 'both')) {
      const share = (shareUpTo('male', row.number('value')) + shareUpTo('female', row.number('value'))) / 2;
      // 5 points of a hundred: half a centimetre (see above) at a density of 0.1 a cm near the median, less beyond.
      expect(Math.abs(share - row.number('p')), `p ${row.number('p')}: ${share}`).toBeLessThan(0.05);
    }
  });

  it.each(SEXES)('%s: depth and girth over height, times the mean height', (sex) => {
    const rows = rowsOf('kahn-2017', sex);
    expect(rows).toHaveLength(4);
    for (const row of rows) {
      const measure = row.text('measure').replace('-to-height', '') as PopulationMeasure;
      const theirs = row.number('value') * MEAN_HEIGHT_CM[sex];
      const ours = populationPercentileMm(measure, sex, row.number('p')) / 10;
      // 3 %: a percentile of a ratio times a mean is not the percentile of the product; two years' growth; no weights here.
      expect(
        Math.abs(ours / theirs - 1),
        `${measure} p ${row.number('p')}: ${ours} and ${theirs}`,
      ).toBeLessThan(0.03);
    }
  });
});

describe('regressions against the percentiles of the same people', () => {
  it.each(SEXES)('%s: the girth of a percentile gives about the depth of that percentile', (sex) => {
    for (const p of ['p50', 'p95', 'p99'] as const) {
      const depth = linear(DEPTH_FROM_GIRTH[sex], POPULATION_CM.girth[sex][p]);
      // 0.45 cm: a regression pulls towards the mean, by (1 − R²) of the distance at most, and percentiles are rounded.
      expect(Math.abs(depth - POPULATION_CM.depth[sex][p]), `${p}: ${depth}`).toBeLessThan(0.45);
    }
  });

  it.each([
    ['male', 175.7],
    ['female', 161.8],
  ] as const)(
    '%s, BMI 36 to 50: weight and height give the same depth directly and by way of the girth',
    (sex, heightCm) => {
      for (let bmi = 36; bmi <= 50; bmi += 2) {
        const weightKg = bmi * (heightCm / 100) ** 2;
        const girth = fromWeightHeight(GIRTH_FROM_WEIGHT_HEIGHT[sex], weightKg, heightCm);
        const direct = fromWeightHeight(DEPTH_FROM_WEIGHT_HEIGHT[sex], weightKg, heightCm);
        // Two fits to the same people meet at their mean; 0.7 cm is half the smaller residual spread.
        expect(
          Math.abs(linear(DEPTH_FROM_GIRTH_BMI_35[sex], girth) - direct),
          `BMI ${bmi}: ${direct}`,
        ).toBeLessThan(0.7);
      }
    },
  );
});
