import type { Prescription } from '../model/prescription';
import { RELAXATION, type Tissue } from './tissues';

const RADIANS = Math.PI / 180;
/** Diffusion weighting of the echo-planar picture that is shown [s/mm²]. */
const DIFFUSION_WEIGHTING = 500;
/** What fat suppression leaves where the field is even. */
export const FAT_LEFT_BY_SUPPRESSION = 0.12;
/** Flow leaves vessels dark in spin echoes. */
const FLOW_VOID = 0.15;

const recovered = (timeMs: number, t1Ms: number): number => 1 - Math.exp(-timeMs / t1Ms);
const decayed = (timeMs: number, t2Ms: number): number => Math.exp(-timeMs / t2Ms);

/**
 * Signal of a tissue relative to freely recovered water, in the family's usual equation: spin echo
 * ρ(1 − E1)·E2; spoiled gradient echo ρ·sin α·(1 − E1)/(1 − cos α·E1)·E2*; balanced ρ·sin α·(1 − E1)/(1 − (E1 − E2)cos α − E1·E2)·√E2.
 * @returns [1] ≥ 0
 * Valid: contrast for the eye; magnetisation transfer, flow and echo-train blurring are left out.
 * Source: [bernstein-2004], from memory.
 */
export function tissueSignal(tissue: Tissue, p: Prescription): number {
  const { t1Ms, t2Ms, t2StarMs, density, diffusion } = RELAXATION[tissue];
  const flowing = tissue === 'blood' ? FLOW_VOID : 1;
  const flip = p.flipDeg * RADIANS;
  const e1 = Math.exp(-p.trMs / t1Ms);
  const e2 = Math.exp(-p.trMs / t2Ms);
  switch (p.family) {
    case 'spin-echo':
    case 'echo-train-spin-echo':
    case 'echo-train-spin-echo-3d':
      return density * (1 - e1) * decayed(p.teMs, t2Ms) * flowing;
    case 'single-shot-echo-train':
      return density * decayed(p.teMs, t2Ms) * flowing;
    case 'echo-planar':
      return (
        density * recovered(p.trMs, t1Ms) * decayed(p.teMs, t2Ms) * Math.exp(-DIFFUSION_WEIGHTING * diffusion)
      );
    case 'gradient-echo':
    case 'gradient-echo-3d':
      return ((density * Math.sin(flip) * (1 - e1)) / (1 - Math.cos(flip) * e1)) * decayed(p.teMs, t2StarMs);
    case 'balanced':
      return (
        ((density * Math.sin(flip) * (1 - e1)) / (1 - (e1 - e2) * Math.cos(flip) - e1 * e2)) * Math.sqrt(e2)
      );
  }
}
