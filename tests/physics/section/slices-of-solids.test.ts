import { describe, expect, it } from 'vitest';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import type { Vec3 } from '@/lib/physics/model/axes';
import { bandRings } from '@/lib/physics/section/band-outline';
import {
  sliceDependence,
  withoutSliceEnds,
  type HalfSpace,
  type Quadric,
} from '@/lib/physics/section/convex-solid';
import { straight, valueAt } from '@/lib/physics/section/curve';
import { outlineRings } from '@/lib/physics/section/outline-rings';
import { bandsBetween, type RowBand } from '@/lib/physics/section/row-band';
import { sliceRange } from '@/lib/physics/section/slice-range';
import { splitByUsable } from '@/lib/physics/section/split-by-usable';
import { samplePrescription } from '../fold/sample-problem';

const quadric = (values: Partial<Quadric>): Quadric => ({
  centre: [0, 0, 0],
  xx: 1e-4,
  yy: 2e-4,
  zz: 0,
  xy: 0,
  xz: 0,
  yz: 0,
  ...values,
});
const plane = (normal: Vec3, limit: number): HalfSpace => ({ normal, limit });

describe('how a solid’s section depends on the slice', () => {
  it('a face across the slice ends it, on its own side', () => {
    expect(sliceDependence({ halfSpaces: [plane([0, 0, 1], 40), plane([0, 0, -2], 60)] })).toMatchObject({
      varies: false,
      coupled: false,
      lowMm: -30,
      highMm: 40,
    });
    const twice = [plane([0, 0, 1], 40), plane([0, 0, 1], 25), plane([0, 0, -1], 30), plane([0, 0, -1], 10)];
    expect(sliceDependence({ halfSpaces: twice })).toMatchObject({ lowMm: -10, highMm: 25 });
  });
  it('a face along the slice leaves all sections alike, a tilted one moves within the plane', () => {
    for (const normal of [
      [1, 0, 0],
      [0, -1, 0],
      [0.6, 0.8, 0],
    ] as const)
      expect(sliceDependence({ halfSpaces: [plane(normal, 9)] })).toMatchObject({
        varies: false,
        coupled: false,
        lowMm: -Infinity,
        highMm: Infinity,
      });
    for (const normal of [
      [0.6, 0, 0.8],
      [0, 0.6, 0.8],
      [0.5, 0.5, 0.7],
      [0.5, -0.5, -0.7],
      [-0.01, 0, 1],
    ] as const)
      expect(sliceDependence({ halfSpaces: [plane(normal, 9)] }), `${normal}`).toMatchObject({
        varies: true,
        coupled: true,
        lowMm: -Infinity,
        highMm: Infinity,
      });
  });
  it('a cylinder along the slice is alike, an ellipsoid varies, a tilted quadric moves', () => {
    const of = (values: Partial<Quadric>) => sliceDependence({ quadric: quadric(values), halfSpaces: [] });
    expect(of({})).toMatchObject({ varies: false, coupled: false });
    expect(of({ zz: 5e-5, centre: [1, 2, 33] })).toMatchObject({
      varies: true,
      coupled: false,
      widestMm: 33,
    });
    for (const values of [{ xz: 1e-5 }, { yz: 1e-5 }, { xz: 1e-5, yz: 1e-5 }, { xz: 1e-5, yz: -1e-5 }])
      expect(of({ zz: 5e-5, ...values }), JSON.stringify(values)).toMatchObject({
        varies: true,
        coupled: true,
      });
  });
  it('without its ends keeps every face that is not one', () => {
    const faces = [
      plane([0, 0, 1], 4),
      plane([0, 0, -1], 4),
      plane([1, 0, 0], 4),
      plane([0.5, -0.5, 0.7], 4),
      plane([0.5, 0.5, 0], 4),
      plane([0, -1, 0], 4),
    ];
    expect(withoutSliceEnds({ halfSpaces: faces }).halfSpaces).toEqual(faces.slice(2));
  });
});

describe('the slices a solid spans', () => {
  it('of an ellipsoid are its own, however flat it is', () => {
    for (const [a, b, c] of [
      [100, 80, 60],
      [10, 300, 900],
      [200, 200, 5],
    ] as const) {
      const q = quadric({ centre: [3, -4, 17], xx: 1 / a ** 2, yy: 1 / b ** 2, zz: 1 / c ** 2 });
      const [low, high] = sliceRange({ quadric: q, halfSpaces: [] });
      expect(low).toBeCloseTo(17 - c, 6);
      expect(high).toBeCloseTo(17 + c, 6);
    }
  });
  it('of a tilted ellipsoid are its support √(nᵀQ⁻¹n)', () => {
    // Semi-axes 100 and 40 turned by 30° in the phase–slice plane: half = √((100 sin 30°)² + (40 cos 30°)²).
    const [c, s] = [Math.cos(Math.PI / 6), Math.sin(Math.PI / 6)];
    const [ia, ib] = [1 / 100 ** 2, 1 / 40 ** 2];
    const q = quadric({
      xx: 1 / 70 ** 2,
      yy: c * c * ia + s * s * ib,
      zz: s * s * ia + c * c * ib,
      yz: c * s * (ia - ib),
    });
    expect(sliceRange({ quadric: q, halfSpaces: [] })[1]).toBeCloseTo(Math.hypot(50, 40 * c), 6);
  });
  it('of a cylinder have no end', () => {
    expect(sliceRange({ quadric: quadric({}), halfSpaces: [] })).toEqual([-Infinity, Infinity]);
  });
  it('of a wedge end at its corners', () => {
    // Below z = 10 + x/2 and above z = −5, between x = −20 and 20: corners from −5 to 20.
    const wedge = [
      plane([1, 0, 0], 20),
      plane([-1, 0, 0], 20),
      plane([0, 1, 0], 7),
      plane([0, -1, 0], 7),
      plane([-0.5, 0, 1], 10),
      plane([0, 0, -1], 5),
    ];
    const [low, high] = sliceRange({ halfSpaces: wedge });
    expect(low).toBeCloseTo(-5, 5);
    expect(high).toBeCloseTo(20, 5);
    expect(low).toBeLessThanOrEqual(-5);
    expect(high).toBeGreaterThanOrEqual(20);
  });
});

