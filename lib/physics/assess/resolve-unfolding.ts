import type { Case } from '../model/case';
import type { Prescription, Unfolding } from '../model/prescription';

export const isAccelerated = (p: Prescription): boolean =>
  p.acceleration.factorPhase > 1 || (p.slices.mode === 'slab' && p.acceleration.factorSlice > 1);

/** How this scan is unfolded: what the protocol says, else what the scanner does; 'unknown' when neither says. */
export function unfoldingOf({ prescription, scanner }: Pick<Case, 'prescription' | 'scanner'>): Unfolding {
  const { unfolding } = prescription.acceleration;
  return unfolding === 'unknown' ? scanner.unfolding : unfolding;
}

/** The prescription as the geometry takes it: unknown unfolding becomes the cautious one, a grid that ends at W. */
export function withUnfolding(
  given: Pick<Case, 'prescription' | 'scanner'>,
  unfolding: Unfolding,
): Prescription {
  const { prescription } = given;
  const used = unfolding === 'unknown' ? 'image-domain-grid-ends' : unfolding;
  if (prescription.acceleration.unfolding === used) return prescription;
  return { ...prescription, acceleration: { ...prescription.acceleration, unfolding: used } };
}
