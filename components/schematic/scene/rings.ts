import type { Bounds, Ring } from './scene';
import type { ScreenPoint } from './section-frame';

export function boundsOf(rings: readonly Ring[]): Bounds | null {
  let [left, top, right, bottom] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const ring of rings) {
    for (const [u, v] of ring) {
      left = Math.min(left, u);
      right = Math.max(right, u);
      top = Math.min(top, v);
      bottom = Math.max(bottom, v);
    }
  }
  return left <= right ? { left, top, right, bottom } : null;
}

export function joinBounds(a: Bounds, b: Bounds | null): Bounds {
  if (!b) return a;
  return {
    left: Math.min(a.left, b.left),
    top: Math.min(a.top, b.top),
    right: Math.max(a.right, b.right),
    bottom: Math.max(a.bottom, b.bottom),
  };
}

/** Rectangle between two points given in a turned pair of axes. */
export function rectangle(at: (a: number, b: number) => ScreenPoint, halfA: number, halfB: number): Ring {
  return [at(-halfA, -halfB), at(halfA, -halfB), at(halfA, halfB), at(-halfA, halfB)];
}

/** Centroid of the largest ring: holes and slivers do not pull it about. */
export function centroidOf(rings: readonly Ring[]): ScreenPoint | null {
  let best: { area: number; at: ScreenPoint } | null = null;
  for (const ring of rings) {
    let doubled = 0;
    let u = 0;
    let v = 0;
    ring.forEach(([u0, v0], i) => {
      const [u1, v1] = ring[(i + 1) % ring.length]!;
      const cross = u0 * v1 - u1 * v0;
      doubled += cross;
      u += (u0 + u1) * cross;
      v += (v0 + v1) * cross;
    });
    const area = Math.abs(doubled) / 2;
    if (area > (best?.area ?? 1e-9)) best = { area, at: [u / (3 * doubled), v / (3 * doubled)] };
  }
  return best?.at ?? null;
}

export function movedRings(rings: readonly Ring[], [du, dv]: ScreenPoint): readonly Ring[] {
  return rings.map((ring) => ring.map(([u, v]) => [u + du, v + dv] as const));
}

/**
 * Parallel strokes that fill rings by the even-odd rule. Worked out here, not by a pattern of the painter: the
 * strokes are the same on canvas, on paper and in a test, and survive a photocopier.
 * @param angleDeg direction of the strokes, clockwise from the screen's horizontal
 */
export function hatch(
  rings: readonly Ring[],
  angleDeg: number,
  spacingMm: number,
): readonly (readonly [ScreenPoint, ScreenPoint])[] {
  const angle = (angleDeg * Math.PI) / 180;
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  const along = ([u, v]: ScreenPoint): number => u * cos + v * sin;
  const across = ([u, v]: ScreenPoint): number => v * cos - u * sin;
  const turned = rings.map((ring) => ring.map((point) => [along(point), across(point)] as const));
  const extent = boundsOf(turned);
  if (!extent) return [];
  const strokes: [ScreenPoint, ScreenPoint][] = [];
  // Anchored to the patient, not to the piece: hatching does not crawl while an edge is dragged.
  const first = Math.ceil(extent.top / spacingMm) * spacingMm;
  for (let level = first; level < extent.bottom; level += spacingMm) {
    const crossings = crossingsAt(turned, level);
    for (let i = 0; i + 1 < crossings.length; i += 2) {
      const [from, to] = [crossings[i]!, crossings[i + 1]!];
      strokes.push([
        [from * cos - level * sin, from * sin + level * cos],
        [to * cos - level * sin, to * sin + level * cos],
      ]);
    }
  }
  return strokes;
}

function crossingsAt(rings: readonly Ring[], level: number): number[] {
  const crossings: number[] = [];
  for (const ring of rings) {
    ring.forEach(([a0, b0], i) => {
      const [a1, b1] = ring[(i + 1) % ring.length]!;
      // Half-open in b, so that a vertex on the level counts once.
      if (b0 <= level !== b1 <= level) crossings.push(a0 + ((level - b0) / (b1 - b0)) * (a1 - a0));
    });
  }
  return crossings.sort((x, y) => x - y);
}
