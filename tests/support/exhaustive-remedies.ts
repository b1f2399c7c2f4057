/**
 * The remedy search written a second time, the slow and plain way: every setting is found by trying them one after
 * another in the solved geometry, prices are added up from the policy's words. It shares no code with lib/physics/remedy.
 * Valid for keep-clear boxes, sizes without spread and untilted planes.
 */
import { assess } from '@/lib/physics';
import { geometryCase } from '@/lib/physics/assess/assess';
import { solveClass } from '@/lib/physics/assess/geometry-class';
import { slabResultOf } from '@/lib/physics/assess/slab-result';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { DomainError } from '@/lib/physics/model/domain-error';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { PaybackKind, RemedyKind } from '@/lib/physics/model/remedy';
import { carryTiming, scanTime } from '@/lib/physics/sequence/scan-time';

export interface Outcome {
  readonly prescription: Prescription;
  readonly arms: string;
  readonly costTenths: number;
  readonly leavesFold: boolean;
}

type Step = (given: Case) => Case | 'nothing' | 'refused';

const change = (given: Case, values: Partial<Prescription>): Case => ({
  ...given,
  prescription: { ...given.prescription, ...values },
});

// The questions asked thousands of times go to the solved geometry that assess() itself uses; areas are left out.
const partitionsOf = ({ prescription: { slices } }: Case): number | undefined =>
  slices.mode === 'slab' ? slices.acquiredPartitions : undefined;
const planeFolds = (given: Case): boolean =>
  !solveClass(geometryCase(given)).isClean(given.prescription.acquiredLines, partitionsOf(given));
const slabFolds = (given: Case): boolean =>
  (slabResultOf(geometryCase(given))?.contaminatedInKeepClear ?? 0) > 0;

/** Lines the scanner can be set to, ascending, from N to its maximum. */
function grid({ scanner }: Case, n: number): number[] {
  const most = Math.min(
    scanner.limits.acquiredLinesMax,
    Math.ceil(n * (1 + scanner.limits.phaseOversamplingMaxPct / 100) - 1e-9),
  );
  const { lineStep } = scanner;
  const lines: number[] = [];
  for (let l = n; l <= most; l++) {
    const percent = lineStep.kind === 'percent' ? lineStep.percent : 1;
    const k = Math.floor(((l / n - 1) * 100) / percent + 1e-9);
    const fits = {
      line: true,
      'even-lines': l % 2 === 0,
      percent: [k, k + 1].some(
        (steps) => steps >= 0 && Math.ceil(n * (1 + (steps * percent) / 100) - 1e-9) === l,
      ),
      doubling: l === n || l === 2 * n,
    }[lineStep.kind];
    if (fits) lines.push(l);
  }
  return lines;
}

const oversampleFirst: Step = (given) => {
  const p = given.prescription;
  const lines = grid(given, p.linesAcrossFov).find((l) => !planeFolds(change(given, { acquiredLines: l })));
  if (lines === undefined) return 'refused';
  return lines === p.acquiredLines ? 'nothing' : change(given, { acquiredLines: lines });
};

const oversampleAlways: Step = (given) => {
  const p = given.prescription;
  let lastFolding = p.linesAcrossFov - 1;
  for (let l = p.linesAcrossFov; l <= 3 * p.linesAcrossFov; l++) {
    if (planeFolds(change(given, { acquiredLines: l }))) lastFolding = l;
  }
  const lines = grid(given, p.linesAcrossFov).find((l) => l > lastFolding);
  if (lines === undefined) return 'refused';
  return lines === p.acquiredLines ? 'nothing' : change(given, { acquiredLines: lines });
};

function readout(
  { prescription: p, scanner }: Case,
  fovPhaseMm: number,
  keepPixel: boolean,
): Partial<Prescription> {
  if (scanner.phaseFovMayExceedReadoutFov || fovPhaseMm <= p.fovReadoutMm) return {};
  return {
    fovReadoutMm: fovPhaseMm,
    ...(keepPixel
      ? { readoutMatrix: Math.ceil((fovPhaseMm * p.readoutMatrix) / p.fovReadoutMm - 1e-9) }
      : {}),
  };
}

