import type { UnfoldingRule } from '../acceleration/unfolding-rule';
import { toPatient } from '../geometry/section-frame';
import { crossings, straight, valueAt } from '../section/curve';
import type { RowBand } from '../section/row-band';
import type { Interval } from './displacement';
import type { DisplayedSections } from './displayed-sections';
import type { UsableVolume } from './fold-problem';

/** One solid's section that may be seen in a wrong place in this picture. */
export interface LandingSolid {
  readonly bands: readonly RowBand[];
  /** Slice coordinate it lies at, mm. */
  readonly sMm: number;
  /** Lies elsewhere along the slab: every order lands, 0 included. */
  readonly fromElsewhere: boolean;
}

export interface LandedArea {
  readonly displayedMm2: number;
  readonly keepClearMm2: number;
  readonly placeUncertain: boolean;
}

/** Gauss–Legendre, 8 points on [−1, 1]. */
const NODES = [0.1834346424956498, 0.525532409916329, 0.7966664774136267, 0.9602898564975363];
const WEIGHTS = [0.362683783378362, 0.3137066458778873, 0.2223810344533745, 0.1012285362903763];

/**
 * Area of the picture under tissue that is seen in a wrong place, its union over parts and orders [mm²].
 * Rows between break points (ends of shapes, crossings with the edges of what is shown) are summed by Gauss–Legendre
 * after r = middle + half·sin(πx/2), which removes the square-root ends of an ellipse. Where the pieces of two parts
 * overlap, and for outlines of many pieces, kinks are no break points: error below 0.5 % of the area. Never used for
 * a verdict.
 */
export function landedArea(
  sections: DisplayedSections,
  solids: readonly LandingSolid[],
  clear: readonly RowBand[],
  rule: UnfoldingRule,
  widthMm: number,
  usable: UsableVolume | undefined,
  shares: readonly number[],
): LandedArea {
  const { window, frame } = sections;
  const low = window.lower.offset;
  const high = window.upper.offset;
  const step = rule.kind === 'grid-ends' ? widthMm / rule.factorPhase : widthMm;
  const ghosting = rule.kind === 'grid-ends';
  const edges = [frame.centrePhaseMm - widthMm / 2, frame.centrePhaseMm + widthMm / 2];
  const shifts = shares.map((share) => share * widthMm);
  const breaks = breakRows(window, solids, clear, step, ghosting ? edges : [], shifts);

  let displayedMm2 = 0;
  let keepClearMm2 = 0;
  let placeUncertain = false;
  const landed: Interval[] = [];
  const land = (
    from: number,
    to: number,
    r: number,
    sMm: number,
    everyOrder: boolean,
    shift: number,
  ) => {
    if (!(to > from)) return;
    const first = Math.ceil((from - high) / step);
    const last = Math.floor((to - low) / step);
    for (let i = first; i <= last; i++) {
      if (i === 0 && !everyOrder) continue;
      const a = Math.max(from - i * step, low);
      const b = Math.min(to - i * step, high);
      if (!(b > a)) continue;
      landed.push([a, b]);
      if (usable && !placeUncertain) {
        placeUncertain = [a, b].some((p) => beyondUsable(usable, toPatient(frame, r, p + i * step - shift, sMm)));
      }
    }
  };

  for (let k = 0; k + 1 < breaks.length; k++) {
    const middle = (breaks[k]! + breaks[k + 1]!) / 2;
    const half = (breaks[k + 1]! - breaks[k]!) / 2;
    for (let n = 0; n < 8; n++) {
      const x = n < 4 ? NODES[n]! : -NODES[n - 4]!;
      const r = middle + half * Math.sin((Math.PI / 2) * x);
      const weight = WEIGHTS[n % 4]! * half * (Math.PI / 2) * Math.cos((Math.PI / 2) * x);
      landed.length = 0;
      for (const solid of solids) {
        for (const band of solid.bands) {
          if (r <= band.r0 || r >= band.r1) continue;
          const lower = valueAt(band.lower, r);
          const upper = valueAt(band.upper, r);
          for (const shift of shifts) {
            const a = lower + shift;
            const b = upper + shift;
            if (!ghosting || solid.fromElsewhere) land(a, b, r, solid.sMm, solid.fromElsewhere, shift);
            else {
              land(Math.max(a, edges[1]!), b, r, solid.sMm, false, shift);
              land(a, Math.min(b, edges[0]!), r, solid.sMm, false, shift);
            }
          }
        }
      }
      if (landed.length === 0) continue;
      landed.sort((a, b) => a[0] - b[0]);
      displayedMm2 += weight * covered(landed, low, high);
      for (const band of clear) {
        if (r > band.r0 && r < band.r1) {
          keepClearMm2 += weight * covered(landed, valueAt(band.lower, r), valueAt(band.upper, r));
        }
      }
    }
  }
  return { displayedMm2, keepClearMm2, placeUncertain };
}

