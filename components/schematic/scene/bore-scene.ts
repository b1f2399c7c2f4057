import type { BorePart, BoreSection, Clearance } from '@/lib/physics/bore/bore-types';
import type { BoreCheck } from '@/lib/physics/bore/check-bore';
import { FLAT_BACK_EXPONENT } from '@/lib/physics/bore/bore-clearance';
import type { Patient } from '@/lib/physics/model/patient';
import type { Scanner } from '@/lib/physics/model/scanner';
import { isMeasured, SIDE_LETTERS } from '@/lib/presentation/anatomy-words';
import { anchorWithin } from './place-text';
import { hatch } from './rings';
import type { AreaNode, Bounds, MarkerNode, Ring, Scene, SceneNode, TextNode } from './scene';
import type { ScreenPoint } from './section-frame';

export interface BoreSceneInput {
  readonly check: BoreCheck;
  readonly scanner: Scanner;
  readonly patient: Patient;
  /** Pad added on the table, compressed, mm. */
  readonly padMm: number;
  readonly bounds: Bounds;
  readonly mmPerPx: number;
  readonly handles?: readonly { readonly id: string; readonly at: ScreenPoint }[];
}

const POINTS = 120;
/** Room round the opening, mm. */
const PAD_MM = 46;

export function boreBounds({ boreDiameterMm }: Pick<Scanner, 'boreDiameterMm'>): Bounds {
  const half = boreDiameterMm / 2 + PAD_MM;
  return { left: -half, right: half, top: -half, bottom: half };
}

/** Bore's frame → screen: to the patient's left is to the right, up is up. */
const onScreen = (x: number, up: number): ScreenPoint => [x, up === 0 ? 0 : -up];

/** Seen along the bore with the patient's left on the right: the opening, the table, and every section that lies in it. */
export function boreScene(input: BoreSceneInput): Scene {
  const { check, scanner, bounds, mmPerPx } = input;
  const radius = scanner.boreDiameterMm / 2;
  const opening: Ring = arc(0, 2 * Math.PI, (t) => onScreen(radius * Math.cos(t), radius * Math.sin(t)));
  const tight = check.tightest;
  const nodes: SceneNode[] = [
    { kind: 'area', name: 'bore/opening', rings: [opening], fill: 'paper', stroke: { colour: 'ink', widthPx: 2, edge: 'solid' } },
    ...tableNodes(input, radius),
    ...check.inside.flatMap((section) => sectionNodes(section, input, section.name === tight?.section)),
    ...(tight ? clearanceNodes(tight, radius, bounds, mmPerPx) : []),
    ...letterNodes(input, radius),
    ...(input.handles ?? []).map(
      ({ id, at }): MarkerNode => ({ kind: 'marker', name: `handle/${id}`, at, shape: 'handle', colour: 'ink' }),
    ),
  ];
  return { bounds, nodes };
}

function arc(from: number, to: number, at: (t: number) => ScreenPoint): Ring {
  return Array.from({ length: POINTS + 1 }, (_, i) => at(from + ((to - from) * i) / POINTS));
}

function tableNodes({ scanner, padMm, mmPerPx }: BoreSceneInput, radius: number): SceneNode[] {
  const below = scanner.tableBelowCentreMm;
  const half = Math.sqrt(radius ** 2 - below ** 2);
  const end = Math.asin(below / radius);
  const table: Ring = arc(Math.PI + end, 2 * Math.PI - end, (t) => onScreen(radius * Math.cos(t), radius * Math.sin(t)));
  const nodes: SceneNode[] = [
    { kind: 'area', name: 'table', rings: [table], fill: 'cloth', stroke: { colour: 'ink', widthPx: 1.25, edge: 'solid' } },
    { kind: 'lines', name: 'table/hatch', lines: hatch([table], -45, 14 * mmPerPx), stroke: { colour: 'line-strong', widthPx: 1, edge: 'solid', opacity: 0.6 } },
    note('table/label', `table, ${Math.round(below)} mm below the centre`, [0, below], [0, 30], 'middle', 'ink-soft'),
  ];
  if (padMm > 0) {
    const top = below - padMm;
    const reach = (up: number) => Math.sqrt(Math.max(0, radius ** 2 - up ** 2));
    const pad: Ring = [[-half, below], [half, below], [Math.min(half, reach(top)), top], [-Math.min(half, reach(top)), top]];
    nodes.push({ kind: 'area', name: 'pad', rings: [pad], fill: 'wash', stroke: { colour: 'ink-soft', widthPx: 1, edge: 'solid' } });
  }
  return nodes;
}

/** Lowest point of a part on the table, above it by pad and by what it is raised. */
function outline(part: BorePart, { scanner, patient, padMm }: BoreSceneInput, exponent: number, coilMm: number): Ring {
  const a = part.breadthMm.value / 2;
  const b = part.depthMm.value / 2;
  const x0 = part.centreMm + patient.lateralOffsetMm;
  const y0 = b - scanner.tableBelowCentreMm + padMm + part.raisedMm;
  const power = (x: number): number => Math.sign(x) * Math.abs(x) ** (2 / exponent);
  return arc(0, 2 * Math.PI, (t) => {
    const sin = Math.sin(t);
    return onScreen(x0 + a * power(Math.cos(t)), y0 + b * power(sin) + (sin > 0 ? coilMm : 0));
  });
}

