import type { Prescription } from '../model/prescription';

/** How an acquisition's aliases behave. */
export interface UnfoldingRule {
  /** 'plain': like no acceleration. 'grid-ends': image-domain unfolding knows nothing beyond the acquired width. */
  readonly kind: 'plain' | 'grid-ends';
  readonly factorPhase: number;
  readonly factorSlice: number;
  /** The behaviour was not known and the cautious one was taken. */
  readonly assumed: boolean;
}

/**
 * Aliases of k-space, self-calibrating methods, and of image-domain ones that solve for tissue beyond W, are those of a
 * plain acquisition. With an unfolding grid that ends at W, or one that is not known, tissue beyond W leaves ghosts.
 * Source: [griswold-2004], [goldfarb-2004], [pruessmann-1999], [uecker-2014].
 */
export function unfoldingRule(prescription: Pick<Prescription, 'acceleration' | 'slices'>): UnfoldingRule {
  const { acceleration, slices } = prescription;
  const factorPhase = acceleration.factorPhase;
  const factorSlice = slices.mode === 'slab' ? acceleration.factorSlice : 1;
  const accelerated = factorPhase > 1 || factorSlice > 1;
  const ends = acceleration.unfolding === 'image-domain-grid-ends' || acceleration.unfolding === 'unknown';
  return {
    kind: accelerated && ends ? 'grid-ends' : 'plain',
    factorPhase,
    factorSlice,
    assumed: accelerated && acceleration.unfolding === 'unknown',
  };
}
