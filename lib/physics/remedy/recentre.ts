import { unfoldingOf, isAccelerated } from '../assess/resolve-unfolding';
import { AXIS_LETTERS, figure } from '../assess/words';
import { windowRegion, type OrientedRegion } from '../geometry/oriented-region';
import { sectionFrame } from '../geometry/section-frame';
import { add, dot, scale } from '../geometry/vector';
import type { Vec3 } from '../model/axes';
import {
  changed,
  NOTHING_TO_CHANGE,
  refused,
  withPrescription,
  type Change,
  type TargetedCase,
} from './change';

const regionMoved = (region: OrientedRegion, by: Vec3): OrientedRegion => ({
  axes: region.axes,
  rangesMm: region.rangesMm.map(([low, high], i) => {
    const shift = dot(by, region.axes[i as 0 | 1 | 2]);
    return [low + shift, high + shift] as const;
  }) as unknown as OrientedRegion['rangesMm'],
});

/** The area after the window moved: it goes along only where the case says so. */
function followed(given: TargetedCase, planned: TargetedCase, by: Vec3): TargetedCase {
  if (!given.keepClear.followsWindow || given.keepClear.mustStayDisplayed === undefined) return planned;
  const { area } = given.keepClear;
  if (area.kind === 'whole-picture') return { ...planned, frozen: windowRegion(planned.prescription) };
  return given.frozen === undefined ? planned : { ...planned, frozen: regionMoved(given.frozen, by) };
}

/** Ghosts of a grid that ends at W depend on the centre; plain fold onto an area fixed in the patient does not. */
const centreMatters = (given: TargetedCase): boolean =>
  (given.keepClear.followsWindow && given.keepClear.mustStayDisplayed !== undefined) ||
  (isAccelerated(given.prescription) && ['image-domain-grid-ends', 'unknown'].includes(unfoldingOf(given)));

/**
 * FOV centre moved along phase to the middle of the body (margin included), or as far towards it as keeps what must
 * stay in the picture. Whole millimetres.
 */
export const recentre: Change = (given, solver) => {
  if (!centreMatters(given)) {
    return refused(
      'recentring-changes-nothing',
      'Moving the FOV centre changes nothing here: fold depends on the acquired width alone.',
    );
  }
  const frame = sectionFrame(given.prescription, 0);
  const [low, high] = solver.bodyAlongPhaseMm(given);
  const wanted = Math.round((low + high) / 2 - frame.centrePhaseMm);
  for (let moveMm = wanted; moveMm !== 0; moveMm -= Math.sign(moveMm)) {
    const by = scale(frame.phase, moveMm);
    const moved = withPrescription(given, { centreMm: add(given.prescription.centreMm, by) });
    const planned = followed(given, moved, by);
    if (solver.leavesPicture(planned) !== undefined) continue;
    return changed(
      planned,
      `FOV centre ${figure(Math.abs(moveMm))} mm along ${AXIS_LETTERS[frame.phaseAxis]}`,
    );
  }
  if (wanted === 0) return NOTHING_TO_CHANGE;
  return refused(
    'area-leaves-picture',
    'Not possible: the area leaves the picture when the FOV centre moves.',
  );
};
