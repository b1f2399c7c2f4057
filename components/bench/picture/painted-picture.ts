import type { ImageOptions, SimulatedImage } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';

export interface AskedPicture extends ImageOptions {
  readonly question: Case;
  /** White follows the picture; otherwise it is the sequence's own, so that now and tried can be compared. */
  readonly fitWhite?: boolean;
}

/** Grey levels instead of brightness: a quarter of the bytes, and ready to be painted. */
export interface GreyPicture extends Omit<SimulatedImage, 'values'> {
  readonly levels: Uint8ClampedArray;
}

export type PaintedPicture = GreyPicture | { readonly refusal: string };
