import type { Bounds, TextNode } from './scene';
import type { ScreenPoint } from './section-frame';

/** A generous width of a note's letter, pixels: better a little early than cut off. */
const LETTER_PX = 7.6;

/** Puts words beside a point so that they end inside the picture: to its right, else to its left, else over it. */
export function anchorWithin(
  text: string,
  at: ScreenPoint,
  bounds: Bounds,
  mmPerPx: number,
): Pick<TextNode, 'anchor'> & { readonly sign: -1 | 0 | 1 } {
  const width = (text.length * LETTER_PX + 10) * mmPerPx;
  if (at[0] + width <= bounds.right) return { anchor: 'start', sign: 1 };
  if (at[0] - width >= bounds.left) return { anchor: 'end', sign: -1 };
  return { anchor: 'middle', sign: 0 };
}
