import type { Prescription } from '../model/prescription';
import { fatWaterShiftHz } from '../constants/larmor';
import { acquiredViewsOf } from './acquired-views';
import { ceilCount, requirePositive, requireWhole } from '../model/require-argument';

/**
 * Displacement along phase of an off-resonant spin in EPI: Δy = Δf·ESP·W/(R·shots).
 * @param offResonanceHz Δf [Hz], any sign
 * @param echoSpacingMs ESP [ms] > 0; acquiredWidthMm W [mm] > 0; factor R ≥ 1; shots whole ≥ 1
 * @returns [mm], signed like Δf
 * @throws DomainError for a width, spacing or factor that is not positive
 * Valid: Cartesian blipped EPI, one polarity of the blips. Source: [bernstein-2004], from memory.
 */
export function epiDisplacementMm(
  offResonanceHz: number,
  echoSpacingMs: number,
  acquiredWidthMm: number,
  factor: number,
  shots: number,
): number {
  requirePositive('echo-spacing-not-positive', 'echoSpacingMs', echoSpacingMs);
  requirePositive('width-not-positive', 'acquiredWidthMm', acquiredWidthMm);
  requirePositive('acceleration-not-positive', 'factor', factor);
  requireWhole('shots-not-whole', 'shots', shots, 1);
  return (offResonanceHz * (echoSpacingMs / 1000) * acquiredWidthMm) / (factor * shots);
}

/**
 * Shift of fat along the readout direction: Δx = Δf/(bandwidth per pixel) · pixel.
 * @returns pixels and mm, both > 0
 * Source: [bernstein-2004], from memory.
 */
export function chemicalShift(
  fieldStrengthT: number,
  bandwidthHzPerPixel: number,
  readoutPixelMm: number,
): { readonly hz: number; readonly pixels: number; readonly mm: number } {
  requirePositive('bandwidth-not-positive', 'bandwidthHzPerPixel', bandwidthHzPerPixel);
  requirePositive('pixel-not-positive', 'readoutPixelMm', readoutPixelMm);
  const hz = fatWaterShiftHz(fieldStrengthT);
  const pixels = hz / bandwidthHzPerPixel;
  return { hz, pixels, mm: pixels * readoutPixelMm };
}

/**
 * Minimum TE of a centre reached through the train: (f − ½)·L·ESP/(R·shots).
 * @param fraction partial Fourier f, 0.5 < f ≤ 1; factor R ≥ 1; shots: 1 for a single-shot train
 * @returns [ms] ≥ 0
 * Valid: linear ordering; reference lines in the train come on top and are not counted here.
 */
export function minimumTeMs(
  fraction: number,
  acquiredLines: number,
  echoSpacingMs: number,
  factor: number,
  shots: number,
): number {
  requirePositive('echo-spacing-not-positive', 'echoSpacingMs', echoSpacingMs);
  requirePositive('acceleration-not-positive', 'factor', factor);
  requireWhole('shots-not-whole', 'shots', shots, 1);
  return ((fraction - 0.5) * acquiredLines * echoSpacingMs) / (factor * shots);
}

/**
 * Length of the echo train that runs along phase.
 * Single-shot echo train: Y_acq·ESP; EPI: ⌈Y_acq/shots⌉·ESP. Undefined where oversampling lengthens no train.
 * @returns [ms]
 */
export function trainMs(p: Prescription): number | undefined {
  if (p.family === 'single-shot-echo-train') return acquiredViewsOf(p) * p.echoSpacingMs;
  if (p.family === 'echo-planar') return ceilCount(acquiredViewsOf(p) / p.shots) * p.echoSpacingMs;
  return undefined;
}

/** W = L·F/N of a prescription [mm]. */
export function acquiredWidthMmOf(p: Prescription): number {
  return (p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov;
}
