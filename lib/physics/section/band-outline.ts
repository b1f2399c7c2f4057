import { valueAt, type Curve } from './curve';
import { bandsBetween, TOUCH_MM, type RowBand } from './row-band';
import type { SectionPoint, SectionRing } from './section-drawing';

/** Points along a curved boundary; 32 keep a 500 mm trunk within 0.3 mm of its outline (sagitta of one chord). */
const ARC_POINTS = 32;

/** Readout coordinates along [r0, r1], closer together towards the ends, where an ellipse turns. */
function rowsAlong(r0: number, r1: number, curved: boolean): number[] {
  if (!curved) return [r0, r1];
  const middle = (r0 + r1) / 2;
  const half = (r1 - r0) / 2;
  return Array.from(
    { length: ARC_POINTS + 1 },
    (_, i) => middle - half * Math.cos((Math.PI * i) / ARC_POINTS),
  );
}

function boundary(curve: Curve, r0: number, r1: number): SectionPoint[] {
  return rowsAlong(r0, r1, curve.bulge !== 0).map((r) => [r, valueAt(curve, r)] as const);
}

/** Outlines of row bands; bands that continue each other become one ring. */
export function bandRings(bands: readonly RowBand[]): SectionRing[] {
  const rings: SectionRing[] = [];
  let bottom: SectionPoint[] = [];
  let top: SectionPoint[] = [];
  let last: RowBand | undefined;
  const close = () => {
    if (!last) return;
    rings.push(withoutRepeats([...bottom, ...top.reverse()]));
    bottom = [];
    top = [];
  };
  for (const band of [...bands].sort((a, b) => a.r0 - b.r0)) {
    // Boundaries agree where bands meet to well under a micrometre, else the shape has a step and a new ring begins.
    const continues =
      last &&
      Math.abs(last.r1 - band.r0) < 1e-6 &&
      Math.abs(valueAt(last.lower, band.r0) - valueAt(band.lower, band.r0)) < 1e-3 &&
      Math.abs(valueAt(last.upper, band.r0) - valueAt(band.upper, band.r0)) < 1e-3;
    if (!continues) close();
    bottom.push(...boundary(band.lower, band.r0, band.r1));
    top.push(...boundary(band.upper, band.r0, band.r1));
    last = band;
  }
  close();
  return rings.filter((ring) => ring.length >= 3);
}

function withoutRepeats(points: readonly SectionPoint[]): SectionPoint[] {
  return points.filter(([r, p], i) => {
    const [previousR, previousP] = points[(i + points.length - 1) % points.length]!;
    return Math.hypot(r - previousR, p - previousP) > 1e-6;
  });
}

/** The part of convex bands between two straight or curved limits and within [r0, r1]. */
export function cropBands(
  bands: readonly RowBand[],
  limits: {
    readonly lowers?: readonly Curve[];
    readonly uppers?: readonly Curve[];
    readonly r0?: number;
    readonly r1?: number;
  },
): RowBand[] {
  return bands.flatMap((band) => {
    const r0 = Math.max(band.r0, limits.r0 ?? -Infinity);
    const r1 = Math.min(band.r1, limits.r1 ?? Infinity);
    if (!(r1 - r0 > TOUCH_MM)) return [];
    return bandsBetween(
      [band.lower, ...(limits.lowers ?? [])],
      [band.upper, ...(limits.uppers ?? [])],
      r0,
      r1,
    );
  });
}

/** Intersection of bands with a polygon given as bands. */
export function intersectBands(bands: readonly RowBand[], polygon: readonly RowBand[]): RowBand[] {
  return polygon
    .flatMap((clear) =>
      cropBands(bands, { lowers: [clear.lower], uppers: [clear.upper], r0: clear.r0, r1: clear.r1 }),
    )
    .sort((a, b) => a.r0 - b.r0);
}

/** Bands moved along phase by d [mm]. */
export function moveBands(bands: readonly RowBand[], d: number): RowBand[] {
  return bands.map((band) => ({
    ...band,
    lower: { ...band.lower, offset: band.lower.offset + d },
    upper: { ...band.upper, offset: band.upper.offset + d },
  }));
}
