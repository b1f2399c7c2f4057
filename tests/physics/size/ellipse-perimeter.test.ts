import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  breadthFromGirthAndDepth,
  ellipsePerimeter,
  TAPE_TO_ELLIPSE,
} from '@/lib/physics/size/ellipse-perimeter';
import { breadthFromMeasuredGirthAndDepth } from '@/lib/physics/size/estimate-trunk';
import { BREADTH_FROM_GIRTH, DEPTH_FROM_GIRTH_BMI_35, linear } from '@/lib/physics/size/regressions';
import { measured } from '@/tests/support/physics-cases';
import { runsOf } from '@/tests/support/tally';

/** Perimeter by the trapezoid rule, which converges geometrically on a periodic integrand. */
function perimeter(a: number, b: number): number {
  const n = 20_000;
  let sum = 0;
  for (let k = 0; k < n; k += 1) {
    const t = (2 * Math.PI * k) / n;
    sum += Math.hypot(a * Math.sin(t), b * Math.cos(t));
  }
  return (2 * Math.PI * sum) / n;
}

describe('perimeter of an ellipse (Ramanujan II, from memory)', () => {
  it('agrees with the integral to 4e-8 for bodies (axes up to 3 : 1)', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 50, max: 400, noNaN: true }),
        fc.double({ min: 1, max: 3, noNaN: true }),
        (b, ratio) => {
          // The leading error is 3·h⁵/2¹⁷ of the perimeter, h ≤ 1/4 here: 2.2e-8, and higher terms add half of that.
          expect(Math.abs(ellipsePerimeter(b * ratio, b) / perimeter(b * ratio, b) - 1)).toBeLessThan(4e-8);
        },
      ),
      { seed: 20271, numRuns: runsOf(60) },
    );
  });
  it('is exact for a circle, symmetric, and within 4.1e-4 for a flat one', () => {
    expect(ellipsePerimeter(100, 100)).toBeCloseTo(200 * Math.PI, 9);
    expect(ellipsePerimeter(100, 40)).toBe(ellipsePerimeter(40, 100));
    expect(Math.abs(ellipsePerimeter(100, 0) / 400 - 1)).toBeLessThan(4.1e-4);
  });
  it('refuses axes that are no ellipse', () => {
    for (const [a, b] of [
      [0, 0],
      [-1, 5],
      [5, Number.NaN],
      [Number.POSITIVE_INFINITY, 1],
    ] as const) {
      expect(() => ellipsePerimeter(a, b)).toThrow(
        expect.objectContaining({ code: 'semi-axes-not-positive' }),
      );
    }
  });
});

describe('breadth from girth and depth', () => {
  it('inverts the perimeter after the tape’s factor (0.949 men, 0.943 women)', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('male' as const, 'female' as const),
        fc.double({ min: 150, max: 700, noNaN: true }),
        fc.double({ min: 150, max: 450, noNaN: true }),
        (sex, breadth, depth) => {
          const girth = ellipsePerimeter(breadth / 2, depth / 2) / { male: 0.949, female: 0.943 }[sex];
          expect(breadthFromGirthAndDepth(girth, depth, sex)).toBeCloseTo(breadth, 5);
        },
      ),
      { seed: 20272 },
    );
  });
  it('without the factor breadth is 3 to 5.5 cm too large (people at the BMI ≥ 35 line)', () => {
    for (const sex of ['male', 'female'] as const) {
      for (const girth of [115, 130, 145]) {
        const depth = 10 * linear(DEPTH_FROM_GIRTH_BMI_35[sex], girth);
        const excess =
          breadthFromGirthAndDepth((girth * 10) / TAPE_TO_ELLIPSE[sex], depth, sex) -
          breadthFromGirthAndDepth(girth * 10, depth, sex);
        expect(excess).toBeGreaterThan(30);
        expect(excess).toBeLessThan(55);
      }
    }
  });
  it('agrees with the modelled breadth line within its ± 2.5 cm', () => {
    for (const sex of ['male', 'female'] as const) {
      for (const girth of [115, 130, 145]) {
        const depth = 10 * linear(DEPTH_FROM_GIRTH_BMI_35[sex], girth);
        expect(
          Math.abs(
            breadthFromGirthAndDepth(girth * 10, depth, sex) - 10 * linear(BREADTH_FROM_GIRTH[sex], girth),
          ),
        ).toBeLessThan(25);
      }
    }
  });
  it('grows with girth and falls with depth', () => {
    const at = (girth: number, depth: number) => breadthFromGirthAndDepth(girth, depth, 'female');
    expect(at(1310, 320)).toBeGreaterThan(at(1300, 320));
    expect(at(1300, 330)).toBeLessThan(at(1300, 320));
    expect(2 * at(1300, 320)).toBeCloseTo(at(2600, 640), 4);
  });
  it('refuses a girth that cannot go round that depth, naming the least', () => {
    // A flat ellipse of depth 400: 800·(1 + 4e-4)/0.949 = 843.
    expect(() => breadthFromGirthAndDepth(800, 400, 'male')).toThrow(/above 843 mm for a depth of 400 mm/);
    expect(() => breadthFromGirthAndDepth(0, 400, 'male')).toThrow(
      expect.objectContaining({ code: 'girth-not-positive' }),
    );
    expect(() => breadthFromGirthAndDepth(900, 0, 'male')).toThrow(
      expect.objectContaining({ code: 'depth-not-positive' }),
    );
  });
  it('carries the errors of girth and depth into the spread', () => {
    const girth = { ...measured(1300, 20), takenOn: '2026-05-02' };
    const depth = { ...measured(320, 10), takenOn: '2026-05-04' };
    const answer = breadthFromMeasuredGirthAndDepth(girth, depth, 'female', 42);
    const slope = (dg: number, dd: number) =>
      (breadthFromGirthAndDepth(1300 + dg, 320 + dd, 'female') -
        breadthFromGirthAndDepth(1300 - dg, 320 - dd, 'female')) /
      0.2;
    // Centred differences against the engine's one-sided ones: 1 %.
    expect(answer.spread / Math.hypot(15, slope(0.1, 0) * 20, slope(0, 0.1) * 10)).toBeCloseTo(1, 2);
    expect(answer).toMatchObject({ source: 'girth-and-depth', takenOn: '2026-05-02', extrapolated: false });
  });
});
