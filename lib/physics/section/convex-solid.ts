import type { Vec3 } from '../model/axes';
import type { SectionFrame } from '../geometry/section-frame';
import { dot } from '../geometry/vector';
import { straight, type Curve } from './curve';
import { bandsBetween, TOUCH_MM, type RowBand } from './row-band';

/** { x : normal·x ≤ limit }, mm. */
export interface HalfSpace {
  readonly normal: Vec3;
  readonly limit: number;
}

/** { x : (x − centre)ᵀ·Q·(x − centre) ≤ 1 } with Q symmetric, positive semidefinite, 1/mm². */
export interface Quadric {
  readonly centre: Vec3;
  readonly xx: number;
  readonly yy: number;
  readonly zz: number;
  readonly xy: number;
  readonly xz: number;
  readonly yz: number;
}

/** A convex solid: a quadric, half-spaces, or both together. Always bounded along phase and readout. */
export interface ConvexSolid {
  readonly quadric?: Quadric;
  readonly halfSpaces: readonly HalfSpace[];
}

/** Relative size below which a quadratic coefficient means "no dependence" (rounding of a rotation is 1e-16). */
const FLAT = 1e-13;

function quadraticForm(q: Quadric, a: Vec3, b: Vec3): number {
  return (
    a[0] * (q.xx * b[0] + q.xy * b[1] + q.xz * b[2]) +
    a[1] * (q.xy * b[0] + q.yy * b[1] + q.yz * b[2]) +
    a[2] * (q.xz * b[0] + q.yz * b[1] + q.zz * b[2])
  );
}

/** The same solid in section axes: x is readout, y phase, z slice. */
export function solidInSection(solid: ConvexSolid, frame: SectionFrame): ConvexSolid {
  const { readout, phase, slice } = frame;
  const turn = (v: Vec3): Vec3 => [dot(v, readout), dot(v, phase), dot(v, slice)];
  const q = solid.quadric;
  return {
    ...(q && {
      quadric: {
        centre: turn(q.centre),
        xx: quadraticForm(q, readout, readout),
        yy: quadraticForm(q, phase, phase),
        zz: quadraticForm(q, slice, slice),
        xy: quadraticForm(q, readout, phase),
        xz: quadraticForm(q, readout, slice),
        yz: quadraticForm(q, phase, slice),
      },
    }),
    halfSpaces: solid.halfSpaces.map(({ normal, limit }) => ({ normal: turn(normal), limit })),
  };
}

/** How a solid's section depends on the slice coordinate. */
export interface SliceDependence {
  /** Sections at different slice coordinates differ. */
  readonly varies: boolean;
  /** Outlines also move within the plane from slice to slice (tilted planes): sections are not nested. */
  readonly coupled: boolean;
  /** Slice coordinates between which the solid exists, as far as half-spaces across the slice say, mm. */
  readonly lowMm: number;
  readonly highMm: number;
  /** Where the section is largest when it varies but is not coupled. */
  readonly widestMm: number;
}

/**
 * How sections change from slice to slice. Without coupling an unclipped quadric's sections are nested (same shape,
 * smaller away from its centre), so the union of the sections of a slice range is the one nearest its centre.
 */
export function sliceDependence(solid: ConvexSolid): SliceDependence {
  let low = -Infinity;
  let high = Infinity;
  let coupled = false;
  for (const { normal, limit } of solid.halfSpaces) {
    const inPlane = Math.abs(normal[0]) + Math.abs(normal[1]) > FLAT;
    const across = Math.abs(normal[2]) > FLAT;
    if (inPlane && across) coupled = true;
    else if (across && normal[2] > 0) high = Math.min(high, limit / normal[2]);
    else if (across) low = Math.max(low, limit / normal[2]);
  }
  const q = solid.quadric;
  let varies = coupled;
  if (q) {
    const scale = q.xx + q.yy + q.zz;
    if (Math.abs(q.xz) + Math.abs(q.yz) > FLAT * scale) coupled = varies = true;
    if (q.zz > FLAT * scale) varies = true;
  }
  return { varies, coupled, lowMm: low, highMm: high, widestMm: q ? q.centre[2] : 0 };
}

/** The solid without its ends across the slice, which `sliceDependence` gives as lowMm and highMm. */
export function withoutSliceEnds(solid: ConvexSolid): ConvexSolid {
  const inPlane = ({ normal }: HalfSpace) => Math.abs(normal[0]) + Math.abs(normal[1]) > FLAT;
  return { ...solid, halfSpaces: solid.halfSpaces.filter(inPlane) };
}

interface CutLimits {
  r0: number;
  r1: number;
  readonly lowers: Curve[];
  readonly uppers: Curve[];
}

