import { describe, expect, it } from 'vitest';
import { ghostWidths, mirrorMargin, mirrorPhase } from '@/lib/physics/acceleration/ghost-widths';
import { straight, valueAt } from '@/lib/physics/section/curve';
import type { RowBand } from '@/lib/physics/section/row-band';
import { seededNumbers } from '@/tests/support/seeded-numbers';

const R_STEP = 0.25;
const W_STEP = 0.25;

/**
 * The widths at which some point of tissue lies beyond W/2 and its ghost m·W/R away lies in keep-clear, by trying rows
 * and widths one after another.
 */
function tried(
  tissue: RowBand,
  clear: RowBand,
  margin: readonly [number, number],
  centre: number,
  multiple: number,
): readonly [number, number] | undefined {
  let low = Infinity;
  let high = -Infinity;
  for (let r = Math.max(tissue.r0, clear.r0) + R_STEP / 2; r < Math.min(tissue.r1, clear.r1); r += R_STEP) {
    const [a, b] = [valueAt(tissue.lower, r) - margin[0], valueAt(tissue.upper, r) + margin[1]];
    const [k, l] = [valueAt(clear.lower, r), valueAt(clear.upper, r)];
    for (let w = W_STEP; w < 900; w += W_STEP) {
      if (Math.max(a, centre + w / 2, k + multiple * w) >= Math.min(b, l + multiple * w)) continue;
      low = Math.min(low, w);
      high = Math.max(high, w);
    }
  }
  return high > low ? [low, high] : undefined;
}

describe('widths at which a ghost lies in keep-clear', () => {
  it.each([1 / 3, 1 / 2, 2 / 3, 1, 3 / 2])(
    'M = %d, sloping edges, margins of two sizes, any FOV centre',
    (multiple) => {
      const next = seededNumbers(Math.round(multiple * 60));
      const between = (low: number, high: number): number => low + next() * (high - low);
      const band = (low: number, high: number): RowBand => {
        const r0 = between(-60, -20);
        return {
          r0,
          r1: between(10, 50),
          lower: straight(low, between(-0.3, 0.3)),
          upper: straight(high, between(-0.3, 0.3)),
        };
      };
      let found = 0;
      for (let k = 0; k < 12; k++) {
        const tissue = band(between(-120, 60), between(130, 280));
        const clear = band(between(-90, -20), between(-10, 80));
        const margin = [between(0, 15), between(0, 15)] as const;
        const centre = between(-30, 30);
        const closed = ghostWidths([tissue], [clear], margin, centre, multiple);
        const sampled = tried(tissue, clear, margin, centre, multiple);
        // An end is met within a step of W, and a step of the row moves it by the edges' slopes over M: 0.3·0.25·2·3 at most.
        if (sampled === undefined) {
          expect(closed === undefined || closed[1] - closed[0] < 1.5).toBe(true);
          continue;
        }
        found++;
        expect(Math.abs(closed![0] - sampled[0])).toBeLessThan(0.75);
        expect(Math.abs(closed![1] - sampled[1])).toBeLessThan(0.75);
      }
      expect(found).toBeGreaterThan(5);
    },
  );

  it('at M = ½ asks keep-clear to reach beyond the FOV centre, whatever the width', () => {
    const tissue: RowBand = { r0: 0, r1: 100, lower: straight(100), upper: straight(250) };
    const upTo = (upper: ReturnType<typeof straight>) =>
      ghostWidths([tissue], [{ r0: 0, r1: 100, lower: straight(-80), upper }], [0, 0], 10, 0.5);
    expect(upTo(straight(9.99))).toBeUndefined();
    expect(upTo(straight(10))).toBeUndefined();
    // (b − k)/M = 660, but only below 2(b − c) = 480 does tissue lie beyond the width.
    expect(upTo(straight(10.01))![1]).toBeCloseTo(480, 9);
    expect(upTo(straight(10.01))![0]).toBeCloseTo((100 - 10.01) / 0.5, 9);
    // Reaching beyond it in some rows only: those count, from either end.
    const sloped = { r0: 0, r1: 100, lower: straight(100, 1), upper: straight(250, 1) };
    const partly = (upper: ReturnType<typeof straight>) =>
      ghostWidths([sloped], [{ r0: 0, r1: 100, lower: straight(-80), upper }], [0, 0], 0, 0.5);
    // Above the centre for r > 40, where tissue reaches up to 350 and begins at 140 or more.
    expect(partly(straight(-20, 0.5))![1]).toBeCloseTo(2 * 350, 6);
    expect(partly(straight(-20, 0.5))![0]).toBeCloseTo(2 * 140, 6);
    // By half a millimetre in the last row, or the first, is enough.
    expect(partly(straight(-49.5, 0.5))![1]).toBeCloseTo(2 * 350, 6);
    expect(partly(straight(0.5, -0.5))![1]).toBeCloseTo(2 * 251, 6);
    // Above it for r < 40: tissue reaches up to 290.
    expect(partly(straight(20, -0.5))![1]).toBeCloseTo(2 * 290, 6);
    expect(partly(straight(20, -0.5))![0]).toBeCloseTo(2 * 80, 6);
  });

  it('mirrors a band and its margin, and back', () => {
    const band: RowBand = { r0: 1, r1: 9, lower: straight(-5, 0.2), upper: straight(30, -0.1) };
    const [mirrored] = mirrorPhase([band]);
    expect([valueAt(mirrored!.lower, 4), valueAt(mirrored!.upper, 4)]).toEqual([
      -valueAt(band.upper, 4),
      -valueAt(band.lower, 4),
    ]);
    expect(mirrorMargin([3, 8])).toEqual([8, 3]);
  });
});

describe('the centre ghost of two', () => {
  it('reaches an area whose edge rises from the FOV centre, from either end of its rows', () => {
    const tissue: RowBand[] = [{ r0: -100, r1: 100, lower: straight(120), upper: straight(200) }];
    const rising = (slope: number, r0: number, r1: number, offset = 0): RowBand[] => [
      { r0, r1, lower: straight(-50), upper: straight(offset, slope) },
    ];
    // The edge lies at the centre in its first or last row, and 50 mm beyond it at the other end.
    for (const [slope, r0, r1] of [
      [0.5, 0, 100],
      [-0.5, -100, 0],
    ] as const) {
      const found = ghostWidths(tissue, rising(slope, r0, r1), [0, 0], 0, 0.5)!;
      const nearly = ghostWidths(tissue, rising(slope, r0, r1, 1e-7), [0, 0], 0, 0.5)!;
      // A ghost at p − W/2 within −50…50 of tissue 120…200 beyond W/2: 2·(120 − 50) < W < 2·200.
      expect(found[0]).toBeCloseTo(140, 4);
      expect(found[1]).toBeCloseTo(400, 4);
      expect(found[0]).toBeCloseTo(nearly[0], 4);
      expect(found[1]).toBeCloseTo(nearly[1], 4);
    }
    // Wholly on the near side of the centre there is none.
    expect(ghostWidths(tissue, rising(0.5, -100, 0), [0, 0], 0, 0.5)).toBeUndefined();
  });
});