/** Whether any width at all stops the fold: not where tissue wraps along the slab. */
const widthHelps = (given: Case): boolean =>
  Number.isFinite(solveClass(geometryCase(given)).requirement(partitionsOf(given)).alwaysCleanMm);

const fovMatrix: Step = (given) => {
  if (!widthHelps(given)) return 'refused';
  if (!planeFolds(given)) return 'nothing';
  for (let f = Math.floor(given.prescription.fovPhaseMm) + 1; f <= given.scanner.limits.fovMaxMm; f++) {
    const planned = change(given, { fovPhaseMm: f, ...readout(given, f, false) });
    if (!planeFolds(planned)) return planned;
  }
  return 'refused';
};

const fovVoxel: Step = (given) => {
  if (!widthHelps(given)) return 'refused';
  if (!planeFolds(given)) return 'nothing';
  const p = given.prescription;
  const pixel = p.fovPhaseMm / p.linesAcrossFov;
  for (
    let n = p.linesAcrossFov + 1;
    n * pixel <= given.scanner.limits.fovMaxMm + 1e-9 && n <= given.scanner.limits.matrixMax;
    n++
  ) {
    const wanted = (n * p.acquiredLines) / p.linesAcrossFov;
    const lines = grid(
      {
        ...given,
        scanner: {
          ...given.scanner,
          limits: { ...given.scanner.limits, acquiredLinesMax: 9999, phaseOversamplingMaxPct: 400 },
        },
      },
      n,
    ).find((l) => l >= wanted - 1e-9);
    if (lines === undefined) continue;
    const planned = change(given, {
      fovPhaseMm: n * pixel,
      linesAcrossFov: n,
      acquiredLines: lines,
      ...readout(given, n * pixel, true),
    });
    if (!planeFolds(planned)) return planned;
  }
  return 'refused';
};

const swap: Step = (given) => {
  const p = given.prescription;
  const [first, second] = { axial: ['RL', 'AP'], coronal: ['RL', 'SI'], sagittal: ['AP', 'SI'] }[p.plane] as [
    Prescription['phaseAxis'],
    Prescription['phaseAxis'],
  ];
  const readoutMm =
    !given.scanner.phaseFovMayExceedReadoutFov && p.fovReadoutMm > p.fovPhaseMm
      ? p.fovReadoutMm
      : p.fovPhaseMm;
  return change(given, {
    phaseAxis: p.phaseAxis === first ? second : first,
    fovPhaseMm: p.fovReadoutMm,
    linesAcrossFov: p.readoutMatrix,
    acquiredLines:
      given.scanner.lineStep.kind === 'even-lines' ? 2 * Math.ceil(p.readoutMatrix / 2) : p.readoutMatrix,
    fovReadoutMm: readoutMm,
    readoutMatrix: Math.ceil((readoutMm * p.linesAcrossFov) / p.fovPhaseMm - 1e-9),
  });
};

const armsUp: Step = (given) => {
  const { position } = given.patient.arms;
  if (position !== 'down') return position === 'up' ? 'nothing' : 'refused';
  return { ...given, patient: { ...given.patient, arms: { ...given.patient.arms, position: 'up' } } };
};

const oversampleSlices: Step = (given) => {
  const { slices } = given.prescription;
  if (slices.mode === 'stack') return 'nothing';
  const most = slices.partitions * (1 + given.scanner.limits.sliceOversamplingMaxPct / 100);
  const at = (acquiredPartitions: number): Case =>
    change(given, { slices: { ...slices, acquiredPartitions } });
  const tried: number[] = [];
  for (let lz = slices.partitions; lz <= most + 1e-9; lz += given.scanner.partitionStep) tried.push(lz);
  const alone = tried.filter((lz) => !slabFolds(at(lz)));
  if (alone.length === 0) return 'refused';
  const chosen =
    alone.find((lz) => !planeFolds(at(lz))) ?? alone.find((lz) => widthHelps(at(lz))) ?? alone[0]!;
  return chosen === slices.acquiredPartitions ? 'nothing' : at(chosen);
};

