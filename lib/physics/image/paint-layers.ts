import { reachAlongZ } from '../body/coil-reach';
import { buildBody } from '../body/build-body';
import { partSolids } from '../body/part-solids';
import { cosSin } from '../geometry/vector';
import type { SectionFrame } from '../geometry/section-frame';
import type { Case } from '../model/case';
import type { BodyRegion, PartKind, SolidPart } from '../model/patient';
import { solidInSection, type ConvexSolid, type HalfSpace, type Quadric } from '../section/convex-solid';
import { rimOf, type Organ } from './phantom';
import { breastOrgans, headOrgans, kneeOrgans, limbOrgans, neckOrgans } from './phantom-head-limbs';
import { abdomenOrgans, chestOrgans, pelvisOrgans } from './phantom-trunk';
import type { Tissue } from './tissues';

/** One convex piece painted with one tissue, section coordinates; later layers lie over earlier ones. */
export interface PaintLayer {
  readonly solid: ConvexSolid;
  readonly tissue: Tissue;
  /** The part's own signal weight [1]. */
  readonly weight: number;
}

const TRUNK_ORGANS: Readonly<Record<BodyRegion, readonly Organ[]>> = {
  abdomen: abdomenOrgans,
  pelvis: pelvisOrgans,
  hip: pelvisOrgans,
  chest: chestOrgans,
  breast: chestOrgans,
  shoulder: chestOrgans,
  head: chestOrgans,
  knee: [],
};

function organsOf(kind: PartKind, name: string, region: BodyRegion): readonly Organ[] {
  switch (kind) {
    case 'trunk':
      return name === 'shoulders' ? limbOrgans.slice(0, 1) : TRUNK_ORGANS[region];
    case 'head':
      return headOrgans;
    case 'leg':
      return region === 'knee' ? kneeOrgans : limbOrgans;
    case 'arm':
      return limbOrgans;
    case 'breast':
      return breastOrgans;
    case 'nose':
      return [];
    case 'other':
      return name === 'neck' ? neckOrgans : [];
  }
}

/** A part's centre and half-lengths in patient coordinates; z is its half-length where it is an ellipsoid. */
interface PartMeasure {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly halfX: number;
  readonly halfY: number;
  readonly halfZ?: number;
  readonly ends: readonly HalfSpace[];
}

/** Undefined for parts whose inside is not drawn: outlines, and cylinders that do not run along z. */
function measureOf({ shape }: SolidPart): PartMeasure | undefined {
  if (shape.type === 'ellipsoid') {
    const [x, y, z] = shape.centreMm;
    const [halfX, halfY, halfZ] = shape.semiAxesMm;
    return { x, y, z, halfX, halfY, halfZ, ends: [] };
  }
  if (shape.type !== 'elliptic-cylinder' || shape.along !== 'z') return undefined;
  const [x, y] = shape.centreMm;
  const [halfX, halfY] = shape.semiAxesMm;
  const ends: HalfSpace[] = [];
  if (shape.fromMm !== undefined) ends.push({ normal: [0, 0, -1], limit: -shape.fromMm });
  if (shape.toMm !== undefined) ends.push({ normal: [0, 0, 1], limit: shape.toMm });
  return { x, y, z: 0, halfX, halfY, ends };
}

/** The muscle wall inside the rim of fat; organs are measured in it. */
function wallOf(measure: PartMeasure, kind: PartKind): PartMeasure {
  if (kind === 'head')
    return {
      ...measure,
      halfX: measure.halfX * 0.95,
      halfY: measure.halfY * 0.96,
      ...(measure.halfZ ? { halfZ: measure.halfZ * 0.96 } : {}),
    };
  const rim = rimOf(measure);
  const limb = kind === 'arm' || kind === 'leg' ? 0.8 : 1;
  return {
    ...measure,
    halfX: measure.halfX - rim.sideMm * limb,
    halfY: measure.halfY - (limb * (rim.frontMm + rim.backMm)) / 2,
    y: measure.y + (limb * (rim.frontMm - rim.backMm)) / 2,
    ...(measure.halfZ ? { halfZ: measure.halfZ * 0.88 } : {}),
  };
}

