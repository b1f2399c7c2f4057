import { ceilCount, requirePositive, requireWhole } from '../model/require-argument';

export interface InPlaneSampling {
  readonly fovPhaseMm: number;
  readonly linesAcrossFov: number;
  readonly fovReadoutMm: number;
  readonly readoutMatrix: number;
}

/**
 * Sampling after phase and readout change places; each axis of the patient keeps its pixel:
 * N_phase' = ⌈F_readout/Δ_readout⌉, N_readout' = ⌈F_phase/Δ_phase⌉. A rectangular saving reverses
 * (300 mm/256 lines phase, 480 mm/384 readout → 480 mm and 384 lines phase). Where the scanner does not let the phase FOV exceed the
 * readout FOV, the readout FOV rises to the phase FOV at its own pixel.
 * @returns the swapped sampling and whether the readout FOV had to rise
 * @throws DomainError for a FOV that is not positive or a count that is not whole
 */
export function swapAxes(
  now: InPlaneSampling,
  phaseFovMayExceedReadoutFov: boolean,
): InPlaneSampling & { readonly readoutFovRaised: boolean } {
  requirePositive('fov-not-positive', 'fovPhaseMm', now.fovPhaseMm);
  requirePositive('fov-not-positive', 'fovReadoutMm', now.fovReadoutMm);
  requireWhole('lines-not-whole', 'linesAcrossFov', now.linesAcrossFov, 1);
  requireWhole('lines-not-whole', 'readoutMatrix', now.readoutMatrix, 1);
  const pixelPhase = now.fovPhaseMm / now.linesAcrossFov;
  const pixelReadout = now.fovReadoutMm / now.readoutMatrix;
  const raised = !phaseFovMayExceedReadoutFov && now.fovReadoutMm > now.fovPhaseMm;
  const fovReadoutMm = raised ? now.fovReadoutMm : now.fovPhaseMm;
  return {
    fovPhaseMm: now.fovReadoutMm,
    linesAcrossFov: ceilCount(now.fovReadoutMm / pixelReadout),
    fovReadoutMm,
    readoutMatrix: ceilCount(fovReadoutMm / pixelPhase),
    readoutFovRaised: raised,
  };
}
