import type { SlabResult } from '../model/assessment';
import { assessSlab } from '../slab/assess-slab';
import { identityOf, KeptAnswers, slabKey, type FrozenCase } from './geometry-class';
import { slabSurroundings } from './slab-surroundings';

const answers = new KeptAnswers<SlabResult>(256);

/** Slice wrap of a slab as prescribed; undefined for a stack. What happens in the plane plays no part in it. */
export function slabResultOf(given: FrozenCase): SlabResult | undefined {
  const { prescription: p, scanner, policy } = given;
  const { slices } = p;
  if (slices.mode !== 'slab') return undefined;
  const surroundings = slabSurroundings(given);
  const key = [
    slices.acquiredPartitions,
    slabKey(slices, p),
    surroundings.tissue.rangeMm.join('/'),
    surroundings.keepClearMm?.join('/'),
    identityOf(scanner),
    identityOf(policy),
  ].join('#');
  return answers.get(key, () => assessSlab(p, slices, scanner, policy, surroundings));
}