const dropEnds: Step = (given) => {
  const { slices, centreMm } = given.prescription;
  if (slices.mode === 'stack' || !slabFolds(given)) return 'nothing';
  if (given.keepClear.area.kind !== 'box') throw new Error('written for boxes');
  const [low, high] = given.keepClear.area.box.zMm;
  for (let n = slices.droppedPartitionsPerEnd + 1; n <= (slices.partitions - 1) / 2; n++) {
    const half = (slices.partitions / 2 - n) * slices.partitionThicknessMm;
    const shown = (slices.partitions / 2) * slices.partitionThicknessMm;
    if (
      Math.max(low, centreMm[2] - shown) < centreMm[2] - half - 1e-6 ||
      Math.min(high, centreMm[2] + shown) > centreMm[2] + half + 1e-6
    )
      return 'refused';
    const planned = change(given, { slices: { ...slices, droppedPartitionsPerEnd: n } });
    if (!slabFolds(planned)) return planned;
  }
  return 'refused';
};

interface Named {
  readonly kind: RemedyKind;
  readonly setting: boolean;
  readonly step: Step;
}

/** In the order in which they are applied. */
const STEPS: readonly Named[] = [
  { kind: 'arms-up', setting: true, step: armsUp },
  { kind: 'swap', setting: true, step: swap },
  { kind: 'slice-oversampling', setting: false, step: oversampleSlices },
  { kind: 'drop-end-partitions', setting: false, step: dropEnds },
  { kind: 'larger-fov-same-matrix', setting: false, step: fovMatrix },
  { kind: 'larger-fov-same-voxel', setting: false, step: fovVoxel },
  { kind: 'phase-oversampling', setting: false, step: oversampleFirst },
  { kind: 'phase-oversampling', setting: false, step: oversampleAlways },
];

export const SEARCHED_KINDS: readonly RemedyKind[] = [...new Set(STEPS.map(({ kind }) => kind))];

const timeOf = (original: Case, planned: Case) =>
  scanTime(carryTiming(original.prescription, planned.prescription), planned.patient, planned.scanner);

function debt(original: Case, planned: Case): number[] {
  const now = timeOf(original, original);
  const then = timeOf(original, planned);
  const beyond = (value: number, limit: number): number => (value > limit + 5e-7 ? value - limit : 0);
  const held = original.prescription.breathing === 'breath-hold';
  return [
    held ? beyond(then.longestHoldS, original.patient.breathHoldS.value) : 0,
    beyond(then.scanS, now.scanS),
    beyond(then.trainMs ?? 0, now.trainMs ?? 0),
  ];
}

const less = (a: readonly number[], b: readonly number[]): boolean => {
  for (let i = 0; i < a.length; i++) if (Math.abs(a[i]! - b[i]!) > 5e-7) return a[i]! < b[i]!;
  return false;
};

function levels(given: Case, payback: PaybackKind): Partial<Prescription>[] {
  const p = given.prescription;
  const { limits } = given.scanner;
  switch (payback) {
    case 'fewer-averages':
      return Array.from({ length: p.averages - 1 }, (_, i) => p.averages - 1 - i)
        .filter((averages) => p.family !== 'echo-planar' || (p.volumes * averages) % p.averages === 0)
        .map((averages) => ({ averages }));
    case 'more-acceleration':
      return [1.5, 2, 2.5, 3, 3.5, 4, 5, 6]
        .filter((r) => r > p.acceleration.factorPhase && r <= limits.accelerationPhaseMax)
        .map((factorPhase) => ({ acceleration: { ...p.acceleration, factorPhase } }));
    case 'partial-fourier':
      return [0.875, 0.75, 0.625]
        .filter((f) => f < p.partialFourierPhase && f >= limits.partialFourierMin)
        .map((partialFourierPhase) => ({ partialFourierPhase }));
  }
}

function plan(
  given: Case,
  steps: readonly Named[],
  level: Partial<Prescription> | undefined,
): Case | undefined {
  let planned = given;
  for (const stage of [true, false]) {
    for (const { step } of steps.filter(({ setting }) => setting === stage)) {
      const result = step(planned);
      if (typeof result === 'string') return undefined;
      planned = result;
    }
    if (stage && level !== undefined) planned = change(planned, level);
  }
  return planned;
}

