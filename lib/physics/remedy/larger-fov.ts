import { nextAcquiredLines } from '../fold/acquired-lines';
import type { OpenInterval } from '../model/assessment';
import type { Case } from '../model/case';
import { figure } from '../assess/words';
import { changed, NOTHING_TO_CHANGE, refused, withPrescription, type Change } from './change';

/** Phase FOV is set in whole millimetres. */
const FOV_STEP_MM = 1;
const SLACK = 1e-9;

/** The forbidden interval that holds this width, if any; touching an end is clean. */
const forbiddenAround = (widthMm: number, forbidden: readonly OpenInterval[]): OpenInterval | undefined =>
  forbidden.find(([low, high]) => widthMm > low + SLACK && widthMm < high - SLACK);

/** Readout follows where the scanner does not let the phase FOV exceed it; its matrix keeps count or pixel. */
function readoutFor(given: Case, fovPhaseMm: number, keepPixel: boolean): Partial<Case['prescription']> {
  const { prescription: p, scanner } = given;
  if (scanner.phaseFovMayExceedReadoutFov || fovPhaseMm <= p.fovReadoutMm) return {};
  const pixel = p.fovReadoutMm / p.readoutMatrix;
  return {
    fovReadoutMm: fovPhaseMm,
    ...(keepPixel ? { readoutMatrix: Math.ceil(fovPhaseMm / pixel - SLACK) } : {}),
  };
}

const WRAPS_ALONG_SLAB = refused(
  'wraps-along-slab',
  'No larger FOV is enough: tissue from the other end of the slab lands in the keep-clear area.',
);

/**
 * Larger phase FOV at the same lines: the voxel grows, the time stays. The smallest whole-millimetre F' ≥ F whose
 * acquired width L·F'/N is clean for the frozen keep-clear area.
 */
export const largerFovSameMatrix: Change = (given, solver) => {
  const { prescription: p, scanner } = given;
  const requirement = solver.requirement(given);
  if (!Number.isFinite(requirement.alwaysCleanMm)) return WRAPS_ALONG_SLAB;
  const share = p.acquiredLines / p.linesAcrossFov;
  let fovMm = p.fovPhaseMm;
  for (let hit = forbiddenAround(fovMm * share, requirement.forbiddenMm); hit !== undefined;) {
    fovMm = Math.ceil(hit[1] / share / FOV_STEP_MM - SLACK) * FOV_STEP_MM;
    hit = forbiddenAround(fovMm * share, requirement.forbiddenMm);
  }
  if (fovMm === p.fovPhaseMm) return NOTHING_TO_CHANGE;
  if (fovMm > scanner.limits.fovMaxMm) {
    return refused(
      'fov-over-maximum',
      `A FOV of ${figure(fovMm)} mm is over this scanner's ${figure(scanner.limits.fovMaxMm)} mm.`,
    );
  }
  return changed(withPrescription(given, { fovPhaseMm: fovMm, ...readoutFor(given, fovMm, false) }));
};

/**
 * Larger phase FOV at the same pixel: lines grow with it. The smallest N' > N whose acquired width, at the same share
 * of oversampling on the scanner's grid, is clean.
 */
export const largerFovSameVoxel: Change = (given, solver) => {
  const { prescription: p, scanner } = given;
  const requirement = solver.requirement(given);
  if (!Number.isFinite(requirement.alwaysCleanMm)) return WRAPS_ALONG_SLAB;
  const pixel = p.fovPhaseMm / p.linesAcrossFov;
  const share = p.acquiredLines / p.linesAcrossFov;
  if (forbiddenAround(p.acquiredLines * pixel, requirement.forbiddenMm) === undefined)
    return NOTHING_TO_CHANGE;
  const most = Math.floor(Math.min(scanner.limits.fovMaxMm / pixel, scanner.limits.matrixMax) + SLACK);
  for (let lines = p.linesAcrossFov + 1; lines <= most; lines++) {
    const acquired = nextAcquiredLines(lines, lines * share, scanner.lineStep);
    if (acquired === undefined) continue;
    const hit = forbiddenAround(acquired * pixel, requirement.forbiddenMm);
    if (hit === undefined) {
      const fovPhaseMm = lines * pixel;
      return changed(
        withPrescription(given, {
          fovPhaseMm,
          linesAcrossFov: lines,
          acquiredLines: acquired,
          ...readoutFor(given, fovPhaseMm, true),
        }),
      );
    }
    // Nothing below the interval's end can be clean: go to the last N' that cannot reach it yet.
    lines = Math.max(lines, Math.floor(hit[1] / pixel / share) - 2);
  }
  return refused(
    'fov-over-maximum',
    `No FOV up to ${figure(most * pixel)} mm at this pixel is enough on this scanner.`,
  );
};
