import type { Sex } from './size-types';

/*
 * Regressions of body sizes, as published with their data: centimetres, kilograms, BMI in kg/m².
 * They stay in the units they were computed in, so that they can be compared with their tables; the functions that use
 * them take and give millimetres. residualSd is the residual standard deviation [cm].
 */

export interface LinearRegression {
  readonly intercept: number;
  /** Per cm of the predictor (girth), or per kg/m² (BMI). */
  readonly slope: number;
  readonly residualSd: number;
}

export interface WeightHeightRegression {
  readonly intercept: number;
  readonly perKg: number;
  readonly perCm: number;
  readonly residualSd: number;
}

type BySex<T> = Readonly<Record<Sex, T>>;

/** Supine sagittal abdominal diameter from waist girth at the iliac crest, all BMI. Source: [nhanes-2013]. */
export const DEPTH_FROM_GIRTH: BySex<LinearRegression> = {
  male: { intercept: -3.06, slope: 0.261, residualSd: 1.3 },
  female: { intercept: -2.88, slope: 0.257, residualSd: 1.5 },
};

/** The same at BMI ≥ 35. Source: [nhanes-2013]. */
export const DEPTH_FROM_GIRTH_BMI_35: BySex<LinearRegression> = {
  male: { intercept: 1.3, slope: 0.229, residualSd: 1.5 },
  female: { intercept: 4.45, slope: 0.199, residualSd: 1.7 },
};

/** Supine sagittal abdominal diameter from weight and height, BMI ≥ 35 only. Source: [nhanes-2013]. */
export const DEPTH_FROM_WEIGHT_HEIGHT: BySex<WeightHeightRegression> = {
  male: { intercept: 38.21, perKg: 0.1525, perCm: -0.1507, residualSd: 2.0 },
  female: { intercept: 37.39, perKg: 0.1575, perCm: -0.1588, residualSd: 2.0 },
};

/** Waist girth at the iliac crest from weight and height, BMI ≥ 35 only. Source: [nhanes-2013]. */
export const GIRTH_FROM_WEIGHT_HEIGHT: BySex<WeightHeightRegression> = {
  male: { intercept: 138.2, perKg: 0.637, perCm: -0.507, residualSd: 6.1 },
  female: { intercept: 124.4, perKg: 0.683, perCm: -0.47, residualSd: 7.3 },
};

/** Supine breadth from waist girth: modelled (ellipse of that girth and the regression's depth). Source: [nhanes-2013]. */
export const BREADTH_FROM_GIRTH: BySex<LinearRegression> = {
  male: { intercept: 2.43, slope: 0.341, residualSd: 2.5 },
  female: { intercept: 2.26, slope: 0.341, residualSd: 2.5 },
};

/** Hip girth from BMI. Source: [nhanes-2013]; the residual SD is our judgement, none is published with it. */
export const HIP_GIRTH_FROM_BMI: BySex<LinearRegression> = {
  male: { intercept: 51.5, slope: 1.82, residualSd: 5 },
  female: { intercept: 51.3, slope: 1.92, residualSd: 5 },
};

/** Hip breadth from hip girth. Source: [ansur-2]; the residual SD is our judgement, none is published with it. */
export const HIP_BREADTH_FROM_HIP_GIRTH: BySex<LinearRegression> = {
  male: { intercept: 4.65, slope: 0.294, residualSd: 1 },
  female: { intercept: 1.56, slope: 0.331, residualSd: 1 },
};

/** Weight-and-height routes start here [kg/m²]; below there is none. */
export const WEIGHT_HEIGHT_FROM_BMI = 35;
/** Above this BMI the tables hold too few people: extrapolation. */
export const EXTRAPOLATED_ABOVE_BMI = 50;
/** Above this BMI hip breadth is extrapolated (the survey measured soldiers). */
export const HIPS_EXTRAPOLATED_ABOVE_BMI = 40;
/** Added to a worked-out depth at liver level, in quadrature [mm]: our judgement. */
export const LIVER_LEVEL_SPREAD_MM = 15;

/** y = intercept + slope·x. */
export const linear = (r: LinearRegression, x: number): number => r.intercept + r.slope * x;

/** y = intercept + perKg·W + perCm·H. */
export const fromWeightHeight = (r: WeightHeightRegression, weightKg: number, heightCm: number): number =>
  r.intercept + r.perKg * weightKg + r.perCm * heightCm;
