import { DomainError } from '../model/domain-error';

const SQRT_2_PI = Math.sqrt(2 * Math.PI);

/** Density of the standard normal, φ(x) = exp(−x²/2)/√(2π). */
export const normalDensity = (x: number): number => Math.exp((-x * x) / 2) / SQRT_2_PI;

/** Upper tail 1 − Φ(x) for x ≥ 0. */
function upperTail(x: number): number {
  if (x < 4) {
    // Φ(x) = ½ + φ(x)·Σ x^(2k+1)/(1·3·5…(2k+1)): all terms positive, so no cancellation in the sum.
    let term = x;
    let sum = x;
    for (let k = 1; term > sum * 1e-17 && k < 200; k++) {
      term *= (x * x) / (2 * k + 1);
      sum += term;
    }
    return 0.5 - normalDensity(x) * sum;
  }
  // Laplace's continued fraction, evaluated from its far end: converges fast for x ≥ 4.
  let denominator = x;
  for (let k = 60; k >= 1; k--) denominator = x + k / denominator;
  return normalDensity(x) / denominator;
}

/**
 * Cumulative standard normal Φ(x).
 * @param x any number; ±Infinity gives 0 or 1.
 * @returns [1], absolute error below 1e-14.
 * Valid: everywhere. Source: series and continued fraction of the error function, [abramowitz-1964] 26.2.11, 26.2.14.
 */
export function normalCumulative(x: number): number {
  if (x === Infinity) return 1;
  if (x === -Infinity) return 0;
  return x >= 0 ? 1 - upperTail(x) : upperTail(-x);
}

/**
 * Quantile of the standard normal: the z with Φ(z) = p.
 * @param p probability, 0 < p < 1.
 * @throws DomainError "probability-out-of-range"
 * Newton's method on Φ from a logistic start; the step is bounded, so it converges for every double in the domain
 * down to p = 1e-12.
 */
export function normalQuantile(p: number): number {
  if (!(p > 0 && p < 1))
    throw new DomainError('probability-out-of-range', 'p', p, 'more than 0 and less than 1');
  if (p < 0.5) return -normalQuantile(1 - p);
  let z = Math.min(7, Math.log(p / (1 - p)) / 1.702);
  for (let step = 0; step < 60; step++) {
    const change = (1 - p - upperTail(z)) / normalDensity(z);
    const bounded = Math.max(-1, Math.min(1, change));
    z -= bounded;
    if (Math.abs(bounded) < 1e-14) break;
  }
  return z === 0 ? 0 : z;
}
