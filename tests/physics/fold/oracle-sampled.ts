/**
 * Oracle B: fold on general cases, by looking at points. Written from the fold law and the documented meaning of the
 * model's fields; it shares no geometry with lib/physics. A hit is a proof: it names a keep-clear point y and a tissue
 * point y + i·W·phase (+ j·W_z·slice) in patient coordinates. No hit proves nothing below the sampling step.
 */
import type { FoldProblem } from '@/lib/physics/fold/fold-problem';
import type { SolidPart } from '@/lib/physics/model/patient';

type V = [number, number, number];
const DEG = Math.PI / 180;
const along = (a: readonly number[], b: readonly number[]) => a[0]! * b[0]! + a[1]! * b[1]! + a[2]! * b[2]!;

/** Right-handed rotation about a unit vector, by its matrix. */
function turn(v: V, k: V, deg: number): V {
  const c = Math.cos(deg * DEG);
  const s = Math.sin(deg * DEG);
  const [x, y, z] = k;
  const m = [
    [c + x * x * (1 - c), x * y * (1 - c) - z * s, x * z * (1 - c) + y * s],
    [y * x * (1 - c) + z * s, c + y * y * (1 - c), y * z * (1 - c) - x * s],
    [z * x * (1 - c) - y * s, z * y * (1 - c) + x * s, c + z * z * (1 - c)],
  ];
  return [along(m[0]!, v), along(m[1]!, v), along(m[2]!, v)];
}

const UNIT: Record<string, V> = { RL: [1, 0, 0], AP: [0, 1, 0], SI: [0, 0, 1] };
const IN_PLANE: Record<string, [string, string, string]> = {
  axial: ['RL', 'AP', 'SI'],
  coronal: ['RL', 'SI', 'AP'],
  sagittal: ['AP', 'SI', 'RL'],
};

/** Turned about the in-plane axis that comes first, then about the turned other one, then in the plane. */
export function oracleAxes({ prescription }: FoldProblem): { readout: V; phase: V; slice: V } {
  const [a, b, n] = IN_PLANE[prescription.plane]!;
  const phaseFirst = prescription.phaseAxis === a;
  const t1 = phaseFirst ? prescription.tiltAboutPhaseDeg : prescription.tiltAboutReadoutDeg;
  const t2 = phaseFirst ? prescription.tiltAboutReadoutDeg : prescription.tiltAboutPhaseDeg;
  const e1 = UNIT[a]!;
  const e2 = turn(UNIT[b]!, e1, t1);
  const e3 = turn(turn(UNIT[n]!, e1, t1), e2, t2);
  const first = turn(turn(e1, e2, t2), e3, prescription.inPlaneRotationDeg);
  const second = turn(e2, e3, prescription.inPlaneRotationDeg);
  return phaseFirst
    ? { readout: second, phase: first, slice: e3 }
    : { readout: first, phase: second, slice: e3 };
}

function inPart(part: SolidPart, at: V, problem: FoldProblem): boolean {
  const { shape } = part;
  if (Math.abs(at[2] - problem.isocentreZMm) >= problem.tissueReachMm) return false;
  if (shape.type === 'ellipsoid') {
    return (
      shape.semiAxesMm.reduce((sum, semi, i) => sum + ((at[i]! - shape.centreMm[i]!) / semi) ** 2, 0) < 1
    );
  }
  const axis = 'xyz'.indexOf(shape.along);
  const open = axis === 2 ? Infinity : problem.tissueReachMm;
  if (at[axis]! >= (shape.toMm ?? open) || at[axis]! <= (shape.fromMm ?? -open)) return false;
  const [u, v] = [0, 1, 2].filter((i) => i !== axis) as [number, number];
  if (shape.type === 'outline-prism') {
    let inside = false;
    for (const ring of shape.rings) {
      for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
        const [ax, ay] = ring[i]!;
        const [bx, by] = ring[j]!;
        if (ay > at[v]! !== by > at[v]! && at[u]! < ((bx - ax) * (at[v]! - ay)) / (by - ay) + ax)
          inside = !inside;
      }
    }
    return inside;
  }
  // Turn the point back about the cylinder's axis, then compare with the upright ellipse.
  const axisVector: V = [axis === 0 ? 1 : 0, axis === 1 ? 1 : 0, axis === 2 ? 1 : 0];
  const d: V = [at[0] - shape.centreMm[0], at[1] - shape.centreMm[1], at[2] - shape.centreMm[2]];
  const back = turn(d, axisVector, -(shape.rotationDeg ?? 0));
  return (back[u]! / shape.semiAxesMm[0]) ** 2 + (back[v]! / shape.semiAxesMm[1]) ** 2 < 1;
}

