/**
 * The fold model against k-space: ellipses whose Fourier transform is known in closed form (the first Bessel function),
 * sampled at 1/W along phase and 1/F along readout, and brought back with a general-purpose FFT package (fft.js).
 * Source: transform of an ellipse, J1(2πρ)/ρ, e.g. Bracewell, The Fourier Transform and Its Applications; J1 by its
 * integral, (1/π)∫ cos(τ − x·sin τ) dτ (Abramowitz & Stegun 9.1.21), both from memory.
 */
import FFT from 'fft.js';
import { describe, expect, it } from 'vitest';
import { foldOntoRow, type RowSampling } from '@/lib/physics/image/fold-row';
import { rowInterval } from '@/lib/physics/image/row-intervals';
import { countOf, tally } from '@/tests/support/tally';
import { seededNumbers } from '@/tests/support/seeded-numbers';

const CASES = countOf('SELVEDGE_ELLIPSE_FFT', 200);
const SIZE = 128;

/** Trapezoid rule on a periodic integrand: exact to a double's last bits once the points outnumber the argument. */
function besselJ1(x: number): number {
  const points = Math.ceil(Math.abs(x)) + 24;
  let sum = 0;
  for (let k = 0; k < points; k++) {
    const angle = (Math.PI * (k + 0.5)) / points;
    sum += Math.cos(angle - x * Math.sin(angle));
  }
  return sum / points;
}

/** J1(2πρ)/ρ on a fine table, read by straight lines: the ellipse's transform needs it some million times. */
const TABLE_STEP = 1 / 512;
const TABLE = Array.from({ length: 160 * 512 }, (_, i) => (i === 0 ? Math.PI : besselJ1(2 * Math.PI * i * TABLE_STEP) / (i * TABLE_STEP)));
function jinc(rho: number): number {
  const at = rho / TABLE_STEP;
  const index = Math.floor(at);
  const [low, high] = [TABLE[index], TABLE[index + 1]];
  if (low === undefined || high === undefined) throw new Error(`ρ = ${rho} is beyond the table`);
  return low + (high - low) * (at - index);
}

interface Ellipse {
  readonly r: number;
  readonly p: number;
  readonly a: number;
  readonly b: number;
  readonly turn: number;
}

/** Hamming window, so that ringing dies out within a few pixels of an edge. */
const hamming = (index: number): number => 0.54 + 0.46 * Math.cos((2 * Math.PI * index) / SIZE);

/** Image of the ellipses on the acquired grid: SIZE pixels over F along readout, SIZE over W along phase. */
function fromKSpace(ellipses: readonly Ellipse[], fovReadoutMm: number, widthMm: number): Float64Array[] {
  const transform = new FFT(SIZE);
  const columns: number[][] = [];
  for (let u = 0; u < SIZE; u++) {
    const ku = u < SIZE / 2 ? u : u - SIZE;
    const line = transform.createComplexArray() as number[];
    for (let v = 0; v < SIZE; v++) {
      const kv = v < SIZE / 2 ? v : v - SIZE;
      const [kr, kp] = [ku / fovReadoutMm, kv / widthMm];
      let real = 0;
      let imaginary = 0;
      for (const { r, p, a, b, turn } of ellipses) {
        const [c, s] = [Math.cos(turn), Math.sin(turn)];
        const rho = Math.hypot(a * (kr * c + kp * s), b * (kp * c - kr * s));
        const size = a * b * jinc(rho);
        // Pixel centres start half a pixel inside the edges of the sampled field.
        const phase = -2 * Math.PI * (kr * (r + fovReadoutMm / 2 - fovReadoutMm / SIZE / 2) + kp * (p + widthMm / 2 - widthMm / SIZE / 2));
        real += size * Math.cos(phase);
        imaginary += size * Math.sin(phase);
      }
      const filter = hamming(ku) * hamming(kv);
      line[2 * v] = real * filter;
      line[2 * v + 1] = imaginary * filter;
    }
    const back = transform.createComplexArray() as number[];
    transform.inverseTransform(back, line);
    columns.push(back);
  }
  const rows = Array.from({ length: SIZE }, () => new Float64Array(SIZE));
  for (let v = 0; v < SIZE; v++) {
    const line = transform.createComplexArray() as number[];
    for (let u = 0; u < SIZE; u++) {
      line[2 * u] = columns[u]![2 * v]!;
      line[2 * u + 1] = columns[u]![2 * v + 1]!;
    }
    const back = transform.createComplexArray() as number[];
    transform.inverseTransform(back, line);
    for (let u = 0; u < SIZE; u++) rows[u]![v] = (back[2 * u]! * SIZE * SIZE) / (fovReadoutMm * widthMm);
  }
  return rows;
}