/** An ellipsoid, or a cylinder along z where it has no length of its own. */
function quadric(
  centre: Quadric['centre'],
  halfX: number,
  halfY: number,
  halfZ: number | undefined,
  turnDeg: number,
): Quadric {
  const [c, s] = cosSin(turnDeg);
  const ia = 1 / (halfX * halfX);
  const ib = 1 / (halfY * halfY);
  return {
    centre,
    xx: c * c * ia + s * s * ib,
    yy: s * s * ia + c * c * ib,
    xy: c * s * (ia - ib),
    zz: halfZ === undefined ? 0 : 1 / (halfZ * halfZ),
    xz: 0,
    yz: 0,
  };
}

function organSolid(organ: Organ, wall: PartMeasure): ConvexSolid {
  const [zAt, zHalf] = organ.z ?? [0, undefined];
  // A part that is itself an ellipsoid is measured along z as well: 100 mm of an organ's own z are its half-length.
  const zScale = wall.halfZ === undefined ? 1 : wall.halfZ / 100;
  const through = wall.halfZ === undefined ? undefined : wall.halfZ * Math.max(...organ.half);
  return {
    quadric: quadric(
      [wall.x + organ.at[0] * wall.halfX, wall.y + organ.at[1] * wall.halfY, wall.z + zAt * zScale],
      organ.half[0] * wall.halfX,
      organ.half[1] * wall.halfY,
      zHalf === undefined ? through : zHalf * zScale,
      organ.turnDeg ?? 0,
    ),
    halfSpaces: wall.ends,
  };
}

/** What a part's skin side is painted with. */
const rimTissue = (kind: PartKind, drawnInside: boolean): Tissue =>
  kind === 'nose' ? 'cartilage' : drawnInside ? 'fat' : 'muscle';

/** Parts that reach into others are painted first: the neck ends inside the head, the nose in the face. */
const PAINT_ORDER: readonly PartKind[] = ['other', 'trunk', 'arm', 'leg', 'breast', 'nose', 'head'];

/**
 * The body as layers of tissue in section coordinates, bottom first: every part's own solid, its wall, its organs.
 * @param given sizes as they are to be drawn
 */
export function paintLayers(given: Case, frame: SectionFrame): readonly PaintLayer[] {
  const { patient, scanner } = given;
  const parts = buildBody(patient, scanner);
  const reach = reachAlongZ(given);
  const seen = partSolids(parts, reach, { bands: [], b1Scale: 1, t1Ms: [] }, 0);
  const zEnds: HalfSpace[] = [
    { normal: [0, 0, 1], limit: reach.isocentreZMm + reach.tissueReachMm },
    { normal: [0, 0, -1], limit: reach.tissueReachMm - reach.isocentreZMm },
  ];
  const layersOf = (part: SolidPart, index: number): readonly PaintLayer[] => {
    const measure = measureOf(part);
    const weight = part.signalWeight;
    const layer = (solid: ConvexSolid, tissue: Tissue): PaintLayer => ({
      solid: solidInSection(solid, frame),
      tissue,
      weight,
    });
    const own = seen
      .filter((piece) => piece.part === index)
      .map((piece) => layer(piece.solid, rimTissue(part.kind, measure !== undefined)));
    if (measure === undefined) return own;
    const wall = wallOf({ ...measure, ends: [...measure.ends, ...zEnds] }, part.kind);
    const inside = organsOf(part.kind, part.name, patient.region);
    if (inside.length === 0) return own;
    const wallTissue: Tissue = part.kind === 'head' ? 'cortex' : part.kind === 'breast' ? 'fat' : 'muscle';
    const wallLayer = layer(
      {
        quadric: quadric([wall.x, wall.y, wall.z], wall.halfX, wall.halfY, wall.halfZ, 0),
        halfSpaces: wall.ends,
      },
      wallTissue,
    );
    return [...own, wallLayer, ...inside.map((organ) => layer(organSolid(organ, wall), organ.tissue))];
  };
  return parts
    .map((part, index) => ({ part, index }))
    .sort((a, b) => PAINT_ORDER.indexOf(a.part.kind) - PAINT_ORDER.indexOf(b.part.kind) || a.index - b.index)
    .flatMap(({ part, index }) => layersOf(part, index));
}
