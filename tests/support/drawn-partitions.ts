import type { SceneNode } from '@/components/schematic/scene/scene';
import type { SlabResult } from '@/lib/physics/model/assessment';

/** Which partitions the picture of a slab shows with wrap, from the places of the bars that are painted as such. */
export function partitionsWithWrap(nodes: readonly SceneNode[], slab: SlabResult): readonly number[] {
  return nodes
    .flatMap((node) => (node.kind === 'area' && /^partitions\/alias\/(thread|ochre)\//.test(node.name) ? node.rings : []))
    .map((ring) => {
      const middle = ring.reduce((sum, [z]) => sum + z, 0) / ring.length;
      return slab.partitions.reduce((best, each) => (Math.abs(each.offsetMm - middle) < Math.abs(best.offsetMm - middle) ? each : best)).index;
    })
    .sort((a, b) => a - b);
}
