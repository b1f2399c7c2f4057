/**
 * Oracle A: fold on an integer lattice, by counting cells. Written from the fold law alone and sharing nothing with
 * lib/physics: every edge and every acquired width is a whole number of lattice units, tissue and areas are sets of unit
 * cells, and a width is wrong when some cell of the keep-clear area is hit by some tissue cell a whole number of
 * acquired widths away.
 */

/** Half-open cell ranges [from, to). */
export type CellRange = readonly [number, number];

export interface LatticeBox {
  readonly r: CellRange;
  readonly p: CellRange;
  readonly s: CellRange;
}

/** Boxes of one part combine by parity (even-odd), so that a box inside another is a hole. */
export interface LatticePart {
  readonly boxes: readonly LatticeBox[];
  readonly weight: number;
}

export interface LatticeMargin {
  readonly r: readonly [number, number];
  readonly p: readonly [number, number];
  readonly s: readonly [number, number];
}

export interface LatticeCase {
  readonly parts: readonly LatticePart[];
  readonly clear: LatticeBox;
  readonly window: { readonly r: CellRange; readonly p: CellRange };
  /** Displayed slices: their cells. */
  readonly slices: readonly number[];
  /** FOV centre along phase and slab centre along slice, in half cells. */
  readonly centrePHalf: number;
  readonly centreSHalf: number;
  readonly margin: LatticeMargin;
  readonly tolerance: number;
  /** Slab: signal by the source cell's offset from the slab centre (half cells); a stack has none. */
  readonly slab?: { readonly weight: (offsetHalf: number) => number; readonly tolerance: number };
  /** Image-domain unfolding that ends at W: factors along phase and slice; absent: plain. */
  readonly ghosts?: { readonly ry: number; readonly rz: number };
}

// Room for every case: r ±5, p ±40, s ±12, each grown by its margin.
const R = 16;
const P = 100;
const S = 32;
const ORIGIN = { r: R / 2, p: P / 2, s: S / 2 };
const index = (r: number, p: number, s: number) => (s * R + r) * P + p;

/** Cells of one part after parity, dilated by the margin; r, p, s are stored from the grid's corner. */
function partCells(part: LatticePart, margin: LatticeMargin): Uint8Array {
  const bare = new Uint8Array(R * P * S);
  for (const { r, p, s } of part.boxes) {
    for (let z = s[0]; z < s[1]; z++)
      for (let x = r[0]; x < r[1]; x++)
        for (let y = p[0]; y < p[1]; y++) bare[index(x + ORIGIN.r, y + ORIGIN.p, z + ORIGIN.s)]! ^= 1;
  }
  // Dilation by a box is one axis after the other.
  let cells = dilate(bare, 1, P, margin.p);
  cells = dilate(cells, P, R, margin.r);
  cells = dilate(cells, R * P, S, margin.s);
  return cells;
}

function dilate(
  from: Uint8Array,
  stride: number,
  count: number,
  [low, high]: readonly [number, number],
): Uint8Array {
  if (low === 0 && high === 0) return from;
  const to = new Uint8Array(from.length);
  for (let at = 0; at < from.length; at++) {
    if (!from[at]) continue;
    const along = Math.floor(at / stride) % count;
    for (let step = -low; step <= high; step++) {
      if (along + step >= 0 && along + step < count) to[at + step * stride] = 1;
    }
  }
  return to;
}

/** Whether keep-clear stays free at acquired width W and, for a slab, W_z (lattice units). */
export function latticeOracle(question: LatticeCase): (w: number, wz?: number) => boolean {
  const counted = question.parts.filter((part) => part.weight > question.tolerance);
  const grids = counted.map((part) => ({ weight: part.weight, cells: partCells(part, question.margin) }));
  const targets: [number, number, number][] = [];
  for (const s of question.slices) {
    if (s < question.clear.s[0] || s >= question.clear.s[1]) continue;
    for (
      let r = Math.max(question.clear.r[0], question.window.r[0]);
      r < Math.min(question.clear.r[1], question.window.r[1]);
      r++
    )
      for (
        let p = Math.max(question.clear.p[0], question.window.p[0]);
        p < Math.min(question.clear.p[1], question.window.p[1]);
        p++
      )
        targets.push([r + ORIGIN.r, p + ORIGIN.p, s + ORIGIN.s]);
  }
  const offsetHalf = (s: number) => 2 * (s - ORIGIN.s) + 1 - question.centreSHalf;
  const excited = (s: number, weight: number) =>
    !question.slab || weight * question.slab.weight(offsetHalf(s)) > question.slab.tolerance;

  return (w, wz) => {
    const { ghosts } = question;
    const stepP = ghosts ? w / ghosts.ry : w;
    const unfoldSlices = ghosts !== undefined && ghosts.rz > 1;
    const stepS = wz === undefined ? undefined : unfoldSlices ? wz / ghosts.rz : wz;
    if (targets.length === 0) return true;
    if (unfoldSlices && wz !== undefined) {
      for (const { cells, weight } of grids)
        for (let s = 0; s < S; s++) {
          if (Math.abs(offsetHalf(s)) <= wz || !excited(s, weight)) continue;
          for (let at = index(0, 0, s); at < index(0, 0, s + 1); at++) if (cells[at]) return false;
        }
    }
    for (const { cells, weight } of grids) {
      for (const [r, p, s] of targets) {
        const jMax = stepS === undefined ? 0 : Math.ceil(S / stepS);
        for (let j = -jMax; j <= jMax; j++) {
          const sourceS = s + (stepS === undefined ? 0 : j * stepS);
          if (sourceS < 0 || sourceS >= S) continue;
          if (j !== 0 && !excited(sourceS, weight)) continue;
          if (unfoldSlices && j !== 0 && Math.abs(offsetHalf(sourceS)) > wz!) continue;
          for (let sourceP = p % stepP; sourceP < P; sourceP += stepP) {
            if (sourceP === p && j === 0) continue;
            if (!cells[index(r, sourceP, sourceS)]) continue;
            // Image-domain unfolding ghosts only what lies beyond the acquired width (or came along the slab).
            const beyond = Math.abs(2 * (sourceP - ORIGIN.p) + 1 - question.centrePHalf) > w;
            if (ghosts && (unfoldSlices || j === 0) && !beyond) continue;
            return false;
          }
        }
      }
    }
    return true;
  };
}

export const LATTICE_BOUNDS = { r: R / 2, p: P / 2, s: S / 2 };
