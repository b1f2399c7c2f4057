import { describe, expect, it } from 'vitest';
import { growInReadout, hullBands } from '@/lib/physics/fold/displacement';
import { straight, valueAt } from '@/lib/physics/section/curve';
import type { RowBand } from '@/lib/physics/section/row-band';

const inside = (bands: readonly RowBand[], r: number, p: number) =>
  bands.some(
    (band) => r > band.r0 && r < band.r1 && p > valueAt(band.lower, r) && p < valueAt(band.upper, r),
  );

describe('growing a keep-clear section along readout', () => {
  // A box with its lower left corner cut off, as a tilted keep-clear box leaves it in the window.
  const cut: RowBand[] = [
    { r0: -100, r1: -80, lower: straight(-860, -8), upper: straight(60) },
    { r0: -80, r1: 70, lower: straight(-220), upper: straight(60) },
  ];

  it('is the union of the section moved by every part of the margin', () => {
    const grown = growInReadout(cut, [7, 20]);
    for (let r = -130; r < 90; r += 1.7) {
      for (let p = -230; p < 70; p += 3.3) {
        let expected = false;
        for (let d = -20; d <= 7; d += 0.05) expected ||= inside(cut, r - d, p);
        expect(inside(grown, r, p), `${r}, ${p}`).toBe(expected);
      }
    }
  });

  it('keeps edges along phase at both ends of a hull', () => {
    const bands = hullBands([
      [0, 0],
      [0, 10],
      [20, -5],
      [20, 15],
    ]);
    expect(inside(bands, 19.9, -4.8)).toBe(true);
    expect(inside(bands, 19.9, 14.8)).toBe(true);
    expect(inside(bands, 0.1, 9.9)).toBe(true);
    expect(inside(bands, 0.1, 0.1)).toBe(true);
    expect(inside(bands, 10, 13)).toBe(false);
  });
});
