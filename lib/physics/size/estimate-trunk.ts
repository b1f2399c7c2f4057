import type { Reading, ReadingSource } from '../model/patient';
import { requirePositive, requireRange } from '../model/require-argument';
import { bodyMassIndex } from './body-mass-index';
import { eitherSex, sexWords } from './either-sex';
import { breadthFromGirthAndDepth } from './ellipse-perimeter';
import { olderDate } from './older-date';
import {
  BREADTH_FROM_GIRTH,
  DEPTH_FROM_GIRTH,
  DEPTH_FROM_GIRTH_BMI_35,
  DEPTH_FROM_WEIGHT_HEIGHT,
  EXTRAPOLATED_ABOVE_BMI,
  fromWeightHeight,
  GIRTH_FROM_WEIGHT_HEIGHT,
  linear,
  LIVER_LEVEL_SPREAD_MM,
  WEIGHT_HEIGHT_FROM_BMI,
  type LinearRegression,
  type WeightHeightRegression,
} from './regressions';
import type { Estimate, Sex, SizeAnswer, SizeNeeded, Spread } from './size-types';

/** Level the depth is wanted at; the tables measured at the iliac crest. */
export type TrunkLevel = 'iliac-crest' | 'liver';

export interface WeightAndHeight {
  readonly weightKg: Reading;
  readonly heightCm: Reading;
}

const EXTRAPOLATION = 'BMI above 50: beyond the people the table was made from.';

export const sizeNeeded = (words: string): SizeNeeded => ({ sizeNeeded: true, words });

function girthOf(girthMm: Reading): { readonly cm: number; readonly sdCm: number } {
  requireRange('girth-out-of-range', 'girthMm', girthMm.value, 400, 2500);
  requireRange('spread-out-of-range', 'girthMm.spread', girthMm.spread, 0, 500);
  return { cm: girthMm.value / 10, sdCm: girthMm.spread / 10 };
}

/** Value and spread [mm] of a line through an uncertain predictor [cm]; the predictor's error comes on top of the residual. */
function throughLine(r: LinearRegression, cm: number, sdCm: number): Spread {
  return { value: 10 * linear(r, cm), spread: 10 * Math.hypot(r.residualSd, r.slope * sdCm) };
}

/** The same from weight and height, whose errors are independent. */
function throughPlane(r: WeightHeightRegression, { weightKg, heightCm }: WeightAndHeight): Spread {
  return {
    value: 10 * fromWeightHeight(r, weightKg.value, heightCm.value),
    spread: 10 * Math.hypot(r.residualSd, r.perKg * weightKg.spread, r.perCm * heightCm.spread),
  };
}

function atLevel({ value, spread }: Spread, level: TrunkLevel): Spread {
  return { value, spread: level === 'liver' ? Math.hypot(spread, LIVER_LEVEL_SPREAD_MM) : spread };
}

function estimate(
  { value, spread }: Spread,
  source: ReadingSource,
  words: string,
  bmi: number | undefined,
  takenOn: string | undefined,
  cautions: readonly string[] = [],
): Estimate {
  const extrapolated = bmi !== undefined && bmi > EXTRAPOLATED_ABOVE_BMI;
  return {
    value,
    spread,
    source,
    words,
    extrapolated,
    cautions: extrapolated ? [...cautions, EXTRAPOLATION] : cautions,
    ...(takenOn === undefined ? {} : { takenOn }),
  };
}

/**
 * Supine depth from girth at the iliac crest: SAD = a + b·WC, the BMI ≥ 35 line where the BMI is known to be that.
 * @param girthMm waist girth at the iliac crest [mm], 400–2500
 * @returns mm; spread = residual SD, the girth's own error, and at liver level 15 mm, in quadrature
 * @throws DomainError "girth-out-of-range", "spread-out-of-range"
 * Source: [nhanes-2013].
 */
export function depthFromGirth(
  girthMm: Reading,
  sex: Sex | undefined,
  bmi: number | undefined,
  level: TrunkLevel,
): Estimate {
  const { cm, sdCm } = girthOf(girthMm);
  const heavy = bmi !== undefined && bmi >= WEIGHT_HEIGHT_FROM_BMI;
  const table = heavy ? DEPTH_FROM_GIRTH_BMI_35 : DEPTH_FROM_GIRTH;
  const depth = eitherSex(sex, (one) => throughLine(table[one], cm, sdCm));
  const words = `depth from girth at the iliac crest (${sexWords(sex)}, ${heavy ? 'BMI 35 and over' : 'all'})`;
  return estimate(atLevel(depth, level), 'girth', words, bmi, girthMm.takenOn);
}

/**
 * Supine breadth from girth: modelled, not measured.
 * @param girthMm waist girth at the iliac crest [mm], 400–2500
 * @returns mm, ± 25 mm and the girth's own error in quadrature
 * Source: [nhanes-2013].
 */
