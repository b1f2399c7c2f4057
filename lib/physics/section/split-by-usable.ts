import type { UsableVolume } from '../fold/fold-problem';
import type { SectionFrame } from '../geometry/section-frame';
import { bandRings, cropBands, intersectBands, moveBands } from './band-outline';
import { cutSolid, solidInSection, type ConvexSolid } from './convex-solid';
import { straight, valueAt, type Curve } from './curve';
import type { RowBand } from './row-band';
import type { ByPlace, PlacedRings } from './section-drawing';

/** Bands told apart by whether the scanner maps them rightly. */
export interface SplitByUsable {
  readonly within: RowBand[];
  /** Each list is connected by itself: above, below and beside what is usable. */
  readonly beyond: readonly RowBand[][];
}

/** Chords a usable ellipse is cut by; they stay within 0.2 mm of a 500 mm one (sagitta of one chord). */
const CHORDS = 40;

function solidOf({ centreMm, halfMm }: UsableVolume): ConvexSolid {
  return {
    quadric: {
      centre: centreMm,
      xx: 1 / halfMm[0] ** 2,
      yy: 1 / halfMm[1] ** 2,
      zz: 0,
      xy: 0,
      xz: 0,
      yz: 0,
    },
    halfSpaces: [
      { normal: [0, 0, 1], limit: centreMm[2] + halfMm[2] },
      { normal: [0, 0, -1], limit: halfMm[2] - centreMm[2] },
    ],
  };
}

function chord(curve: Curve, r0: number, r1: number): Curve {
  const slope = (valueAt(curve, r1) - valueAt(curve, r0)) / (r1 - r0);
  return straight(valueAt(curve, r0) - slope * r0, slope);
}

/** Two arcs of different centres have no closed crossing; an arc and a chord have. */
function inChords(band: RowBand): RowBand[] {
  if (band.lower.bulge === 0 && band.upper.bulge === 0) return [band];
  const middle = (band.r0 + band.r1) / 2;
  const half = (band.r1 - band.r0) / 2;
  const rows = Array.from({ length: CHORDS + 1 }, (_, i) => middle - half * Math.cos((Math.PI * i) / CHORDS));
  return rows.slice(1).map((r1, i) => {
    const r0 = rows[i]!;
    return { r0, r1, lower: chord(band.lower, r0, r1), upper: chord(band.upper, r0, r1) };
  });
}

/**
 * A section's bands within the scanner's usable FOV and beyond it. For drawing only: the verdict asks point by point.
 * @param sMm slice coordinate of the bands, mm
 * Valid: convex bands; the usable volume is an elliptic cylinder along z, its section taken as a polygon of 2 × 40 chords.
 */
export function splitByUsable(
  bands: readonly RowBand[],
  usable: UsableVolume,
  frame: SectionFrame,
  sMm: number,
): SplitByUsable {
  const polygon = cutSolid(solidInSection(solidOf(usable), frame), sMm, true)
    .flatMap(inChords)
    .sort((a, b) => a.r0 - b.r0);
  const [first, last] = [polygon[0], polygon.at(-1)];
  if (!first || !last) return { within: [], beyond: [[...bands]] };
  const above = polygon.flatMap(({ r0, r1, upper }) => cropBands(bands, { lowers: [upper], r0, r1 }));
  const below = polygon.flatMap(({ r0, r1, lower }) => cropBands(bands, { uppers: [lower], r0, r1 }));
  return {
    within: intersectBands(bands, polygon),
    beyond: [above, below, cropBands(bands, { r1: first.r0 }), cropBands(bands, { r0: last.r1 })].filter(
      (each) => each.length > 0,
    ),
  };
}

/** Tissue at slice coordinate sMm that is seen moved by −moveMm along phase. */
export interface MovedBands {
  readonly source: readonly RowBand[];
  readonly moveMm: number;
  readonly sMm: number;
}

/** Pieces by whether the scanner maps the tissue they come from rightly: only then is it certain where they land. */
export function piecesByPlace(
  pieces: readonly MovedBands[],
  usable: UsableVolume,
  frame: SectionFrame,
  keepClear: readonly RowBand[],
): ByPlace {
  const splits = pieces.map((piece) => ({
    piece,
    split: splitByUsable(piece.source, usable, frame, piece.sMm),
  }));
  const placed = (pick: (split: SplitByUsable) => readonly RowBand[][]): PlacedRings => {
    const parts = splits.flatMap(({ piece, split }) =>
      pick(split).map((source) => ({ source, landed: moveBands(source, -piece.moveMm) })),
    );
    return {
      source: parts.flatMap(({ source }) => bandRings(source)),
      landed: parts.flatMap(({ landed }) => bandRings(landed)),
      inKeepClear: parts.flatMap(({ landed }) => bandRings(intersectBands(landed, keepClear))),
    };
  };
  return {
    certain: placed(({ within }) => [within]),
    uncertain: placed(({ beyond }) => beyond),
  };
}
