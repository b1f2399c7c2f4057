import { PLANE_AXES } from '../geometry/section-frame';
import { swapAxes } from '../sequence/swap-axes';
import { figure } from '../assess/words';
import { changed, withPrescription, type Change } from './change';
import { nextAcquiredLines } from '../fold/acquired-lines';

/**
 * Phase and readout change places; each patient axis keeps its pixel and the swapped phase direction starts without
 * oversampling. Where the scanner does not let the phase FOV exceed the readout FOV, the readout FOV rises.
 */
export const swapDirection: Change = (given) => {
  const { prescription: p, scanner } = given;
  const { readoutFovRaised, ...sampling } = swapAxes(p, scanner.phaseFovMayExceedReadoutFov);
  const axes = PLANE_AXES[p.plane];
  const phaseAxis = p.phaseAxis === axes[0] ? axes[1] : axes[0];
  const acquiredLines = nextAcquiredLines(sampling.linesAcrossFov, sampling.linesAcrossFov, scanner.lineStep);
  const sideEffects = ['Motion ghosts and chemical shift change direction'];
  if (readoutFovRaised) sideEffects.push(`Readout FOV rises to ${figure(sampling.fovReadoutMm)} mm`);
  if (p.family === 'echo-planar') sideEffects.push('EPI displacement changes direction');
  // Which end fat is displaced to was known for the old direction only.
  const { fatDisplacedTowards: _, ...unswapped } = p;
  return changed(
    withPrescription({ ...given, prescription: unswapped }, {
      phaseAxis,
      ...sampling,
      acquiredLines: acquiredLines ?? sampling.linesAcrossFov,
      tiltAboutReadoutDeg: p.tiltAboutPhaseDeg,
      tiltAboutPhaseDeg: p.tiltAboutReadoutDeg,
    }),
    ...sideEffects,
  );
};