export function breadthFromGirth(girthMm: Reading, sex: Sex | undefined, bmi: number | undefined): Estimate {
  const { cm, sdCm } = girthOf(girthMm);
  const breadth = eitherSex(sex, (one) => throughLine(BREADTH_FROM_GIRTH[one], cm, sdCm));
  return estimate(breadth, 'girth', `breadth modelled from girth (${sexWords(sex)})`, bmi, girthMm.takenOn);
}

function weightHeightBmi({ weightKg, heightCm }: WeightAndHeight): number {
  requireRange('spread-out-of-range', 'weightKg.spread', weightKg.spread, 0, 100);
  requireRange('spread-out-of-range', 'heightCm.spread', heightCm.spread, 0, 50);
  return bodyMassIndex(weightKg.value, heightCm.value);
}

const NO_ROUTE =
  'Size needed: below a BMI of 35 weight and height do not tell depth or breadth. Ask for the girth at the iliac crest.';

/**
 * Supine depth from weight and height, BMI ≥ 35 only.
 * @returns mm, or that a size is needed
 * Source: [nhanes-2013].
 */
export function depthFromWeightAndHeight(
  known: WeightAndHeight,
  sex: Sex | undefined,
  level: TrunkLevel,
): SizeAnswer {
  const bmi = weightHeightBmi(known);
  if (bmi < WEIGHT_HEIGHT_FROM_BMI) return sizeNeeded(NO_ROUTE);
  const depth = eitherSex(sex, (one) => throughPlane(DEPTH_FROM_WEIGHT_HEIGHT[one], known));
  const words = `depth from weight and height (${sexWords(sex)}, BMI 35 and over)`;
  return estimate(
    atLevel(depth, level),
    'weight-and-height',
    words,
    bmi,
    olderDate(known.weightKg, known.heightCm),
  );
}

/**
 * Waist girth at the iliac crest from weight and height, BMI ≥ 35 only.
 * @returns mm, or that a size is needed
 * Source: [nhanes-2013].
 */
export function girthFromWeightAndHeight(known: WeightAndHeight, sex: Sex | undefined): SizeAnswer {
  const bmi = weightHeightBmi(known);
  if (bmi < WEIGHT_HEIGHT_FROM_BMI) return sizeNeeded(NO_ROUTE);
  const girth = eitherSex(sex, (one) => throughPlane(GIRTH_FROM_WEIGHT_HEIGHT[one], known));
  const words = `girth from weight and height (${sexWords(sex)}, BMI 35 and over)`;
  return estimate(girth, 'weight-and-height', words, bmi, olderDate(known.weightKg, known.heightCm));
}

/**
 * Supine breadth from weight and height by way of the girth, BMI ≥ 35 only.
 * @returns mm, or that a size is needed
 */
export function breadthFromWeightAndHeight(known: WeightAndHeight, sex: Sex | undefined): SizeAnswer {
  const bmi = weightHeightBmi(known);
  if (bmi < WEIGHT_HEIGHT_FROM_BMI) return sizeNeeded(NO_ROUTE);
  const breadth = eitherSex(sex, (one) => {
    const girth = throughPlane(GIRTH_FROM_WEIGHT_HEIGHT[one], known);
    return throughLine(BREADTH_FROM_GIRTH[one], girth.value / 10, girth.spread / 10);
  });
  const words = `breadth modelled from weight and height (${sexWords(sex)}, BMI 35 and over)`;
  return estimate(breadth, 'weight-and-height', words, bmi, olderDate(known.weightKg, known.heightCm));
}

/** How far a trunk's breadth strays from the ellipse's at the same girth and depth [mm]: our judgement. */
const SHAPE_SPREAD_MM = 15;

/**
 * Breadth from girth and depth, both measured: the ellipse of perimeter factor·girth (ellipse-perimeter.ts).
 * @returns mm; spread from girth, depth (by finite differences) and shape, in quadrature
 * @throws DomainError "girth-too-small-for-depth", "girth-out-of-range", "depth-not-positive"
 */
export function breadthFromMeasuredGirthAndDepth(
  girthMm: Reading,
  depthMm: Reading,
  sex: Sex | undefined,
  bmi: number | undefined,
): Estimate {
  girthOf(girthMm);
  requirePositive('depth-not-positive', 'depthMm', depthMm.value);
  requireRange('spread-out-of-range', 'depthMm.spread', depthMm.spread, 0, 500);
  const breadth = eitherSex(sex, (one) => {
    const value = breadthFromGirthAndDepth(girthMm.value, depthMm.value, one);
    // One millimetre each way; the perimeter is smooth, so the slope is right to a part in a thousand.
    const perGirth = breadthFromGirthAndDepth(girthMm.value + 1, depthMm.value, one) - value;
    const perDepth = breadthFromGirthAndDepth(girthMm.value, depthMm.value - 1, one) - value;
    return {
      value,
      spread: Math.hypot(SHAPE_SPREAD_MM, perGirth * girthMm.spread, perDepth * depthMm.spread),
    };
  });
  const words = `breadth from girth and depth (ellipse, ${sexWords(sex)})`;
  return estimate(breadth, 'girth-and-depth', words, bmi, olderDate(girthMm, depthMm));
}
