import { SIDE_LETTERS } from '@/lib/presentation/anatomy-words';
import type { Case } from '@/lib/physics/model/case';
import type { PieceDrawing, SectionDrawing, SectionRing } from '@/lib/physics/section/section-drawing';
import { anatomySketch } from './anatomy';
import { ghostNodes, landedNodes, sourceNodes, threadNodes } from './piece-nodes';
import { boundsOf, joinBounds, rectangle } from './rings';
import type { AreaNode, Bounds, LinesNode, MarkerNode, Ring, Scene, SceneNode, TextNode } from './scene';
import { screenFrame, screenAxes, toScreen, type ScreenFrame, type ScreenPoint } from './section-frame';
import { inWindow, windowFrame, type WindowFrame } from './window-frame';
import { triedEdge, wovenEdge } from './woven-edge';

/** One question with the section the engine cut for it. */
export interface DrawnSection {
  readonly question: Case;
  readonly drawing: SectionDrawing;
}

export interface SectionSceneInput extends DrawnSection {
  /** What a tried remedy would make of it. */
  readonly tried?: DrawnSection;
  readonly bounds: Bounds;
  /** Name of the piece or ghost that is hovered or focused. */
  readonly focus?: string;
  readonly handles?: readonly { readonly id: string; readonly kind: string; readonly at: ScreenPoint }[];
  /** Size of a screen pixel, mm: strokes and gaps keep their size at every zoom. */
  readonly mmPerPx: number;
}

/** Section coordinates → screen. */
function screener(drawing: SectionDrawing, screen: ScreenFrame): (ring: SectionRing) => Ring {
  const readout = toScreen(screen, drawing.frame.readout);
  const phase = toScreen(screen, drawing.frame.phase);
  return (ring) => ring.map(([r, p]) => [readout[0] * r + phase[0] * p, readout[1] * r + phase[1] * p] as const);
}

/** From section coordinates to the screen, for one drawing. */
export function ringOnScreen(drawing: SectionDrawing, prescription: Case['prescription']): (ring: SectionRing) => Ring {
  return screener(drawing, screenFrame(prescription));
}

/** Geometry → picture of one section: where tissue is, where it lands, and what was asked to stay free of it. */
export function sectionScene(input: SectionSceneInput): Scene {
  const { question, drawing, tried, bounds, mmPerPx } = input;
  const screen = screenFrame(question.prescription);
  const toRing = screener(drawing, screen);
  const window = windowFrame(question.prescription);
  const windowRing = rectangle((a, b) => inWindow(window, a, b), window.halfPhaseMm, window.halfReadoutMm);
  const shown = tried ?? { question, drawing };
  const pieceContext = {
    toRing: screener(shown.drawing, screen),
    phase: toScreen(screen, shown.drawing.frame.phase),
    readout: toScreen(screen, shown.drawing.frame.readout),
    mmPerPx,
  };
  const pieces = shown.drawing.pieces;
  const focused = focusedPiece(pieces, input.focus);
  const nodes: SceneNode[] = [
    { kind: 'area', name: 'picture', rings: [windowRing], fill: 'paper' },
    ...tissueNodes(drawing, toRing),
    ...sketchNodes(question, drawing, toRing),
    veil(bounds, windowRing),
    ...pieces.flatMap((piece) => sourceNodes(piece, pieceContext, piece === focused)),
    ...pieces.flatMap((piece) => landedNodes(piece, pieceContext, piece === focused)),
    ...shown.drawing.ghosts.flatMap((ghost) => ghostNodes(ghost, pieceContext, ghost.name === input.focus)),
    ...edgeNodes(window, question, tried, mmPerPx),
    { kind: 'area', name: 'fov', rings: [windowRing], stroke: { colour: 'ink', widthPx: 1.75, edge: 'solid' } },
    ...areaNodes(drawing, question, toRing),
    ...threadNodes(focused, shown.drawing.ghosts.find(({ name }) => name === input.focus), pieceContext),
    ...letterNodes(bounds, question, window, mmPerPx),
    ...scaleNodes(bounds, mmPerPx),
    ...(input.handles ?? []).map(
      ({ id, kind, at }): MarkerNode => ({
        kind: 'marker',
        name: `handle/${id}`,
        at,
        shape: kind === 'fov-centre' ? 'centre' : 'handle',
        colour: kind === 'keep-clear-edge' ? 'indigo' : kind === 'extent' ? 'ink-soft' : 'ink',
      }),
    ),
  ];
  return { bounds, nodes };
}

