import { describe, expect, it } from 'vitest';
import { armsBeside } from '@/lib/physics/body/make-part';
import { outlineTrapezoids } from '@/lib/physics/body/outline-trapezoids';
import { partSolids } from '@/lib/physics/body/part-solids';
import { presaturatedWeight } from '@/lib/physics/body/presaturated-weight';
import type { PartShape } from '@/lib/physics/model/patient';
import { typicalPatient } from '@/tests/support/physics-cases';

const solidsOf = (shape: PartShape, signalWeight = 1, tolerance = 0.05) =>
  partSolids(
    [{ name: 'a part', kind: 'other', shape, signalWeight, estimated: false }],
    { isocentreZMm: 0, tissueReachMm: 250 },
    { bands: [], b1Scale: 1, t1Ms: [300] },
    tolerance,
  );

describe('what a part may be', () => {
  it('ends in the right order and apart', () => {
    const from = (fromMm: number, toMm: number) => () =>
      solidsOf({
        type: 'elliptic-cylinder',
        along: 'z',
        centreMm: [0, 0, 0],
        semiAxesMm: [50, 40],
        fromMm,
        toMm,
      });
    expect(from(-1, 1)).not.toThrow();
    for (const [low, high] of [
      [5, 5],
      [6, 5],
    ] as const)
      expect(from(low, high)).toThrow(expect.objectContaining({ code: 'part-empty' }));
  });

  it('semi-axes above 0, however small', () => {
    const cylinder = (a: number, b: number) => () =>
      solidsOf({ type: 'elliptic-cylinder', along: 'z', centreMm: [0, 0, 0], semiAxesMm: [a, b] });
    expect(cylinder(0.5, 0.5)).not.toThrow();
    for (const [a, b] of [
      [0, 5],
      [5, 0],
      [Number.NaN, 5],
      [5, Infinity],
    ] as const) {
      expect(cylinder(a, b)).toThrow(expect.objectContaining({ code: 'semi-axis-not-positive' }));
    }
  });

  it('arms with breadth and depth, however thin', () => {
    const arms = (breadthMm: number, depthMm: number) =>
      armsBeside(typicalPatient({ arms: { position: 'down', breadthMm, depthMm, gapMm: 10 } }), {
        x: 5,
        y: -3,
        halfX: 200,
      });
    expect(arms(0, 80)).toEqual([]);
    expect(arms(80, 0)).toEqual([]);
    const [right, left] = arms(0.5, 0.8);
    expect(right!.shape).toMatchObject({ centreMm: [5 - 210.25, -3, 0], semiAxesMm: [0.25, 0.4] });
    expect(left!.shape).toMatchObject({ centreMm: [5 + 210.25, -3, 0], semiAxesMm: [0.25, 0.4] });
  });
});

describe('what presaturation may be', () => {
  it('T1 above 0, delay 0 or more', () => {
    expect(presaturatedWeight(90, 1, 0, 0.5)).toBeCloseTo(0, 12);
    expect(presaturatedWeight(90, 1, 0.5, 0.5)).toBeCloseTo(1 - Math.exp(-1), 12);
    expect(() => presaturatedWeight(90, 1, 10, 0)).toThrow(
      expect.objectContaining({ code: 't1-not-positive' }),
    );
    expect(() => presaturatedWeight(90, 1, -0.001, 300)).toThrow(
      expect.objectContaining({ code: 'delay-negative' }),
    );
  });
});

describe('what a presaturation band weakens', () => {
  const sphere: PartShape = { type: 'ellipsoid', centreMm: [0, 0, 0], semiAxesMm: [100, 100, 100] };
  const [inner, thickness] = [20, 30];
  it.each([
    ['right', [-1, 0, 0]],
    ['left', [1, 0, 0]],
    ['anterior', [0, -1, 0]],
    ['posterior', [0, 1, 0]],
    ['inferior', [0, 0, -1]],
    ['superior', [0, 0, 1]],
  ] as const)('on the %s side: what lies between its edges there, and nothing else', (side, out) => {
    const band = { side, innerEdgeMm: inner, thicknessMm: thickness, nominalFlipDeg: 80, delayMs: 10 };
    const pieces = partSolids(
      [{ name: 'a part', kind: 'other', shape: sphere, signalWeight: 1, estimated: false }],
      { isocentreZMm: 0, tissueReachMm: 250 },
      { bands: [band], b1Scale: 1, t1Ms: [300] },
      0.05,
    );
    // Points of no symmetry: no coordinate stands for another.
    for (let i = 0; i < 200; i++) {
      const point = [((i * 37) % 113) - 56, ((i * 53) % 109) - 54, ((i * 71) % 103) - 51] as const;
      const along = point[0] * out[0] + point[1] * out[1] + point[2] * out[2];
      if (along === inner || along === inner + thickness) continue;
      const holding = pieces.filter(({ solid }) =>
        solid.halfSpaces.every(
          ({ normal, limit }) => normal[0] * point[0] + normal[1] * point[1] + normal[2] * point[2] <= limit,
        ),
      );
      const under = along > inner && along < inner + thickness;
      expect(holding.map(({ weight }) => weight)).toEqual([under ? presaturatedWeight(80, 1, 10, 300) : 1]);
    }
  });
});

describe('neighbouring trapezoids', () => {
  it('are joined only when both lines are the same', () => {
    // A tent: the upper line breaks at u = 0, where both its halves have one height.
    const tent = outlineTrapezoids([
      [
        [-50, 0],
        [50, 0],
        [0, 40],
      ],
    ]);
    expect(tent).toHaveLength(2);
    // The same with the lower line broken there and the upper straight.
    expect(
      outlineTrapezoids([
        [
          [-50, 0],
          [50, 0],
          [0, -40],
        ],
      ]),
    ).toHaveLength(2);
    // A hole elsewhere breaks a square into five, joined again where nothing changes: left, right, above and below it.
    const square = [
      [-50, -50],
      [50, -50],
      [50, 50],
      [-50, 50],
    ] as const;
    const hole = [
      [-10, -10],
      [10, -10],
      [10, 10],
      [-10, 10],
    ] as const;
    expect(outlineTrapezoids([square, hole])).toHaveLength(4);
    // A break on the edge itself changes nothing.
    expect(
      outlineTrapezoids([
        [
          [-50, -50],
          [0, -50],
          [50, -50],
          [50, 50],
          [-50, 50],
        ],
      ]),
    ).toHaveLength(1);
  });
});
