import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  boreClearance,
  exactly,
  FLAT_BACK_EXPONENT,
  sectionClearance,
} from '@/lib/physics/bore/bore-clearance';
import { bodySections, type BoreSizes } from '@/lib/physics/bore/body-sections';
import type { BorePart, BoreSection, BoreSetting } from '@/lib/physics/bore/bore-types';
import { chordMm } from '@/lib/physics/bore/chord';
import { farthestPoint, type Outline } from '@/lib/physics/bore/farthest-point';
import { measured } from '@/tests/support/physics-cases';
import { runsOf } from '@/tests/support/tally';

const outline = (overrides: Partial<Outline> = {}): Outline => ({
  a: 270,
  b: 200,
  x0: 0,
  y0: 30,
  exponent: 2,
  frontRaisedMm: 0,
  ...overrides,
});
const setting = (overrides: Partial<BoreSetting> = {}): BoreSetting => ({
  bore: { diameterMm: 600, tableBelowCentreMm: 170 },
  coilMm: 0,
  padMm: 0,
  lateralOffsetMm: 0,
  ...overrides,
});
const trunk = (breadth = 540, depth = 400, overrides: Partial<BorePart> = {}): BorePart => ({
  name: 'trunk',
  breadthMm: exactly(breadth),
  depthMm: exactly(depth),
  centreMm: 0,
  raisedMm: 0,
  underCoil: true,
  ...overrides,
});
const section = (...parts: readonly BorePart[]): BoreSection => ({ name: 'trunk', zFromTargetMm: 0, parts });

/** Brute force over the outline itself, written without its parametrisation: every x, both y. */
function bruteDistance({ a, b, x0, y0, exponent, frontRaisedMm }: Outline): number {
  let most = 0;
  const n = 50_000;
  for (let k = 0; k <= n; k += 1) {
    // Cosine spacing, so that the ends, where the outline is steep, are as finely covered as the middle.
    const x = a * Math.cos((Math.PI * k) / n);
    const y = b * Math.max(0, 1 - Math.abs(x / a) ** exponent) ** (1 / exponent);
    most = Math.max(most, Math.hypot(x0 + x, y0 + y + frontRaisedMm), Math.hypot(x0 + x, y0 - y));
  }
  return most;
}

describe('the farthest point', () => {
  it('540 × 400 in a 60 bore, h 17 cm: 2.63 cm at 10.5° (the tightest place is oblique)', () => {
    const farthest = farthestPoint(outline());
    expect(300 - farthest.distanceMm).toBeCloseTo(26.3, 1);
    expect(farthest.angleDeg).toBeCloseTo(10.5, 1);
    expect(Math.hypot(...farthest.pointMm)).toBeCloseTo(farthest.distanceMm, 9);
    // Neither the side nor the front is the tightest: 28.4 and 70 mm.
    expect(farthest.distanceMm).toBeGreaterThan(Math.hypot(270, 30));
  });

  it('agrees with brute force, ellipse and superellipse, off-centre and with a coil', () => {
    fc.assert(
      fc.property(
        fc.record({
          a: fc.double({ min: 100, max: 350, noNaN: true }),
          b: fc.double({ min: 80, max: 260, noNaN: true }),
          x0: fc.double({ min: -60, max: 60, noNaN: true }),
          y0: fc.double({ min: -100, max: 100, noNaN: true }),
          exponent: fc.constantFrom(2, 2.5, 3),
          frontRaisedMm: fc.constantFrom(0, 40),
        }),
        (o) => {
          // Brute force misses the top of a maximum by at most a step of 0.02 mm squared over its radius.
          expect(Math.abs(farthestPoint(o).distanceMm - bruteDistance(o))).toBeLessThan(1e-4);
        },
      ),
      { seed: 20275, numRuns: runsOf(40) },
    );
  });

  it.each([
    [{ a: 0 }, 'semi-axis-out-of-range'],
    [{ b: Number.NaN }, 'semi-axis-out-of-range'],
    [{ exponent: 1.5 }, 'exponent-out-of-range'],
    [{ frontRaisedMm: -1 }, 'coil-out-of-range'],
  ])('refuses %o', (overrides, code) => {
    expect(() => farthestPoint(outline(overrides))).toThrow(expect.objectContaining({ code }));
  });
});

