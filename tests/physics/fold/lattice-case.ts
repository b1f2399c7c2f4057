import type { FoldProblem } from '@/lib/physics/fold/fold-problem';
import type { PatientAxis, RangeMm, Side } from '@/lib/physics/model/axes';
import type { OutlinePoint, SolidPart } from '@/lib/physics/model/patient';
import type { Plane, Prescription } from '@/lib/physics/model/prescription';
import { PLANE_AXES } from '@/lib/physics/geometry/section-frame';
import { AXIS_SIDES } from '@/lib/physics/geometry/vector';
import type { CellRange, LatticeBox, LatticeCase } from './oracle-lattice';
import { NO_MARGIN_MM, samplePrescription, sampleProblem } from './sample-problem';

/** Deterministic pseudo-random numbers (32-bit mixing). */
export function seeded(seed: number) {
  let state = seed >>> 0;
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const whole = (low: number, high: number) => low + Math.floor(next() * (high - low + 1));
  return { next, whole, pick: <T>(items: readonly T[]): T => items[whole(0, items.length - 1)]! };
}

type Random = ReturnType<typeof seeded>;

export interface LatticeSample {
  readonly lattice: LatticeCase;
  readonly problem: FoldProblem;
  /** Lattice units of one acquired line and one acquired partition. */
  readonly lineUnits: number;
  readonly lines: number;
  readonly partitions: number | undefined;
  /** Only L_z that are whole multiples of this keep ghosts on the lattice. */
  readonly partitionMultiple: number;
}

/** Lengths of one lattice unit: whole, a binary fraction, and one that doubles cannot hold exactly. */
const UNITS_MM = [1, 2, 5, 300 / 256, 0.7];
const AXIS_KEY = { RL: 'x', AP: 'y', SI: 'z' } as const;

function range(random: Random, low: number, high: number, longest: number): CellRange {
  const from = random.whole(low, high - 1);
  return [from, random.whole(from + 1, Math.min(high, from + longest))];
}

function box(random: Random, deep: boolean): LatticeBox {
  return {
    r: range(random, -5, 5, 8),
    p: range(random, -40, 40, random.pick([4, 12, 60])),
    s: deep ? range(random, -12, 12, random.pick([4, 24])) : [-3, 3],
  };
}

function inside(random: Random, outer: LatticeBox): LatticeBox {
  const within = ([a, b]: CellRange): CellRange => {
    const from = random.whole(a, b - 1);
    return [from, random.whole(from + 1, b)];
  };
  return { r: within(outer.r), p: within(outer.p), s: outer.s };
}

