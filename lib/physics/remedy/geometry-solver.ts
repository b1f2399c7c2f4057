import { assessChecked, geometryCase, solveGeometry, type SolvedGeometry } from '../assess/assess';
import type { FrozenCase } from '../assess/geometry-class';
import { partAlong } from '../assess/part-along';
import { slabResultOf } from '../assess/slab-result';
import { buildBody } from '../body/build-body';
import { regionCorners, regionOfBox, windowRegion, type OrientedRegion } from '../geometry/oriented-region';
import { sectionFrame } from '../geometry/section-frame';
import { AXIS_SIDES, AXIS_VECTOR, dot, scale } from '../geometry/vector';
import { toMicrometres } from '../geometry/micrometres';
import type { Reason, SlabResult } from '../model/assessment';
import type { PatientAxis, RangeMm, Side, Vec3 } from '../model/axes';
import type { Case } from '../model/case';
import { nextAcquiredPartitions } from '../fold/acquired-lines';
import type { Solver, TargetedCase } from './change';

const SIDE_AXIS: Readonly<Record<Side, PatientAxis>> = {
  right: 'RL',
  left: 'RL',
  anterior: 'AP',
  posterior: 'AP',
  superior: 'SI',
  inferior: 'SI',
};

/** Unit vector towards a side. */
const towards = (side: Side): Vec3 =>
  scale(AXIS_VECTOR[SIDE_AXIS[side]], AXIS_SIDES[SIDE_AXIS[side]][1] === side ? 1 : -1);

const partitionsOf = ({ prescription: { slices } }: Case): number | undefined =>
  slices.mode === 'slab' ? slices.acquiredPartitions : undefined;

/** Geometry of the cases one ranking meets, by the case itself: each is solved once and forgotten with the ranking. */
class RankingGeometry {
  private readonly toSize = new Map<TargetedCase, SolvedGeometry>();
  private readonly toAssess = new Map<TargetedCase, SolvedGeometry>();

  /** Against what sizing has to keep free. */
  forSizing(given: TargetedCase): SolvedGeometry {
    if (given.target === undefined) return this.forAssessing(given);
    return kept(this.toSize, given, () => solveGeometry({ ...given, frozen: given.target! }));
  }

  /** Against the keep-clear area. */
  forAssessing(given: TargetedCase): SolvedGeometry {
    return kept(this.toAssess, given, () => solveGeometry(given));
  }

  slabIsClean(given: TargetedCase): boolean {
    return (this.slabResult(given)?.contaminatedInKeepClear ?? 0) === 0;
  }

  /** Through the slab alone: the plane is not solved for it, since many slabs are tried before one is kept. */
  slabResult(given: TargetedCase): SlabResult | undefined {
    if (given.prescription.slices.mode !== 'slab') return undefined;
    return slabResultOf(
      geometryCase(given.target === undefined ? given : { ...given, frozen: given.target }),
    );
  }

  isClean(given: TargetedCase): boolean {
    const { solved } = this.forSizing(given);
    return solved.isClean(given.prescription.acquiredLines, partitionsOf(given)) && this.slabIsClean(given);
  }
}

function kept<T>(known: Map<TargetedCase, T>, given: TargetedCase, workOut: () => T): T {
  let value = known.get(given);
  if (value === undefined) {
    value = workOut();
    known.set(given, value);
  }
  return value;
}

/** So many partitions that hardly anything of a slab's profile is left to wrap along it. */
const NO_SLAB_WRAP = 8;

/** L_z on the scanner's step from `first` to its maximum, the first that will do. */
function firstPartitions(
  given: TargetedCase,
  first: number,
  willDo: (planned: TargetedCase) => boolean,
): number | undefined {
  const { slices } = given.prescription;
  if (slices.mode !== 'slab') return undefined;
  const { sliceOversamplingMaxPct } = given.scanner.limits;
  const most = Math.floor(slices.partitions * (1 + sliceOversamplingMaxPct / 100) + 1e-9);
  for (let acquired = first; acquired <= most;) {
    const planned = {
      ...given,
      prescription: { ...given.prescription, slices: { ...slices, acquiredPartitions: acquired } },
    };
    if (willDo(planned)) return acquired;
    acquired = nextAcquiredPartitions(slices.partitions, acquired + 1, given.scanner.partitionStep);
  }
  return undefined;
}

/**
 * First L_z that keeps the slab's own partitions clean and lets nothing fold in both directions at once. Where the
 * phase direction folds by itself no L_z can help that: then the first at which some acquired width will.
 */
