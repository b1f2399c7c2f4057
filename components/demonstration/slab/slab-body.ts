import { anatomySketch } from '@/components/schematic/scene/anatomy';
import type { AreaNode, Ring } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import type { Case } from '@/lib/physics/model/case';
import type { RangeMm } from '@/lib/physics/model/axes';

export type Lane = readonly [upper: number, lower: number];

/** What of a polygon lies at or beyond a place of the slab axis; `side` 1 keeps what is higher, −1 what is lower. */
function cutAt(ring: Ring, at: number, side: 1 | -1): Ring {
  const kept = ([z]: ScreenPoint): boolean => (z - at) * side >= 0;
  return ring.flatMap((point, i): ScreenPoint[] => {
    const next = ring[(i + 1) % ring.length]!;
    const crossing: ScreenPoint[] =
      kept(point) === kept(next) ? [] : [[at, point[1] + ((next[1] - point[1]) * (at - point[0])) / (next[0] - point[0])]];
    return kept(point) ? [point, ...crossing] : crossing;
  });
}

/** The part of an outline between two places of the slab axis. */
export function between(ring: Ring, [from, to]: RangeMm): Ring {
  return cutAt(cutAt(ring, from, 1), to, -1);
}

/**
 * Organs of the body lying along the slab, squeezed into its lane: the coronal sketch turned on its side, the patient's
 * right on top. For slabs along other axes there is no sketch, and the body stays plain.
 */
export function slabSketch({ patient, prescription }: Case, lane: Lane): readonly AreaNode[] {
  if (prescription.plane !== 'axial') return [];
  const { extents, region } = patient;
  const [right, left] = [-extents.right.value, extents.left.value];
  const [top, bottom] = [-extents.superior.value, extents.inferior.value];
  const body: Ring = [[right, top], [left, top], [left, bottom], [right, bottom]];
  const centre = prescription.centreMm[2];
  const turned = ([u, v]: ScreenPoint): ScreenPoint => [
    -v - centre,
    lane[0] + ((u - right) / Math.max(1, left - right)) * (lane[1] - lane[0]),
  ];
  return anatomySketch(region, 'coronal', [{ name: 'tissue/trunk', kind: 'trunk' }], () => [body]).map((organ) => ({
    ...organ,
    rings: organ.rings.map((ring) => ring.map(turned)),
  }));
}

/** A stretch of the slab axis as high as its lane. */
export const box = (from: number, to: number, [upper, lower]: Lane): Ring => [
  [from, upper], [to, upper], [to, lower], [from, lower],
];
