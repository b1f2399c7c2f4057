import { type BartPrescription, LONG_SHARE, SHORT_SHARE } from './prescriptions';
import type { Bart } from './toolbox';

/** Samples across the readout field F0; the fold along phase does not depend on it. */
const READOUT = 96;
/** Alias energy, relative to the picture in the keep-clear area, below which a width counts as clean. */
export const CLEAN_ENERGY = 5e-4;

export interface MeasuredFold {
  readonly name: string;
  /** First acquired line count, from N upwards, whose alias energy is below CLEAN_ENERGY. */
  readonly firstCleanLines: number;
  /** [lines, relative alias energy] round the threshold. */
  readonly sweep: readonly (readonly [number, number])[];
  /** Lines of the aliased profile and of the wide one (no alias), and |image| along phase summed over readout. */
  readonly foldedLines: number;
  readonly wideLines: number;
  readonly folded: readonly number[];
  readonly wide: readonly number[];
}

interface Image {
  readonly lines: number;
  /** Complex, [readout fastest], index 2·(r + READOUT·p). */
  readonly data: Float32Array;
}

/** Analytic k-space sampled at 1/W along phase, shifted, inverse transformed; scaled so that pixels compare between widths. */
function image(bart: Bart, c: BartPrescription, lines: number): Image {
  const f0 = c.longHalfMm / LONG_SHARE;
  const width = (lines * c.fovMm) / c.lines;
  const step = f0 / width;
  const trajectory = new Float32Array(2 * 3 * READOUT * lines);
  for (let p = 0; p < lines; p++) {
    for (let r = 0; r < READOUT; r++) {
      const at = 2 * 3 * (r + READOUT * p);
      const kReadout = r - READOUT / 2;
      const kPhase = (p - Math.floor(lines / 2)) * step;
      // The phantom's first axis is its long one.
      trajectory[at] = c.phaseAlong === 'long' ? kPhase : kReadout;
      trajectory[at + 2] = c.phaseAlong === 'long' ? kReadout : kPhase;
    }
  }
  bart.write('trajectory', { dims: [3, READOUT, lines], data: trajectory });
  bart.run('phantom', '-k', '-t', 'trajectory', 'kspace');
  const kspace = bart.read('kspace').data;
  for (let p = 0; p < lines; p++) {
    const angle = (-2 * Math.PI * (p - Math.floor(lines / 2)) * c.shiftMm) / width;
    const cos = Math.cos(angle);
    const sin = Math.sin(angle);
    for (let r = 0; r < READOUT; r++) {
      const at = 2 * (r + READOUT * p);
      const re = kspace[at]!;
      const im = kspace[at + 1]!;
      kspace[at] = (re * cos - im * sin) / width;
      kspace[at + 1] = (re * sin + im * cos) / width;
    }
  }
  bart.write('kspace2', { dims: [READOUT, lines], data: kspace });
  bart.run('fft', '-i', '3', 'kspace2', 'image');
  return { lines, data: bart.read('image').data };
}

function keepClearEnergy(c: BartPrescription, narrow: Image, wide: Image): number {
  const pixel = c.fovMm / c.lines;
  let difference = 0;
  let reference = 0;
  // The pixel on the very edge is shared with tissue that only touches, and touching is clean: it is left out.
  for (let i = Math.floor(c.keepClearMm[0] / pixel) + 1; i <= Math.ceil(c.keepClearMm[1] / pixel) - 1; i++) {
    const a = i + Math.floor(narrow.lines / 2);
    const b = i + Math.floor(wide.lines / 2);
    if (a < 0 || a >= narrow.lines) continue;
    for (let r = 0; r < 2 * READOUT; r++) {
      const w = wide.data[2 * READOUT * b + r]!;
      difference += (narrow.data[2 * READOUT * a + r]! - w) ** 2;
      reference += w ** 2;
    }
  }
  return difference / reference;
}

/** Real part summed over readout: linear in the picture, so folding it is exact. */
function profile(picture: Image): number[] {
  return Array.from({ length: picture.lines }, (_, p) => {
    let sum = 0;
    for (let r = 0; r < READOUT; r++) sum += picture.data[2 * (r + READOUT * p)]!;
    return Number(sum.toPrecision(7));
  });
}

export function measureFold(bart: Bart, c: BartPrescription): MeasuredFold {
  const half = c.longHalfMm * (c.phaseAlong === 'long' ? 1 : SHORT_SHARE / LONG_SHARE);
  const pixel = c.fovMm / c.lines;
  // Odd and even counts sample k-space ends differently: compare like with like, so every count swept is even.
  const wideLines = 2 * Math.ceil((2 * (half + Math.abs(c.shiftMm)) * 1.5) / pixel / 2);
  const wide = image(bart, c, wideLines);
  const sweep: [number, number][] = [];
  let lines = c.lines + (c.lines % 2);
  let below = 0;
  let firstCleanLines = 0;
  while (below < 3 && lines <= wideLines) {
    const energy = keepClearEnergy(c, image(bart, c, lines), wide);
    sweep.push([lines, Number(energy.toPrecision(4))]);
    if (energy < CLEAN_ENERGY) {
      below += 1;
      if (firstCleanLines === 0) firstCleanLines = lines;
    } else {
      below = 0;
      firstCleanLines = 0;
    }
    lines += 2;
  }
  const foldedLines = c.lines + (c.lines % 2);
  return {
    name: c.name,
    firstCleanLines,
    sweep: sweep.slice(-8),
    foldedLines,
    wideLines,
    folded: profile(image(bart, c, foldedLines)),
    wide: profile(wide),
  };
}
