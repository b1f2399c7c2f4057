import type { Bounds, Scene, SceneNode } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';

const mix = (a: number, b: number, t: number): number => a + (b - a) * t;
const mixPoint = (a: ScreenPoint, b: ScreenPoint, t: number): ScreenPoint => [mix(a[0], b[0], t), mix(a[1], b[1], t)];

type Points = readonly (readonly ScreenPoint[])[];

const samePoints = (a: Points, b: Points): boolean => a.length === b.length && a.every((line, i) => line.length === b[i]!.length);

function span(points: Points): { low: ScreenPoint; high: ScreenPoint } | null {
  const all = points.flat();
  if (all.length === 0) return null;
  const [us, vs] = [all.map(([u]) => u), all.map(([, v]) => v)];
  return { low: [Math.min(...us), Math.min(...vs)], high: [Math.max(...us), Math.max(...vs)] };
}

/** Where a value of the span b0…b1 lies when the span is moved and stretched to m0…m1. */
const stretched = (value: number, b0: number, b1: number, m0: number, m1: number): number =>
  b1 - b0 < 1e-9 ? value + (m0 + m1 - b0 - b1) / 2 : m0 + ((value - b0) / (b1 - b0)) * (m1 - m0);

/** Point by point where there are as many; else the new shape grows out of the place and size the old one had. */
function mixPoints(a: Points, b: Points, t: number): Points {
  if (samePoints(a, b)) return b.map((line, i) => line.map((point, k) => mixPoint(a[i]![k]!, point, t)));
  const [from, to] = [span(a), span(b)];
  if (!from || !to) return b;
  const [low, high] = [mixPoint(from.low, to.low, t), mixPoint(from.high, to.high, t)];
  return b.map((line) =>
    line.map(([u, v]) => [stretched(u, to.low[0], to.high[0], low[0], high[0]), stretched(v, to.low[1], to.high[1], low[1], high[1])] as const),
  );
}

/** A piece that is new slides in from where its tissue lies, as on the bench. */
function arriving(to: SceneNode, t: number): SceneNode {
  if ((to.kind !== 'area' && to.kind !== 'lines') || !to.slideFrom) return to;
  const [du, dv] = [to.slideFrom[0] * (1 - t), to.slideFrom[1] * (1 - t)];
  const moved = (points: Points): Points => points.map((line) => line.map(([u, v]) => [u + du, v + dv] as const));
  return to.kind === 'area' ? { ...to, rings: moved(to.rings) } : { ...to, lines: moved(to.lines) };
}

function mixNode(from: SceneNode | undefined, to: SceneNode, t: number): SceneNode {
  if (!from || from.kind !== to.kind) return arriving(to, t);
  if (to.kind === 'area' && from.kind === 'area') return { ...to, rings: mixPoints(from.rings, to.rings, t) };
  if (to.kind === 'lines' && from.kind === 'lines') return { ...to, lines: mixPoints(from.lines, to.lines, t) };
  if ((to.kind === 'text' && from.kind === 'text') || (to.kind === 'marker' && from.kind === 'marker')) {
    return { ...to, at: mixPoint(from.at, to.at, t) } as SceneNode;
  }
  return to;
}

function mixBounds(a: Bounds, b: Bounds, t: number): Bounds {
  return { left: mix(a.left, b.left, t), right: mix(a.right, b.right, t), top: mix(a.top, b.top, t), bottom: mix(a.bottom, b.bottom, t) };
}

/**
 * On the way from one picture to the next, 0 ≤ t ≤ 1: what has the same name moves; a landed piece that is new slides
 * in from its source, and what has gone is gone. At 1 it is the next picture itself.
 */
export function betweenScenes(from: Scene, to: Scene, t: number): Scene {
  if (t >= 1) return to;
  const before = new Map(from.nodes.map((node) => [node.name, node]));
  return {
    bounds: mixBounds(from.bounds, to.bounds, t),
    nodes: to.nodes.map((node) => mixNode(before.get(node.name), node, t)),
  };
}