const area = (bands: readonly RowBand[]): number =>
  bands.reduce((sum, { r0, r1, lower, upper }) => {
    let own = 0;
    const n = 400;
    for (let i = 0; i < n; i++) {
      const r = r0 + ((r1 - r0) * (i + 0.5)) / n;
      own += ((valueAt(upper, r) - valueAt(lower, r)) * (r1 - r0)) / n;
    }
    return sum + own;
  }, 0);

describe('bands told apart by the usable volume', () => {
  const usable = { centreMm: [15, -20, 30], halfMm: [120, 70, 50] } as const;
  const frame = sectionFrame(samplePrescription());
  const body: RowBand[] = [{ r0: -200, r1: 180, lower: straight(-150), upper: straight(130) }];

  it('are what an ellipse about its centre holds, and all the rest', () => {
    const { within, beyond } = splitByUsable(body, usable, frame, 30);
    const ellipse = Math.PI * 120 * 70;
    // Two times forty chords of an ellipse leave out a thousandth of it.
    expect(Math.abs(area(within) / ellipse - 1)).toBeLessThan(0.002);
    expect(area(within) + beyond.reduce((sum, bands) => sum + area(bands), 0)).toBeCloseTo(380 * 280, -1);
    expect(Math.min(...within.map(({ r0 }) => r0))).toBeCloseTo(15 - 120, 6);
    expect(Math.max(...within.map(({ r1 }) => r1))).toBeCloseTo(15 + 120, 6);
    // Above, below and beside, each by itself.
    expect(beyond).toHaveLength(4);
  });
  it('past its ends along z hold nothing usable', () => {
    for (const s of [30 - 50.1, 30 + 50.1])
      expect(splitByUsable(body, usable, frame, s)).toEqual({ within: [], beyond: [body] });
    for (const s of [30 - 49.9, 30 + 49.9])
      expect(area(splitByUsable(body, usable, frame, s).within)).toBeGreaterThan(1000);
  });
  it('inside it altogether leave nothing beyond', () => {
    const small: RowBand[] = [{ r0: 0, r1: 30, lower: straight(-30), upper: straight(-10) }];
    const { within, beyond } = splitByUsable(small, usable, frame, 30);
    expect(area(within)).toBeCloseTo(600, 6);
    expect(beyond).toEqual([]);
  });
});

describe('outlines as drawn', () => {
  it('bands that continue each other are one ring, a step or a gap begins another', () => {
    const band = (r0: number, r1: number, low: number, high: number): RowBand => ({
      r0,
      r1,
      lower: straight(low),
      upper: straight(high),
    });
    expect(bandRings([band(0, 10, -5, 5), band(10, 20, -5, 5)])).toHaveLength(1);
    expect(bandRings([band(10, 20, -5, 5), band(0, 10, -5, 5)])).toHaveLength(1);
    expect(bandRings([band(0, 10, -5, 5), band(10, 20, -5, 6)])).toHaveLength(2);
    expect(bandRings([band(0, 10, -5, 5), band(10, 20, -6, 5)])).toHaveLength(2);
    expect(bandRings([band(0, 10, -5, 5), band(10.1, 20, -5, 5)])).toHaveLength(2);
    expect(bandRings([])).toEqual([]);
  });
  it('an uploaded outline belongs to slices between its ends, not to one on an end', () => {
    const shape = {
      type: 'outline-prism' as const,
      along: 'z' as const,
      rings: [
        [
          [-10, -20],
          [30, -15],
          [5, 25],
        ] as const,
      ],
      fromMm: -12,
      toMm: 18,
    };
    const at = (z: number, isocentreZMm = 0, tissueReachMm = 250) =>
      outlineRings(shape, sectionFrame(samplePrescription({ centreMm: [0, 0, z] })), {
        isocentreZMm,
        tissueReachMm,
      });
    for (const z of [-11.9, 0, 17.9])
      expect(at(z)).toEqual([
        [
          [-10, -20],
          [30, -15],
          [5, 25],
        ],
      ]);
    for (const z of [-12, 18, -12.1, 18.1, 300]) expect(at(z), `${z}`).toEqual([]);
    // Nor to what coil and magnet do not see.
    expect(at(10, 0, 9)).toEqual([]);
    expect(at(10, 0, 11)).toHaveLength(1);
    expect(at(-5, 6, 10)).toEqual([]);
    expect(at(-3, 6, 10)).toHaveLength(1);
  });
  it('a shape without a boundary on one side, or without rows, is none', () => {
    expect(bandsBetween([], [straight(5)], 0, 10)).toEqual([]);
    expect(bandsBetween([straight(0)], [], 0, 10)).toEqual([]);
    expect(bandsBetween([straight(0)], [straight(5)], 10, 0)).toEqual([]);
    expect(bandsBetween([straight(0)], [straight(5)], 0, 10)).toHaveLength(1);
  });
});
