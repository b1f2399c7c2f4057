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
 * All boundaries are straight in W and stay in the curve family in r; the set is convex in (r, W), so its extent in W
 * over all rows is one open interval with closed-form ends. Tissue at the low side: mirror phase first.
 * Source: derived; rule from [griswold-2004], [goldfarb-2004].
 */
export function ghostWidths(
  tissue: readonly RowBand[],
  clear: readonly RowBand[],
  margin: AxisMargin,
  centreMm: number,
  multiple: number,
): Interval | undefined {
  let low = Infinity;
  let high = -Infinity;
  for (const a of tissue) {
    for (const k of clear) {
      for (const band of widthBands(a, k, margin, centreMm, multiple)) {
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
): RowBand[] {
  let r0 = Math.max(tissue.r0, clear.r0);
  let r1 = Math.min(tissue.r1, clear.r1);
  if (!(r1 - r0 > TOUCH_MM)) return [];
  const bottom = affine(tissue.lower, 1, -margin[0]);
  const top = affine(tissue.upper, 1, margin[1]);
  const lowers: Curve[] = [difference(bottom, clear.upper, 1 / multiple), affine(clear.upper, 0, 0)];
  const uppers: Curve[] = [difference(top, clear.lower, 1 / multiple), affine(top, 2, -2 * centre)];
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