/** Averages given up pay for as many clean lines as fit into the time there was. */
function spend(original: Case, planned: Case): Case {
  const lines = grid(planned, planned.prescription.linesAcrossFov).filter(
    (l) => l > planned.prescription.acquiredLines,
  );
  for (const l of lines.reverse()) {
    const filled = change(planned, { acquiredLines: l });
    if (debt(original, filled).every((owed) => owed === 0) && !planeFolds(filled) && !slabFolds(filled))
      return filled;
  }
  return planned;
}

function planPaid(given: Case, steps: readonly Named[], payback: PaybackKind): Case | undefined {
  const unpaid = plan(given, steps, undefined);
  if (unpaid === undefined) return undefined;
  let owed = debt(given, unpaid);
  if (owed.every((value) => value === 0)) return undefined;
  let best: Case | undefined;
  for (const level of levels(given, payback)) {
    let planned = plan(given, steps, level);
    if (planned === undefined) continue;
    let left = debt(given, planned);
    const oversamples = steps.some(({ kind }) => kind === 'phase-oversampling');
    if (
      payback === 'fewer-averages' &&
      oversamples &&
      left.every((value) => value === 0) &&
      timeOf(given, given).trainMs === undefined
    ) {
      planned = spend(given, planned);
      left = debt(given, planned);
    }
    if (less(left, owed)) [best, owed] = [planned, left];
    if (left.every((value) => value === 0)) break;
  }
  return best;
}

const staysShown = (original: Case, planned: Case): boolean => {
  if (original.keepClear.area.kind !== 'box') throw new Error('written for boxes');
  const { box } = original.keepClear.area;
  const window = ({ prescription: p }: Case) => {
    const sizes = { [p.phaseAxis]: p.fovPhaseMm } as Record<string, number>;
    const other = (
      { axial: ['RL', 'AP'], coronal: ['RL', 'SI'], sagittal: ['AP', 'SI'] }[p.plane] as string[]
    ).find((axis) => axis !== p.phaseAxis)!;
    sizes[other] = p.fovReadoutMm;
    return ['RL', 'AP', 'SI'].map((axis, i) =>
      sizes[axis] === undefined
        ? undefined
        : [p.centreMm[i]! - sizes[axis] / 2, p.centreMm[i]! + sizes[axis] / 2],
    );
  };
  const [before, after] = [window(original), window(planned)];
  return [box.xMm, box.yMm, box.zMm].every(([low, high], i) => {
    const [seen, shown] = [before[i], after[i]];
    if (seen === undefined || shown === undefined) return true;
    const [from, to] = [Math.max(low, seen[0]!), Math.min(high, seen[1]!)];
    return from >= to || (shown[0]! <= from + 5e-4 && shown[1]! >= to - 5e-4);
  });
};

