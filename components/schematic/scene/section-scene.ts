import type { Case } from '@/lib/physics/model/case';
import type { GhostDrawing, PieceDrawing, SectionDrawing, SectionRing, TissueDrawing } from '@/lib/physics/section/section-drawing';
import { anatomySketch } from './anatomy';
import { ghostNodes, landedNodes, sourceNodes, threadNodes } from './piece-nodes';
import { letterNodes, scaleNodes } from './frame-nodes';
import { anchorWithin } from './place-text';
import { boundsOf, joinBounds, rectangle } from './rings';
import type { AreaNode, Bounds, MarkerNode, Ring, Scene, SceneNode, Stroke, TextNode } from './scene';
import { screenFrame, toScreen, type ScreenFrame, type ScreenPoint } from './section-frame';
import { inWindow, windowFrame, type WindowFrame } from './window-frame';
import { OVERHANG_MM, triedEdge, wovenEdge } from './woven-edge';

/**
 * One question with the section the engine cut for it, at the sizes that the site's certainty asks for: the picture
 * and the verdict are about the same body.
 */
export interface DrawnSection {
  readonly question: Case;
  readonly drawing: SectionDrawing;
  /** The tissue at the sizes as given; apart from the above where a size is uncertain. */
  readonly asGiven?: readonly TissueDrawing[];
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
    bounds,
  };
  const { pieces, ghosts } = shown.drawing;
  const focused = heldOf(pieces, input.focus);
  const focusedGhost = focused ? undefined : heldOf(ghosts, input.focus);
  const nodes: SceneNode[] = [
    { kind: 'area', name: 'picture', rings: [windowRing], fill: 'paper' },
    ...tissueNodes(drawing, input.asGiven, toRing),
    ...sketchNodes(question, input.asGiven ?? drawing.tissue, toRing),
    veil(bounds, windowRing),
    ...pieces.flatMap((piece) => sourceNodes(piece, pieceContext, piece === focused)),
    ...uniqueSources(ghosts).flatMap((ghost) => sourceNodes(ghost, pieceContext, ghost === focusedGhost)),
    ...pieces.flatMap((piece) => landedNodes(piece, pieceContext, piece === focused)),
    ...ghosts.flatMap((ghost) => ghostNodes(ghost, pieceContext, ghost === focusedGhost)),
    ...edgeNodes(window, input),
    { kind: 'area', name: 'fov', rings: [windowRing], stroke: { colour: 'ink', widthPx: 1.75, edge: 'solid' } },
    ...areaNodes(drawing, question, toRing),
    ...threadNodes(focused, focusedGhost, pieceContext),
    ...letterNodes(bounds, question, window, mmPerPx),
    ...scaleNodes(bounds, mmPerPx),
    ...(input.handles ?? []).map(
      ({ id, kind, at }): MarkerNode => ({
        kind: 'marker',
        name: `handle/${id}`,
        at,
        shape: kind === 'fov-centre' ? 'centre' : kind === 'fov-rotation' ? 'ring' : 'handle',
        colour: kind === 'keep-clear-edge' ? 'indigo' : kind === 'extent' || kind === 'must-stay-edge' ? 'ink-soft' : 'ink',
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
  const step = 10;
  const pad = 34;
  return {
    left: Math.floor((all.left - pad) / step) * step,
    top: Math.floor((all.top - pad) / step) * step,
    right: Math.ceil((all.right + pad) / step) * step,
    bottom: Math.ceil((all.bottom + pad + 14) / step) * step,
  };
}

/**
 * Filled to the size that is counted on; inside it the size as given, and between them a band. What is counted on beyond
 * a size that was given is an estimate, so its edge is dotted, whether or not the size was measured.
 */
function tissueNodes(
  drawing: SectionDrawing,
  asGiven: readonly TissueDrawing[] | undefined,
  toRing: (ring: SectionRing) => Ring,
): AreaNode[] {
  const given = new Map(
    (asGiven ?? [])
      .filter((tissue) => tissue.rings.length > 0 && differs(tissue, drawing.tissue))
      .map((tissue) => [tissue.name, tissue]),
  );
  const outlines = drawing.tissue
    .filter(({ rings }) => rings.length > 0)
    .flatMap((tissue): AreaNode[] => {
      const { withinUsable, beyondUsable } = tissue;
      const dotted = tissue.estimated || given.has(tissue.name);
      const edge = tissue.placeUncertain && !beyondUsable ? 'dashed' : dotted ? 'dotted' : 'solid';
      const stroke: Stroke = { colour: 'ink-soft', widthPx: 1.25, edge };
      const whole: AreaNode = { kind: 'area', name: tissue.name, rings: tissue.rings.map(toRing), fill: 'tissue-fat' };
      if (!withinUsable || !beyondUsable) return [{ ...whole, stroke }];
      return [
        whole,
        { kind: 'area', name: `${tissue.name}/within-usable`, rings: withinUsable.map(toRing), stroke },
        { kind: 'area', name: `${tissue.name}/beyond-usable`, rings: beyondUsable.map(toRing), stroke: { ...stroke, edge: 'dashed' } },
      ];
    });
  const bands = drawing.tissue.flatMap((tissue): AreaNode[] => {
    const mean = given.get(tissue.name);
    if (!mean || tissue.rings.length === 0) return [];
    const rings = mean.rings.map(toRing);
    return [
      { kind: 'area', name: `${tissue.name}/band`, rings: [...tissue.rings.map(toRing), ...rings], fill: 'ink-soft', fillOpacity: 0.16 },
      {
        kind: 'area',
        name: `${tissue.name}/as-given`,
        rings,
        stroke: { colour: 'ink-soft', widthPx: 1.25, edge: mean.estimated ? 'dotted' : 'solid', opacity: 0.75 },
      },
    ];
  });
  return [...outlines, ...bands];
}

/** Less than this apart, two outlines would only look like a thick line, mm. */
const BAND_MM = 1;

function differs(tissue: TissueDrawing, sure: readonly TissueDrawing[]): boolean {
  const other = sure.find(({ name }) => name === tissue.name);
  const a = boundsOf(tissue.rings);
  const b = other ? boundsOf(other.rings) : null;
  if (!a || !b) return true;
  return (['left', 'right', 'top', 'bottom'] as const).some((edge) => Math.abs(a[edge] - b[edge]) > BAND_MM);
}

function sketchNodes(question: Case, tissue: readonly TissueDrawing[], toRing: (ring: SectionRing) => Ring): readonly AreaNode[] {
  const { patient, prescription } = question;
  return anatomySketch(patient.region, prescription.plane, tissue, (index) => tissue[index]!.rings.map(toRing));
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

function edgeNodes(window: WindowFrame, input: SectionSceneInput): SceneNode[] {
  const { tried, mmPerPx } = input;
  const edges: SceneNode[] = [...wovenEdge(window, -1, mmPerPx), ...wovenEdge(window, 1, mmPerPx)];
  if (!tried) return [...edges, edgeLabel('acquired-edge/label', `acquired ${widthWords(window)}`, window, 'now', input)];
  const next = windowFrame(tried.question.prescription);
  if (!sameWindow(window, next)) {
    const ring = rectangle((a, b) => inWindow(next, a, b), next.halfPhaseMm, next.halfReadoutMm);
    edges.push({ kind: 'area', name: 'tried-fov', rings: [ring], stroke: { colour: 'indigo', widthPx: 1.5, edge: 'solid' } });
  }
  return [
    ...edges,
    triedEdge(next, -1),
    triedEdge(next, 1),
    edgeLabel('tried-edge/label', `tried ${widthWords(next)}`, next, 'tried', input),
    edgeLabel('acquired-edge/label', `now ${widthWords(window)}`, window, 'now', input),
  ];
}

const widthWords = (frame: WindowFrame): string => `${Math.round(2 * frame.halfAcquiredMm)} mm`;

function sameWindow(a: WindowFrame, b: WindowFrame): boolean {
  const figures = (frame: WindowFrame): number[] => [...frame.centre, ...frame.phase, frame.halfPhaseMm, frame.halfReadoutMm];
  return figures(a).every((figure, i) => Math.abs(figure - figures(b)[i]!) < 1e-6);
}

/**
 * Beside the end of the edge, off the picture: now below the line, what is tried above it. Where there is no room beside
 * a level edge the words go to the corner, clear of those over and under the body that say where tissue comes from.
 */
function edgeLabel(name: string, text: string, frame: WindowFrame, which: 'now' | 'tried', input: SectionSceneInput): TextNode {
  const across = Math.abs(frame.phase[1]) > Math.abs(frame.phase[0]);
  const towards = across ? frame.phase[1] : frame.phase[0];
  // The upper of two level edges, the right-hand one of two upright ones.
  const sign = across === towards > 0 ? -1 : 1;
  const readoutSign = across ? Math.sign(frame.readout[0]) : -Math.sign(frame.readout[1]);
  const end = readoutSign * (frame.halfReadoutMm + OVERHANG_MM);
  const at = inWindow(frame, sign * frame.halfAcquiredMm, end);
  const { anchor } = anchorWithin(text, at, input.bounds, input.mmPerPx);
  const words = { kind: 'text', name, text, size: 'note', colour: which === 'now' ? 'ink-soft' : 'indigo' } as const;
  if (!across) return { ...words, at, offsetPx: [0, which === 'now' ? -10 : -26], anchor: 'middle' };
  if (anchor === 'start') return { ...words, at, offsetPx: [8, which === 'now' ? 13 : -5], anchor };
  const { right, top } = input.bounds;
  return { ...words, at: [right, top], offsetPx: [-8, which === 'now' ? 36 : 18], anchor: 'end' };
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
    const { right, bottom } = boundsOf([toRing(drawing.mustStayDisplayed)])!;
    // Below it and at its other end than the keep-clear area's words: the two boxes often share their edges.
    nodes.push({
      kind: 'text',
      name: 'must-stay-displayed/label',
      text: 'must stay displayed',
      at: [right, bottom],
      offsetPx: [0, 20],
      anchor: 'end',
      size: 'note',
      colour: 'ink-soft',
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

/** The hovered one; else the first that reaches the keep-clear area, so that its thread is drawn without asking. */
function heldOf<T extends PieceDrawing | GhostDrawing>(drawn: readonly T[], focus: string | undefined): T | undefined {
  if (focus !== undefined) return drawn.find(({ name }) => name === focus);
  return drawn.find(({ inKeepClear }) => inKeepClear.length > 0);
}

/** Several ghosts of one piece of tissue have one source. */
function uniqueSources(ghosts: readonly GhostDrawing[]): readonly GhostDrawing[] {
  const first = new Map<string, GhostDrawing>();
  for (const ghost of ghosts) {
    const key = `${ghost.part}/${ghost.side}`;
    if (!first.has(key)) first.set(key, ghost);
  }
  return [...first.values()];
}
