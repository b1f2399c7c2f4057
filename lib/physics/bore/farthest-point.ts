import { requireRange } from '../model/require-argument';

/** Semi-axes and centre of an outline in the bore's frame: x to the patient's left, y up, mm. */
export interface Outline {
  readonly a: number;
  readonly b: number;
  readonly x0: number;
  readonly y0: number;
  /** Exponent n of |x/a|ⁿ + |y/b|ⁿ = 1; 2 is an ellipse. */
  readonly exponent: number;
  /** The front half stands this much higher: the coil on it. */
  readonly frontRaisedMm: number;
}

export interface Farthest {
  readonly distanceMm: number;
  /** Parameter t of the outline, degrees, 0 to 360: 0 is the patient's left, 90 the front. */
  readonly angleDeg: number;
  /** The point itself in the bore's frame, mm. */
  readonly pointMm: readonly [number, number];
}

/** Points tried before refining: 0.5° apart, so that each of the distance's few maxima is bracketed. */
const STARTS = 720;

const power = (x: number, p: number): number => Math.sign(x) * Math.abs(x) ** p;

/** Point at parameter t; `front` says which of the two copies of the outline's front half is meant. */
function pointAt(o: Outline, t: number): readonly [number, number] {
  const p = 2 / o.exponent;
  const s = Math.sin(t);
  return [o.x0 + o.a * power(Math.cos(t), p), o.y0 + o.b * power(s, p) + (s >= 0 ? o.frontRaisedMm : 0)];
}

/**
 * The outline's farthest point from the bore's centre: d_max = max_t √((x0 + a cos t)² + (y0 + b sin t)²), for a
 * superellipse with |cos t| and |sin t| to the power 2/n, solved by trying every 0.5° and closing in by golden section.
 * @param o semi-axes [mm] 1–1000, exponent 2–10, finite centre
 * @returns mm and degrees; within 1e-6 mm
 * @throws DomainError "semi-axis-out-of-range", "exponent-out-of-range", "coil-out-of-range"
 */
export function farthestPoint(o: Outline): Farthest {
  requireRange('semi-axis-out-of-range', 'a', o.a, 1, 1000);
  requireRange('semi-axis-out-of-range', 'b', o.b, 1, 1000);
  requireRange('exponent-out-of-range', 'exponent', o.exponent, 2, 10);
  requireRange('coil-out-of-range', 'frontRaisedMm', o.frontRaisedMm, 0, 300);
  const squared = (t: number): number => {
    const [x, y] = pointAt(o, t);
    return x * x + y * y;
  };
  const step = (2 * Math.PI) / STARTS;
  let best = 0;
  for (let k = 1; k < STARTS; k += 1) if (squared(k * step) > squared(best * step)) best = k;
  const t = refine(squared, best, step);
  const pointMm = pointAt(o, t);
  return { distanceMm: Math.hypot(...pointMm), angleDeg: ((t * 180) / Math.PI + 360) % 360, pointMm };
}

/** Golden section on both sides of the best start: at 0 and 180° the raised front makes the distance jump. */
function refine(f: (t: number) => number, best: number, step: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let answer = best * step;
  for (const [from, to] of [
    [(best - 1) * step, best * step],
    [best * step, (best + 1) * step],
  ] as const) {
    let low = from;
    let high = to;
    while (high - low > 1e-10) {
      const c = high - golden * (high - low);
      const d = low + golden * (high - low);
      if (f(c) > f(d)) high = d;
      else low = c;
    }
    const middle = (low + high) / 2;
    if (f(middle) > f(answer)) answer = middle;
  }
  return answer;
}
