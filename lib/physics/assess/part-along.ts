import { reachAlongZ } from '../body/coil-reach';
import { add, cosSin, dot } from '../geometry/vector';
import type { RangeMm, Vec3 } from '../model/axes';
import type { Case } from '../model/case';
import type { PartShape, SolidPart } from '../model/patient';

const AXES = { x: 0, y: 1, z: 2 } as const;
const UNIT: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
/** The two axes across a prism, in x, y, z order. */
const ACROSS = { x: [1, 2], y: [0, 2], z: [0, 1] } as const;

/** Ends of a prism along its own axis; along z no further than coil and magnet see about the isocentre. */
function prismEnds(shape: Exclude<PartShape, { type: 'ellipsoid' }>, given: Case): RangeMm {
  const { isocentreZMm, tissueReachMm } = reachAlongZ(given);
  const reach = shape.along === 'z' ? tissueReachMm : given.scanner.tissueReachMm;
  const middle = shape.along === 'z' ? isocentreZMm : 0;
  return [
    Math.max(shape.fromMm ?? -Infinity, middle - reach),
    Math.min(shape.toMm ?? Infinity, middle + reach),
  ];
}

/** Half-extent of an ellipse with semi-axes a, b turned by θ along the unit direction (u, v): √((a·u′)² + (b·v′)²). */
function ellipseHalf(a: number, b: number, rotationDeg: number, u: number, v: number): number {
  const [c, s] = cosSin(rotationDeg);
  return Math.hypot(a * (u * c + v * s), b * (v * c - u * s));
}

/**
 * Extent of a part along a direction, patient coordinates [mm]: the support of its shape, closed form.
 * @param direction unit vector
 */
export function partAlong(part: SolidPart, direction: Vec3, given: Case): RangeMm {
  const { shape } = part;
  if (shape.type === 'ellipsoid') {
    const centre = dot(shape.centreMm, direction);
    const half = Math.hypot(...shape.semiAxesMm.map((semi, axis) => semi * direction[axis]!));
    return [centre - half, centre + half];
  }
  const along = AXES[shape.along];
  const [first, second] = ACROSS[shape.along];
  const ends = prismEnds(shape, given).map((at) => at * direction[along]);
  const lowEnd = Math.min(...ends);
  const highEnd = Math.max(...ends);
  if (shape.type === 'outline-prism') {
    const across = shape.rings.flat().map(([u, v]) => u * direction[first] + v * direction[second]);
    return [Math.min(...across) + lowEnd, Math.max(...across) + highEnd];
  }
  const flat = add(
    shape.centreMm,
    UNIT[along]!.map((unit) => -unit * shape.centreMm[along]) as unknown as Vec3,
  );
  const centre = dot(flat, direction);
  // Right-handed about y turns z towards x, which is backwards in the order (x, z).
  const turn = (shape.along === 'y' ? -1 : 1) * (shape.rotationDeg ?? 0);
  const half = ellipseHalf(...shape.semiAxesMm, turn, direction[first], direction[second]);
  return [centre - half + lowEnd, centre + half + highEnd];
}
