/** What a phantom is painted with. */
export type Tissue =
  | 'fat'
  | 'muscle'
  | 'liver'
  | 'spleen'
  | 'kidney'
  | 'fluid'
  | 'blood'
  | 'marrow'
  | 'cortex'
  | 'bowel'
  | 'gas'
  | 'gland'
  | 'grey-matter'
  | 'white-matter'
  | 'cartilage'
  | 'disc';

/** Relaxation of one tissue. */
export interface Relaxation {
  readonly t1Ms: number;
  readonly t2Ms: number;
  /** Of the free induction decay, ms. */
  readonly t2StarMs: number;
  /** Proton density relative to water [1]. */
  readonly density: number;
  /** Apparent diffusion [mm²/s]. */
  readonly diffusion: number;
}

const relaxation = (
  t1Ms: number,
  t2Ms: number,
  t2StarMs: number,
  density: number,
  diffusion: number,
): Relaxation => ({
  t1Ms,
  t2Ms,
  t2StarMs,
  density,
  diffusion,
});

/**
 * Round values at 1.5 T, so that tissues are told apart as they are in practice; nothing is decided by them.
 * Source: [bernstein-2004] tables and common practice, from memory.
 */
export const RELAXATION: Readonly<Record<Tissue, Relaxation>> = {
  fat: relaxation(300, 80, 40, 0.9, 0.0001),
  muscle: relaxation(950, 45, 28, 0.8, 0.0016),
  liver: relaxation(620, 46, 24, 0.8, 0.0011),
  spleen: relaxation(1050, 80, 40, 0.85, 0.0009),
  kidney: relaxation(1000, 85, 45, 0.86, 0.0019),
  fluid: relaxation(3200, 900, 350, 1, 0.003),
  blood: relaxation(1400, 230, 110, 0.9, 0.003),
  marrow: relaxation(420, 75, 18, 0.8, 0.0005),
  cortex: relaxation(800, 1, 0.5, 0.15, 0.0005),
  bowel: relaxation(900, 70, 30, 0.8, 0.0015),
  gas: relaxation(1000, 1, 0.5, 0, 0.003),
  gland: relaxation(900, 75, 40, 0.85, 0.0017),
  'grey-matter': relaxation(950, 100, 60, 0.85, 0.0009),
  'white-matter': relaxation(600, 80, 55, 0.72, 0.0007),
  cartilage: relaxation(1000, 40, 22, 0.7, 0.0013),
  disc: relaxation(1000, 90, 40, 0.8, 0.0015),
};
