import type { EdgeStyle } from './scene';

/** Dash patterns in pixels, one table for every painter. Dots are drawn with a round cap. */
export const EDGE_DASH: Readonly<Record<EdgeStyle, readonly number[]>> = {
  solid: [],
  dotted: [0.5, 4],
  dashed: [7, 5],
};