/** Room round the body, the window and both acquired widths, in whole steps so that the picture does not breathe. */
export function sectionBounds(now: DrawnSection, tried?: DrawnSection): Bounds {
  const cornersOf = ({ question }: DrawnSection): Bounds => {
    const frame = windowFrame(question.prescription);
    const halfPhase = Math.max(frame.halfAcquiredMm, frame.halfPhaseMm);
    return boundsOf([rectangle((a, b) => inWindow(frame, a, b), halfPhase, frame.halfReadoutMm)])!;
  };
  const toRing = screener(now.drawing, screenFrame(now.question.prescription));
  const body = boundsOf(now.drawing.tissue.flatMap(({ rings }) => rings.map(toRing)));
  const all = joinBounds(joinBounds(cornersOf(now), body), tried ? cornersOf(tried) : null);
  const step = 20;
  const pad = 34;
  return {
    left: Math.floor((all.left - pad) / step) * step,
    top: Math.floor((all.top - pad) / step) * step,
    right: Math.ceil((all.right + pad) / step) * step,
    bottom: Math.ceil((all.bottom + pad + 14) / step) * step,
  };
}

function tissueNodes(drawing: SectionDrawing, toRing: (ring: SectionRing) => Ring): AreaNode[] {
  return drawing.tissue
    .filter(({ rings }) => rings.length > 0)
    .map((tissue) => ({
      kind: 'area',
      name: tissue.name,
      rings: tissue.rings.map(toRing),
      fill: 'tissue-fat',
      stroke: {
        colour: 'ink-soft',
        widthPx: 1.25,
        edge: tissue.placeUncertain ? 'dashed' : tissue.estimated ? 'dotted' : 'solid',
      },
    }));
}

function sketchNodes(question: Case, drawing: SectionDrawing, toRing: (ring: SectionRing) => Ring): readonly AreaNode[] {
  const trunk = drawing.tissue.find(({ kind }) => kind === 'trunk');
  const bounds = trunk ? boundsOf(trunk.rings.map(toRing)) : null;
  return bounds ? anatomySketch(question.patient.region, question.prescription.plane, bounds) : [];
}

/** What lies outside the displayed window steps back. */
function veil(bounds: Bounds, window: Ring): AreaNode {
  const far = 4000;
  const all: Ring = [
    [bounds.left - far, bounds.top - far],
    [bounds.right + far, bounds.top - far],
    [bounds.right + far, bounds.bottom + far],
    [bounds.left - far, bounds.bottom + far],
  ];
  return { kind: 'area', name: 'outside-the-picture', rings: [all, window], fill: 'cloth', fillOpacity: 0.6 };
}

function edgeNodes(
  window: WindowFrame,
  question: Case,
  tried: SectionSceneInput['tried'],
  mmPerPx: number,
): SceneNode[] {
  const edges: SceneNode[] = [...wovenEdge(window, -1, mmPerPx), ...wovenEdge(window, 1, mmPerPx)];
  if (!tried) return edges;
  const next = windowFrame(tried.question.prescription);
  if (tried.question.prescription.phaseAxis !== question.prescription.phaseAxis || next.halfPhaseMm !== window.halfPhaseMm || next.centre[0] !== window.centre[0] || next.centre[1] !== window.centre[1] || next.halfReadoutMm !== window.halfReadoutMm) {
    const ring = rectangle((a, b) => inWindow(next, a, b), next.halfPhaseMm, next.halfReadoutMm);
    edges.push({ kind: 'area', name: 'tried-fov', rings: [ring], stroke: { colour: 'indigo', widthPx: 1.5, edge: 'solid' } });
  }
  edges.push(triedEdge(next, -1), triedEdge(next, 1));
  const upper = (frame: WindowFrame): -1 | 1 => (frame.phase[1] > 0 || (frame.phase[1] === 0 && frame.phase[0] > 0) ? -1 : 1);
  const label = (name: string, text: string, frame: WindowFrame, colour: 'indigo' | 'ink-soft', below: boolean): TextNode => ({
    kind: 'text',
    name,
    text,
    at: inWindow(frame, upper(frame) * frame.halfAcquiredMm, -frame.halfReadoutMm),
    offsetPx: [8, below ? 16 : -8],
    anchor: 'start',
    size: 'note',
    colour,
  });
  const mm = (frame: WindowFrame): string => `${Math.round(2 * frame.halfAcquiredMm)} mm`;
  edges.push(label('tried-edge/label', `tried: acquired ${mm(next)}`, next, 'indigo', false));
  edges.push(label('acquired-edge/label', `now: ${mm(window)}`, window, 'ink-soft', true));
  return edges;
}

