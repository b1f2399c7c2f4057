import type { Reading } from '../model/patient';
import { bodyMassIndex } from './body-mass-index';
import { olderDate } from './older-date';
import { sexWords } from './either-sex';
import type { Estimate, Sex } from './size-types';

/*
 * Regressions of the data set `body` (507 active adults, BMI 16.9–38.2): y = intercept + height·H + weight·W + male,
 * centimetres and kilograms. Good for shoulders, chest and hips; not for abdominal depth, nor for large habitus, where
 * they extrapolate. Source: [heinz-2003]; fixtures/published/body-regressions.
 */

interface BodyRegression {
  /** Name of the column in the data set. */
  readonly column: string;
  readonly words: string;
  readonly intercept: number;
  readonly perCm: number;
  readonly perKg: number;
  /** Added for men. */
  readonly male: number;
  readonly residualSd: number;
}

export const BODY_REGRESSIONS = {
  pelvicBreadth: {
    column: 'Biiliac',
    words: 'breadth between the iliac crests',
    intercept: 11.401175034225,
    perCm: 0.060577067237558,
    perKg: 0.102192132903609,
    male: -2.06272536743478,
    residualSd: 1.78287788541743,
  },
  bitrochantericBreadth: {
    column: 'Bitro',
    words: 'hip breadth between the trochanters (bone)',
    intercept: 17.7770016749103,
    perCm: 0.0391624622262933,
    perKg: 0.119268735839532,
    male: -1.53142618471221,
    residualSd: 1.42472442084489,
  },
  chestBreadth: {
    column: 'ChestD',
    words: 'chest breadth at mid-expiration',
    intercept: 20.9161036730345,
    perCm: -0.0201577447030839,
    perKg: 0.14033999883532,
    male: 1.64902558184106,
    residualSd: 1.41240267922637,
  },
  chestDepth: {
    column: 'ChestDp',
    words: 'chest depth between spine and sternum at mid-expiration',
    intercept: 14.8547501052019,
    perCm: -0.0354756527912362,
    perKg: 0.143873971713741,
    male: 1.01439520747751,
    residualSd: 1.46830781457989,
  },
  biacromialBreadth: {
    column: 'Biacrom',
    words: 'shoulder breadth between the acromions (bone)',
    intercept: 17.6602401670648,
    perCm: 0.0936767820660417,
    perKg: 0.0560743886554774,
    male: 2.54853652024268,
    residualSd: 1.63450505892541,
  },
  shoulderGirth: {
    column: 'ShoulderG',
    words: 'girth over the deltoids',
    intercept: 86.0761486548042,
    perCm: -0.111086982043508,
    perKg: 0.53700755844489,
    male: 8.20645899911717,
    residualSd: 4.0412293828321,
  },
  chestGirth: {
    column: 'ChestG',
    words: 'chest girth at the nipple line, mid-expiration',
    intercept: 85.098951932885,
    perCm: -0.220076899925344,
    perKg: 0.614610528694896,
    male: 6.98011731165796,
    residualSd: 3.66745315007303,
  },
  waistGirth: {
    column: 'WaistG',
    words: 'waist girth below the ribs',
    intercept: 80.5145712409737,
    perCm: -0.356355895123093,
    perKg: 0.792769045792388,
    male: 5.40866037039364,
    residualSd: 4.06439149424802,
  },
  abdominalGirth: {
    column: 'AbdG',
    words: 'girth at the navel and iliac crest',
    intercept: 76.0425734390381,
    perCm: -0.246367903211151,
    perKg: 0.797394947939013,
    male: -6.90153447209455,
    residualSd: 5.58734148234076,
  },
  hipGirth: {
    column: 'HipG',
    words: 'hip girth',
    intercept: 80.6264513163231,
    perCm: -0.139578218809036,
    perKg: 0.627699382956391,
    male: -7.10519091881044,
    residualSd: 2.95076342348436,
  },
} as const satisfies Readonly<Record<string, BodyRegression>>;

export type BodyMeasure = keyof typeof BODY_REGRESSIONS;

/** BMI of the people the regressions were made from. */
export const BODY_REGRESSION_BMI = [16.9, 38.2] as const;

/**
 * A body measure from weight and height.
 * @returns mm with the residual SD and the readings' own errors in quadrature; extrapolated outside BMI 16.9–38.2
 * @throws DomainError "weight-out-of-range", "height-out-of-range"
 */
export function bodyMeasure(measure: BodyMeasure, weightKg: Reading, heightCm: Reading, sex: Sex): Estimate {
  const r = BODY_REGRESSIONS[measure];
  const bmi = bodyMassIndex(weightKg.value, heightCm.value);
  const extrapolated = bmi < BODY_REGRESSION_BMI[0] || bmi > BODY_REGRESSION_BMI[1];
  const cm =
    r.intercept + r.perCm * heightCm.value + r.perKg * weightKg.value + (sex === 'male' ? r.male : 0);
  const takenOn = olderDate(weightKg, heightCm);
  return {
    value: 10 * cm,
    spread: 10 * Math.hypot(r.residualSd, r.perCm * heightCm.spread, r.perKg * weightKg.spread),
    source: 'weight-and-height',
    words: `${r.words}, from weight and height (${sexWords(sex)})`,
    extrapolated,
    cautions: extrapolated ? ['BMI outside 16.9 to 38.2: beyond the people the table was made from.'] : [],
    ...(takenOn === undefined ? {} : { takenOn }),
  };
}
