import { describe, expect, it } from 'vitest';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import { foldOntoRow } from '@/lib/physics/image/fold-row';
import { resample, type Grid } from '@/lib/physics/image/resample';
import type { Prescription } from '@/lib/physics/model/prescription';
import { typicalPrescription } from '@/tests/support/physics-cases';

/** Rows run along readout, columns along phase. */
const grid = (rows: number, columns: number, at: (row: number, column: number) => number): Grid => ({
  rows,
  columns,
  lines: Array.from({ length: rows }, (_, row) =>
    Float64Array.from({ length: columns }, (_, column) => at(row, column)),
  ),
});
const shown = (given: Grid, p: Prescription, sizePx: number) => {
  const picture = resample(given, sectionFrame(p, 0), p, sizePx);
  return { ...picture, at: (x: number, y: number) => picture.values[y * picture.widthPx + x]! };
};
const axial = (phaseAxis: 'AP' | 'RL') =>
  typicalPrescription({ phaseAxis, fovPhaseMm: 200, fovReadoutMm: 400 });

describe('the sampled picture at the asked size', () => {
  it('is even where the samples are, into every corner', () => {
    const { values } = shown(
      grid(6, 4, () => 0.7),
      axial('AP'),
      40,
    );
    expect([...values].every((value) => Math.abs(value - 0.7) < 1e-6)).toBe(true);
  });

  it('has the window’s shape, the longer side as asked, and its axes', () => {
    expect(
      shown(
        grid(6, 4, () => 1),
        axial('AP'),
        40,
      ),
    ).toMatchObject({ widthPx: 40, heightPx: 20, horizontalAxis: 'RL', verticalAxis: 'AP' });
    expect(
      shown(
        grid(6, 4, () => 1),
        axial('RL'),
        40,
      ),
    ).toMatchObject({ widthPx: 20, heightPx: 40 });
    const thin = typicalPrescription({ phaseAxis: 'AP', fovPhaseMm: 2, fovReadoutMm: 400 });
    expect(
      shown(
        grid(6, 4, () => 1),
        thin,
        40,
      ),
    ).toMatchObject({ widthPx: 40, heightPx: 1 });
  });

  it('shows each sample at its own size where the sizes agree', () => {
    // Phase down, readout across: 8 rows of samples across, 4 columns down.
    const picture = shown(
      grid(8, 4, (row, column) => 10 * row + column),
      axial('AP'),
      8,
    );
    for (let x = 0; x < 8; x++)
      for (let y = 0; y < 4; y++) expect(picture.at(x, y)).toBeCloseTo(10 * x + y, 4);
    const across = shown(
      grid(8, 4, (row, column) => 10 * row + column),
      axial('RL'),
      8,
    );
    for (let x = 0; x < 4; x++)
      for (let y = 0; y < 8; y++) expect(across.at(x, y)).toBeCloseTo(10 * y + x, 4);
  });

  it('goes straight from one sample to the next, both ways, and holds the border', () => {
    const picture = shown(
      grid(8, 4, (row, column) => 10 * row + column),
      axial('AP'),
      16,
    );
    // Twice as many pixels: a quarter of a sample from the nearest centre; the border stays.
    const along = (pixel: number, samples: number) =>
      Math.min(samples - 1, Math.max(0, (pixel + 0.5) / 2 - 0.5));
    for (let x = 0; x < 16; x++)
      for (let y = 0; y < 8; y++) expect(picture.at(x, y)).toBeCloseTo(10 * along(x, 8) + along(y, 4), 4);
  });

  it('puts superior on top, anterior and right where they come first', () => {
    const p = typicalPrescription({ plane: 'coronal', phaseAxis: 'SI', fovPhaseMm: 400, fovReadoutMm: 400 });
    // Phase runs from inferior to superior: the last column is the top line.
    const picture = shown(
      grid(4, 4, (row, column) => 10 * row + column),
      p,
      4,
    );
    for (let x = 0; x < 4; x++)
      for (let y = 0; y < 4; y++) expect(picture.at(x, y)).toBeCloseTo(10 * x + (3 - y), 4);
  });
});

describe('one row whose FOV centre lies off the origin', () => {
  // Every place tried for itself: a piece of a millimetre at p is seen where p comes back by whole widths, if inside F.
  it.each([
    [40, 300, 1],
    [-65, 340, 1],
    [40, 300, 2],
    [25, 320, 3],
    [200, 300, 1],
    [-230, 310, 2],
  ])('centre %d mm, W %d mm, R %d', (centreMm, widthMm, ghostFactor) => {
    const sampling = { centreMm, fovMm: 280, widthMm, pixels: 280, ghostFactor };
    const row = new Float64Array(280);
    foldOntoRow(row, sampling, -310.5, 420.25, 2);
    const expected = new Float64Array(280);
    for (let p = -310.5; p < 420.25; p += 0.25) {
      const at = p + 0.125;
      const folded =
        centreMm + ((((at - centreMm + widthMm / 2) % widthMm) + widthMm) % widthMm) - widthMm / 2;
      const copies = Math.abs(at - centreMm) > widthMm / 2 ? ghostFactor : 1;
      for (let k = 0; k < copies; k++) {
        const moved = folded - centreMm + (k * widthMm) / ghostFactor;
        const seen = ((((moved + widthMm / 2) % widthMm) + widthMm) % widthMm) - widthMm / 2;
        const pixel = Math.floor(seen + 140);
        if (pixel >= 0 && pixel < 280) expected[pixel]! += 0.5;
      }
    }
    // A quarter of a millimetre of brightness 2 a step; pieces begin and end between steps, up to R at a place.
    row.forEach((value, i) =>
      expect(Math.abs(value - expected[i]!), `pixel ${i}`).toBeLessThan(0.51 * ghostFactor),
    );
    expect(row.reduce((sum, value) => sum + value, 0)).toBeCloseTo(
      expected.reduce((sum, value) => sum + value, 0),
      -0.5,
    );
  });
});
