import type { GhostDrawing, PieceDrawing, PlacedRings, SectionRing } from '@/lib/physics/section/section-drawing';
import type { Side } from '@/lib/physics/model/axes';
import { centroidOf, hatch } from './rings';
import { anchorWithin } from './place-text';
import type { AreaNode, Bounds, LinesNode, Ring, SceneNode, Stroke } from './scene';
import type { ScreenPoint } from './section-frame';

export interface PieceContext {
  readonly toRing: (ring: SectionRing) => Ring;
  /** Unit vector of the phase direction on the screen. */
  readonly phase: ScreenPoint;
  readonly readout: ScreenPoint;
  readonly mmPerPx: number;
  readonly bounds: Bounds;
}

const HATCH_PX = 8;

/** Tissue is told apart by the direction of its hatching as well: each side of the patient has its own. */
const HATCH_DEG: Readonly<Record<Side, number>> = {
  posterior: -45,
  anterior: 45,
  right: -60,
  left: 60,
  superior: 30,
  inferior: -30,
};

function edgeOf(piece: Pick<PieceDrawing, 'estimated' | 'placeUncertain'>): Stroke['edge'] {
  return piece.placeUncertain ? 'dashed' : piece.estimated ? 'dotted' : 'solid';
}

function certainEdge(piece: Pick<PieceDrawing, 'estimated'>): Stroke['edge'] {
  return piece.estimated ? 'dotted' : 'solid';
}

/** Where the tissue is: outlined, outside the picture; what lies beyond the usable FOV dashed. */
export function sourceNodes(piece: PieceDrawing | GhostDrawing, context: PieceContext, focused: boolean): SceneNode[] {
  const outline = (name: string, rings: readonly SectionRing[], edge: Stroke['edge']): SceneNode[] =>
    rings.length === 0
      ? []
      : [
          {
            kind: 'area',
            name,
            rings: rings.map(context.toRing),
            fill: 'cloth',
            fillOpacity: 0.35,
            stroke: { colour: 'ink', widthPx: focused ? 2.25 : 1.25, edge },
            hover: piece.name,
          },
        ];
  const { byPlace } = piece;
  if (!byPlace) return outline(`${piece.name}/source`, piece.source, edgeOf(piece));
  return [
    ...outline(`${piece.name}/source`, byPlace.certain.source, certainEdge(piece)),
    ...outline(`${piece.name}/source/uncertain`, byPlace.uncertain.source, 'dashed'),
  ];
}

/**
 * Where it lands: hatched, the same outline moved; what reaches the keep-clear area is red and hatched across. What
 * comes from beyond the usable FOV keeps a dashed outline only: it folds, but nobody can say just where to.
 */
export function landedNodes(piece: PieceDrawing, context: PieceContext, focused: boolean): SceneNode[] {
  const { byPlace } = piece;
  const placed = byPlace?.certain ?? piece;
  const edge = byPlace ? certainEdge(piece) : edgeOf(piece);
  const from = slideVector(piece, context);
  const spacing = HATCH_PX * context.mmPerPx;
  const nodes: SceneNode[] = [];
  const landed = placed.landed.map(context.toRing);
  if (landed.length > 0) {
    nodes.push(
      area(`${piece.name}/landed`, landed, 'ochre', focused ? 2.25 : 1.25, edge, piece.name, from),
      strokes(`${piece.name}/landed/hatch`, landed, HATCH_DEG[piece.side], spacing, 'ochre', from),
    );
  }
  const inside = placed.inKeepClear.map(context.toRing);
  if (inside.length > 0) {
    nodes.push(
      area(`${piece.name}/in-keep-clear`, inside, 'thread', focused ? 2.25 : 1.5, edge, piece.name, from),
      strokes(`${piece.name}/in-keep-clear/hatch`, inside, HATCH_DEG[piece.side] + 90, spacing, 'thread', from),
    );
  }
  return byPlace ? [...nodes, ...uncertainNodes(piece, byPlace.uncertain, context, focused)] : nodes;
}

/** Dashed, without hatching, and said in words beside it. */
function uncertainNodes(piece: PieceDrawing | GhostDrawing, placed: PlacedRings, context: PieceContext, focused: boolean): SceneNode[] {
  const landed = placed.landed.map(context.toRing);
  const at = centroidOf(landed);
  if (!at) return [];
  const widthPx = focused ? 2.25 : 1.5;
  const inside = placed.inKeepClear.map(context.toRing);
  const outline = (name: string, rings: readonly Ring[], colour: 'ochre' | 'thread'): SceneNode => ({
    kind: 'area',
    name,
    rings,
    stroke: { colour, widthPx, edge: 'dashed' },
    hover: piece.name,
  });
  return [
    outline(`${piece.name}/landed/uncertain`, landed, 'ochre'),
    ...(inside.length > 0 ? [outline(`${piece.name}/in-keep-clear/uncertain`, inside, 'thread')] : []),
    {
      kind: 'text',
      name: `${piece.name}/landed/uncertain/label`,
      text: 'place uncertain',
      at,
      offsetPx: [0, 5],
      anchor: 'middle',
      size: 'note',
      colour: inside.length > 0 ? 'thread' : 'ochre',
    },
  ];
}