/** One random case, posed to the lattice oracle and, in millimetres and patient axes, to the engine. */
export function latticeSample(seed: number, deep: boolean): LatticeSample {
  const random = seeded(seed);
  const h = random.pick(UNITS_MM);
  const ghosts =
    random.next() < 0.4 ? { ry: random.pick([1, 2, 3]), rz: deep ? random.pick([1, 1, 2]) : 1 } : undefined;
  const ghosting = ghosts && (ghosts.ry > 1 || ghosts.rz > 1) ? ghosts : undefined;
  // Acquired edges at ±W/2 and ghosts at W/R must fall on lattice lines.
  const lineUnits = ghosting ? 2 * ghosting.ry : random.pick([1, 2, 3]);
  const lines = random.whole(3, Math.max(3, Math.floor(40 / lineUnits)));
  const fov = lines * lineUnits;
  const centreP = ghosting ? 2 * random.whole(-6, 6) : 2 * random.whole(-6, 6) + (fov % 2);
  const pLow = (centreP - fov) / 2;
  const rLow = random.whole(-5, 0);
  const rHigh = random.whole(1, 5);

  // An even number with slices unfolded, so that ±W_z/2 falls on lattice planes too.
  const partitions = !deep
    ? undefined
    : ghosting && ghosting.rz > 1
      ? 2 * random.whole(1, 4)
      : random.whole(2, 8);
  const slices = deep ? Array.from({ length: partitions! }, (_, i) => i - Math.floor(partitions! / 2)) : [0];
  const centreS = deep ? 2 * slices[0]! + partitions! : 1;

  const parts = Array.from({ length: random.whole(1, 3) }, () => {
    const first = box(random, deep);
    const boxes = [first];
    if (random.next() < 0.3) boxes.push(inside(random, first));
    return { boxes, weight: random.pick([1, 1, 1, 0.3, 0.02]) };
  });
  const withMargin = random.next() < 0.4;
  const pair = (most: number): readonly [number, number] =>
    withMargin ? [random.whole(0, most), random.whole(0, most)] : [0, 0];
  const margin = { r: pair(2), p: pair(4), s: deep ? pair(2) : ([0, 0] as const) };
  const clear: LatticeBox =
    random.next() < 0.4
      ? { r: [rLow, rHigh], p: [pLow, pLow + fov], s: [-40, 40] }
      : {
          r: range(random, rLow, rHigh, 8),
          p: range(random, pLow, pLow + fov, 60),
          s: deep ? range(random, -4, 4, 8) : [-1, 2],
        };
  const table = Array.from({ length: 97 }, () => random.pick([0, 0, 0.04, 0.06, 1]));
  const selective = random.next() < 0.7;
  const slabWeight = (offsetHalf: number) =>
    !selective
      ? 1
      : Math.abs(offsetHalf) < partitions!
        ? 1
        : (table[Math.min(96, Math.abs(offsetHalf))] ?? 0);

  const lattice: LatticeCase = {
    parts,
    clear,
    window: { r: [rLow, rHigh], p: [pLow, pLow + fov] },
    slices,
    centrePHalf: centreP,
    centreSHalf: centreS,
    margin,
    tolerance: 0.05,
    ...(deep && { slab: { weight: slabWeight, tolerance: 0.05 } }),
    ...(ghosting && { ghosts: ghosting }),
  };

  const plane: Plane = random.pick(['axial', 'coronal', 'sagittal']);
  const [first, second, sliceAxis] = PLANE_AXES[plane];
  const phaseAxis = random.next() < 0.5 ? first : second;
  const axes: Record<'r' | 'p' | 's', PatientAxis> = {
    r: phaseAxis === first ? second : first,
    p: phaseAxis,
    s: sliceAxis,
  };
  const centre: Record<PatientAxis, number> = { RL: 0, AP: 0, SI: 0 };
  centre[axes.r] = ((rLow + rHigh) / 2) * h;
  centre[axes.p] = (centreP / 2) * h;
  centre[axes.s] = (centreS / 2) * h;

  const mm = ([a, b]: CellRange): RangeMm => [a * h, b * h];
  const marginMm: Record<Side, number> = { ...NO_MARGIN_MM };
  for (const key of ['r', 'p', 's'] as const) {
    const [low, high] = AXIS_SIDES[axes[key]];
    marginMm[low] = margin[key][0] * h;
    marginMm[high] = margin[key][1] * h;
  }
  const slab = deep
    ? {
        mode: 'slab' as const,
        partitions: partitions!,
        partitionThicknessMm: h,
        acquiredPartitions: partitions!,
        selective: true,
        droppedPartitionsPerEnd: 0,
      }
    : { mode: 'stack' as const, slices: 1, thicknessMm: h, gapMm: 0 };
  // The profile is one value a cell: the cell an offset lies in, by its centre's distance from the slab centre.
  const parity = deep ? Math.abs(1 - partitions!) % 2 : 0;
  const cellOffsetHalf = (offsetMm: number) => 2 * Math.round(((2 * offsetMm) / h - parity) / 2) + parity;
  const prescription: Prescription = samplePrescription({
    plane,
    phaseAxis,
    centreMm: [centre.RL, centre.AP, centre.SI],
    fovPhaseMm: fov * h,
    fovReadoutMm: (rHigh - rLow) * h,
    linesAcrossFov: lines,
    slices: slab,
    acceleration: {
      ...samplePrescription().acceleration,
      factorPhase: ghosting?.ry ?? 1,
      factorSlice: ghosting?.rz ?? 1,
      unfolding: random.pick(['image-domain-grid-ends', 'unknown']),
    },
  });
  const solids = parts.map((part, i) => outlinePart(`part ${i}`, part.boxes, part.weight, axes, h));
  const ranges: Record<PatientAxis, RangeMm> = { RL: [0, 1], AP: [0, 1], SI: [0, 1] };
  for (const key of ['r', 'p', 's'] as const) ranges[axes[key]] = mm(clear[key]);
  const problem = sampleProblem(solids, prescription, {
    marginMm,
    keepClear: {
      axes: [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
      rangesMm: [ranges.RL, ranges.AP, ranges.SI],
    },
    tissueReachMm: 1000,
    ...(deep && { slabWeight: (offsetMm: number) => slabWeight(cellOffsetHalf(offsetMm)) }),
  });
  return {
    lattice,
    problem,
    lineUnits,
    lines,
    partitions,
    partitionMultiple: ghosting && ghosting.rz > 1 ? 2 * ghosting.rz : 1,
  };
}

/** Boxes of one part share their slice range: one prism along the slice axis with one ring a box. */
function outlinePart(
  name: string,
  boxes: readonly LatticeBox[],
  weight: number,
  axes: Record<'r' | 'p' | 's', PatientAxis>,
  h: number,
): SolidPart {
  const along = AXIS_KEY[axes.s];
  const readoutFirst = AXIS_KEY[axes.r] < AXIS_KEY[axes.p];
  const point = (r: number, p: number): OutlinePoint => (readoutFirst ? [r * h, p * h] : [p * h, r * h]);
  return {
    name,
    kind: 'other',
    shape: {
      type: 'outline-prism',
      along,
      rings: boxes.map(({ r, p }) => [
        point(r[0], p[0]),
        point(r[1], p[0]),
        point(r[1], p[1]),
        point(r[0], p[1]),
      ]),
      fromMm: boxes[0]!.s[0] * h,
      toMm: boxes[0]!.s[1] * h,
    },
    signalWeight: weight,
    estimated: false,
  };
}
