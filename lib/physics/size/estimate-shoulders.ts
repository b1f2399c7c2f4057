import type { Reading } from '../model/patient';
import { bodyMeasure } from './body-regressions';
import { eitherSex, sexWords } from './either-sex';
import { olderDate } from './older-date';
import type { Estimate, Sex } from './size-types';

/**
 * Breadth over the deltoids as a share of the girth over them. The survey's mean breadths (men 51.0 cm, women 45.0 cm)
 * over the girths that the regression gives at its mean weights and heights are 0.424 and 0.431.
 * Source: [ansur-2] means, from memory; [heinz-2003] girths.
 */
const BREADTH_PER_GIRTH = 0.427;
/** What the ratio leaves open [mm]: our judgement. */
const RATIO_SPREAD_MM = 20;
/** Soft tissue in front of the sternum and behind the spine: the data set's depth is between bones [mm]; our judgement. */
const SOFT_TISSUE_MM = 30;

export interface ShoulderSize {
  readonly breadth: Estimate;
  readonly depth: Estimate;
}

/**
 * Breadth and depth over the shoulders from weight and height.
 * @returns mm; modelled, extrapolated outside the data's BMI (16.9–38.2) and said so
 * @throws DomainError "weight-out-of-range", "height-out-of-range"
 * Source: [heinz-2003] for girth and chest depth; the allowances are our judgement.
 */
export function shouldersFromWeightAndHeight(
  weightKg: Reading,
  heightCm: Reading,
  sex: Sex | undefined,
): ShoulderSize {
  const breadth = eitherSex(sex, (one) => {
    const girth = bodyMeasure('shoulderGirth', weightKg, heightCm, one);
    return {
      value: BREADTH_PER_GIRTH * girth.value,
      spread: Math.hypot(RATIO_SPREAD_MM, BREADTH_PER_GIRTH * girth.spread),
    };
  });
  const depth = eitherSex(sex, (one) => {
    const bones = bodyMeasure('chestDepth', weightKg, heightCm, one);
    return { value: bones.value + SOFT_TISSUE_MM, spread: bones.spread };
  });
  // Whether the table is left depends on weight and height alone, not on the sex.
  const { extrapolated, cautions } = bodyMeasure('shoulderGirth', weightKg, heightCm, sex ?? 'female');
  const takenOn = olderDate(weightKg, heightCm);
  const common = {
    source: 'weight-and-height',
    extrapolated,
    cautions,
    ...(takenOn === undefined ? {} : { takenOn }),
  } as const;
  return {
    breadth: {
      ...breadth,
      ...common,
      words: `shoulder breadth modelled from weight and height (${sexWords(sex)})`,
    },
    depth: { ...depth, ...common, words: `chest depth from weight and height (${sexWords(sex)})` },
  };
}