/** Adds the conic that the plane z = s cuts out of the quadric. @returns false when it misses the solid */
function cutQuadric(q: Quadric, s: number, limits: CutLimits): boolean {
  const ds = s - q.centre[2];
  const scale = q.xx + q.yy + q.zz;
  const [cr, cp] = q.centre;
  if (q.yy <= FLAT * scale) {
    // A strip along phase: only readout is limited.
    const constant = q.zz * ds * ds - 1;
    if (q.xx <= FLAT * scale) return constant < 0;
    const half = (q.xz * ds) / q.xx;
    const under = half * half - constant / q.xx;
    if (!(under > 0)) return false;
    limits.r0 = Math.max(limits.r0, cr - half - Math.sqrt(under));
    limits.r1 = Math.min(limits.r1, cr - half + Math.sqrt(under));
    return true;
  }
  // yy·y² + 2(xy·x + yz·ds)·y + … ≤ 0 solved for y; its discriminant is −alpha·x² + 2·beta·x + gamma.
  const alpha = q.yy * q.xx - q.xy * q.xy;
  const gamma = (q.yz * q.yz - q.yy * q.zz) * ds * ds + q.yy;
  const offset = cp - (q.yz * ds) / q.yy + (q.xy * cr) / q.yy;
  const slope = -q.xy / q.yy;
  if (alpha <= FLAT * scale * scale) {
    // A strip at an angle: two parallel lines.
    if (!(gamma > 0)) return false;
    const half = Math.sqrt(gamma) / q.yy;
    limits.lowers.push(straight(offset - half, slope));
    limits.uppers.push(straight(offset + half, slope));
    return true;
  }
  const beta = ds * (q.xy * q.yz - q.yy * q.xz);
  const x0 = beta / alpha;
  const halfSquared = gamma / alpha + x0 * x0;
  if (!(halfSquared > 0)) return false;
  const arcHalf = Math.sqrt(halfSquared);
  const arcCentre = cr + x0;
  const bulge = (Math.sqrt(alpha) * arcHalf) / q.yy;
  limits.r0 = Math.max(limits.r0, arcCentre - arcHalf);
  limits.r1 = Math.min(limits.r1, arcCentre + arcHalf);
  limits.lowers.push({ offset, slope, bulge: -bulge, arcCentre, arcHalf });
  limits.uppers.push({ offset, slope, bulge, arcCentre, arcHalf });
  return true;
}

/**
 * Whether the section's ellipse lies wholly inside a half-plane, so that it cuts nothing: the ellipse's support,
 * (nr + np·slope)·r₀ + np·offset + √(((nr + np·slope)·A)² + (np·B)²), is within the limit.
 */
function clearsConic({ lowers, uppers }: CutLimits, nr: number, np: number, room: number): boolean {
  const arc = uppers[0];
  if (!arc || lowers[0]?.bulge !== -arc.bulge || arc.bulge === 0) return false;
  const sheared = nr + np * arc.slope;
  return (
    sheared * arc.arcCentre + np * arc.offset + Math.hypot(sheared * arc.arcHalf, np * arc.bulge) <= room
  );
}

/**
 * Section of a solid (in section axes) with the plane at slice coordinate s [mm], as row bands.
 * @param closed  whether a plane that only touches a face across the slice still cuts it. Keep-clear areas are
 *                closed (a slice on their edge belongs to them), tissue is open.
 */
export function cutSolid(solid: ConvexSolid, s: number, closed = false): RowBand[] {
  const limits: CutLimits = { r0: -Infinity, r1: Infinity, lowers: [], uppers: [] };
  if (solid.quadric && !cutQuadric(solid.quadric, s, limits)) return [];
  // Level edges are common (a box in an untilted plane): only the tightest of each kind matters.
  let floor = -Infinity;
  let ceiling = Infinity;
  for (const { normal, limit } of solid.halfSpaces) {
    const [nr, np, ns] = normal;
    const room = limit - ns * s;
    if (clearsConic(limits, nr, np, room)) continue;
    if (Math.abs(np) > FLAT) {
      const level = room / np;
      if (Math.abs(nr) > FLAT) (np > 0 ? limits.uppers : limits.lowers).push(straight(level, -nr / np));
      else if (np > 0) ceiling = Math.min(ceiling, level);
      else floor = Math.max(floor, level);
    } else if (Math.abs(nr) > FLAT) {
      if (nr > 0) limits.r1 = Math.min(limits.r1, room / nr);
      else limits.r0 = Math.max(limits.r0, room / nr);
    } else if (closed ? room < -TOUCH_MM : room <= TOUCH_MM) {
      return [];
    }
  }
  if (floor > -Infinity) limits.lowers.push(straight(floor));
  if (ceiling < Infinity) limits.uppers.push(straight(ceiling));
  const { lowers, uppers } = limits;
  if (
    lowers.length === 1 &&
    uppers.length === 1 &&
    lowers[0]!.bulge === -uppers[0]!.bulge &&
    lowers[0]!.slope === uppers[0]!.slope
  ) {
    // One ellipse, or two parallel lines: they meet nowhere inside.
    return limits.r1 - limits.r0 > TOUCH_MM &&
      (lowers[0]!.bulge !== 0 || uppers[0]!.offset - lowers[0]!.offset > TOUCH_MM)
      ? [{ r0: limits.r0, r1: limits.r1, lower: lowers[0]!, upper: uppers[0]! }]
      : [];
  }
  return boundedBands(limits);
}

/** Polygon whose readout range only its straight edges limit (a tilted box): its range is where edges cross. */
function boundedBands({ lowers, uppers, r0, r1 }: CutLimits): RowBand[] {
  if (Number.isFinite(r0) && Number.isFinite(r1)) return bandsBetween(lowers, uppers, r0, r1);
  // Far beyond any body; bandsBetween then finds the crossings that really end the polygon.
  return bandsBetween(lowers, uppers, Math.max(r0, -1e5), Math.min(r1, 1e5));
}
