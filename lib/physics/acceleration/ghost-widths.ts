import { affine, maxOn, minOn, valueAt, type Curve } from '../section/curve';
import { bandsBetween, TOUCH_MM, type RowBand } from '../section/row-band';
import type { Interval } from '../fold/displacement';
import type { AxisMargin } from '../fold/section-margin';

/**
 * Acquired widths at which image-domain unfolding that ends at W leaves a ghost in keep-clear, for one multiple m:
 * { W : some tissue point p with p − c > W/2 has p − M·W in keep-clear in the same row }, M = m/R > 0.
 *
 * In one row, with tissue (a, b) and keep-clear (k, l), eliminating p leaves
 *   (a − l)/M < W < (b − k)/M        the ghost meets keep-clear
 *   W < 2(b − c)                     some tissue lies beyond the acquired width
 *   (M − ½)·W > c − l                it does so for the same p
 * With fat displaced by κW before it is unfolded (EPI), p + κW takes the place of p: (a − l)/(M − κ) < W < (b − k)/(M − κ)
 * (the other way round where κ > M), (½ − κ)·W < b − c, and the third line as it stands.
 * All boundaries are straight in W and stay in the curve family in r; the set is convex in (r, W), so its extent in W
 * over all rows is one open interval with closed-form ends. Tissue at the low side: mirror phase first.
 * @param share  κ of displaced fat, positive towards the high side
 * Source: derived; rule from [griswold-2004], [goldfarb-2004].
 */
export function ghostWidths(
  tissue: readonly RowBand[],
  clear: readonly RowBand[],
  margin: AxisMargin,
  centreMm: number,
  multiple: number,
  share = 0,
): Interval | undefined {
  let low = Infinity;
  let high = -Infinity;
  for (const a of tissue) {
    for (const k of clear) {
      for (const band of widthBands(a, k, margin, centreMm, multiple, share)) {
        low = Math.min(low, minOn(band.lower, band.r0, band.r1));
        high = Math.max(high, maxOn(band.upper, band.r0, band.r1));
      }
    }
  }
  return high > low ? [Math.max(low, 0), high] : undefined;
}

/** The region of (readout, W) where the pair leaves a ghost. */
function widthBands(
  tissue: RowBand,
  clear: RowBand,
  margin: AxisMargin,
  centre: number,
  multiple: number,
  share: number,
): RowBand[] {
  let r0 = Math.max(tissue.r0, clear.r0);
  let r1 = Math.min(tissue.r1, clear.r1);
  if (!(r1 - r0 > TOUCH_MM)) return [];
  const bottom = affine(tissue.lower, 1, -margin[0]);
  const top = affine(tissue.upper, 1, margin[1]);
  const moved = multiple - share;
  const beyond = 1 / Math.max(0.5 - share, NOTHING);
  const lowers: Curve[] = [affine(clear.upper, 0, 0)];
  const uppers: Curve[] = [affine(top, beyond, -centre * beyond)];
  if (Math.abs(moved) > NOTHING) {
    const nearest = difference(bottom, clear.upper, 1 / moved);
    const farthest = difference(top, clear.lower, 1 / moved);
    lowers.unshift(moved > 0 ? nearest : farthest);
    uppers.unshift(moved > 0 ? farthest : nearest);
  } else {
    // The ghost lies on the tissue itself, whatever W: only in rows where that lies in keep-clear.
    const overlap = bandsBetween([bottom, clear.lower], [top, clear.upper], r0, r1);
    if (overlap.length === 0) return [];
    r0 = overlap[0]!.r0;
    r1 = overlap.at(-1)!.r1;
  }
  const beyondHalf = multiple - 0.5;
  if (beyondHalf > 1e-12) {
    lowers.push(affine(clear.upper, -1 / beyondHalf, centre / beyondHalf));
  } else if (beyondHalf < -1e-12) {
    uppers.push(affine(clear.upper, -1 / beyondHalf, centre / beyondHalf));
  } else {
    // M = ½ (the centre ghost of R = 2): keep-clear must reach beyond the FOV centre, whatever W.
    const at0 = valueAt(clear.upper, r0) - centre;
    const at1 = valueAt(clear.upper, r1) - centre;
    if (at0 <= 0 && at1 <= 0) return [];
    if (at0 < 0 || at1 < 0) {
      const root = r0 + ((r1 - r0) * at0) / (at0 - at1);
      if (at0 < 0) r0 = root;
      else r1 = root;
    }
  }
  return bandsBetween(lowers, uppers, r0, r1);
}

/** A share of W so small that it moves nothing by a nanometre at any width. */
const NOTHING = 1e-9;

/** factor·(curve − line). */
function difference(curve: Curve, line: Curve, factor: number): Curve {
  return affine(curve, factor, -line.offset * factor, -line.slope * factor);
}

/** Bands mirrored along phase (p → −p), so that the low side can be asked like the high side. */
export function mirrorPhase(bands: readonly RowBand[]): RowBand[] {
  return bands.map((band) => ({
    ...band,
    lower: affine(band.upper, -1, 0),
    upper: affine(band.lower, -1, 0),
  }));
}

export const mirrorMargin = (margin: AxisMargin): AxisMargin => [margin[1], margin[0]];
