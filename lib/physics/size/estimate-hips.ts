import type { Reading } from '../model/patient';
import { requireRange } from '../model/require-argument';
import { eitherSex, sexWords } from './either-sex';
import {
  HIP_BREADTH_FROM_HIP_GIRTH,
  HIP_GIRTH_FROM_BMI,
  HIPS_EXTRAPOLATED_ABOVE_BMI,
  linear,
} from './regressions';
import type { Estimate, Sex } from './size-types';

const EXTRAPOLATION = 'BMI above 40: beyond the people the hip table was made from.';

function requireBmi(bmi: number): number {
  return requireRange('bmi-out-of-range', 'bmi', bmi, 10, 120);
}

function marks(bmi: number | undefined): Pick<Estimate, 'extrapolated' | 'cautions'> {
  const extrapolated = bmi !== undefined && bmi > HIPS_EXTRAPOLATED_ABOVE_BMI;
  return { extrapolated, cautions: extrapolated ? [EXTRAPOLATION] : [] };
}

/**
 * Hip girth from BMI.
 * @param bmi [kg/m²], 10–120
 * @returns mm; the spread (50 mm) is our judgement
 * @throws DomainError "bmi-out-of-range"
 * Source: [nhanes-2013].
 */
export function hipGirthFromBmi(bmi: number, sex: Sex | undefined): Estimate {
  requireBmi(bmi);
  const girth = eitherSex(sex, (one) => {
    const r = HIP_GIRTH_FROM_BMI[one];
    return { value: 10 * linear(r, bmi), spread: 10 * r.residualSd };
  });
  return {
    ...girth,
    ...marks(bmi),
    source: 'weight-and-height',
    words: `hip girth from BMI (${sexWords(sex)})`,
  };
}

/**
 * Hip breadth from hip girth.
 * @param hipGirthMm [mm], 500–2500
 * @returns mm; extrapolated above BMI 40; the residual spread (10 mm) is our judgement
 * @throws DomainError "girth-out-of-range"
 * Source: [ansur-2].
 */
export function hipBreadthFromHipGirth(
  hipGirthMm: Reading,
  sex: Sex | undefined,
  bmi: number | undefined,
): Estimate {
  requireRange('girth-out-of-range', 'hipGirthMm', hipGirthMm.value, 500, 2500);
  requireRange('spread-out-of-range', 'hipGirthMm.spread', hipGirthMm.spread, 0, 500);
  const breadth = eitherSex(sex, (one) => {
    const r = HIP_BREADTH_FROM_HIP_GIRTH[one];
    return {
      value: 10 * linear(r, hipGirthMm.value / 10),
      spread: Math.hypot(10 * r.residualSd, r.slope * hipGirthMm.spread),
    };
  });
  return {
    ...breadth,
    ...marks(bmi),
    source: 'girth',
    words: `hip breadth from hip girth (${sexWords(sex)})`,
    ...(hipGirthMm.takenOn === undefined ? {} : { takenOn: hipGirthMm.takenOn }),
  };
}

/** Hip breadth from BMI by way of the hip girth; the two errors in quadrature. Units and sources as above. */
export function hipBreadthFromBmi(bmi: number, sex: Sex | undefined): Estimate {
  requireBmi(bmi);
  const breadth = eitherSex(sex, (one) => {
    const girth = HIP_GIRTH_FROM_BMI[one];
    const across = HIP_BREADTH_FROM_HIP_GIRTH[one];
    return {
      value: 10 * linear(across, linear(girth, bmi)),
      spread: 10 * Math.hypot(across.residualSd, across.slope * girth.residualSd),
    };
  });
  return {
    ...breadth,
    ...marks(bmi),
    source: 'weight-and-height',
    words: `hip breadth from BMI (${sexWords(sex)})`,
  };
}
