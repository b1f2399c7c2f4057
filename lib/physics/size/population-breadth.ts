import { eitherSex, sexWords } from './either-sex';
import { populationEstimate } from './population';
import { BREADTH_FROM_GIRTH, linear } from './regressions';
import type { Estimate, Sex } from './size-types';

/**
 * Breadth of a person of whom nothing is known: the population's girth through the modelled breadth line.
 * @returns mm
 * Source: [nhanes-2013].
 */
export function breadthFromPopulation(sex: Sex | undefined): Estimate {
  const breadth = eitherSex(sex, (one) => {
    const girth = populationEstimate('girth', one);
    const r = BREADTH_FROM_GIRTH[one];
    return {
      value: 10 * linear(r, girth.value / 10),
      spread: Math.hypot(10 * r.residualSd, r.slope * girth.spread),
    };
  });
  return {
    ...populationEstimate('girth', sex),
    ...breadth,
    words: `breadth modelled from the median girth of adults (${sexWords(sex)}), not of this patient`,
  };
}
