import type { Vec3 } from '../model/axes';
import { cross, dot, scale } from '../geometry/vector';
import type { ConvexSolid, HalfSpace, Quadric } from './convex-solid';

/** Slack for a corner that lies on its own planes [mm]: rounding of a 3 × 3 solution with lengths under a metre. */
const ON_PLANE_MM = 1e-6;

/**
 * Slice coordinates a solid (in section axes) spans, mm: by an ellipsoid's support, by a polytope's corners, infinite
 * where neither ends it. A bound, never too small; exact for a whole ellipsoid and for a bounded polytope (an
 * unbounded one has corners but is not ended by them; the body's solids are all bounded).
 */
export function sliceRange(solid: ConvexSolid): readonly [low: number, high: number] {
  return solid.quadric ? ellipsoidRange(solid.quadric) : polytopeRange(solid.halfSpaces);
}

function ellipsoidRange(q: Quadric): readonly [number, number] {
  const minor = q.xx * q.yy - q.xy * q.xy;
  const determinant = q.zz * minor - q.xz * (q.xz * q.yy - q.xy * q.yz) + q.yz * (q.xz * q.xy - q.xx * q.yz);
  const scale = q.xx + q.yy + q.zz;
  // A cylinder (rank 2) has no end of its own.
  if (!(determinant > 1e-12 * scale ** 3)) return [-Infinity, Infinity];
  const half = Math.sqrt(minor / determinant);
  return [q.centre[2] - half, q.centre[2] + half];
}

function polytopeRange(given: readonly HalfSpace[]): readonly [number, number] {
  // Unit normals, so that a slack is a length and a determinant a sine.
  const planes = given.map(({ normal, limit }) => {
    const size = Math.sqrt(dot(normal, normal));
    return { normal: scale(normal, 1 / size), limit: limit / size };
  });
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < planes.length; i++)
    for (let j = i + 1; j < planes.length; j++)
      for (let k = j + 1; k < planes.length; k++) {
        const corner = meeting(planes[i]!, planes[j]!, planes[k]!);
        if (!corner || planes.some(({ normal, limit }) => dot(normal, corner) > limit + ON_PLANE_MM))
          continue;
        low = Math.min(low, corner[2]);
        high = Math.max(high, corner[2]);
      }
  return low > high ? [-Infinity, Infinity] : [low - ON_PLANE_MM, high + ON_PLANE_MM];
}

function meeting(a: HalfSpace, b: HalfSpace, c: HalfSpace): Vec3 | undefined {
  const bc = cross(b.normal, c.normal);
  const determinant = dot(a.normal, bc);
  // Parallel planes; a sine of 1e-9 is far below any tilt that can be typed.
  if (Math.abs(determinant) < 1e-9) return undefined;
  const ca = cross(c.normal, a.normal);
  const ab = cross(a.normal, b.normal);
  const along = (i: 0 | 1 | 2) => (a.limit * bc[i] + b.limit * ca[i] + c.limit * ab[i]) / determinant;
  return [along(0), along(1), along(2)];
}
