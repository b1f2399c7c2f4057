import { DomainError } from '../model/domain-error';
import { requirePositive } from '../model/require-argument';
import type { Sex } from './size-types';

/**
 * A tape round the body reads longer than the ellipse of the same breadth and depth (it bridges hollows and is not level):
 * perimeter of the ellipse = factor · girth. Without it a breadth worked out from girth and depth is 3–5.5 cm too large.
 * Source: [nhanes-2013].
 */
export const TAPE_TO_ELLIPSE: Readonly<Record<Sex, number>> = { male: 0.949, female: 0.943 };

/**
 * Perimeter of an ellipse, Ramanujan's second approximation:
 * π(a + b)(1 + 3h/(10 + √(4 − 3h))), h = ((a − b)/(a + b))².
 * @param a, b semi-axes [mm] ≥ 0, not both 0
 * @returns [mm]; relative error below 4e-8 up to a/b = 3, below 4.1e-4 always
 * @throws DomainError "semi-axes-not-positive"
 * Source: [ramanujan-1914].
 */
export function ellipsePerimeter(a: number, b: number): number {
  if (!(a >= 0 && b >= 0 && a + b > 0 && Number.isFinite(a + b))) {
    throw new DomainError('semi-axes-not-positive', 'semi-axes', `${a}, ${b}`, '0 or more, not both 0');
  }
  const h = ((a - b) / (a + b)) ** 2;
  return Math.PI * (a + b) * (1 + (3 * h) / (10 + Math.sqrt(4 - 3 * h)));
}

/**
 * Breadth of the ellipse whose perimeter is factor·girth and whose other axis is the depth (bisection; the perimeter
 * grows steadily with the breadth).
 * @param girthMm tape [mm] > 0; depthMm [mm] > 0; sex chooses the factor
 * @returns breadth [mm], to 1e-6 mm; it may be less than the depth
 * @throws DomainError "girth-too-small-for-depth" when even a flat ellipse of that depth is longer round
 */
export function breadthFromGirthAndDepth(girthMm: number, depthMm: number, sex: Sex): number {
  requirePositive('girth-not-positive', 'girthMm', girthMm);
  requirePositive('depth-not-positive', 'depthMm', depthMm);
  const perimeter = TAPE_TO_ELLIPSE[sex] * girthMm;
  const b = depthMm / 2;
  if (ellipsePerimeter(0, b) >= perimeter) {
    const least = Math.ceil(ellipsePerimeter(0, b) / TAPE_TO_ELLIPSE[sex]);
    throw new DomainError(
      'girth-too-small-for-depth',
      'girthMm',
      girthMm,
      `above ${least} mm for a depth of ${depthMm} mm`,
    );
  }
  let low = 0;
  // An ellipse is longer round than four of its semi-axes.
  let high = perimeter / 4;
  while (high - low > 2.5e-7) {
    const middle = (low + high) / 2;
    if (ellipsePerimeter(middle, b) < perimeter) low = middle;
    else high = middle;
  }
  return low + high;
}