/** The tightest section is filled, the others outlined behind it; a size that was not measured has a dotted edge. */
function sectionNodes(section: BoreSection, input: BoreSceneInput, tightest: boolean): SceneNode[] {
  const flat = input.check.tightest?.outline === 'superellipse';
  return section.parts.flatMap((part): SceneNode[] => {
    const exponent = tightest && flat && part.name === input.check.tightest?.part ? FLAT_BACK_EXPONENT : 2;
    const estimated = !isMeasured(part.breadthMm.source) || !isMeasured(part.depthMm.source);
    const body: AreaNode = {
      kind: 'area',
      name: `section/${section.name}/${part.name}`,
      rings: [outline(part, input, exponent, 0)],
      ...(tightest ? { fill: 'tissue-fat' as const, fillOpacity: 0.85 } : {}),
      stroke: { colour: tightest ? 'ink' : 'ink-soft', widthPx: tightest ? 1.75 : 1.25, edge: estimated ? 'dotted' : 'solid' },
    };
    if (!part.underCoil || input.scanner.anteriorCoilMm <= 0) return [body];
    const front = outline(part, input, exponent, 0).filter(([, v]) => v <= middleOf(body));
    const raised = outline(part, input, exponent, input.scanner.anteriorCoilMm).filter(([, v]) => v <= middleOf(body));
    const coil: AreaNode = {
      kind: 'area',
      name: `coil/${section.name}`,
      rings: [[...front, ...[...raised].reverse()]],
      fill: 'wash',
      fillOpacity: 0.8,
      stroke: { colour: 'indigo', widthPx: 1.25, edge: 'solid' },
    };
    const top = raised.reduce((best, point) => (point[1] < best[1] ? point : best), raised[0]!);
    return [body, coil, note(`coil/${section.name}/label`, `coil, ${Math.round(input.scanner.anteriorCoilMm)} mm`, [top[0], top[1]], [0, -6], 'middle', 'indigo')];
  });
}

/** Height on the screen at which a part is broadest. */
function middleOf({ rings }: AreaNode): number {
  const heights = rings[0]!.map(([, v]) => v);
  return (Math.min(...heights) + Math.max(...heights)) / 2;
}

/** From the tightest point of the body straight out to the opening, or, where the opening is too small, back in to it. */
function clearanceNodes(tight: Clearance, radius: number, bounds: Bounds, mmPerPx: number): SceneNode[] {
  const [x, up] = tight.pointMm;
  const distance = Math.hypot(x, up) || 1;
  const body = onScreen(x, up);
  const wall = onScreen((x / distance) * radius, (up / distance) * radius);
  const short = tight.clearanceMm < 0;
  // To the millimetre, as in the words beside it: the sizes are no better known.
  const rounded = Math.round(Math.abs(tight.clearanceMm));
  const text = short ? `${rounded} mm too small, at the ${tight.section}` : `${rounded} mm, at the ${tight.section}`;
  // Inside the opening: outside it there may be no room.
  const { anchor } = anchorWithin(text, body, { ...bounds, left: -radius, right: radius }, mmPerPx);
  const inward: TextNode['anchor'] = x > 20 ? 'end' : x < -20 ? 'start' : anchor;
  const nudge = inward === 'end' ? -12 : inward === 'start' ? 12 : 0;
  return [
    { kind: 'lines', name: 'clearance', lines: [[body, wall]], stroke: { colour: 'ink', widthPx: 2.5, edge: short ? 'dashed' : 'solid' } },
    { kind: 'marker', name: 'clearance/body', at: body, shape: 'dot', colour: 'ink' },
    { kind: 'marker', name: 'clearance/opening', at: wall, shape: 'ring', colour: 'ink' },
    note('clearance/label', text, body, [nudge, up < 0 ? -8 : 18], inward, 'ink'),
  ];
}

function letterNodes({ patient, scanner, bounds, mmPerPx }: BoreSceneInput, radius: number): TextNode[] {
  const prone = patient.position.endsWith('prone');
  const at = radius + PAD_MM / 2;
  const inset = 13 * mmPerPx;
  // An enlarged picture keeps them at its edges.
  const seen = (value: number, low: number, high: number): number => Math.min(high - inset, Math.max(low + inset, value));
  const letter = (side: keyof typeof SIDE_LETTERS, [u, v]: ScreenPoint): TextNode => ({
    kind: 'text',
    name: `letter/${side}`,
    text: SIDE_LETTERS[side],
    at: [seen(u, bounds.left, bounds.right), seen(v, bounds.top, bounds.bottom)],
    offsetPx: [0, 6],
    anchor: 'middle',
    size: 'letter',
    colour: 'ink',
  });
  return [
    letter('right', [-at, 0]),
    letter('left', [at, 0]),
    letter(prone ? 'posterior' : 'anterior', [0, -at]),
    letter(prone ? 'anterior' : 'posterior', [0, at]),
    // Inside, under the top: beside the opening there may be no room.
    note('bore/label', `opening ${Math.round(scanner.boreDiameterMm)} mm`, [0, -radius], [0, 22], 'middle', 'ink-soft'),
  ];
}

function note(
  name: string,
  text: string,
  at: ScreenPoint,
  offsetPx: ScreenPoint,
  anchor: TextNode['anchor'],
  colour: TextNode['colour'],
): TextNode {
  return { kind: 'text', name, text, at, offsetPx, anchor, size: 'note', colour };
}
