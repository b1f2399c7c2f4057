import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { growInReadout } from '@/lib/physics/fold/displacement';
import {
  appendForbidden,
  forbiddenFrom,
  forbiddenUntilMm,
  mergeWidths,
} from '@/lib/physics/fold/forbidden-widths';
import { beyondUsable } from '@/lib/physics/fold/landed-area';
import { straight } from '@/lib/physics/section/curve';

/** Open intervals of whole micrometres, in any order, as pairs one after another. */
const intervals = fc.array(
  fc
    .tuple(fc.integer({ min: 0, max: 400 }), fc.integer({ min: 1, max: 60 }))
    .map(([low, size]) => [low, low + size] as const),
  { maxLength: 8 },
);
const holds = (all: readonly (readonly [number, number])[], width: number) =>
  all.some(([low, high]) => low < width && width < high);

describe('sets of forbidden widths', () => {
  it('merged hold the same widths as one by one, in order and apart', () => {
    fc.assert(
      fc.property(intervals, (all) => {
        const merged = mergeWidths(all.flat());
        const pairs = Array.from(
          { length: merged.length / 2 },
          (_, i) => [merged[2 * i]!, merged[2 * i + 1]!] as const,
        );
        for (let width = 0; width <= 470; width++)
          if (holds(all, width) !== holds(pairs, width)) expect.fail(`${width} of ${merged}`);
        for (const [i, [low, high]] of pairs.entries()) {
          expect(high).toBeGreaterThan(low);
          // Two that touch leave the width between them clean.
          if (i > 0) expect(low).toBeGreaterThanOrEqual(pairs[i - 1]![1]);
        }
      }),
      { seed: 41, numRuns: 200 },
    );
  });

  it('tell of every width whether it is clean, and where its interval ends', () => {
    const set = [100, 200, 200, 250, 400, 450];
    const until = (micrometres: number) => forbiddenUntilMm(set, micrometres / 1000);
    expect([99, 100, 101, 199].map(until)).toEqual([undefined, undefined, 0.2, 0.2]);
    expect([200, 201, 249, 250].map(until)).toEqual([undefined, 0.25, 0.25, undefined]);
    expect([399, 400, 401, 449, 450, 900].map(until)).toEqual([
      undefined,
      undefined,
      0.45,
      0.45,
      undefined,
      undefined,
    ]);
  });

  it('from a FOV on leave out what ends at or below it, and keep true ends', () => {
    const set = [100, 200, 300, 400, 500, 600];
    expect(forbiddenFrom(set, 0.05)).toEqual([
      [0.1, 0.2],
      [0.3, 0.4],
      [0.5, 0.6],
    ]);
    expect(forbiddenFrom(set, 0.2)).toEqual([
      [0.3, 0.4],
      [0.5, 0.6],
    ]);
    expect(forbiddenFrom(set, 0.35)).toEqual([
      [0.3, 0.4],
      [0.5, 0.6],
    ]);
    expect(forbiddenFrom(set, 0.6)).toEqual([]);
  });

  it('are those at which (n/R + κ)·W lies among the displacements, for some n ≠ 0', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -900, max: 900 }),
        fc.integer({ min: 1, max: 120 }),
        fc.constantFrom(1, 2, 3),
        fc.constantFrom(0, 0.04, -0.11),
        (low, size, factor, share) => {
          const into: number[] = [];
          appendForbidden([low, low + size], factor, share, 200, into);
          const set = mergeWidths(into);
          for (let width = 201.3; width < 1100; width += 7.7) {
            let expected = false;
            let near = false;
            for (let n = -20; n <= 20; n++) {
              if (n === 0) continue;
              const moved = (n / factor + share) * width;
              expected ||= moved > low && moved < low + size;
              near ||= Math.abs(moved - low) < 0.01 || Math.abs(moved - low - size) < 0.01;
            }
            if (!near && (forbiddenUntilMm(set, width) !== undefined) !== expected)
              expect.fail(`W ${width}, displacements ${low} to ${low + size}, R ${factor}, κ ${share}`);
          }
        },
      ),
      { seed: 42, numRuns: 150 },
    );
  });
});

describe('a keep-clear section grown along readout', () => {
  const area = [{ r0: 10, r1: 30, lower: straight(-5), upper: straight(5) }];
  it.each([
    [0, 0, 10, 30],
    [1, 0, 10, 31],
    [0, 1, 9, 30],
    [4, 0, 10, 34],
    [0, 4, 6, 30],
  ])('by %d and %d mm runs from %d to %d mm', (towardsHigh, towardsLow, from, to) => {
    const grown = growInReadout(area, [towardsHigh, towardsLow]);
    expect(Math.min(...grown.map(({ r0 }) => r0))).toBeCloseTo(from, 9);
    expect(Math.max(...grown.map(({ r1 }) => r1))).toBeCloseTo(to, 9);
  });
  it('that is empty stays empty', () => {
    expect(growInReadout([], [3, 3])).toEqual([]);
  });
});

describe('tissue beyond the usable volume', () => {
  // Elliptic across, centred off the origin, with flat ends along z.
  const usable = { centreMm: [20, -35, 50], halfMm: [100, 80, 60] } as const;
  it('is what lies outside its ellipse or past its ends', () => {
    const at = (x: number, y: number, z: number) => beyondUsable(usable, [20 + x, -35 + y, 50 + z]);
    for (const [x, y, z] of [
      [0, 0, 0],
      [99, 0, 0],
      [-99, 0, 59],
      [0, 79, -59],
      [0, -79, 0],
      [70, 56, 0],
      [-70, -56, 0],
    ] as const)
      expect(at(x, y, z), `${x}, ${y}, ${z}`).toBe(false);
    for (const [x, y, z] of [
      [101, 0, 0],
      [-101, 0, 0],
      [0, 81, 0],
      [0, -81, 0],
      [0, 0, 61],
      [0, 0, -61],
      [72, 58, 0],
      [-72, 58, 0],
      [90, 40, 0],
    ] as const)
      expect(at(x, y, z), `${x}, ${y}, ${z}`).toBe(true);
  });
});