export interface SampledAxes {
  readonly readout: readonly [number, number];
  readonly phase: readonly [number, number];
  readonly slice: readonly [number, number];
}

/**
 * Looks for a keep-clear point that tissue folds onto at width W (and W_z).
 * @param margin  how far tissue may have moved along each section axis, towards low and high
 * @param steps   mm between points in readout and in phase
 */
export function sampledHit(
  problem: FoldProblem,
  margin: SampledAxes,
  width: number,
  slab: number | undefined,
  steps: readonly [number, number],
): boolean {
  const { prescription, keepClear } = problem;
  const { readout, phase, slice } = oracleAxes(problem);
  const { slices, acceleration } = prescription;
  const count = slices.mode === 'stack' ? slices.slices : slices.partitions;
  const pitch = slices.mode === 'stack' ? slices.thicknessMm + slices.gapMm : slices.partitionThicknessMm;
  const accelerated = acceleration.factorPhase > 1 && acceleration.unfolding === 'image-domain-grid-ends';
  const shift = accelerated ? width / acceleration.factorPhase : width;
  const parts = problem.parts.filter((part) => part.signalWeight > problem.tissueTolerance);
  const moved =
    margin.readout[0] +
      margin.readout[1] +
      margin.phase[0] +
      margin.phase[1] +
      margin.slice[0] +
      margin.slice[1] >
    0;
  const spread = ([low, high]: readonly [number, number], n: number) =>
    low + high === 0 ? [0] : Array.from({ length: n }, (_, i) => -low + ((low + high) * i) / (n - 1));
  const moves: V[] = !moved
    ? [[0, 0, 0]]
    : spread(margin.readout, 3).flatMap((a) =>
        spread(margin.phase, 2).flatMap((b) => spread(margin.slice, 7).map((c): V => [a, b, c])),
      );
  const c = prescription.centreMm;
  const { fovReadoutMm: fr, fovPhaseMm: fp } = prescription;
  const grid = (length: number, step: number) => {
    const n = Math.max(2, Math.ceil(length / step));
    // The outermost points lie a nanometre inside the edges.
    return Array.from({ length: n + 1 }, (_, i) => -length / 2 + 1e-6 + ((length - 2e-6) * i) / n);
  };
  const rows = grid(fr, steps[0]);
  const columns = grid(fp, steps[1]);
  const jMax = slab === undefined ? 0 : Math.ceil(600 / slab);
  // No part of these cases lies farther than this from the origin, so no other order needs looking at.
  const farthest = 470;
  const centreP = along(c, phase);
  const at = (r: number, p: number, s: number): V => [
    c[0] + r * readout[0] + p * phase[0] + s * slice[0],
    c[1] + r * readout[1] + p * phase[1] + s * slice[1],
    c[2] + r * readout[2] + p * phase[2] + s * slice[2],
  ];
  const clearAt = (y: V) =>
    keepClear.axes.every((axis, i) => {
      const [low, high] = keepClear.rangesMm[i as 0 | 1 | 2];
      const value = along(axis, y);
      return value > low && value < high;
    });
  for (let k = 0; k < count; k++) {
    const s = (k - (count - 1) / 2) * pitch;
    for (const r of rows) {
      for (const p of columns) {
        if (!clearAt(at(r, p, s))) continue;
        for (let j = -jMax; j <= jMax; j++) {
          // Displacement first: what is sampled at p + i·shift lies elsewhere in truth. Then the fold.
          for (const displaced of [0, ...(problem.fatShares ?? [])].map((share) => share * width)) {
            const from = Math.ceil((-farthest - centreP - p + displaced) / shift);
            const to = Math.floor((farthest - centreP - p + displaced) / shift);
            for (let i = from; i <= to; i++) {
              if (i === 0 && j === 0) continue;
              const sampledP = p + i * shift;
              if (accelerated && j === 0 && Math.abs(sampledP) <= width / 2) continue;
              for (const [dr, dp, ds] of moves) {
                const x = at(r - dr, sampledP - displaced - dp, s + j * (slab ?? 0) - ds);
                if (parts.some((part) => inPart(part, x, problem))) return true;
              }
            }
          }
        }
      }
    }
  }
  return false;
}
