import { halfPulse } from './slab-pulse';

/** Hard pulses in half the pulse: enough that the profile is within 2e-5 of the continuous Bloch equations. */
const HALF_STEPS_PER_TBW = 80;
const LEAST_HALF_STEPS = 300;
/** Grid points a slab thickness; keeps six-point interpolation of β within 1e-6. */
const POINTS_PER_TBW = 12;
/** Mirrored points before zero that the six-point stencil reaches. */
const PAD = 2;

/**
 * Response of spins along the slab axis to one slab-selective pulse, starting along +z. With Cayley–Klein β:
 * |Mxy| = 2·|β|·√(1 − β²), 1 − Mz = 2·β².
 *
 * Each hard pulse sits between two halves of its step's precession (second order in the step). A step's matrix is
 * symmetric and the pulse is symmetric in time, so the whole pulse is U = Hᵀ·H with H its first half: half the steps do,
 * and β = 2i·Im(a*·b) is purely imaginary and even in z. β is band-limited in z because the pulse is limited in time, so
 * β, not |Mxy| with its cusps, is what is tabulated and interpolated.
 * Source: [pauly-1991]; deviations: none.
 */
export class SlabResponse {
  private readonly tips: Float64Array;
  private readonly halfSteps: number;
  private readonly spacing: number;
  private beta = new Float64Array(0);
  private filled = 0;

  constructor(
    private readonly timeBandwidthProduct: number,
    flipDeg: number,
  ) {
    this.halfSteps = Math.max(LEAST_HALF_STEPS, Math.ceil(HALF_STEPS_PER_TBW * timeBandwidthProduct));
    this.tips = halfPulse(timeBandwidthProduct, flipDeg, this.halfSteps);
    this.spacing = 1 / (POINTS_PER_TBW * timeBandwidthProduct);
  }

  /** Im β at z/S from the slab centre, interpolated from the table. */
  betaAt(zOverSlab: number): number {
    const position = Math.abs(zOverSlab) / this.spacing;
    const index = Math.floor(position);
    this.fillTo(index + 4);
    return interpolate(this.beta, index, position - index);
  }

  /** Im β at z/S without the table: the pulse played step by step. */
  exactBetaAt(zOverSlab: number): number {
    // A step's precession is 2π·TBW·(z/S)/n; a spinor turns by half of it, and by a quarter before the first tip.
    const turn = (Math.PI * this.timeBandwidthProduct * zOverSlab) / (2 * this.halfSteps);
    const cos = Math.cos(turn);
    const sin = Math.sin(turn);
    const startCos = Math.cos(turn / 2);
    const startSin = Math.sin(turn / 2);
    const { tips, halfSteps } = this;
    // (a, b): the first half of the pulse applied to (1, 0).
    let ar = startCos;
    let ai = -startSin;
    let br = 0;
    let bi = 0;
    for (let k = 0; k < halfSteps; k += 1) {
      const c = tips[2 * k]!;
      const s = tips[2 * k + 1]!;
      // Tip about x: (a, b) → (c·a − i·s·b, c·b − i·s·a).
      const tar = c * ar + s * bi;
      const tai = c * ai - s * br;
      const tbr = c * br + s * ai;
      const tbi = c * bi - s * ar;
      const last = k === halfSteps - 1;
      const pc = last ? startCos : cos;
      const ps = last ? startSin : sin;
      ar = tar * pc + tai * ps;
      ai = tai * pc - tar * ps;
      br = tbr * pc - tbi * ps;
      bi = tbi * pc + tbr * ps;
    }
    return 2 * (ar * bi - ai * br);
  }

  private fillTo(index: number): void {
    if (index < this.filled) return;
    // Half a slab's thickness more at a time: most questions end within one slab of the centre.
    const wanted = index + Math.ceil(0.5 / this.spacing);
    const grown = new Float64Array(wanted + PAD);
    grown.set(this.beta);
    for (let i = this.filled; i < wanted; i += 1) grown[i + PAD] = this.exactBetaAt(i * this.spacing);
    for (let i = 1; i <= PAD; i += 1) grown[PAD - i] = grown[PAD + i]!;
    this.beta = grown;
    this.filled = wanted;
  }
}

/** Six-point Lagrange interpolation at index + t, 0 ≤ t < 1, on values stored with PAD in front. */
function interpolate(values: Float64Array, index: number, t: number): number {
  const a = t + 2;
  const b = t + 1;
  const d = t - 1;
  const e = t - 2;
  const f = t - 3;
  const i = index + PAD;
  return (
    (-b * t * d * e * f * values[i - 2]!) / 120 +
    (a * t * d * e * f * values[i - 1]!) / 24 -
    (a * b * d * e * f * values[i]!) / 12 +
    (a * b * t * e * f * values[i + 1]!) / 12 -
    (a * b * t * d * f * values[i + 2]!) / 24 +
    (a * b * t * d * e * values[i + 3]!) / 120
  );
}
