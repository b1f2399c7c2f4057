import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { rowInterval, topSegments } from '@/lib/physics/image/row-intervals';
import type { Vec3 } from '@/lib/physics/model/axes';
import type { ConvexSolid, HalfSpace, Quadric } from '@/lib/physics/section/convex-solid';

const whole = (min: number, max: number) => fc.integer({ min, max });
const triple = (min: number, max: number) => fc.tuple(whole(min, max), whole(min, max), whole(min, max));

/** { x : |M(x − c)| ≤ 1 } for any matrix M: its quadric is MᵀM, whatever M is. */
const quadricOf = (rows: readonly Vec3[], centre: Vec3): Quadric => {
  const entry = (i: number, j: number) => rows.reduce((sum, row) => sum + row[i]! * row[j]!, 0);
  return {
    centre,
    xx: entry(0, 0),
    yy: entry(1, 1),
    zz: entry(2, 2),
    xy: entry(0, 1),
    xz: entry(0, 2),
    yz: entry(1, 2),
  };
};

describe('a row through a convex solid', () => {
  it('runs inside exactly where every point of it is in the solid', () => {
    const planes = fc.array(fc.record({ normal: triple(-3, 3), limit: whole(0, 120) }), { maxLength: 3 });
    fc.assert(
      fc.property(
        fc.tuple(triple(-9, 9), triple(-9, 9), triple(-9, 9)),
        triple(-30, 30),
        planes,
        whole(-60, 60),
        whole(-60, 60),
        (matrix, centre, halfSpaces: HalfSpace[], r, s) => {
          const rows = matrix.map((row) => row.map((value) => value / 500) as unknown as Vec3);
          const solid: ConvexSolid = { quadric: quadricOf(rows, centre), halfSpaces };
          /** 0 on the surface, below inside: straight from the two definitions. */
          const depth = (p: number): number => {
            const from: Vec3 = [r - centre[0], p - centre[1], s - centre[2]];
            const image = rows.map((row) => row[0] * from[0] + row[1] * from[1] + row[2] * from[2]);
            return Math.max(
              image.reduce((sum, value) => sum + value * value, 0) - 1,
              ...halfSpaces.map(({ normal, limit }) => normal[0] * r + normal[1] * p + normal[2] * s - limit),
            );
          };
          const found = rowInterval(solid, r, s);
          const wrong: number[] = [];
          for (let p = -400; p <= 400; p += 8.1) {
            const inside = found !== undefined && p > found[0] && p < found[1];
            const away = depth(p);
            // 1e-9: a point that lies on the surface itself may be told either way by rounding.
            if (Math.abs(away) > 1e-9 && inside !== away < 0) wrong.push(p);
          }
          expect(wrong).toEqual([]);
          for (const end of found ?? []) {
            // The ends lie on the surface; 1e-6 for what squares of some hundred millimetres lose.
            if (Number.isFinite(end)) expect(Math.abs(depth(end))).toBeLessThan(1e-6);
          }
        },
      ),
      { seed: 31, numRuns: 200 },
    );
  });

  it('that runs along phase inside a cylinder has no end of its own, and outside it none at all', () => {
    const cylinder: ConvexSolid = {
      quadric: quadricOf(
        [
          [0.01, 0, 0],
          [0, 0, 0.02],
        ],
        [10, 0, -5],
      ),
      halfSpaces: [],
    };
    expect(rowInterval(cylinder, 60, -5)).toEqual([-Infinity, Infinity]);
    expect(rowInterval(cylinder, 111, -5)).toBeUndefined();
    expect(rowInterval(cylinder, 10, 46)).toBeUndefined();
    // Its surface belongs to it.
    expect(rowInterval(cylinder, 110, -5)).toEqual([-Infinity, Infinity]);
  });

  it('on a face that runs along phase belongs to the solid, and beyond it does not', () => {
    const slab: ConvexSolid = {
      halfSpaces: [
        { normal: [1, 0, 0], limit: 20 },
        { normal: [0, 1, 0], limit: 7 },
        { normal: [0, -1, 0], limit: 3 },
      ],
    };
    expect(rowInterval(slab, 20, 0)).toEqual([-3, 7]);
    expect(rowInterval(slab, 20.001, 0)).toBeUndefined();
    expect(rowInterval({ halfSpaces: slab.halfSpaces.slice(1) }, 500, 0)).toEqual([-3, 7]);
  });

  it('that only touches a solid is not in it', () => {
    const sphere: ConvexSolid = {
      quadric: quadricOf(
        [
          [0.5, 0, 0],
          [0, 0.5, 0],
          [0, 0, 0.5],
        ],
        [0, 0, 0],
      ),
      halfSpaces: [],
    };
    expect(rowInterval(sphere, 2, 0)).toBeUndefined();
    expect(
      rowInterval(
        {
          halfSpaces: [
            { normal: [0, 1, 0], limit: 4 },
            { normal: [0, -1, 0], limit: -4 },
          ],
        },
        0,
        0,
      ),
    ).toBeUndefined();
  });
});

describe('stretches of a row', () => {
  it('show at every place the last layer that covers it, each stretch once', () => {
    const interval = fc.option(
      fc.tuple(whole(0, 20), whole(0, 20)).map(([a, b]) => [Math.min(a, b), Math.max(a, b)] as const),
      { nil: undefined },
    );
    fc.assert(
      fc.property(fc.array(interval, { maxLength: 6 }), (intervals) => {
        const segments = topSegments(intervals);
        const places = Array.from({ length: 20 }, (_, i) => i + 0.5);
        expect(
          places.map((at) =>
            segments.filter(({ fromMm, toMm }) => fromMm < at && at < toMm).map(({ layer }) => layer),
          ),
        ).toEqual(
          places
            .map((at) => intervals.findLastIndex((one) => one !== undefined && one[0] < at && at < one[1]))
            .map((layer) => (layer < 0 ? [] : [layer])),
        );
        // In order, none empty, and no edge where nothing changes.
        segments.forEach(({ fromMm, toMm, layer }, i) => {
          expect(toMm).toBeGreaterThan(fromMm);
          const next = segments[i + 1];
          if (next === undefined) return;
          expect(next.fromMm).toBeGreaterThanOrEqual(toMm);
          if (next.layer === layer) expect(next.fromMm).toBeGreaterThan(toMm);
        });
      }),
      { seed: 32, numRuns: 200 },
    );
  });
});
