import type { Bounds, Scene, SceneNode } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';

const mix = (a: number, b: number, t: number): number => a + (b - a) * t;
const mixPoint = (a: ScreenPoint, b: ScreenPoint, t: number): ScreenPoint => [mix(a[0], b[0], t), mix(a[1], b[1], t)];

function mixLines(a: readonly (readonly ScreenPoint[])[], b: readonly (readonly ScreenPoint[])[], t: number) {
  return b.map((line, i) => line.map((point, k) => mixPoint(a[i]![k]!, point, t)));
}

const sameShape = (a: readonly (readonly ScreenPoint[])[], b: readonly (readonly ScreenPoint[])[]): boolean =>
  a.length === b.length && a.every((line, i) => line.length === b[i]!.length);

function mixNode(from: SceneNode | undefined, to: SceneNode, t: number): SceneNode {
  if (!from || from.kind !== to.kind) return to;
  if (to.kind === 'area' && from.kind === 'area') {
    return sameShape(from.rings, to.rings) ? { ...to, rings: mixLines(from.rings, to.rings, t) } : to;
  }
  if (to.kind === 'lines' && from.kind === 'lines') {
    return sameShape(from.lines, to.lines) ? { ...to, lines: mixLines(from.lines, to.lines, t) } : to;
  }
  if ((to.kind === 'text' && from.kind === 'text') || (to.kind === 'marker' && from.kind === 'marker')) {
    return { ...to, at: mixPoint(from.at, to.at, t) } as SceneNode;
  }
  return to;
}

function mixBounds(a: Bounds, b: Bounds, t: number): Bounds {
  return { left: mix(a.left, b.left, t), right: mix(a.right, b.right, t), top: mix(a.top, b.top, t), bottom: mix(a.bottom, b.bottom, t) };
}

/**
 * On the way from one picture to the next, 0 ≤ t ≤ 1: what has the same name and as many points moves; what is new or
 * of another make stands where it will stand, and what has gone is gone. At 1 it is the next picture itself.
 */
export function betweenScenes(from: Scene, to: Scene, t: number): Scene {
  if (t >= 1) return to;
  const before = new Map(from.nodes.map((node) => [node.name, node]));
  return {
    bounds: mixBounds(from.bounds, to.bounds, t),
    nodes: to.nodes.map((node) => mixNode(before.get(node.name), node, t)),
  };
}
