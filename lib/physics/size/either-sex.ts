import type { Sex, Spread } from './size-types';

/**
 * The estimate for a sex; when it is not known, the even mixture of both: mean of the means, and a spread that holds
 * both spreads and their distance.
 */
export function eitherSex(sex: Sex | undefined, of: (sex: Sex) => Spread): Spread {
  if (sex) return of(sex);
  const [a, b] = [of('female'), of('male')];
  return {
    value: (a.value + b.value) / 2,
    spread: Math.sqrt((a.spread ** 2 + b.spread ** 2) / 2 + ((a.value - b.value) / 2) ** 2),
  };
}

/** "men", "women" or "women and men", as the words beside an estimate say. */
export function sexWords(sex: Sex | undefined): string {
  return sex === undefined ? 'women and men' : sex === 'male' ? 'men' : 'women';
}
