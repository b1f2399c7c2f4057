import type { PartShape, Side, SolidPart } from '@/lib/domain/case/model';

type Axis = 'x' | 'y' | 'z';
const AXES: readonly Axis[] = ['x', 'y', 'z'];
type Bounds = Record<Axis, readonly [number, number]>;

function prismBounds(shape: Exclude<PartShape, { type: 'ellipsoid' }>, reachMm: number): Bounds {
  const across = AXES.filter((axis) => axis !== shape.along);
  const along = [shape.fromMm ?? -reachMm, shape.toMm ?? reachMm] as const;
  const spans = across.map((axis, index): readonly [number, number] => {
    if (shape.type === 'outline-prism') {
      const values = shape.rings.flat().map((point) => point[index === 0 ? 0 : 1]);
      return [Math.min(...values), Math.max(...values)];
    }
    const [a, b] = shape.semiAxesMm;
    const t = ((shape.rotationDeg ?? 0) * Math.PI) / 180;
    // Half-extent of a rotated ellipse along either of its two frame axes.
    const half = index === 0 ? Math.hypot(a * Math.cos(t), b * Math.sin(t)) : Math.hypot(a * Math.sin(t), b * Math.cos(t));
    const centre = shape.centreMm[AXES.indexOf(axis)] ?? 0;
    return [centre - half, centre + half];
  });
  const bounds = {} as Record<Axis, readonly [number, number]>;
  AXES.forEach((axis) => {
    bounds[axis] = axis === shape.along ? along : (spans[across.indexOf(axis)] ?? [0, 0]);
  });
  return bounds;
}

function partBounds(shape: PartShape, reachMm: number): Bounds {
  if (shape.type !== 'ellipsoid') return prismBounds(shape, reachMm);
  const span = (i: 0 | 1 | 2) => [shape.centreMm[i] - shape.semiAxesMm[i], shape.centreMm[i] + shape.semiAxesMm[i]] as const;
  return { x: span(0), y: span(1), z: span(2) };
}

/** How far the parts reach each side of the origin, mm ≥ 0: the extents of a body given as parts. */
export function boundsOfParts(parts: readonly SolidPart[], reachMm: number): Record<Side, number> {
  const all = parts.map((part) => partBounds(part.shape, reachMm));
  const low = (axis: Axis) => Math.max(0, -Math.min(...all.map((bounds) => bounds[axis][0])));
  const high = (axis: Axis) => Math.max(0, Math.max(...all.map((bounds) => bounds[axis][1])));
  return {
    right: low('x'), left: high('x'), anterior: low('y'), posterior: high('y'), inferior: low('z'), superior: high('z'),
  };
}
