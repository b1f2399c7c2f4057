import type { WidthRequirement } from '../model/assessment';
import type { Case } from '../model/case';
import { figure } from '../assess/words';
import {
  changed,
  NOTHING_TO_CHANGE,
  refused,
  withPrescription,
  type Change,
  type ChangeResult,
} from './change';

/** Which width is asked for: the first clean one, or the one from which every larger width is clean too. */
export type WidthTarget = 'first-clean' | 'always-clean';

function toLines(given: Case, requirement: WidthRequirement, target: WidthTarget): ChangeResult {
  const { prescription: p, scanner } = given;
  const widthMm = target === 'first-clean' ? requirement.firstCleanMm : requirement.alwaysCleanMm;
  const lines = target === 'first-clean' ? requirement.firstCleanLines : requirement.alwaysCleanLines;
  if (!Number.isFinite(widthMm)) {
    return refused(
      'wraps-along-slab',
      'No phase oversampling is enough: tissue from the other end of the slab lands in the keep-clear area.',
    );
  }
  if (lines === undefined) {
    const percent = figure((widthMm / p.fovPhaseMm - 1) * 100);
    return refused(
      'phase-oversampling-over-maximum',
      `${percent} % phase oversampling (${figure(widthMm)} mm acquired) is more than this scanner can be set to ` +
        `(${figure(scanner.limits.phaseOversamplingMaxPct)} %, ${scanner.limits.acquiredLinesMax} lines).`,
    );
  }
  if (lines === p.acquiredLines) return NOTHING_TO_CHANGE;
  return changed(withPrescription(given, { acquiredLines: lines }));
}

/** Acquired lines set to the smallest number on the scanner's grid that is enough, by either reading of enough. */
export const phaseOversampling =
  (target: WidthTarget): Change =>
  (given, solver) =>
    toLines(given, solver.requirement(given), target);
