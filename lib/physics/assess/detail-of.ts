import { buildBody } from '../body/build-body';
import { sectionFrame } from '../geometry/section-frame';
import type { DetailResult } from '../model/assessment';
import type { RangeMm } from '../model/axes';
import type { Case } from '../model/case';
import { detail } from '../sequence/detail';
import { partAlong } from './part-along';

/** Largest overlap the site's table knows. */
const MOST_OVERLAP = 4;

/**
 * Most copies of the body that lie on one place of the reduced picture: length of the body inside the acquired width
 * over W/R, at least 1 and at most ⌈R⌉.
 */
export function overlapCount(given: Case): number {
  const { prescription: p, patient, scanner } = given;
  const factor = p.acceleration.factorPhase;
  if (factor === 1) return 1;
  const frame = sectionFrame(p, 0);
  const widthMm = (p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov;
  const ranges = buildBody(patient, scanner).map((part) => partAlong(part, frame.phase, given));
  const low = Math.min(...ranges.map((range) => range[0]));
  const high = Math.max(...ranges.map((range) => range[1]));
  const length = Math.min(widthMm, high - low);
  return Math.max(1, Math.min(Math.ceil(factor), Math.ceil((length * factor) / widthMm - 1e-9)));
}

/** g where copies overlap: the prescription's own, else the site's range for that many copies, else 1. */
function geometryFactor(given: Case): number | RangeMm {
  const { prescription: p, policy } = given;
  const own = p.acceleration.geometryFactor;
  const along = overlapCount(given);
  const across = p.slices.mode === 'slab' ? Math.ceil(p.acceleration.factorSlice) : 1;
  const copies = Math.min(MOST_OVERLAP, along * across);
  if (copies === 1) return 1;
  return own ?? policy.geometryFactorByOverlap[String(copies) as '2' | '3' | '4'];
}

/** Voxel and SNR of a case. */
export const detailOf = (given: Case): DetailResult =>
  detail(given.prescription, { geometryFactor: geometryFactor(given) });
