import { fitScene, fromPixels, type Bounds, type Scene, type SceneNode, type Token } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { anchorWithin } from '@/components/schematic/scene/place-text';
import { HEIGHT_SHARE, slabScene } from '@/components/schematic/scene/slab-scene';
import { sliceAxisOf } from '@/lib/domain/case/lines';
import { geometryCase } from '@/lib/physics/assess/assess';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { slabSurroundings } from '@/lib/physics/assess/slab-surroundings';
import { AXIS_SIDES } from '@/lib/physics/geometry/vector';
import type { PartitionResult, SlabResult } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { slabSources } from '@/lib/physics/slab/assess-slab';
import type { SlabSource, TissueAlongSlab } from '@/lib/physics/slab/slab-types';
import { between, box, slabSketch, type Lane } from './slab-body';
import { travelNodes, travelsOf } from './slab-travel';

export interface SlabStageInput {
  readonly question: Case;
  readonly slab: SlabResult;
  readonly size: { readonly widthPx: number; readonly heightPx: number };
  /** Partition looked at, by its offset, mm. */
  readonly sliceOffsetMm: number;
}

/** Room for the highest bar above the base line, and the body's lane below it, as shares of the acquired slab. */
const HIGHEST = 0.66;
const LANE = [0.13, 0.41] as const;
/** Below the lane: two paths and a line of words. */
const BELOW = 0.62;
/** A phone's width, where words that stand beside the slab go below it. */
const NARROW_PX = 480;
const BELOW_NARROW = 0.86;

const PROFILE_NAMES: Readonly<Record<SlabResult['profileKind'], string>> = {
  'single-pulse': 'single-pulse profile',
  spoiled: 'spoiled profile',
  'non-selective': 'no slab selected',
};
/** What the bench says at places where here something else is drawn. */
const SAID_HERE = new Set(['partition/axis', 'keep-clear/label', 'acquired-edge/label']);

const worstAt = (sources: readonly SlabSource[], slabMm: number, z: number): number =>
  Math.max(...sources.map(({ profile, shiftShare }) => profile.at(z / slabMm - shiftShare)));

/**
 * The slab with the body lying in it. Above: the bench's own profile with its partitions, drawn on into the skirts.
 * Below: the body, cut into partitions; what is excited beyond an end, outlined, and hatched where it lands.
 */
export function slabStage({ question, slab, size, sliceOffsetMm }: SlabStageInput): Scene {
  const given = geometryCase(freeze(question));
  const { slices, plane } = given.prescription;
  if (slices.mode !== 'slab') throw new Error('Only a slab has a slab view.');
  const thickness = slices.partitionThicknessMm;
  const widthMm = slices.acquiredPartitions * thickness;
  const slabMm = slices.partitions * thickness;
  const { tissue } = slabSurroundings(given);
  const sources = slabSources(given.prescription, slices, given.scanner, given.policy);
  const inBody = (z: number): boolean => z >= tissue.rangeMm[0] && z <= tissue.rangeMm[1];
  const travels = travelsOf(slab, widthMm, thickness, (z) => (inBody(z) ? worstAt(sources, slabMm, z) : 0));

  const reach = Math.max(widthMm * 0.6, ...travels.flatMap(({ sourceMm }) => sourceMm.map((z) => Math.abs(z) + 0.04 * widthMm)));
  const highest = Math.max(...slab.partitions.map(({ signal, alias }) => signal + alias));
  const half = Math.min(reach, 1.5 * widthMm);
  const heightShare = Math.min(HEIGHT_SHARE, HIGHEST / (highest + 0.1));
  const plateau = widthMm * heightShare;
  const wanted: Bounds = { left: -half * 1.04, right: half * 1.04, top: -plateau * Math.max(1.7, highest + 0.15), bottom: widthMm * (size.widthPx < NARROW_PX ? BELOW_NARROW : BELOW) };
  const fit = fitScene(wanted, size.widthPx, size.heightPx);
  const [left, top] = fromPixels(fit, [0, 0]);
  const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
  const bounds = { left, right, top, bottom };
  const mmPerPx = 1 / fit.scale;
  const above = slabScene({ slab, sliceAxis: sliceAxisOf(plane), partitionThicknessMm: thickness, acquiredSlabMm: widthMm, bounds, mmPerPx, heightShare });
  const lane = [LANE[0] * widthMm, LANE[1] * widthMm] as const;
  const sketch = slabSketch(given, lane).map((organ) => ({ ...organ, rings: organ.rings.map((ring) => between(ring, [left, right])) }));
  return {
    bounds,
    nodes: [
      ...bodyNodes(tissue, bounds, lane),
      ...sketch,
      ...stackNodes(slab, slices, lane),
      ...joined(above.nodes.filter(({ name }) => !SAID_HERE.has(name) && !name.startsWith('level/'))).map((node) => offLines(node, bounds, mmPerPx)),
      ...wordNodes(slab, { widthMm, thickness, plateau, bounds, mmPerPx }),
      skirtNode(sources, slabMm, bounds, plateau),
      ...travels.flatMap((travel) => travelNodes(travel, { sides: AXIS_SIDES[sliceAxisOf(plane)], lane, mmPerPx, bounds, sketch })),
      ...chosenNodes(slab, sliceOffsetMm, thickness, 1.12 * plateau, lane),
    ],
  };
}

