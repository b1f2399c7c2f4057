import { foldPosition } from '@/lib/physics/fold/fold-position';
import type { Verdict } from '@/lib/physics/model/assessment';

/** The example of the front page: an abdomen 480 by 340 mm in a picture 300 mm deep, liver area kept clear. */
export const EXAMPLE = {
  halfBreadthMm: 240,
  halfDepthMm: 170,
  fovMm: 300,
  keepClear: { fromXMm: -190, toXMm: 60, anteriorMm: -140, posteriorMm: 95 },
} as const;

export interface WorkedFold {
  readonly widthMm: number;
  readonly verdict: Verdict;
  /** Where the rearmost tissue is and where it is seen; absent when it is seen in its place or not at all. */
  readonly thread?: { readonly fromMm: number; readonly toMm: number };
  /** How far it reaches into the keep-clear area, mm. */
  readonly depthMm: number;
}

/** What a given phase oversampling [%] does to the example. The body is convex and centred: its apex decides. */
export function workFold(oversamplingPct: number): WorkedFold {
  const { halfDepthMm, fovMm, keepClear } = EXAMPLE;
  const widthMm = fovMm * (1 + oversamplingPct / 100);
  const outlies = halfDepthMm > widthMm / 2;
  const landsMm = foldPosition(halfDepthMm, 0, widthMm);
  const shown = outlies && landsMm > -fovMm / 2;
  if (!shown) return { widthMm, verdict: 'no-fold-expected', depthMm: 0 };
  const depthMm = Math.max(0, landsMm - keepClear.anteriorMm);
  return {
    widthMm,
    verdict: depthMm > 0 ? 'fold-in-keep-clear' : 'fold-outside-keep-clear',
    thread: { fromMm: halfDepthMm, toMm: landsMm },
    depthMm,
  };
}

const { halfDepthMm, fovMm, keepClear } = EXAMPLE;

/** Smallest oversampling [%] that frees the keep-clear area, frees the picture, covers the body. */
export const THRESHOLDS = {
  keepClearPct: ((halfDepthMm - keepClear.anteriorMm) / fovMm - 1) * 100,
  picturePct: ((halfDepthMm + fovMm / 2) / fovMm - 1) * 100,
  bodyPct: ((2 * halfDepthMm) / fovMm - 1) * 100,
} as const;