describe('clearance of a section', () => {
  it('counts the smaller of ellipse and superellipse', () => {
    const answer = sectionClearance(section(trunk()), setting());
    const superellipse = 300 - farthestPoint(outline({ exponent: FLAT_BACK_EXPONENT })).distanceMm;
    expect(answer).toMatchObject({ outline: 'superellipse', part: 'trunk', section: 'trunk' });
    expect(answer.clearanceMm).toBeCloseTo(superellipse, 9);
    expect(answer.clearanceMm).toBeLessThan(26.3);
    // For one much shallower than broad the side is the tightest, and both outlines share it.
    expect(sectionClearance(section(trunk(300, 60)), setting()).clearanceMm).toBeLessThanOrEqual(
      300 - farthestPoint(outline({ a: 150, b: 30, y0: -140 })).distanceMm,
    );
  });
  it('a coil adds in front only; a pad lifts everything; an offset takes from one side', () => {
    const at = (overrides: Partial<BoreSetting>) =>
      sectionClearance(section(trunk(400, 420)), setting(overrides)).clearanceMm;
    const base = at({});
    expect(at({ coilMm: 40 })).toBeLessThan(base);
    expect(
      sectionClearance(section(trunk(400, 420, { underCoil: false })), setting({ coilMm: 40 })).clearanceMm,
    ).toBeCloseTo(base, 9);
    expect(at({ padMm: 20 })).toBeCloseTo(
      sectionClearance(
        section(trunk(400, 420)),
        setting({ bore: { diameterMm: 600, tableBelowCentreMm: 150 } }),
      ).clearanceMm,
      9,
    );
    expect(at({ lateralOffsetMm: 30 })).toBeLessThan(base);
    expect(at({ lateralOffsetMm: 30 })).toBeCloseTo(at({ lateralOffsetMm: -30 }), 6);
  });
  it('reports a negative clearance as such', () => {
    expect(sectionClearance(section(trunk(620, 420)), setting()).clearanceMm).toBeLessThan(-10);
  });
  it('adds the errors of breadth and depth, which one girth may have caused together', () => {
    const spread = (b: number, d: number) =>
      sectionClearance(
        section(trunk(540, 400, { breadthMm: measured(540, b), depthMm: measured(400, d) })),
        setting(),
      ).spreadMm;
    expect(spread(0, 0)).toBe(0);
    expect(spread(10, 8)).toBeCloseTo(spread(10, 0) + spread(0, 8), 9);
    // Half of a breadth's error arrives at one side, at most.
    expect(spread(10, 0)).toBeLessThanOrEqual(5);
    expect(spread(10, 0)).toBeGreaterThan(2);
  });
  it('never grows with breadth or coil, nor with depth where the front is tight, and scales with everything', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 300, max: 600 }),
        fc.integer({ min: 200, max: 450 }),
        fc.integer({ min: 0, max: 60 }),
        fc.integer({ min: -40, max: 40 }),
        (breadth, depth, coilMm, lateralOffsetMm) => {
          const at = (b: number, d: number, overrides: Partial<BoreSetting> = {}) =>
            sectionClearance(section(trunk(b, d)), setting({ coilMm, lateralOffsetMm, ...overrides }))
              .clearanceMm;
          const base = at(breadth, depth);
          expect(at(breadth + 10, depth)).toBeLessThanOrEqual(base + 1e-9);
          // A deeper body stands higher on the table, which can free a place below the centre.
          if (
            sectionClearance(section(trunk(breadth, depth)), setting({ coilMm, lateralOffsetMm }))
              .pointMm[1] > 0
          ) {
            expect(at(breadth, depth + 10)).toBeLessThanOrEqual(base + 1e-9);
          }
          expect(at(breadth, depth, { coilMm: coilMm + 5 })).toBeLessThanOrEqual(base + 1e-9);
          const doubled = at(2 * breadth, 2 * depth, {
            bore: { diameterMm: 1200, tableBelowCentreMm: 340 },
            coilMm: 2 * coilMm,
            lateralOffsetMm: 2 * lateralOffsetMm,
          });
          expect(doubled).toBeCloseTo(2 * base, 5);
        },
      ),
      { seed: 20276, numRuns: runsOf(40) },
    );
  });
  it.each([
    [{ bore: { diameterMm: 60, tableBelowCentreMm: 17 } }, 'bore-out-of-range'],
    [{ bore: { diameterMm: 600, tableBelowCentreMm: 301 } }, 'table-out-of-range'],
    [{ coilMm: -1 }, 'coil-out-of-range'],
    [{ padMm: 400 }, 'pad-out-of-range'],
    [{ lateralOffsetMm: Number.NaN }, 'offset-out-of-range'],
  ])('refuses %o', (overrides, code) => {
    expect(() => sectionClearance(section(trunk()), setting(overrides))).toThrow(
      expect.objectContaining({ code }),
    );
  });
});

