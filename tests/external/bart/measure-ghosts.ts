import type { Bart } from './toolbox';

/** Samples across the phantom's reference field along both axes; a pixel is F0 / GRID. */
export const GHOST_GRID = 128;
const COILS = 8;

export interface GhostCase {
  readonly name: string;
  readonly factor: number;
  /** Acquired lines, a multiple of the factor; the width is lines / GRID of the reference field. */
  readonly lines: number;
}

/** The phantom reaches ±0.46 of the field along phase: 118 of 128 lines hold it. */
export const GHOST_CASES: readonly GhostCase[] = [
  { name: 'R 2, 96 lines', factor: 2, lines: 96 },
  { name: 'R 2, 104 lines', factor: 2, lines: 104 },
  { name: 'R 2, 112 lines', factor: 2, lines: 112 },
  { name: 'R 2, 120 lines', factor: 2, lines: 120 },
  { name: 'R 2, 124 lines', factor: 2, lines: 124 },
  { name: 'R 3, 114 lines', factor: 3, lines: 114 },
  { name: 'R 3, 120 lines', factor: 3, lines: 120 },
];

export interface MeasuredGhosts {
  readonly name: string;
  /** Share of picture energy in error, per phase pixel from −lines/2, in parts per million of the whole picture. */
  readonly errorPpm: readonly number[];
}

interface Kspace {
  readonly data: Float32Array;
}

function kspace(bart: Bart, lines: number): Kspace {
  const trajectory = new Float32Array(2 * 3 * GHOST_GRID * lines);
  for (let p = 0; p < lines; p++) {
    for (let r = 0; r < GHOST_GRID; r++) {
      const at = 2 * 3 * (r + GHOST_GRID * p);
      trajectory[at] = ((p - lines / 2) * GHOST_GRID) / lines;
      trajectory[at + 2] = r - GHOST_GRID / 2;
    }
  }
  bart.write('trajectory', { dims: [3, GHOST_GRID, lines], data: trajectory });
  bart.run('phantom', '-k', '-s', String(COILS), '-t', 'trajectory', 'signal');
  const { dims, data } = bart.read('signal');
  // The toolbox keeps coils in dimension 3; readout and phase come out in 1 and 2.
  if (dims[1] !== GHOST_GRID || dims[2] !== lines || dims[3] !== COILS) throw new Error(`unexpected dims ${dims.join('×')}`);
  return { data };
}

/** Unfolds with maps cut to the acquired width, as an image-domain method whose grid ends there would. */
function unfold(bart: Bart, lines: number, factor: number): Float32Array {
  const { data } = kspace(bart, lines);
  for (let c = 0; c < COILS; c++) {
    for (let p = 0; p < lines; p++) {
      if ((p - lines / 2) % factor === 0) continue;
      data.fill(0, 2 * GHOST_GRID * (p + lines * c), 2 * GHOST_GRID * (p + 1 + lines * c));
    }
  }
  for (let i = 0; i < data.length; i++) data[i]! *= GHOST_GRID / lines;
  bart.write('sampled', { dims: [GHOST_GRID, lines, 1, COILS], data });
  // Image-domain maps come as [long axis, short axis]; phase runs along the long one.
  bart.run('phantom', '-S', String(COILS), '-x', String(GHOST_GRID), 'maps');
  bart.run('transpose', '0', '1', 'maps', 'turned');
  bart.run('resize', '-c', '1', String(lines), 'turned', 'cut');
  bart.run('pics', '-r', '0.0001', '-i', '40', 'sampled', 'cut', 'unfolded');
  return bart.read('unfolded').data;
}

export function measureGhosts(bart: Bart, c: GhostCase): MeasuredGhosts {
  const reference = unfold(bart, GHOST_GRID, 1);
  const picture = unfold(bart, c.lines, c.factor);
  const scale = fit(picture, reference, c.lines);
  let whole = 0;
  for (const v of reference) whole += v * v;
  const skip = (GHOST_GRID - c.lines) / 2;
  const errorPpm = Array.from({ length: c.lines }, (_, p) => {
    let sum = 0;
    for (let r = 0; r < 2 * GHOST_GRID; r++) {
      sum += (picture[2 * GHOST_GRID * p + r]! * scale - reference[2 * GHOST_GRID * (p + skip) + r]!) ** 2;
    }
    return Number(((1e6 * sum) / whole).toPrecision(4));
  });
  return { name: c.name, errorPpm };
}

/** The toolbox normalises each picture for itself: least-squares scale between the two over the shared rows. */
function fit(picture: Float32Array, reference: Float32Array, lines: number): number {
  const skip = (GHOST_GRID - lines) / 2;
  let cross = 0;
  let own = 0;
  for (let i = 0; i < 2 * GHOST_GRID * lines; i++) {
    cross += picture[i]! * reference[i + 2 * GHOST_GRID * skip]!;
    own += picture[i]! ** 2;
  }
  return cross / own;
}
