import type { OutlinePoint } from '../model/patient';
import { DomainError } from '../model/domain-error';

/** Between u0 and u1 (first outline coordinate) the outline fills v from the lower to the upper line v = offset + slope·u. */
export interface Trapezoid {
  readonly u0: number;
  readonly u1: number;
  readonly lower: readonly [offset: number, slope: number];
  readonly upper: readonly [offset: number, slope: number];
}

interface Edge {
  readonly u0: number;
  readonly u1: number;
  readonly offset: number;
  readonly slope: number;
}

type Rings = readonly (readonly OutlinePoint[])[];

/** Uploaded outlines have hundreds of points and are asked about for every candidate: each is taken apart once. */
const known = new WeakMap<Rings, readonly Trapezoid[]>();

/** outlineTrapezoids, remembered for as long as the rings live. */
export function trapezoidsOf(rings: Rings): readonly Trapezoid[] {
  let found = known.get(rings);
  if (!found) {
    found = outlineTrapezoids(rings);
    known.set(rings, found);
  }
  return found;
}

/**
 * Closed rings under the even-odd rule as trapezoids with parallel sides u = const (holes stay holes).
 * Self-crossing and mutually crossing rings are allowed: crossings are break points too.
 * @throws DomainError "outline-too-short", "outline-not-finite"
 */
export function outlineTrapezoids(rings: Rings): Trapezoid[] {
  const edges: Edge[] = [];
  const breaks: number[] = [];
  rings.forEach((ring, index) => {
    if (ring.length < 3)
      throw new DomainError(
        'outline-too-short',
        `rings[${index}]`,
        `${ring.length} points`,
        'at least 3 points',
      );
    ring.forEach(([u, v], i) => {
      if (!Number.isFinite(u) || !Number.isFinite(v)) {
        throw new DomainError(
          'outline-not-finite',
          `rings[${index}][${i}]`,
          `${u}, ${v}`,
          'finite millimetres',
        );
      }
      const [nextU, nextV] = ring[(i + 1) % ring.length]!;
      breaks.push(u);
      if (u === nextU) return;
      const slope = (nextV - v) / (nextU - u);
      edges.push({ u0: Math.min(u, nextU), u1: Math.max(u, nextU), offset: v - slope * u, slope });
    });
  });
  edges.sort((a, b) => a.u0 - b.u0);
  for (let i = 0; i < edges.length; i++) {
    const a = edges[i]!;
    for (let j = i + 1; j < edges.length && edges[j]!.u0 < a.u1; j++) {
      const b = edges[j]!;
      if (a.slope === b.slope) continue;
      const u = (b.offset - a.offset) / (a.slope - b.slope);
      if (u > Math.max(a.u0, b.u0) && u < Math.min(a.u1, b.u1)) breaks.push(u);
    }
  }
  breaks.sort((a, b) => a - b);
  const trapezoids: Trapezoid[] = [];
  for (let i = 0; i + 1 < breaks.length; i++) {
    const u0 = breaks[i]!;
    const u1 = breaks[i + 1]!;
    // A thousandth of a micrometre: what rounding of the crossings leaves, far below any outline.
    if (u1 - u0 < 1e-6) continue;
    const middle = (u0 + u1) / 2;
    const crossing = edges
      .filter((edge) => edge.u0 < middle && edge.u1 > middle)
      .sort((a, b) => a.offset + a.slope * middle - (b.offset + b.slope * middle));
    for (let k = 0; k + 1 < crossing.length; k += 2) {
      const lower = crossing[k]!;
      const upper = crossing[k + 1]!;
      // Two rings along one line cancel under the even-odd rule and leave nothing between them.
      if (upper.offset + upper.slope * middle - (lower.offset + lower.slope * middle) < 1e-6) continue;
      trapezoids.push({ u0, u1, lower: [lower.offset, lower.slope], upper: [upper.offset, upper.slope] });
    }
  }
  return joinAlong(trapezoids);
}

/** Neighbours bounded by the same two lines are one trapezoid (a break point on another ring had split them). */
function joinAlong(trapezoids: readonly Trapezoid[]): Trapezoid[] {
  const joined: Trapezoid[] = [];
  for (const next of trapezoids) {
    const at = joined.findIndex(
      (one) =>
        one.u1 === next.u0 &&
        one.lower[0] === next.lower[0] &&
        one.lower[1] === next.lower[1] &&
        one.upper[0] === next.upper[0] &&
        one.upper[1] === next.upper[1],
    );
    if (at >= 0) joined[at] = { ...joined[at]!, u1: next.u1 };
    else joined.push(next);
  }
  return joined;
}
