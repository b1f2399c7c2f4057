import type { ConvexSolid } from '../section/convex-solid';

/** Relative size below which a coefficient means "no dependence"; rounding of a rotation is 1e-16. */
const FLAT = 1e-13;

/**
 * Where the line readout = r, slice = s runs inside a convex solid: [low, high] along phase, or undefined.
 * The quadric gives a quadratic inequality in p, every half-space a bound; closed form.
 * @param solid section coordinates; r, s [mm]
 */
export function rowInterval(
  { quadric: q, halfSpaces }: ConvexSolid,
  r: number,
  s: number,
): readonly [number, number] | undefined {
  let low = -Infinity;
  let high = Infinity;
  if (q !== undefined) {
    const dr = r - q.centre[0];
    const ds = s - q.centre[2];
    const c = q.xx * dr * dr + 2 * q.xz * dr * ds + q.zz * ds * ds - 1;
    const b = q.xy * dr + q.yz * ds;
    const a = q.yy;
    if (a <= FLAT * Math.max(q.xx, q.zz)) {
      if (c > 0) return undefined;
    } else {
      const discriminant = b * b - a * c;
      if (discriminant <= 0) return undefined;
      const root = Math.sqrt(discriminant);
      low = q.centre[1] + (-b - root) / a;
      high = q.centre[1] + (-b + root) / a;
    }
  }
  for (const { normal, limit } of halfSpaces) {
    const rest = limit - normal[0] * r - normal[2] * s;
    if (Math.abs(normal[1]) <= FLAT) {
      if (rest < 0) return undefined;
    } else if (normal[1] > 0) high = Math.min(high, rest / normal[1]);
    else low = Math.max(low, rest / normal[1]);
  }
  return high > low ? [low, high] : undefined;
}

/** A stretch of one row with one top layer. */
export interface RowSegment {
  readonly fromMm: number;
  readonly toMm: number;
  readonly layer: number;
}

/**
 * A row cut into stretches by what lies on top: the edges of every interval, sorted, and for each stretch between two
 * edges the last layer that covers it. Stretches nothing covers are left out; equal neighbours are joined.
 */
export function topSegments(intervals: readonly (readonly [number, number] | undefined)[]): RowSegment[] {
  const edges: number[] = [];
  for (const interval of intervals) if (interval !== undefined) edges.push(interval[0], interval[1]);
  edges.sort((a, b) => a - b);
  const segments: RowSegment[] = [];
  for (let i = 0; i + 1 < edges.length; i++) {
    const fromMm = edges[i]!;
    const toMm = edges[i + 1]!;
    if (!(toMm > fromMm)) continue;
    const middle = (fromMm + toMm) / 2;
    let layer = intervals.length - 1;
    while (
      layer >= 0 &&
      !(intervals[layer] !== undefined && intervals[layer]![0] < middle && intervals[layer]![1] > middle)
    )
      layer--;
    if (layer < 0) continue;
    const last = segments.at(-1);
    if (last !== undefined && last.layer === layer && last.toMm === fromMm)
      segments[segments.length - 1] = { ...last, toMm };
    else segments.push({ fromMm, toMm, layer });
  }
  return segments;
}
