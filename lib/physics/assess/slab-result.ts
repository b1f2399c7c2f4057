import type { SlabResult } from '../model/assessment';
import { assessSlab } from '../slab/assess-slab';
import { classKey, KeptAnswers, type FrozenCase } from './geometry-class';
import { slabSurroundings } from './slab-surroundings';

const answers = new KeptAnswers<SlabResult>(512);

/** Slice wrap of a slab as prescribed; undefined for a stack. */
export function slabResultOf(given: FrozenCase): SlabResult | undefined {
  const { prescription: p, scanner, policy } = given;
  const { slices } = p;
  if (slices.mode !== 'slab') return undefined;
  return answers.get(`${slices.acquiredPartitions}#${classKey(given)}`, () =>
    assessSlab(p, slices, scanner, policy, slabSurroundings(given)),
  );
}