function areaNodes(drawing: SectionDrawing, question: Case, toRing: (ring: SectionRing) => Ring): SceneNode[] {
  const nodes: SceneNode[] = [];
  if (drawing.mustStayDisplayed.length > 0) {
    nodes.push({
      kind: 'area',
      name: 'must-stay-displayed',
      rings: [toRing(drawing.mustStayDisplayed)],
      stroke: { colour: 'ink-soft', widthPx: 1, edge: 'dotted' },
    });
  }
  if (drawing.keepClear.length === 0) return nodes;
  const ring = toRing(drawing.keepClear);
  if (question.keepClear.area.kind === 'whole-picture') return nodes;
  nodes.push({
    kind: 'area',
    name: 'keep-clear/with-margin',
    rings: [toRing(drawing.keepClearWithMargin)],
    stroke: { colour: 'indigo', widthPx: 1, edge: 'dotted', opacity: 0.55 },
  });
  nodes.push({
    kind: 'area',
    name: 'keep-clear',
    rings: [ring],
    stroke: { colour: 'indigo', widthPx: 1.75, edge: 'dashed' },
  });
  const bounds = boundsOf([ring])!;
  const area = question.keepClear.area;
  nodes.push({
    kind: 'text',
    name: 'keep-clear/label',
    text: area.label ? `keep-clear area: ${area.label}` : 'keep-clear area',
    at: [bounds.left, bounds.bottom],
    offsetPx: [8, -8],
    anchor: 'start',
    size: 'note',
    colour: 'indigo',
  });
  return nodes;
}

function letterNodes(bounds: Bounds, question: Case, window: WindowFrame, mmPerPx: number): SceneNode[] {
  const { sides } = screenFrame(question.prescription);
  const [u, v] = window.centre;
  const inset = 13 * mmPerPx;
  const letter = (side: keyof typeof sides, at: ScreenPoint): TextNode => ({
    kind: 'text',
    name: `letter/${side}`,
    text: SIDE_LETTERS[sides[side]],
    at,
    offsetPx: [0, 6],
    anchor: 'middle',
    size: 'letter',
    colour: 'ink',
  });
  const down = question.prescription.phaseAxis === screenAxes(question.prescription.plane).vertical;
  const corner: ScreenPoint = [bounds.left + 10 * mmPerPx, bounds.bottom - 10 * mmPerPx];
  const length = 40 * mmPerPx;
  const tip: ScreenPoint = down ? [corner[0], corner[1] - length] : [corner[0] + length, corner[1]];
  const head = (at: ScreenPoint, sign: number): (readonly ScreenPoint[])[] => {
    const a = 5 * mmPerPx;
    return down
      ? [[[at[0] - a, at[1] + sign * a], at, [at[0] + a, at[1] + sign * a]]]
      : [[[at[0] - sign * a, at[1] - a], at, [at[0] - sign * a, at[1] + a]]];
  };
  const arrow: LinesNode = {
    kind: 'lines',
    name: 'phase-direction',
    lines: [[corner, tip], ...head(tip, 1), ...head(corner, -1)],
    stroke: { colour: 'ink', widthPx: 1.5, edge: 'solid' },
  };
  return [
    letter('left', [bounds.left + inset, v]),
    letter('right', [bounds.right - inset, v]),
    letter('top', [u, bounds.top + inset]),
    letter('bottom', [u, bounds.bottom - inset]),
    arrow,
    {
      kind: 'text',
      name: 'phase-direction/label',
      text: 'phase',
      at: down ? [corner[0], corner[1] - length / 2] : [tip[0], tip[1]],
      offsetPx: down ? [12, 5] : [12, 5],
      anchor: 'start',
      size: 'note',
      colour: 'ink-soft',
    },
  ];
}

function scaleNodes(bounds: Bounds, mmPerPx: number): SceneNode[] {
  const right = bounds.right - 10 * mmPerPx;
  const at = bounds.bottom - 10 * mmPerPx;
  const tick = 5 * mmPerPx;
  return [
    {
      kind: 'lines',
      name: 'scale-bar',
      lines: [
        [[right - 100, at], [right, at]],
        [[right - 100, at - tick], [right - 100, at + tick]],
        [[right, at - tick], [right, at + tick]],
      ],
      stroke: { colour: 'ink', widthPx: 1.5, edge: 'solid' },
    },
    {
      kind: 'text',
      name: 'scale-bar/label',
      text: '100 mm',
      at: [right - 50, at],
      offsetPx: [0, -8],
      anchor: 'middle',
      size: 'note',
      colour: 'ink-soft',
    },
  ];
}

/** The hovered piece; else the one that matters most, so that its thread is drawn without asking. */
function focusedPiece(pieces: readonly PieceDrawing[], focus: string | undefined): PieceDrawing | undefined {
  if (focus !== undefined) return pieces.find(({ name }) => name === focus);
  return pieces.find(({ inKeepClear }) => inKeepClear.length > 0);
}
