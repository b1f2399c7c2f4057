import { maxOn, minOn, minusStraight, straight, valueAt } from '../section/curve';
import { TOUCH_MM, type RowBand } from '../section/row-band';
import type { AxisMargin } from './section-margin';

/** Open interval (low, high), mm. */
export type Interval = readonly [low: number, high: number];

/**
 * Phase displacements d for which a band of tissue meets a band of keep-clear moved by d: { d : A ∩ (K + d) ≠ ∅ }.
 * Over the common rows this is one open interval (min(a − l), max(b − k)), whose ends are range ends or an arc's apex;
 * rows are never sampled. An alias of order n reaches keep-clear exactly when n·W lies inside.
 * @param clear  bounded by straight lines (keep-clear areas are polygons)
 * @returns undefined when they share no row (touching is clean)
 */
export function bandDisplacements(tissue: RowBand, clear: RowBand): Interval | undefined {
  const r0 = Math.max(tissue.r0, clear.r0);
  const r1 = Math.min(tissue.r1, clear.r1);
  if (!(r1 - r0 > TOUCH_MM)) return undefined;
  return [
    minOn(minusStraight(tissue.lower, clear.upper), r0, r1),
    maxOn(minusStraight(tissue.upper, clear.lower), r0, r1),
  ];
}

/** Hull of the displacements of all pairs: exact for one convex solid and one convex area. */
export function displacements(
  tissue: readonly RowBand[],
  clear: readonly RowBand[],
  margin: AxisMargin,
): Interval | undefined {
  let low = Infinity;
  let high = -Infinity;
  for (const a of tissue) {
    for (const k of clear) {
      const pair = bandDisplacements(a, k);
      if (!pair) continue;
      if (pair[0] < low) low = pair[0];
      if (pair[1] > high) high = pair[1];
    }
  }
  return high > low ? [low - margin[0], high + margin[1]] : undefined;
}

/**
 * A keep-clear section dilated along readout by the reflected tissue margin: tissue that may move by `margin` meets
 * these rows exactly when the tissue as measured meets the grown ones.
 */
export function growInReadout(bands: readonly RowBand[], margin: AxisMargin): readonly RowBand[] {
  const first = bands[0];
  if (!first || (margin[0] === 0 && margin[1] === 0)) return bands;
  if (bands.length === 1 && first.lower.slope === 0 && first.upper.slope === 0) {
    return [{ ...first, r0: first.r0 - margin[1], r1: first.r1 + margin[0] }];
  }
  const corners = bands.flatMap((band) =>
    [band.r0, band.r1].flatMap((r) => [
      [r, valueAt(band.lower, r)],
      [r, valueAt(band.upper, r)],
    ]),
  ) as [number, number][];
  return hullBands(
    corners.flatMap(
      ([r, p]) =>
        [
          [r - margin[1], p],
          [r + margin[0], p],
        ] as [number, number][],
    ),
  );
}

/** Row bands of the convex hull of points. */
export function hullBands(points: readonly (readonly [number, number])[]): RowBand[] {
  const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const chain = (sign: 1 | -1): (readonly [number, number])[] => {
    const kept: (readonly [number, number])[] = [];
    for (const point of sorted) {
      while (kept.length > 1) {
        const [ar, ap] = kept[kept.length - 2]!;
        const [br, bp] = kept[kept.length - 1]!;
        if (sign * ((br - ar) * (point[1] - ap) - (bp - ap) * (point[0] - ar)) > 0) break;
        kept.pop();
      }
      kept.push(point);
    }
    // Edges along phase limit no row: the lower chain may end with one, the upper may begin with one.
    return sign > 0
      ? kept.filter((point, i) => i === 0 || point[0] - kept[i - 1]![0] > TOUCH_MM)
      : kept.filter((point, i) => i + 1 === kept.length || kept[i + 1]![0] - point[0] > TOUCH_MM);
  };
  const edges = (corners: (readonly [number, number])[]) =>
    corners.slice(1).map((to, i) => {
      const from = corners[i]!;
      const slope = (to[1] - from[1]) / (to[0] - from[0]);
      return { r0: from[0], r1: to[0], line: straight(from[1] - slope * from[0], slope) };
    });
  const bottom = edges(chain(1));
  const top = edges(chain(-1));
  const bands: RowBand[] = [];
  for (const lower of bottom) {
    for (const upper of top) {
      const r0 = Math.max(lower.r0, upper.r0);
      const r1 = Math.min(lower.r1, upper.r1);
      if (r1 - r0 > TOUCH_MM) bands.push({ r0, r1, lower: lower.line, upper: upper.line });
    }
  }
  return bands.sort((a, b) => a.r0 - b.r0);
}