/** Hatched upright, unlike a landed piece; what comes from beyond the usable FOV is told apart as there. */
export function ghostNodes(ghost: GhostDrawing, context: PieceContext, focused: boolean): SceneNode[] {
  const { byPlace } = ghost;
  const placed = byPlace?.certain ?? ghost;
  const edge = byPlace ? certainEdge(ghost) : edgeOf(ghost);
  const spacing = HATCH_PX * context.mmPerPx;
  const nodes: SceneNode[] = [];
  const landed = placed.landed.map(context.toRing);
  if (landed.length > 0) {
    nodes.push(
      area(ghost.name, landed, 'ochre', focused ? 2.25 : 1, edge, ghost.name),
      strokes(`${ghost.name}/hatch`, landed, 90, spacing, 'ochre'),
    );
  }
  const inside = placed.inKeepClear.map(context.toRing);
  if (inside.length > 0) {
    nodes.push(
      area(`${ghost.name}/in-keep-clear`, inside, 'thread', focused ? 2.25 : 1, edge, ghost.name),
      strokes(`${ghost.name}/in-keep-clear/hatch`, inside, 0, spacing, 'thread'),
    );
  }
  return byPlace ? [...nodes, ...uncertainNodes(ghost, byPlace.uncertain, context, focused)] : nodes;
}

/** A straight thread from where the tissue is to where it lands, and what it says. */
export function threadNodes(
  piece: PieceDrawing | undefined,
  ghost: GhostDrawing | undefined,
  context: PieceContext,
): SceneNode[] {
  const held = ghost ?? piece;
  if (!held) return [];
  const inside = held.inKeepClear.length > 0;
  // Tied where the place is certain, if any of it is.
  const tied = held.byPlace && held.byPlace.certain.landed.length > 0 ? held.byPlace.certain : held;
  const target = centroidOf((tied.inKeepClear.length > 0 ? tied.inKeepClear : tied.landed).map(context.toRing));
  if (!target) return [];
  const shift = ghost ? ghostVector(ghost, context) : slideVector(piece!, context);
  const origin: ScreenPoint = [target[0] + shift[0], target[1] + shift[1]];
  const colour = inside ? 'thread' : 'ochre';
  const side = held.side;
  const certain = !held.placeUncertain || tied !== held;
  const distance = `from the ${side} side, ${Math.round(held.distanceMm)} mm away`;
  const where = !certain
    ? `from the ${side} side, place uncertain`
    : held.placeUncertain
      ? `${distance}, the rest uncertain`
      : distance;
  const down = shift[1] > 0;
  const upright = Math.abs(shift[1]) >= Math.abs(shift[0]);
  const text = ghost ? `ghost of ${ghost.fatDisplacedMm === undefined ? 'tissue' : 'fat'} ${where}` : where;
  const { anchor, sign } = anchorWithin(text, origin, context.bounds, context.mmPerPx);
  return [
    { kind: 'lines', name: 'thread', lines: [[origin, target]], stroke: { colour, widthPx: 1.5, edge: 'dotted' } },
    { kind: 'marker', name: 'thread/origin', at: origin, shape: 'ring', colour },
    { kind: 'marker', name: 'thread/landing', at: target, shape: 'dot', colour },
    {
      kind: 'text',
      name: 'thread/label',
      text,
      at: origin,
      offsetPx: upright ? [10 * sign, down ? 22 : -14] : [0, -14],
      anchor: upright || anchor !== 'start' ? anchor : 'middle',
      size: 'note',
      colour,
    },
  ];
}

/** From where a piece lands back to where it is: n·W along phase; a neighbour in the slab lies elsewhere in depth. */
export function slideVector(piece: PieceDrawing, context: PieceContext): ScreenPoint {
  if (piece.order === 0) return [0, 0];
  const back = -Math.sign(piece.order) * piece.distanceMm;
  return [plain(context.phase[0] * back), plain(context.phase[1] * back)];
}

function ghostVector(ghost: GhostDrawing, context: PieceContext): ScreenPoint {
  const back = -Math.sign(ghost.multiple) * ghost.distanceMm;
  return [plain(context.phase[0] * back), plain(context.phase[1] * back)];
}

function plain(value: number): number {
  return value === 0 ? 0 : value;
}

function area(
  name: string,
  rings: readonly Ring[],
  colour: 'ochre' | 'thread',
  widthPx: number,
  edge: Stroke['edge'],
  hover: string,
  slideFrom?: ScreenPoint,
): AreaNode {
  return {
    kind: 'area',
    name,
    rings,
    fill: colour === 'ochre' ? 'ochre-wash' : 'thread-wash',
    fillOpacity: 0.8,
    stroke: { colour, widthPx, edge },
    hover,
    ...(slideFrom ? { slideFrom } : {}),
  };
}

function strokes(
  name: string,
  rings: readonly Ring[],
  angleDeg: number,
  spacingMm: number,
  colour: 'ochre' | 'thread',
  slideFrom?: ScreenPoint,
): LinesNode {
  return {
    kind: 'lines',
    name,
    lines: hatch(rings, angleDeg, spacingMm),
    stroke: { colour, widthPx: 1.25, edge: 'solid' },
    ...(slideFrom ? { slideFrom } : {}),
  };
}