function price(original: Case, planned: Case, now: Assessment, then: Assessment): number {
  const { weights } = original.policy;
  const [before, after] = [original.prescription, planned.prescription];
  const growth = (a = 0, b = 0): number => (a > 0 && b > a ? (b / a - 1) * 100 : 0);
  const volume = ({ detail }: Assessment): number =>
    detail!.voxelMm[0] * detail!.voxelMm[1] * detail!.voxelMm[2];
  const tenths = (points: number): number => Math.round(points * 10 + 1e-9);
  const steps = (ladder: readonly number[], inside: (value: number) => boolean): number =>
    ladder.filter(inside).length;

  const time = growth(now.time!.scanS, then.time!.scanS) * weights.timePct;
  const snr = Math.max(0, (1 - then.detail!.snr / now.detail!.snr) * 100) * weights.snrLostPct;
  const voxel = growth(volume(now), volume(then)) * weights.voxelPct;
  const held = before.breathing === 'breath-hold';
  const hold =
    (held ? Math.max(0, then.time!.longestHoldS - original.patient.breathHoldS.value) : 0) *
      weights.breathHoldS +
    Math.max(0, then.time!.breathHolds - now.time!.breathHolds) * weights.extraBreathHold;
  const swapped = before.phaseAxis !== after.phaseAxis;
  const [r0, r1] = [before.acceleration.factorPhase, after.acceleration.factorPhase];
  const [f0, f1] = [before.partialFourierPhase, after.partialFourierPhase];
  const side =
    (swapped ? weights.swap[original.patient.region] : 0) +
    Math.max(0, before.averages - after.averages) * weights.fewerAverages +
    steps([1.5, 2, 2.5, 3, 3.5, 4, 5, 6], (r) => r > r0 && r <= r1) * weights.moreAcceleration +
    steps([0.875, 0.75, 0.625], (f) => f < f0 && f >= f1) * weights.partialFourier +
    Math.max(
      growth(now.time!.trainMs, then.time!.trainMs),
      growth(now.time!.displacementPer100HzMm, then.time!.displacementPer100HzMm),
    ) *
      weights.trainPct;
  const share = (p: Prescription): string => (p.acquiredLines / p.linesAcrossFov).toFixed(6);
  let edits =
    Number(swapped) + Number(share(before) !== share(after)) + Number(r0 !== r1) + Number(f0 !== f1);
  edits += Number(before.averages !== after.averages) + Number(before.teMs !== after.teMs);
  if (!swapped) {
    for (const field of ['fovPhaseMm', 'fovReadoutMm', 'readoutMatrix', 'linesAcrossFov'] as const)
      edits += Number(before[field] !== after[field]);
  }
  let coverage = 0;
  if (before.slices.mode === 'slab' && after.slices.mode === 'slab') {
    edits += Number(before.slices.acquiredPartitions !== after.slices.acquiredPartitions);
    coverage =
      2 *
      (after.slices.droppedPartitionsPerEnd - before.slices.droppedPartitionsPerEnd) *
      after.slices.partitionThicknessMm;
  }
  const raised = original.patient.arms.position !== planned.patient.arms.position;
  const effort = edits * weights.edit + (raised ? weights.armsUp : 0) + coverage * weights.coverageMm;
  const inside = then.fold!.inKeepClear || (then.slab?.contaminatedInKeepClear ?? 0) > 0;
  const wrapped = (then.slab?.contaminated ?? 0) / (then.slab?.partitions.length ?? 1);
  const displayed = Math.min(1, then.fold!.displayedShare) * 100 * (wrapped > 0 ? wrapped : 1);
  const kept = Math.max(
    Math.min(1, then.fold!.keepClearShare) * 100,
    (100 * (then.slab?.contaminatedInKeepClear ?? 0)) / (then.slab?.partitions.length ?? 1),
  );
  const fold =
    displayed * weights.foldDisplayedPct + Math.max(kept, inside ? 1 : 0) * weights.foldKeepClearPct;
  return [time, snr, voxel, hold, side, effort, fold].reduce((sum, points) => sum + tenths(points), 0);
}

/** Every outcome of the searched changes, merged where equal, without order. */
export function searchRemedies(given: Case): Outcome[] {
  const now = assess(given);
  const sets: Named[][] = [[], ...STEPS.map((step) => [step])];
  STEPS.forEach((a, i) =>
    STEPS.slice(i + 1).forEach((b) => {
      if (a.kind !== b.kind && !(a.kind.startsWith('larger') && b.kind.startsWith('larger')))
        sets.push([a, b]);
    }),
  );
  const found = new Map<string, Outcome>();
  for (const payback of [undefined, 'fewer-averages', 'more-acceleration', 'partial-fourier'] as const) {
    for (const steps of sets) {
      if (steps.length === 0 && payback === undefined) continue;
      let planned: Case | undefined;
      try {
        planned = payback === undefined ? plan(given, steps, undefined) : planPaid(given, steps, payback);
      } catch (error) {
        if (!(error instanceof DomainError)) throw error;
      }
      if (planned === undefined || !staysShown(given, planned)) continue;
      let settled = change(planned, carryTiming(given.prescription, planned.prescription));
      const minimumTe = timeOf(settled, settled).minimumTeMs ?? 0;
      if (minimumTe > settled.prescription.teMs) settled = change(settled, { teMs: Math.ceil(minimumTe) });
      const then = assess(settled);
      if (then.verdict === 'cannot-be-scanned') continue;
      const key = JSON.stringify([settled.prescription, settled.patient.arms.position]);
      if (key === JSON.stringify([given.prescription, given.patient.arms.position])) continue;
      found.set(key, {
        prescription: settled.prescription,
        arms: settled.patient.arms.position,
        costTenths: price(given, settled, now, then),
        leavesFold: then.verdict === 'fold-in-keep-clear',
      });
    }
  }
  return [...found.values()];
}
