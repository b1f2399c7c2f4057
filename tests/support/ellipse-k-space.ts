/**
 * Pictures of ellipses the long way round: their Fourier transform in closed form (the first Bessel function), sampled at
 * 1/W along phase and 1/F along readout, and brought back with a general-purpose FFT package (fft.js).
 * Source: transform of an ellipse, J1(2πρ)/ρ, e.g. Bracewell, The Fourier Transform and Its Applications; J1 by its
 * integral, (1/π)∫ cos(τ − x·sin τ) dτ (Abramowitz & Stegun 9.1.21), both from memory.
 */
import FFT from 'fft.js';

/** Samples along phase and readout. */
export const SIZE = 128;

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
const TABLE = Array.from({ length: 160 * 512 }, (_, i) =>
  i === 0 ? Math.PI : besselJ1(2 * Math.PI * i * TABLE_STEP) / (i * TABLE_STEP),
);
function jinc(rho: number): number {
  const at = rho / TABLE_STEP;
  const index = Math.floor(at);
  const [low, high] = [TABLE[index], TABLE[index + 1]];
  if (low === undefined || high === undefined) throw new Error(`ρ = ${rho} is beyond the table`);
  return low + (high - low) * (at - index);
}

export interface Ellipse {
  readonly r: number;
  readonly p: number;
  readonly a: number;
  readonly b: number;
  readonly turn: number;
}

/** Hamming window, so that ringing dies out within a few pixels of an edge. */
const hamming = (index: number): number => 0.54 + 0.46 * Math.cos((2 * Math.PI * index) / SIZE);

/** Image of ellipses of brightness 1 on the acquired grid: SIZE pixels over F along readout, SIZE over W along phase. */
export function fromKSpace(
  ellipses: readonly Ellipse[],
  fovReadoutMm: number,
  widthMm: number,
): Float64Array[] {
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
        const phase =
          -2 *
          Math.PI *
          (kr * (r + fovReadoutMm / 2 - fovReadoutMm / SIZE / 2) +
            kp * (p + widthMm / 2 - widthMm / SIZE / 2));
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