describe('every section inside the bore', () => {
  const sizes: BoreSizes = {
    trunkBreadthMm: measured(460, 10),
    trunkDepthMm: measured(330),
    hipBreadthMm: measured(500),
    shoulderBreadthMm: measured(520),
    shoulderDepthMm: measured(260),
    elbowBreadthMm: measured(560),
    arms: { breadthMm: 90, depthMm: 90, gapMm: 10 },
    hipsZMm: -250,
    trunkZMm: 0,
    shouldersZMm: 350,
    elbowsZMm: 500,
  };
  const names = (list: readonly { readonly name: string }[]): string[] => list.map(({ name }) => name);

  it('hips, trunk and arms feet-first; shoulders too head-first; elbows with the arms up', () => {
    expect(names(bodySections(sizes, 'feet-first-supine', 'down', 'trunk').sections)).toEqual([
      'trunk',
      'arms',
      'hips',
    ]);
    expect(names(bodySections(sizes, 'head-first-supine', 'cannot-be-raised', 'trunk').sections)).toEqual([
      'trunk',
      'arms',
      'hips',
      'shoulders',
    ]);
    expect(names(bodySections(sizes, 'head-first-prone', 'up', 'trunk').sections)).toEqual([
      'trunk',
      'hips',
      'shoulders',
      'elbows',
    ]);
  });
  it('says which sizes are not known instead of passing them', () => {
    const { hipBreadthMm, shoulderBreadthMm, elbowBreadthMm, ...rest } = sizes;
    expect([hipBreadthMm, shoulderBreadthMm, elbowBreadthMm].every(Boolean)).toBe(true);
    expect(bodySections(rest, 'head-first-supine', 'up', 'trunk').unknown).toEqual([
      'hip breadth',
      'shoulder breadth',
      'breadth over the elbows',
    ]);
    expect(bodySections(rest, 'feet-first-supine', 'up', 'trunk').unknown).toEqual(['hip breadth']);
  });
  it('arms beside the trunk reach to breadth/2 + gap + arm; arms up re-runs it without them', () => {
    const down = bodySections(sizes, 'feet-first-supine', 'down', 'trunk').sections;
    const arms = down.find(({ name }) => name === 'arms')!.parts;
    expect(arms.map(({ centreMm }) => centreMm)).toEqual([-285, 285]);
    const up = bodySections(sizes, 'feet-first-supine', 'up', 'trunk').sections;
    const tight = (list: readonly BoreSection[]) =>
      boreClearance(list, setting({ bore: { diameterMm: 700, tableBelowCentreMm: 170 } })).tightest!;
    expect(tight(down)).toMatchObject({ section: 'arms' });
    expect(tight(up)).toMatchObject({ section: 'hips' });
    expect(tight(up).clearanceMm).toBeGreaterThan(tight(down).clearanceMm);
    // The trunk's own spread reaches the arm: half of it, at most.
    expect(tight(down).spreadMm).toBeGreaterThan(3);
    expect(tight(down).spreadMm).toBeLessThanOrEqual(5.05);
  });
  it('leaves out what lies beyond the narrow part with the target at the isocentre', () => {
    const { sections } = bodySections(sizes, 'head-first-supine', 'up', 'trunk');
    const answer = boreClearance(
      sections,
      setting({ bore: { diameterMm: 700, tableBelowCentreMm: 170, halfLengthMm: 400 } }),
    );
    expect(answer.sections.map((one) => one.section)).toEqual(['trunk', 'hips', 'shoulders']);
    expect(names(answer.outside)).toEqual(['elbows']);
    expect(answer.tightest!.clearanceMm).toBe(
      Math.min(...answer.sections.map(({ clearanceMm }) => clearanceMm)),
    );
    expect(boreClearance([], setting()).tightest).toBeUndefined();
  });
  it('puts the coil where it lies', () => {
    const coiled = (on: 'trunk' | 'hips' | 'none') =>
      bodySections(sizes, 'feet-first-supine', 'up', on).sections.flatMap(({ parts }) =>
        parts.filter(({ underCoil }) => underCoil).map(({ name }) => name),
      );
    expect([coiled('trunk'), coiled('hips'), coiled('none')]).toEqual([['trunk'], ['hips'], []]);
  });
});

describe('chords', () => {
  it('17 cm below the centre: 49.4 cm (60) and 61.2 cm (70)', () => {
    expect(chordMm(600, 170)).toBeCloseTo(494, 0);
    expect(chordMm(700, 170)).toBeCloseTo(612, 0);
    expect(chordMm(600, 0)).toBe(600);
  });
  it('refuses what is not in a bore', () => {
    expect(() => chordMm(60, 17)).toThrow(expect.objectContaining({ code: 'bore-out-of-range' }));
    expect(() => chordMm(600, 301)).toThrow(expect.objectContaining({ code: 'height-out-of-range' }));
  });
});
