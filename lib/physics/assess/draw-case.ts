import { reachAlongZ } from '../body/coil-reach';
import type { Case } from '../model/case';
import { drawSection as drawOutlines, type DrawSectionOptions } from '../section/draw-section';
import type { SectionDrawing } from '../section/section-drawing';
import { slabWeightFor } from './geometry-class';
import { unfoldingOf, withUnfolding } from './resolve-unfolding';

/**
 * One section as outlines, in the same geometry the verdict was worked out in: unfolding the protocol leaves open is the
 * scanner's, and a slab has its own profile. Sizes are those recorded, not yet taken at the policy's certainty.
 */
export function drawSection(given: Case, options: DrawSectionOptions = {}): SectionDrawing {
  const prescription = withUnfolding(given, unfoldingOf(given));
  const slabWeight = options.slabWeight ?? slabWeightFor(given);
  const { isocentreZMm, tissueReachMm } = reachAlongZ(given);
  const seen = {
    ...given,
    prescription,
    patient: { ...given.patient, isocentreZMm },
    scanner: { ...given.scanner, tissueReachMm },
  };
  return drawOutlines(seen, { ...options, ...(slabWeight === undefined ? {} : { slabWeight }) });
}