function bodyNodes(tissue: TissueAlongSlab, bounds: Bounds, lane: Lane): SceneNode[] {
  const [from, to] = [Math.max(tissue.rangeMm[0], bounds.left), Math.min(tissue.rangeMm[1], bounds.right)];
  if (from >= to) return [];
  return [{ kind: 'area', name: 'body', rings: [box(from, to, lane)], fill: 'tissue-fat', stroke: { colour: 'ink-soft', widthPx: 1, edge: 'dotted' } }];
}

/** One box a partition: displayed ones whole, those acquired and cut off dotted. */
function stackNodes(slab: SlabResult, slices: { acquiredPartitions: number; partitionThicknessMm: number }, lane: Lane): SceneNode[] {
  const { acquiredPartitions, partitionThicknessMm: thickness } = slices;
  const shown = slab.partitions.length;
  const [half, acquiredHalf] = [(shown * thickness) / 2, (acquiredPartitions * thickness) / 2];
  const rings = slab.partitions.map(({ offsetMm }) => box(offsetMm - thickness / 2, offsetMm + thickness / 2, lane));
  // An odd one is half at either end.
  const cuts = Array.from({ length: Math.ceil((acquiredPartitions - shown) / 2) }, (_, i) => [
    half + i * thickness,
    Math.min(acquiredHalf, half + (i + 1) * thickness),
  ] as const);
  const discarded = cuts.flatMap(([from, to]) => [box(-to, -from, lane), box(from, to, lane)]);
  return [
    { kind: 'area', name: 'stack', rings, stroke: { colour: 'ink', widthPx: 0.75, edge: 'solid' } },
    ...(discarded.length > 0
      ? [{ kind: 'area', name: 'stack/cut-off', rings: discarded, stroke: { colour: 'ink-soft', widthPx: 0.75, edge: 'dotted' } } as const]
      : []),
  ];
}

/** The profile beyond the partitions, as far as the picture goes. */
function skirtNode(sources: readonly SlabSource[], slabMm: number, bounds: Bounds, height: number): SceneNode {
  const steps = 240;
  const at = (i: number): ScreenPoint => {
    const z = bounds.left + ((bounds.right - bounds.left) * i) / steps;
    return [z, -height * worstAt(sources, slabMm, z)];
  };
  return {
    kind: 'lines', name: 'profile/skirts',
    lines: [Array.from({ length: steps + 1 }, (_, i) => at(i))],
    stroke: { colour: 'ink', widthPx: 1.5, edge: 'dashed' },
  };
}

/**
 * Words of the bench's slab that here would lie on a line: the sides' letters stand at the picture's ends, where the
 * skirts have come down; the outermost numbers stand inside the acquired edge.
 */
function offLines(node: SceneNode, { left, right }: Bounds, mmPerPx: number): SceneNode {
  if (node.kind !== 'text') return node;
  if (node.name === 'partition/first') return { ...node, anchor: 'start', offsetPx: [0, 18] };
  if (node.name === 'partition/last') return { ...node, anchor: 'end', offsetPx: [0, 18] };
  if (!node.name.startsWith('letter/')) return node;
  const inset = 12 * mmPerPx;
  return { ...node, at: [node.name === 'letter/low' ? left + inset : right - inset, 0], offsetPx: [0, -10] };
}

