import type { Vec3 } from '../model/axes';
import { DomainError } from '../model/domain-error';
import type { PartShape, SolidPart } from '../model/patient';
import type { PresaturationBand } from '../model/prescription';
import { cosSin } from '../geometry/vector';
import type { ConvexSolid, HalfSpace, Quadric } from '../section/convex-solid';
import { trapezoidsOf } from './outline-trapezoids';
import { presaturatedWeight } from './presaturated-weight';

/** A convex piece of a part, patient coordinates, with the weight its signal keeps. */
export interface WeightedSolid {
  /** Index of the part in the body. */
  readonly part: number;
  readonly weight: number;
  readonly solid: ConvexSolid;
}

const AXIS_INDEX = { x: 0, y: 1, z: 2 } as const;
const SIDE_NORMAL: Readonly<Record<PresaturationBand['side'], Vec3>> = {
  right: [-1, 0, 0],
  left: [1, 0, 0],
  anterior: [0, -1, 0],
  posterior: [0, 1, 0],
  inferior: [0, 0, -1],
  superior: [0, 0, 1],
};

function unit(index: number, sign: 1 | -1 = 1): Vec3 {
  return [index === 0 ? sign : 0, index === 1 ? sign : 0, index === 2 ? sign : 0];
}

function between(index: number, fromMm: number, toMm: number): HalfSpace[] {
  return [
    { normal: unit(index), limit: toMm },
    { normal: unit(index, -1), limit: -fromMm },
  ];
}

function requirePositive(argument: string, value: number): void {
  if (!(value > 0) || !Number.isFinite(value))
    throw new DomainError('semi-axis-not-positive', argument, value, '> 0 mm');
}

/** The two axes across `along`, in the order x, y, z. */
function across(along: 'x' | 'y' | 'z'): readonly [number, number] {
  return along === 'x' ? [1, 2] : along === 'y' ? [0, 2] : [0, 1];
}

function cylinderQuadric(shape: Extract<PartShape, { type: 'elliptic-cylinder' }>): Quadric {
  const [first, second] = across(shape.along);
  const [a, b] = shape.semiAxesMm;
  requirePositive('semiAxesMm[0]', a);
  requirePositive('semiAxesMm[1]', b);
  // A right-handed turn about y takes z towards x, so in the (x, z) order it counts the other way.
  const turn = (shape.along === 'y' ? -1 : 1) * (shape.rotationDeg ?? 0);
  const [c, s] = cosSin(turn);
  const ia = 1 / (a * a);
  const ib = 1 / (b * b);
  const m: number[][] = [
    [0, 0, 0],
    [0, 0, 0],
    [0, 0, 0],
  ];
  m[first]![first] = c * c * ia + s * s * ib;
  m[second]![second] = s * s * ia + c * c * ib;
  m[first]![second] = m[second]![first] = c * s * (ia - ib);
  return {
    centre: shape.centreMm,
    xx: m[0]![0]!,
    yy: m[1]![1]!,
    zz: m[2]![2]!,
    xy: m[0]![1]!,
    xz: m[0]![2]!,
    yz: m[1]![2]!,
  };
}

/** The convex pieces of a shape without the reach of coil and magnet. */
function shapeSolids(shape: PartShape, reachMm: number): ConvexSolid[] {
  switch (shape.type) {
    case 'ellipsoid': {
      const [a, b, c] = shape.semiAxesMm;
      shape.semiAxesMm.forEach((value, i) => requirePositive(`semiAxesMm[${i}]`, value));
      const quadric = {
        centre: shape.centreMm,
        xx: 1 / (a * a),
        yy: 1 / (b * b),
        zz: 1 / (c * c),
        xy: 0,
        xz: 0,
        yz: 0,
      };
      return [{ quadric, halfSpaces: [] }];
    }
    case 'elliptic-cylinder':
      return [{ quadric: cylinderQuadric(shape), halfSpaces: axialEnds(shape, reachMm) }];
    case 'outline-prism': {
      const [first, second] = across(shape.along);
      const ends = axialEnds(shape, reachMm);
      return trapezoidsOf(shape.rings).map(({ u0, u1, lower, upper }) => {
        const below = [0, 0, 0] as [number, number, number];
        const above = [0, 0, 0] as [number, number, number];
        below[first] = lower[1];
        below[second] = -1;
        above[first] = -upper[1];
        above[second] = 1;
        return {
          halfSpaces: [
            ...between(first, u0, u1),
            { normal: below, limit: -lower[0] },
            { normal: above, limit: upper[0] },
            ...ends,
          ],
        };
      });
    }
  }
}

