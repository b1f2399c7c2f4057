/** The fold model against analytic k-space and a general-purpose FFT package; sources in ellipse-k-space.ts. */
import { describe, expect, it } from 'vitest';
import { foldOntoRow, type RowSampling } from '@/lib/physics/image/fold-row';
import { rowInterval } from '@/lib/physics/image/row-intervals';
import { fromKSpace, SIZE, type Ellipse } from '@/tests/support/ellipse-k-space';
import { countOf, tally } from '@/tests/support/tally';
import { seededNumbers } from '@/tests/support/seeded-numbers';

const CASES = countOf('SELVEDGE_ELLIPSE_FFT', 200);
/** The same from the fold model: each ellipse's own interval in every row, folded. */
function fromFoldModel(ellipses: readonly Ellipse[], fovReadoutMm: number, widthMm: number): Float64Array[] {
  const how: RowSampling = { centreMm: 0, fovMm: widthMm, widthMm, pixels: SIZE, ghostFactor: 1 };
  return Array.from({ length: SIZE }, (_, row) => {
    const at = -fovReadoutMm / 2 + ((row + 0.5) * fovReadoutMm) / SIZE;
    const line = new Float64Array(SIZE);
    for (const { r, p, a, b, turn } of ellipses) {
      const [c, s] = [Math.cos(turn), Math.sin(turn)];
      const [ia, ib] = [1 / (a * a), 1 / (b * b)];
      const quadric = {
        centre: [r, p, 0] as const,
        xx: c * c * ia + s * s * ib,
        yy: s * s * ia + c * c * ib,
        xy: c * s * (ia - ib),
        zz: 0,
        xz: 0,
        yz: 0,
      };
      const interval = rowInterval({ quadric, halfSpaces: [] }, at, 0);
      if (interval !== undefined) foldOntoRow(line, how, interval[0], interval[1], 1);
    }
    return line;
  });
}

/** Pixels all of whose neighbours within `reach` hold the same value: away from every edge, folded ones included. */
function awayFromEdges(rows: readonly Float64Array[], reach: number): [number, number][] {
  const found: [number, number][] = [];
  for (let u = reach; u < SIZE - reach; u++) {
    for (let v = 0; v < SIZE; v++) {
      const value = rows[u]![v]!;
      let even = Number.isInteger(Math.round(value * 1e9) / 1e9);
      for (let du = -reach; even && du <= reach; du++) {
        for (let dv = -reach; even && dv <= reach; dv++)
          even = Math.abs(rows[u + du]![(v + dv + SIZE) % SIZE]! - value) < 1e-9;
      }
      if (even) found.push([u, v]);
    }
  }
  return found;
}

describe('fold against analytic k-space and an FFT package', () => {
  it(
    `agrees away from edges in ${CASES} seeded cases`,
    () => {
      let worst = 0;
      let compared = 0;
      let folded = 0;
      for (let seed = 1; seed <= CASES; seed++) {
        const next = seededNumbers(seed);
        const between = (low: number, high: number): number => low + next() * (high - low);
        const widthMm = between(220, 420);
        const fovReadoutMm = between(480, 560);
        const trunk: Ellipse = {
          r: between(-15, 15),
          p: between(-20, 20),
          a: between(150, 200),
          b: between(120, 190),
          turn: between(-0.4, 0.4),
        };
        const arm = (side: 1 | -1): Ellipse => ({
          r: between(-60, 60),
          p: side * between(215, 330),
          a: between(25, 50),
          b: between(25, 45),
          turn: between(-1, 1),
        });
        const ellipses = next() < 0.5 ? [trunk] : [trunk, arm(1), arm(-1)];
        const model = fromFoldModel(ellipses, fovReadoutMm, widthMm);
        const image = fromKSpace(ellipses, fovReadoutMm, widthMm);
        for (const [u, v] of awayFromEdges(model, 5)) {
          worst = Math.max(worst, Math.abs(image[u]![v]! - model[u]![v]!));
          compared++;
          if (model[u]![v]! > 1.5) folded++;
        }
      }
      tally(
        'ellipse k-space and FFT against the fold model',
        CASES,
        `${compared} pixels, worst ${worst.toFixed(4)}`,
      );
      expect(compared).toBeGreaterThan(CASES * 1000);
      expect(folded).toBeGreaterThan(CASES * 20);
      // 0.02 of tissue: a Hamming window's side lobes are below 1 % beyond five pixels, and two edges can meet.
      expect(worst).toBeLessThan(0.02);
    },
    CASES * 1000,
  );
});