const MANY_BANDS = 40;
const EVEN_ROWS = 12;

/** Length of [low, high] under the intervals, which are sorted by their beginnings. */
function covered(intervals: readonly Interval[], low: number, high: number): number {
  let length = 0;
  let end = low;
  for (const [a, b] of intervals) {
    const from = Math.max(a, end);
    const to = Math.min(b, high);
    if (to > from) {
      length += to - from;
      end = to;
    }
  }
  return length;
}

function breakRows(
  window: RowBand,
  solids: readonly LandingSolid[],
  clear: readonly RowBand[],
  step: number,
  edges: readonly number[],
  shifts: readonly number[],
): number[] {
  const low = window.lower.offset;
  const high = window.upper.offset;
  const rows = [window.r0, window.r1];
  if (solids.reduce((sum, { bands }) => sum + bands.length, 0) > MANY_BANDS) {
    // An outline of hundreds of straight pieces: even rows see it as well as its own corners would.
    return Array.from(
      { length: EVEN_ROWS + 1 },
      (_, i) => window.r0 + ((window.r1 - window.r0) * i) / EVEN_ROWS,
    );
  }
  const add = (r: number) => {
    if (r > window.r0 + 1e-6 && r < window.r1 - 1e-6) rows.push(r);
  };
  const levels = [...edges];
  for (const edge of [low, high]) for (let i = -2; i <= 2; i++) if (i !== 0) levels.push(edge + i * step);
  const lines = shifts.flatMap((shift) => levels.map((level) => straight(level - shift)));
  for (const { bands } of solids) {
    for (const band of bands) {
      add(band.r0);
      add(band.r1);
      for (const line of lines) {
        for (const curve of [band.lower, band.upper]) {
          for (const r of crossings(curve, line)) if (r > band.r0 && r < band.r1) add(r);
        }
      }
    }
  }
  for (const band of clear) {
    add(band.r0);
    add(band.r1);
  }
  return rows.sort((a, b) => a - b).filter((r, i, all) => i === 0 || r - all[i - 1]! > 1e-6);
}

/** Whether a patient point [mm] lies where the scanner maps tissue wrongly. */
export function beyondUsable(usable: UsableVolume, point: readonly [number, number, number]): boolean {
  const x = (point[0] - usable.centreMm[0]) / usable.halfMm[0];
  const y = (point[1] - usable.centreMm[1]) / usable.halfMm[1];
  // A hundredth of a millimetre in 250 mm: a body edge given to the millimetre that touches the volume lies inside.
  return x * x + y * y > 1 + 1e-4 || Math.abs(point[2] - usable.centreMm[2]) > usable.halfMm[2] + 1e-3;
}

/** Area of row bands with straight boundaries, mm². */
export function polygonAreaMm2(bands: readonly RowBand[]): number {
  return bands.reduce((sum, { r0, r1, lower, upper }) => {
    const middle = (r0 + r1) / 2;
    return sum + (r1 - r0) * (valueAt(upper, middle) - valueAt(lower, middle));
  }, 0);
}
