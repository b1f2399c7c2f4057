import type { Reading } from '../model/patient';

export type Sex = 'female' | 'male';

/** A reading that was worked out, with the words that say how. Lengths in mm. */
export interface Estimate extends Reading {
  /** How it was got, as shown beside the number: "from girth at the iliac crest (women, all)". */
  readonly words: string;
  /** Outside the range the regression was made from. */
  readonly extrapolated: boolean;
  /** What a person must know before leaning on it; empty when nothing. */
  readonly cautions: readonly string[];
}

/** There is no route from what is known. */
export interface SizeNeeded {
  readonly sizeNeeded: true;
  /** What to ask for, as shown. */
  readonly words: string;
}

export type SizeAnswer = Estimate | SizeNeeded;

export const isEstimate = (answer: SizeAnswer): answer is Estimate => !('sizeNeeded' in answer);

/** A mean with one standard deviation, mm. */
export interface Spread {
  readonly value: number;
  readonly spread: number;
}
