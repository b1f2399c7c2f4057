import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Interval } from '@/lib/physics/fold/displacement';
import { overSliceMargin, tissueSolids } from '@/lib/physics/fold/tissue-sections';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import type { RowBand } from '@/lib/physics/section/row-band';
import { samplePrescription, sampleProblem } from './sample-problem';

/**
 * A tilted ellipsoid much larger than any slice asked for. Its sections move along phase as the slice does, in proportion,
 * so each section's slice coordinate can be read from it, and any function of the slice can be searched.
 */
const prescription = samplePrescription({ tiltAboutReadoutDeg: 20 });
const [solid] = tissueSolids(
  sampleProblem(
    [
      {
        name: 'part',
        kind: 'other',
        shape: { type: 'ellipsoid', centreMm: [0, 0, 0], semiAxesMm: [300, 150, 240] },
        signalWeight: 1,
        estimated: false,
      },
    ],
    prescription,
  ),
  sectionFrame(prescription),
);
const { yy, yz } = solid!.solid.quadric!;
const sliceOf = ([band]: readonly RowBand[]): number =>
  ((band!.lower.offset + band!.upper.offset) / 2) * (-yy / yz);

/** A search of [s − low, s + high], and how many sections it looked at. */
function search(
  high: (s: number) => number | undefined,
  [from, to]: readonly [number, number],
  covered?: readonly Interval[],
): { found: Interval | undefined; sections: number } {
  let sections = 0;
  const at = 5;
  const found = overSliceMargin(
    solid!,
    at,
    [to - at, at - from],
    (bands) => {
      sections++;
      const value = high(sliceOf(bands));
      return value === undefined ? undefined : [-2 * value, value];
    },
    covered,
  );
  return { found, sections };
}

const RANGE = [-35, 45] as const;
/** The search ends at 1e-5 of the range, 0.8 µm; slopes below are 4 at most. */
const NEAR = 4e-3;

describe('the search of the sections that tissue may bring', () => {
  it('finds the top of any hill, wherever it lies and wherever the sections end', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -60, max: 70 }),
        fc.constantFrom(0.004, 0.02),
        fc.tuple(fc.integer({ min: -40, max: 50 }), fc.integer({ min: 1, max: 100 })),
        (top, steepness, [begins, length]) => {
          const ends = begins + length;
          const hill = (s: number) => (s < begins || s > ends ? undefined : 50 - steepness * (s - top) ** 2);
          const [low, high] = [Math.max(RANGE[0], begins), Math.min(RANGE[1], ends)];
          const { found } = search(hill, RANGE);
          // Sections 20 mm apart are looked at first: what lies between two of them may be passed over.
          const seen = [-35, -15, 5, 25, 45].some((s) => s > begins && s < ends);
          if (!seen) return;
          const best = hill(Math.min(Math.max(top, low), high))!;
          expect(Math.abs(found![1] - best)).toBeLessThan(NEAR);
          expect(Math.abs(found![0] + 2 * best)).toBeLessThan(2 * NEAR);
        },
      ),
      { seed: 51, numRuns: 300 },
    );
  });

  it('finds both ends of an interval where its low end and its high end have their best apart', () => {
    const two = overSliceMargin(solid!, 5, [40, 40], (bands) => {
      const s = sliceOf(bands);
      return [-30 + 0.01 * (s - 12) ** 2, 20 - 0.02 * (s + 23) ** 2];
    })!;
    expect(two[0]).toBeCloseTo(-30, 4);
    expect(two[1]).toBeCloseTo(20, 4);
  });

  it('leaves out only what is covered already', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -60, max: 70 }),
        fc.constantFrom(0.004, 0.02, 0.08),
        fc.integer({ min: -10, max: 60 }),
        fc.integer({ min: -20, max: 120 }),
        (top, steepness, upTo, downTo) => {
          const hill = (s: number) => 50 - steepness * (s - top) ** 2;
          const known: Interval = [-downTo, upTo];
          const best = hill(Math.min(Math.max(top, RANGE[0]), RANGE[1]));
          const { found } = search(hill, RANGE, [[-900, -800], known]);
          const high = Math.max(found![1], known[1]);
          const low = Math.min(found![0], known[0]);
          expect(high).toBeGreaterThan(Math.max(best, known[1]) - NEAR);
          expect(low).toBeLessThan(Math.min(-2 * best, known[0]) + 2 * NEAR);
          // Never more than there is.
          expect(found![1]).toBeLessThan(best + 1e-9);
        },
      ),
      { seed: 52, numRuns: 300 },
    );
  });

  it('is left out where five sections tell that nothing lies beyond', () => {
    const slope = (s: number) => 0.5 * s;
    // −17.5 to 22.5 along the range: covered to the last, and not quite.
    expect(search(slope, RANGE, [[-100, 22.5 + 1e-9]]).sections).toBe(5);
    expect(search(slope, RANGE, [[-100, 22.4]]).sections).toBeGreaterThan(5);
    expect(search(slope, RANGE, [[-44.9, 100]]).sections).toBeGreaterThan(5);
    // What does not meet the answer covers nothing of it.
    expect(search(slope, RANGE, [[23, 100]]).sections).toBeGreaterThan(5);
    expect(search(slope, RANGE).sections).toBeGreaterThan(5);
    // Level where there are sections at all, and none at one end.
    for (const level of [
      (s: number) => (s > 30 ? undefined : 7),
      (s: number) => (s < -20 ? undefined : 7),
      (s: number) => (s < -20 || s > 30 ? undefined : 7),
    ])
      expect(search(level, RANGE, [[-20, 9]]).sections).toBe(5);
    // Two sections alone do not bound a hill.
    expect(search((s) => (s < 20 ? undefined : 7), RANGE, [[-20, 9]]).sections).toBeGreaterThan(5);
  });

  it.each([
    [0, 0],
    [1, 0],
    [0, 1],
    [7, 0],
    [0, 7],
    [7, 3],
  ])('looks %d mm one way and %d mm the other, and no further', (towardsHigh, towardsLow) => {
    const of = (value: (s: number) => number) =>
      overSliceMargin(solid!, 5, [towardsHigh, towardsLow], (bands) => [0, value(sliceOf(bands))])![1];
    expect(of((s) => 100 + s)).toBeCloseTo(105 + towardsHigh, 6);
    expect(of((s) => 100 - s)).toBeCloseTo(95 + towardsLow, 6);
  });

  it('of tissue that no section of the range meets finds nothing', () => {
    expect(search(() => undefined, RANGE).found).toBeUndefined();
    expect(overSliceMargin(solid!, 900, [5, 5], () => [0, 1])).toBeUndefined();
    expect(overSliceMargin(solid!, 900, [0, 0], () => [0, 1])).toBeUndefined();
  });
});
