import { crossings, valueAt, type Curve } from './curve';

/** Rows r0..r1 (readout, mm) in which a shape fills phase from `lower` to `upper`. */
export interface RowBand {
  readonly r0: number;
  readonly r1: number;
  readonly lower: Curve;
  readonly upper: Curve;
}

/** Rows narrower than this are a touch, and touching is clean [mm]. */
export const TOUCH_MM = 1e-9;

/**
 * A convex shape given by its boundaries, as row bands: everywhere above all `lowers` and below all `uppers`.
 * Break points are the crossings, so inside each band one lower and one upper boundary is the active one.
 */
export function bandsBetween(
  lowers: readonly Curve[],
  uppers: readonly Curve[],
  r0: number,
  r1: number,
): RowBand[] {
  if (!(r1 - r0 > TOUCH_MM) || lowers.length === 0 || uppers.length === 0) return [];
  const all = [...lowers, ...uppers];
  const breaks: number[] = [r0, r1];
  for (let i = 0; i < all.length; i++) {
    for (let j = i + 1; j < all.length; j++) {
      for (const r of crossings(all[i]!, all[j]!)) if (r > r0 + TOUCH_MM && r < r1 - TOUCH_MM) breaks.push(r);
    }
  }
  breaks.sort((a, b) => a - b);
  const bands: RowBand[] = [];
  for (let i = 0; i + 1 < breaks.length; i++) {
    const from = breaks[i]!;
    const to = breaks[i + 1]!;
    if (to - from <= TOUCH_MM) continue;
    const middle = (from + to) / 2;
    const lower = extreme(lowers, middle, 1);
    const upper = extreme(uppers, middle, -1);
    if (!(valueAt(upper, middle) - valueAt(lower, middle) > TOUCH_MM)) continue;
    const last = bands[bands.length - 1];
    if (last && last.r1 === from && last.lower === lower && last.upper === upper) {
      bands[bands.length - 1] = { ...last, r1: to };
    } else {
      bands.push({ r0: from, r1: to, lower, upper });
    }
  }
  return bands;
}

function extreme(curves: readonly Curve[], r: number, sign: 1 | -1): Curve {
  let best = curves[0]!;
  let bestValue = valueAt(best, r) * sign;
  for (let i = 1; i < curves.length; i++) {
    const value = valueAt(curves[i]!, r) * sign;
    if (value > bestValue) {
      best = curves[i]!;
      bestValue = value;
    }
  }
  return best;
}