/** The same from the fold model: each ellipse's own interval in every row, folded. */
function fromFoldModel(ellipses: readonly Ellipse[], fovReadoutMm: number, widthMm: number): Float64Array[] {
  const how: RowSampling = { centreMm: 0, fovMm: widthMm, widthMm, pixels: SIZE, ghostFactor: 1 };
  return Array.from({ length: SIZE }, (_, row) => {
    const at = -fovReadoutMm / 2 + ((row + 0.5) * fovReadoutMm) / SIZE;
    const line = new Float64Array(SIZE);
    for (const { r, p, a, b, turn } of ellipses) {
      const [c, s] = [Math.cos(turn), Math.sin(turn)];
      const [ia, ib] = [1 / (a * a), 1 / (b * b)];
      const quadric = { centre: [r, p, 0] as const, xx: c * c * ia + s * s * ib, yy: s * s * ia + c * c * ib, xy: c * s * (ia - ib), zz: 0, xz: 0, yz: 0 };
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
        for (let dv = -reach; even && dv <= reach; dv++) even = Math.abs(rows[u + du]![(v + dv + SIZE) % SIZE]! - value) < 1e-9;
      }
      if (even) found.push([u, v]);
    }
  }
  return found;
}

describe('fold against analytic k-space and an FFT package', () => {
  it(`agrees away from edges in ${CASES} seeded cases`, () => {
    let worst = 0;
    let compared = 0;
    let folded = 0;
    for (let seed = 1; seed <= CASES; seed++) {
      const next = seededNumbers(seed);
      const between = (low: number, high: number): number => low + next() * (high - low);
      const widthMm = between(220, 420);
      const fovReadoutMm = between(480, 560);
      const trunk: Ellipse = { r: between(-15, 15), p: between(-20, 20), a: between(150, 200), b: between(120, 190), turn: between(-0.4, 0.4) };
      const arm = (side: 1 | -1): Ellipse => ({ r: between(-60, 60), p: side * between(215, 330), a: between(25, 50), b: between(25, 45), turn: between(-1, 1) });
      const ellipses = next() < 0.5 ? [trunk] : [trunk, arm(1), arm(-1)];
      const model = fromFoldModel(ellipses, fovReadoutMm, widthMm);
      const image = fromKSpace(ellipses, fovReadoutMm, widthMm);
      for (const [u, v] of awayFromEdges(model, 5)) {
        worst = Math.max(worst, Math.abs(image[u]![v]! - model[u]![v]!));
        compared++;
        if (model[u]![v]! > 1.5) folded++;
      }
    }
    tally('ellipse k-space and FFT against the fold model', CASES, `${compared} pixels, worst ${worst.toFixed(4)}`);
    expect(compared).toBeGreaterThan(CASES * 1000);
    expect(folded).toBeGreaterThan(CASES * 20);
    // 0.02 of tissue: a Hamming window's side lobes are below 1 % beyond five pixels, and two edges can meet.
    expect(worst).toBeLessThan(0.02);
  }, CASES * 1000);
});