const PARTITION = /^partition\/\d+(?<part>\/alias\/hatch|\/alias|)$/;
const PARTS: Readonly<Record<string, string>> = { '': 'signal', '/alias': 'alias', '/alias/hatch': 'hatch' };

/**
 * The partitions' bars, what wraps on them and its hatching, one node for each look instead of three a partition: a
 * control moves all of them in every frame. Ring by ring they stay what the bench draws.
 */
function joined(nodes: readonly SceneNode[]): SceneNode[] {
  const groups = new Map<string, SceneNode>();
  const rest: SceneNode[] = [];
  for (const node of nodes) {
    const part = PARTITION.exec(node.name)?.groups?.part;
    if (part === undefined || (node.kind !== 'area' && node.kind !== 'lines')) {
      rest.push(node);
      continue;
    }
    const name = `partitions/${PARTS[part]}/${node.stroke?.colour}/${node.stroke?.edge}`;
    const group = groups.get(name);
    if (node.kind === 'area' && group?.kind === 'area') groups.set(name, { ...group, rings: [...group.rings, ...node.rings] });
    else if (node.kind === 'lines' && group?.kind === 'lines') groups.set(name, { ...group, lines: [...group.lines, ...node.lines] });
    else groups.set(name, { ...node, name });
  }
  return [...groups.values(), ...rest];
}

/** Which profile it is, what is acquired, and what is to stay free: each where nothing else is drawn. */
function wordNodes(
  slab: SlabResult,
  { widthMm, thickness, plateau, bounds, mmPerPx }: { widthMm: number; thickness: number; plateau: number; bounds: Bounds; mmPerPx: number },
): SceneNode[] {
  const kept = slab.partitions.filter(({ inKeepClear }) => inKeepClear);
  const [first, last] = [kept[0], kept.at(-1)];
  const note = (name: string, text: string, at: ScreenPoint, offsetPx: ScreenPoint, anchor: 'start' | 'middle' | 'end', colour: Token): SceneNode => ({
    kind: 'text', name, text, at, offsetPx, anchor, size: 'note', colour,
  });
  const edge = Math.max(bounds.top + 20 * mmPerPx, -1.45 * plateau);
  const acquired = `acquired ${Math.round(widthMm)} mm`;
  const profile = PROFILE_NAMES[slab.profileKind];
  // Beside the slab where there is room, else together below everything.
  const beside = anchorWithin(acquired, [widthMm / 2, edge], bounds, mmPerPx).sign === 1;
  return [
    ...(beside
      ? [note('acquired-edge/label', acquired, [-widthMm / 2, edge], [-10, 0], 'end', 'ink-soft'), note('profile/name', profile, [widthMm / 2, edge], [10, 0], 'start', 'ink')]
      : [note('acquired-edge/label', `${acquired}, ${profile}`, [0, bounds.bottom], [0, -6], 'middle', 'ink-soft')]),
    ...(first && last
      ? [note('keep-clear/label', 'keep-clear area', [(first.offsetMm + last.offsetMm) / 2, -1.25 * plateau], [0, -6], 'middle', 'indigo')]
      : []),
    ...(slab.partitions.length === 0 ? [] : [note('stack/label', `${slab.partitions.length} partitions of ${Math.round(thickness * 10) / 10} mm`, [0, 0], [0, 18], 'middle', 'ink-soft')]),
  ];
}

function chosenNodes(slab: SlabResult, offsetMm: number, thickness: number, top: number, lane: Lane): SceneNode[] {
  const chosen = nearestPartition(slab, offsetMm);
  if (!chosen) return [];
  const [from, to] = [chosen.offsetMm - thickness / 2, chosen.offsetMm + thickness / 2];
  return [
    {
      // In two, so that the line of words between profile and body is crossed by nothing.
      kind: 'area', name: 'chosen-partition', rings: [box(from, to, [-top, 0]), box(from, to, lane)],
      stroke: { colour: 'indigo', widthPx: 1.75, edge: 'solid' },
    },
  ];
}

export function nearestPartition(slab: SlabResult, offsetMm: number): PartitionResult | undefined {
  return slab.partitions.reduce<PartitionResult | undefined>(
    (best, each) => (best === undefined || Math.abs(each.offsetMm - offsetMm) < Math.abs(best.offsetMm - offsetMm) ? each : best),
    undefined,
  );
}