function cleanPartitions(given: TargetedCase, geometry: RankingGeometry): number | undefined {
  const { slices, acquiredLines } = given.prescription;
  if (slices.mode !== 'slab') return undefined;
  const alone = geometry.slabResult(given)?.smallestCleanPartitions;
  if (alone === undefined) return undefined;
  const { solved } = geometry.forSizing(given);
  const phaseIsClean = solved.isClean(acquiredLines, NO_SLAB_WRAP * slices.partitions);
  const together = phaseIsClean
    ? firstPartitions(given, alone, (planned) => geometry.isClean(planned))
    : undefined;
  const someWidthHelps = (planned: TargetedCase): boolean =>
    Number.isFinite(solved.requirement(partitionsOf(planned)).alwaysCleanMm) && geometry.slabIsClean(planned);
  return together ?? firstPartitions(given, alone, someWidthHelps) ?? alone;
}

const cornersOf = new WeakMap<OrientedRegion, readonly Vec3[]>();

/** Range of a region along a direction [mm]. Its corners are kept: areas are asked about for every candidate. */
function alongDirection(region: OrientedRegion, direction: Vec3): RangeMm {
  let corners = cornersOf.get(region);
  if (corners === undefined) {
    corners = regionCorners(region);
    cornersOf.set(region, corners);
  }
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < corners.length; i++) {
    const at = dot(corners[i]!, direction);
    low = Math.min(low, at);
    high = Math.max(high, at);
  }
  return [low, high];
}

/** Whether what of `area` was displayed in `before` is still displayed in `after`, axis by axis of the window. */
function staysInside(
  area: OrientedRegion,
  before: OrientedRegion,
  after: OrientedRegion,
  skip: number | undefined,
): boolean {
  return after.axes.every((axis, i) => {
    if (i === skip) return true;
    const [areaLow, areaHigh] = alongDirection(area, axis);
    const [seenLow, seenHigh] = alongDirection(before, axis);
    const [low, high] = after.rangesMm[i as 0 | 1 | 2];
    const from = Math.max(areaLow, seenLow);
    const to = Math.min(areaHigh, seenHigh);
    return (
      from >= to || (toMicrometres(low) <= toMicrometres(from) && toMicrometres(high) >= toMicrometres(to))
    );
  });
}

const SLICE = 2;

function leavesPictureOf(original: FrozenCase, before: OrientedRegion) {
  const { area, mustStayDisplayed } = original.keepClear;
  const mustStay = mustStayDisplayed && regionOfBox(mustStayDisplayed);
  return (planned: TargetedCase): Reason | undefined => {
    const after = windowRegion(planned.prescription);
    const reason = (what: string): Reason => ({
      code: 'area-leaves-picture',
      text: `Not possible: ${what} leaves the picture.`,
    });
    if (mustStay !== undefined && !staysInside(mustStay, before, after, undefined)) {
      return reason('the anatomy that must stay displayed');
    }
    const keepClear = planned.frozen ?? original.frozen;
    // A whole picture has no anatomy of its own at its ends: end partitions may be given up, at their price.
    const skip = area.kind === 'whole-picture' ? SLICE : undefined;
    return keepClear !== undefined && !staysInside(keepClear, before, after, skip)
      ? reason('the keep-clear area')
      : undefined;
  };
}

function bodyEdge(given: TargetedCase, direction: Vec3): number {
  const { patient, scanner } = geometryCase(given);
  return Math.max(
    ...buildBody(patient, scanner).map((part) => partAlong(part, direction, { ...given, patient })[1]),
  );
}

function bodyAlongPhase(given: TargetedCase): RangeMm {
  const { phase } = sectionFrame(given.prescription, 0);
  const [lowSide, highSide] = AXIS_SIDES[given.prescription.phaseAxis];
  const { marginMm } = given.policy;
  return [
    -bodyEdge(given, scale(phase, -1)) - marginMm[lowSide],
    bodyEdge(given, phase) + marginMm[highSide],
  ];
}

/**
 * Everything a change is worked out with, for a case whose keep-clear area is fixed where it is now.
 * @param original the case before any change, frozen
 */
export function geometrySolver(original: FrozenCase): Solver {
  const geometry = new RankingGeometry();
  return {
    requirement: (asked) => geometry.forSizing(asked).solved.requirement(partitionsOf(asked)),
    isClean: (asked) => geometry.isClean(asked),
    slabIsClean: (asked) => geometry.slabIsClean(asked),
    cleanPartitions: (asked) => cleanPartitions(asked, geometry),
    intruder: (asked) =>
      geometry.forSizing(asked).solved.leftover(asked.prescription.acquiredLines, partitionsOf(asked)).from,
    leavesPicture: leavesPictureOf(original, windowRegion(original.prescription)),
    windowEdgeMm: (asked, side) =>
      Math.max(
        alongDirection(windowRegion(asked.prescription), towards(side))[1],
        asked.frozen === undefined ? -Infinity : alongDirection(asked.frozen, towards(side))[1],
      ),
    bodyEdgeMm: (asked, side) => bodyEdge(asked, towards(side)),
    bodyAlongPhaseMm: bodyAlongPhase,
    assess: (asked) => assessChecked(asked, false, geometry.forAssessing(asked)),
  };
}
