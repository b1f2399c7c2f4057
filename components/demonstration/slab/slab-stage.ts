import { hatch } from '@/components/schematic/scene/rings';
import { fitScene, fromPixels, type Bounds, type Ring, type Scene, type SceneNode, type Token } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { slabScene } from '@/components/schematic/scene/slab-scene';
import { sliceAxisOf } from '@/lib/domain/case/lines';
import { geometryCase } from '@/lib/physics/assess/assess';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { slabSurroundings } from '@/lib/physics/assess/slab-surroundings';
import { AXIS_SIDES } from '@/lib/physics/geometry/vector';
import type { PartitionResult, SlabResult } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { slabSources } from '@/lib/physics/slab/assess-slab';
import type { SlabSource, TissueAlongSlab } from '@/lib/physics/slab/slab-types';

export interface SlabStageInput {
  readonly question: Case;
  readonly slab: SlabResult;
  readonly size: { readonly widthPx: number; readonly heightPx: number };
  /** Partition looked at, by its offset, mm. */
  readonly sliceOffsetMm: number;
}

/** Where tissue is excited and where the engine finds it: one end of the slab to the other. */
export interface Travel {
  /** End beyond which the tissue lies. */
  readonly end: 'low' | 'high';
  readonly sourceMm: readonly [number, number];
  readonly landedMm: readonly [number, number];
  readonly partitions: readonly PartitionResult[];
}

/** Height of the profile's plateau and of the body's lane below it, as shares of the acquired slab. */
const PLATEAU = 0.42;
const LANE = [0.13, 0.27] as const;

const worstAt = (sources: readonly SlabSource[], slabMm: number, z: number): number =>
  Math.max(...sources.map(({ profile, shiftShare }) => profile.at(z / slabMm - shiftShare)));

/** The contaminated partitions by the end their intruder comes from: the one whose alias the profile weighs more. */
export function travelsOf(
  slab: SlabResult,
  widthMm: number,
  thicknessMm: number,
  weightAt: (z: number) => number,
): readonly Travel[] {
  const contaminated = slab.partitions.filter(({ state }) => state === 'contaminated');
  return (['high', 'low'] as const).flatMap((end): Travel[] => {
    const shift = end === 'high' ? widthMm : -widthMm;
    const partitions = contaminated.filter(({ offsetMm }) => {
      const [mine, other] = [weightAt(offsetMm + shift), weightAt(offsetMm - shift)];
      return end === 'high' ? mine >= other : mine > other;
    });
    const [first, last] = [partitions[0], partitions.at(-1)];
    if (!first || !last) return [];
    const landedMm = [first.offsetMm - thicknessMm / 2, last.offsetMm + thicknessMm / 2] as const;
    return [{ end, landedMm, sourceMm: [landedMm[0] + shift, landedMm[1] + shift], partitions }];
  });
}

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
  const wanted: Bounds = { left: -half * 1.04, right: half * 1.04, top: -widthMm * PLATEAU * Math.max(1.5, highest + 0.1), bottom: widthMm * 0.45 };
  const fit = fitScene(wanted, size.widthPx, size.heightPx);
  const [left, top] = fromPixels(fit, [0, 0]);
  const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
  const bounds = { left, right, top, bottom };
  const mmPerPx = 1 / fit.scale;
  const above = slabScene({ slab, sliceAxis: sliceAxisOf(plane), partitionThicknessMm: thickness, acquiredSlabMm: widthMm, bounds, mmPerPx });
  const lane = [LANE[0] * widthMm, LANE[1] * widthMm] as const;
  return {
    bounds,
    nodes: [
      ...bodyNodes(tissue, bounds, lane),
      ...stackNodes(slab, slices, lane),
      ...above.nodes.filter(({ name }) => name !== 'partition/axis'),
      skirtNode(sources, slabMm, bounds, widthMm * PLATEAU),
      ...travels.flatMap((travel) => travelNodes(travel, AXIS_SIDES[sliceAxisOf(plane)], lane, mmPerPx)),
      ...chosenNodes(slab, sliceOffsetMm, thickness, widthMm, lane),
    ],
  };
}

const box = (from: number, to: number, [upper, lower]: readonly [number, number]): Ring => [
  [from, upper], [to, upper], [to, lower], [from, lower],
];

type Lane = readonly [number, number];

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
    { kind: 'area', name: 'stack', rings, fill: 'tissue-lean', stroke: { colour: 'ink-soft', widthPx: 0.75, edge: 'solid' } },
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

function travelNodes({ end, sourceMm, landedMm, partitions }: Travel, sides: readonly [string, string], lane: Lane, mmPerPx: number): SceneNode[] {
  const kept = partitions.some(({ inKeepClear }) => inKeepClear);
  const colour: Token = kept ? 'thread' : 'ochre';
  const landed = box(landedMm[0], landedMm[1], lane);
  const middle = ([from, to]: readonly [number, number]): number => (from + to) / 2;
  const below = lane[1] + (end === 'high' ? 9 : 21) * mmPerPx;
  const [from, to] = [middle(sourceMm), middle(landedMm)];
  return [
    { kind: 'area', name: `travel/${end}/source`, rings: [box(sourceMm[0], sourceMm[1], lane)], stroke: { colour, widthPx: 1.5, edge: 'solid' } },
    { kind: 'area', name: `travel/${end}/landed`, rings: [landed], fill: kept ? 'thread-wash' : 'ochre-wash', fillOpacity: 0.7, stroke: { colour, widthPx: 1.5, edge: 'solid' } },
    { kind: 'lines', name: `travel/${end}/hatch`, lines: hatch([landed], end === 'high' ? 45 : -45, 6 * mmPerPx), stroke: { colour, widthPx: 1.25, edge: 'solid' } },
    {
      kind: 'lines', name: `travel/${end}/path`,
      lines: [[[from, lane[1]], [from, below], [to, below], [to, lane[1]]]],
      stroke: { colour, widthPx: 1.25, edge: 'dotted' },
    },
    {
      kind: 'text', name: `travel/${end}/label`, text: `from beyond the ${end === 'high' ? sides[1] : sides[0]} end`,
      at: [landedMm[end === 'high' ? 0 : 1], lane[1]], offsetPx: [0, 40], anchor: end === 'high' ? 'start' : 'end', size: 'note', colour,
    },
  ];
}

function chosenNodes(slab: SlabResult, offsetMm: number, thickness: number, widthMm: number, lane: Lane): SceneNode[] {
  const chosen = nearestPartition(slab, offsetMm);
  if (!chosen) return [];
  const [from, to] = [chosen.offsetMm - thickness / 2, chosen.offsetMm + thickness / 2];
  return [
    {
      kind: 'area', name: 'chosen-partition', rings: [box(from, to, [-PLATEAU * widthMm * 1.12, lane[1]])],
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