/** Ends along the shape's own axis. Along z an open end is cut by the reach anyway; along x and y it needs one. */
function axialEnds(
  shape: { readonly along: 'x' | 'y' | 'z'; readonly fromMm?: number; readonly toMm?: number },
  reachMm: number,
): HalfSpace[] {
  const axis = AXIS_INDEX[shape.along];
  const { fromMm, toMm } = shape;
  if (fromMm !== undefined && toMm !== undefined && !(fromMm < toMm)) {
    throw new DomainError('part-empty', 'fromMm', `${fromMm} mm with toMm ${toMm} mm`, 'fromMm < toMm');
  }
  const open = shape.along === 'z' ? undefined : reachMm;
  const to = toMm ?? open;
  const from = fromMm ?? (open === undefined ? undefined : -open);
  return [
    ...(to === undefined ? [] : [{ normal: unit(axis), limit: to }]),
    ...(from === undefined ? [] : [{ normal: unit(axis, -1), limit: -from }]),
  ];
}

/** Splits pieces at a presaturation band: inside it the weight is multiplied by what the band leaves. */
function saturate(pieces: readonly WeightedSolid[], band: PresaturationBand, left: number): WeightedSolid[] {
  const out = SIDE_NORMAL[band.side];
  const back: Vec3 = [-out[0], -out[1], -out[2]];
  const inner: HalfSpace = { normal: out, limit: band.innerEdgeMm };
  const beyondInner: HalfSpace = { normal: back, limit: -band.innerEdgeMm };
  const outer: HalfSpace = { normal: out, limit: band.innerEdgeMm + band.thicknessMm };
  const beyondOuter: HalfSpace = { normal: back, limit: -(band.innerEdgeMm + band.thicknessMm) };
  const cut = (piece: WeightedSolid, weight: number, ...halfSpaces: HalfSpace[]): WeightedSolid => ({
    ...piece,
    weight,
    solid: { ...piece.solid, halfSpaces: [...piece.solid.halfSpaces, ...halfSpaces] },
  });
  return pieces.flatMap((piece) => [
    cut(piece, piece.weight, inner),
    cut(piece, piece.weight * left, beyondInner, outer),
    cut(piece, piece.weight, beyondOuter),
  ]);
}

/**
 * The convex pieces of a body that are bright enough to count, patient coordinates.
 * - Every part is cut at |z − isocentre| ≤ reach.
 * - Coil sensitivity is unknown, so arms never weigh less than 1; a presaturation band alone lowers them.
 * - Pieces at or below `tolerance` do not count.
 * @throws DomainError for a part that is no solid, or a weight below 0
 */
export function partSolids(
  parts: readonly SolidPart[],
  reach: { readonly isocentreZMm: number; readonly tissueReachMm: number },
  saturation: {
    readonly bands: readonly PresaturationBand[];
    readonly b1Scale: number;
    readonly t1Ms: readonly number[];
  },
  tolerance: number,
): WeightedSolid[] {
  const zEnds = between(
    2,
    reach.isocentreZMm - reach.tissueReachMm,
    reach.isocentreZMm + reach.tissueReachMm,
  );
  const solids = parts.flatMap((part, index) => {
    if (!(part.signalWeight >= 0)) {
      throw new DomainError('weight-negative', `${part.name}.signalWeight`, part.signalWeight, '≥ 0');
    }
    const weight = part.kind === 'arm' ? Math.max(1, part.signalWeight) : part.signalWeight;
    let pieces: WeightedSolid[] = shapeSolids(part.shape, reach.tissueReachMm).map((solid) => ({
      part: index,
      weight,
      solid: { ...solid, halfSpaces: [...solid.halfSpaces, ...zEnds] },
    }));
    for (const band of saturation.bands) {
      if (!(band.thicknessMm > 0)) {
        throw new DomainError(
          'band-without-thickness',
          'presaturation.thicknessMm',
          band.thicknessMm,
          '> 0 mm',
        );
      }
      // The worst tissue under the band decides: fat recovers fastest, parenchyma is least inverted.
      const left = Math.max(
        ...saturation.t1Ms.map((t1) =>
          presaturatedWeight(band.nominalFlipDeg, saturation.b1Scale, band.delayMs, t1),
        ),
      );
      pieces = saturate(pieces, band, left);
    }
    return pieces;
  });
  return solids.filter((piece) => piece.weight > tolerance);
}
