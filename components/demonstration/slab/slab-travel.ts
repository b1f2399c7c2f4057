import { hatch } from '@/components/schematic/scene/rings';
import type { AreaNode, Bounds, SceneNode, Token } from '@/components/schematic/scene/scene';
import type { PartitionResult, SlabResult } from '@/lib/physics/model/assessment';
import { between, box, type Lane } from './slab-body';

/** Where tissue is excited and where the engine finds it: one end of the slab to the other. */
export interface Travel {
  /** End beyond which the tissue lies. */
  readonly end: 'low' | 'high';
  readonly sourceMm: readonly [number, number];
  readonly landedMm: readonly [number, number];
  readonly partitions: readonly PartitionResult[];
}

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

export interface TravelFrame {
  readonly sides: readonly [string, string];
  readonly lane: Lane;
  readonly mmPerPx: number;
  readonly bounds: Bounds;
  readonly sketch: readonly AreaNode[];
}

/** The organs of what travels, where it lands. */
function landedOrgans({ end, sourceMm, landedMm }: Travel, sketch: readonly AreaNode[]): SceneNode[] {
  const shift = landedMm[0] - sourceMm[0];
  return sketch.flatMap((organ): SceneNode[] => {
    const rings = organ.rings.map((ring) => between(ring, sourceMm).map(([z, v]) => [z + shift, v] as const)).filter((ring) => ring.length > 2);
    return rings.length > 0 ? [{ ...organ, name: `${organ.name}/landed-${end}`, rings }] : [];
  });
}

/** Both ends' words stand on one line, so each has half of it. */
function travelWords(side: string, widthPx: number): string {
  const words = `from beyond the ${side} end`;
  return words.length * 7.6 < widthPx / 2 - 10 ? words : `from beyond ${side.charAt(0).toUpperCase()}`;
}

/** What is excited beyond an end, outlined; its path; and hatched where it lands. */
export function travelNodes(travel: Travel, { sides, lane, mmPerPx, bounds, sketch }: TravelFrame): SceneNode[] {
  const { end, sourceMm, landedMm, partitions } = travel;
  const kept = partitions.some(({ inKeepClear }) => inKeepClear);
  const colour: Token = kept ? 'thread' : 'ochre';
  const landed = box(landedMm[0], landedMm[1], lane);
  const middle = ([from, to]: readonly [number, number]): number => (from + to) / 2;
  const below = lane[1] + (end === 'high' ? 9 : 21) * mmPerPx;
  const [from, to] = [middle(sourceMm), middle(landedMm)];
  return [
    { kind: 'area', name: `travel/${end}/source`, rings: [box(sourceMm[0], sourceMm[1], lane)], stroke: { colour, widthPx: 1.5, edge: 'solid' } },
    { kind: 'area', name: `travel/${end}/ground`, rings: [landed], fill: 'tissue-fat' },
    ...landedOrgans(travel, sketch),
    { kind: 'area', name: `travel/${end}/landed`, rings: [landed], fill: kept ? 'thread-wash' : 'ochre-wash', fillOpacity: 0.35, stroke: { colour, widthPx: 1.5, edge: 'solid' } },
    { kind: 'lines', name: `travel/${end}/hatch`, lines: hatch([landed], end === 'high' ? 45 : -45, 6 * mmPerPx), stroke: { colour, widthPx: 1.25, edge: 'solid' } },
    {
      kind: 'lines', name: `travel/${end}/path`,
      lines: [[[from, lane[1]], [from, below], [to, below], [to, lane[1]]]],
      stroke: { colour, widthPx: 1.25, edge: 'dotted' },
    },
    {
      kind: 'text', name: `travel/${end}/label`, text: travelWords(sides[end === 'high' ? 1 : 0], (bounds.right - bounds.left) / mmPerPx),
      at: [end === 'high' ? bounds.right : bounds.left, lane[1]], offsetPx: [end === 'high' ? -6 : 6, 42], anchor: end === 'high' ? 'end' : 'start', size: 'note', colour,
    },
  ];
}
