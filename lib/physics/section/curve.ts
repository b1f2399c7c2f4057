/**
 * A boundary of a shape along phase, as a function of the readout coordinate r [mm]:
 *   value(r) = offset + slope·r + bulge·√(1 − ((r − arcCentre)/arcHalf)²)
 * Straight when bulge is 0. An ellipse's two boundaries are such curves with bulge ±B; sums with straight lines and
 * multiples stay in the family, which is what makes every extremum and crossing below a closed form.
 */
export interface Curve {
  readonly offset: number;
  readonly slope: number;
  readonly bulge: number;
  readonly arcCentre: number;
  readonly arcHalf: number;
}

export const straight = (offset: number, slope = 0): Curve => ({
  offset,
  slope,
  bulge: 0,
  arcCentre: 0,
  arcHalf: 1,
});

export function valueAt(curve: Curve, r: number): number {
  const base = curve.offset + curve.slope * r;
  if (curve.bulge === 0) return base;
  const t = (r - curve.arcCentre) / curve.arcHalf;
  const under = 1 - t * t;
  return under > 0 ? base + curve.bulge * Math.sqrt(under) : base;
}

/** factor·curve + offset + slope·r. */
export function affine(curve: Curve, factor: number, offset: number, slope = 0): Curve {
  return {
    offset: curve.offset * factor + offset,
    slope: curve.slope * factor + slope,
    bulge: curve.bulge * factor,
    arcCentre: curve.arcCentre,
    arcHalf: curve.arcHalf,
  };
}

/**
 * curve − other, where other is straight. Keep-clear areas are polygons, so this is the only difference needed.
 */
export function minusStraight(curve: Curve, other: Curve): Curve {
  return affine(curve, 1, -other.offset, -other.slope);
}

/** Readout coordinate where an arc with this slope is stationary: slope = bulge·t/(arcHalf·√(1−t²)). */
function stationaryAt(curve: Curve): number {
  const tilt = curve.slope * curve.arcHalf;
  const t = tilt / Math.hypot(curve.bulge, tilt);
  return curve.arcCentre + curve.arcHalf * (curve.bulge > 0 ? t : -t);
}

/** Largest value on [r0, r1]: range ends, or the apex of an arc that bulges up. */
export function maxOn(curve: Curve, r0: number, r1: number): number {
  const ends = Math.max(valueAt(curve, r0), valueAt(curve, r1));
  if (!(curve.bulge > 0)) return ends;
  const apex = stationaryAt(curve);
  return apex > r0 && apex < r1 ? Math.max(ends, valueAt(curve, apex)) : ends;
}

/** Smallest value on [r0, r1]: range ends, or the apex of an arc that bulges down. */
export function minOn(curve: Curve, r0: number, r1: number): number {
  const ends = Math.min(valueAt(curve, r0), valueAt(curve, r1));
  if (!(curve.bulge < 0)) return ends;
  const apex = stationaryAt(curve);
  return apex > r0 && apex < r1 ? Math.min(ends, valueAt(curve, apex)) : ends;
}

/**
 * Candidates for the readout coordinates where two curves cross. Arcs must share centre and half-length (one solid's
 * upper and lower boundary, or multiples of one boundary). Roots of the squared equation that belong to the other
 * branch may be among them: callers use the result as break points, where an extra one does no harm.
 */
export function crossings(a: Curve, b: Curve): number[] {
  const offset = a.offset - b.offset;
  const slope = a.slope - b.slope;
  const bulge = a.bulge - b.bulge;
  if (bulge === 0) return slope === 0 ? [] : [-offset / slope];
  const arc = a.bulge !== 0 ? a : b;
  // With t = (r − centre)/half: g + h·t = −bulge·√(1 − t²).
  const g = offset + slope * arc.arcCentre;
  const h = slope * arc.arcHalf;
  const square = h * h + bulge * bulge;
  const discriminant = g * g * h * h - square * (g * g - bulge * bulge);
  if (discriminant < 0) return [];
  const root = Math.sqrt(discriminant);
  return [(-g * h - root) / square, (-g * h + root) / square].map((t) => arc.arcCentre + arc.arcHalf * t);
}

/** Visits what crossings(curve, straight(level)) lists, without listing it. */
export function visitLevel(curve: Curve, level: number, visit: (r: number) => void): void {
  const offset = curve.offset - level;
  const { slope, bulge, arcCentre, arcHalf } = curve;
  if (bulge === 0) {
    if (slope !== 0) visit(-offset / slope);
    return;
  }
  const g = offset + slope * arcCentre;
  const h = slope * arcHalf;
  const square = h * h + bulge * bulge;
  const discriminant = g * g * h * h - square * (g * g - bulge * bulge);
  if (discriminant < 0) return;
  const root = Math.sqrt(discriminant);
  visit(arcCentre + arcHalf * ((-g * h - root) / square));
  visit(arcCentre + arcHalf * ((-g * h + root) / square));
}
