import { describe, expect, it } from 'vitest';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { windowRegion } from '@/lib/physics/geometry/oriented-region';
import type { OpenInterval, WidthRequirement } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { Slab } from '@/lib/physics/model/prescription';
import type { ChangeResult, Solver, TargetedCase } from '@/lib/physics/remedy/change';
import { coilElements } from '@/lib/physics/remedy/coil-elements';
import { largerFovSameMatrix, largerFovSameVoxel } from '@/lib/physics/remedy/larger-fov';
import { countEdits, slabCoverageLostMm } from '@/lib/physics/remedy/prescription-difference';
import { recentre } from '@/lib/physics/remedy/recentre';
import { remedySentence } from '@/lib/physics/remedy/sentence';
import {
  dropEndPartitions,
  enlargeSlab,
  sharperPulse,
  sliceOversampling,
} from '@/lib/physics/remedy/slab-changes';
import {
  accelerated,
  LIVER_BOX,
  prescriptionOf,
  sketchCase,
  slabOf,
  typicalPatient,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';

/** A geometry whose answers are stated by the test; what it does not state is not to be asked. */
const solverThat = (answers: Partial<Solver>): Solver =>
  new Proxy(answers as Solver, {
    get: (target, name) =>
      target[name as keyof Solver] ??
      (() => {
        throw new Error(`${String(name)} was asked`);
      }),
  });
const planned = (result: ChangeResult): TargetedCase => {
  if (result.outcome !== 'changed') throw new Error(JSON.stringify(result));
  return result.planned;
};
const code = (result: ChangeResult) => (result.outcome === 'refused' ? result.reason.code : result.outcome);
const slabIn = (given: TargetedCase) => given.prescription.slices as Slab;

describe('changes of a slab', () => {
  const slab = slabOf({
    partitions: 40,
    acquiredPartitions: 50,
    partitionThicknessMm: 3,
    timeBandwidthProduct: 6,
    pulseDurationMs: 1.2,
  });
  const given = freeze(
    sketchCase({
      prescription: prescriptionOf('gradient-echo-3d', { slices: slab, trMs: 5, teMs: 2 }),
      scanner: typicalScanner({ partitionStep: 4, limits: { sliceOversamplingMaxPct: 40 } }),
    }),
  );
  const stack = freeze(sketchCase({ prescription: typicalPrescription() }));
  const cleanFrom = (enough: (slab: Slab) => boolean) =>
    solverThat({ slabIsClean: (asked) => enough(slabIn(asked)), leavesPicture: () => undefined });
  const never = cleanFrom(() => false);

  it('a thicker one: as few partitions more as are enough, two at a time, at the same oversampling', () => {
    const after = planned(
      enlargeSlab(
        given,
        cleanFrom(({ partitions }) => partitions >= 47),
      ),
    );
    // 48 · 1.25 = 60 lies on the step of four from 48.
    expect(slabIn(after)).toMatchObject({ partitions: 48, acquiredPartitions: 60 });
    // Up to twice, itself included.
    expect(
      slabIn(
        planned(
          enlargeSlab(
            given,
            cleanFrom(({ partitions }) => partitions >= 80),
          ),
        ),
      ).partitions,
    ).toBe(80);
    expect(
      code(
        enlargeSlab(
          given,
          cleanFrom(({ partitions }) => partitions >= 81),
        ),
      ),
    ).toBe('slab-not-enough');
    expect(
      code(
        enlargeSlab(
          given,
          cleanFrom(() => true),
        ),
      ),
    ).toBe('nothing-to-change');
    expect(code(enlargeSlab(stack, never))).toBe('nothing-to-change');
  });
  it('a thicker one stays within the scanner’s oversampling, its most included', () => {
    const upTo = (sliceOversamplingMaxPct: number) =>
      enlargeSlab(
        { ...given, scanner: typicalScanner({ partitionStep: 1, limits: { sliceOversamplingMaxPct } }) },
        cleanFrom(({ partitions }) => partitions >= 60),
      );
    expect(slabIn(planned(upTo(25)))).toMatchObject({ partitions: 60, acquiredPartitions: 75 });
    expect(code(upTo(24))).toBe('slab-not-enough');
  });
  it('a sharper pulse: the next product that is enough, lasting longer in proportion, TR and half of it TE with it', () => {
    for (const [from, product] of [
      [6.1, 8],
      [8.5, 10],
      [10.5, 12],
      [12.5, 16],
      [16, 16],
    ] as const) {
      const after = planned(
        sharperPulse(
          given,
          cleanFrom(({ timeBandwidthProduct: tbw }) => tbw! >= from),
        ),
      );
      const added = (1.2 * product) / 6 - 1.2;
      expect(slabIn(after).timeBandwidthProduct).toBe(product);
      expect(slabIn(after).pulseDurationMs).toBeCloseTo(1.2 + added, 9);
      expect(after.prescription.trMs).toBeCloseTo(5 + added, 9);
      expect(after.prescription.teMs).toBeCloseTo(2 + added / 2, 9);
    }
    expect(code(sharperPulse(given, never))).toBe('pulse-not-enough');
    const blunt = {
      ...given,
      prescription: { ...given.prescription, slices: { ...slab, timeBandwidthProduct: 4 } },
    };
    const next = planned(
      sharperPulse(
        blunt,
        cleanFrom(({ timeBandwidthProduct }) => timeBandwidthProduct! > 4),
      ),
    );
    expect(slabIn(next).timeBandwidthProduct).toBe(6);
    const unknown = (values: Partial<Slab>) => ({
      ...given,
      prescription: { ...given.prescription, slices: { ...slab, ...values } },
    });
    expect(code(sharperPulse(unknown({ timeBandwidthProduct: undefined }), never))).toBe('pulse-unknown');
    expect(code(sharperPulse(unknown({ pulseDurationMs: undefined }), never))).toBe('pulse-unknown');
    expect(code(sharperPulse(unknown({ selective: false }), never))).toBe('nothing-to-change');
    expect(code(sharperPulse(stack, never))).toBe('nothing-to-change');
  });
  it('end partitions given up: as few as are enough, while something is left and nothing that must stay goes', () => {
    const enough = (least: number) =>
      cleanFrom(({ droppedPartitionsPerEnd }) => droppedPartitionsPerEnd >= least);
    const result = dropEndPartitions(given, enough(3));
    expect(slabIn(planned(result)).droppedPartitionsPerEnd).toBe(3);
    expect(result).toMatchObject({ sideEffects: ['18 mm of coverage given up, half at each end'] });
    expect(slabIn(planned(dropEndPartitions(given, enough(1)))).droppedPartitionsPerEnd).toBe(1);
    // Of 40 at least two stay.
    expect(slabIn(planned(dropEndPartitions(given, enough(19)))).droppedPartitionsPerEnd).toBe(19);
    expect(code(dropEndPartitions(given, enough(20)))).toBe('drop-not-enough');
    expect(code(dropEndPartitions(given, enough(0)))).toBe('nothing-to-change');
    const leaving = solverThat({
      slabIsClean: () => false,
      leavesPicture: (asked) =>
        slabIn(asked).droppedPartitionsPerEnd > 2 ? { code: 'area-leaves-picture', text: '' } : undefined,
    });
    expect(code(dropEndPartitions(given, leaving))).toBe('area-leaves-picture');
    // Some given up before: only what is given up now is told.
    const before = {
      ...given,
      prescription: { ...given.prescription, slices: { ...slab, droppedPartitionsPerEnd: 2 } },
    };
    expect(dropEndPartitions(before, enough(3))).toMatchObject({
      sideEffects: ['6 mm of coverage given up, half at each end'],
    });
  });
  it('slice oversampling: what the geometry asks for, more or fewer', () => {
    const asked = (partitions: number | undefined) => solverThat({ cleanPartitions: () => partitions });
    expect(slabIn(planned(sliceOversampling(given, asked(56)))).acquiredPartitions).toBe(56);
    expect(slabIn(planned(sliceOversampling(given, asked(44)))).acquiredPartitions).toBe(44);
    expect(code(sliceOversampling(given, asked(50)))).toBe('nothing-to-change');
    expect(code(sliceOversampling(given, asked(undefined)))).toBe('slice-oversampling-over-maximum');
    expect(code(sliceOversampling(stack, never))).toBe('nothing-to-change');
  });
  it('coverage lost and settings changed are counted', () => {
    const { prescription: p } = given;
    const edits = (values: Partial<Slab>) => countEdits(p, { ...p, slices: { ...slab, ...values } });
    expect(edits({})).toBe(0);
    expect(edits({ acquiredPartitions: 55 })).toBe(1);
    // Partitions at the same share of oversampling are one setting; with another share, two.
    expect(edits({ partitions: 48, acquiredPartitions: 60 })).toBe(1);
    expect(edits({ partitions: 48 })).toBe(2);
    expect(edits({ timeBandwidthProduct: 8, pulseDurationMs: 1.6 })).toBe(1);
    expect(edits({ partitions: 48, acquiredPartitions: 50, timeBandwidthProduct: 8 })).toBe(3);
    const lost = (before: number, after: number) =>
      slabCoverageLostMm(
        { ...p, slices: { ...slab, droppedPartitionsPerEnd: before } },
        { ...p, slices: { ...slab, droppedPartitionsPerEnd: after } },
      );
    expect([lost(0, 0), lost(0, 1), lost(1, 3), lost(3, 1)]).toEqual([0, 6, 12, 0]);
    expect(slabCoverageLostMm(typicalPrescription(), p)).toBe(0);
    expect(slabCoverageLostMm(p, typicalPrescription())).toBe(0);
  });
});

describe('settings to change in a plane', () => {
  const p = typicalPrescription();
  const edits = (values: Partial<typeof p>) => countEdits(p, { ...p, ...values });
  it('are one each', () => {
    for (const values of [
      { trMs: 1 },
      { teMs: 1 },
      { averages: 9 },
      { partialFourierPhase: 0.75 },
      { coilElements: ['a'] },
      { fovPhaseMm: 333 },
      { fovReadoutMm: 333 },
      { readoutMatrix: 333 },
      { acquiredLines: 300 },
      { acceleration: accelerated(2) },
      { linesAcrossFov: 300, acquiredLines: 300 },
    ])
      expect(edits(values), JSON.stringify(values)).toBe(1);
    expect(edits({ linesAcrossFov: 300 })).toBe(2);
    expect(edits({})).toBe(0);
  });
  it('a swap is one, and its FOVs and matrices follow by themselves', () => {
    const swap = { phaseAxis: 'RL', fovPhaseMm: 480, fovReadoutMm: 300, readoutMatrix: 240 } as const;
    expect(edits({ ...swap, linesAcrossFov: 384, acquiredLines: 384 })).toBe(1);
    expect(edits({ ...swap, linesAcrossFov: 384, acquiredLines: 480 })).toBe(2);
  });
});

describe('a larger FOV', () => {
  const requirement = (forbiddenMm: readonly OpenInterval[]): WidthRequirement => ({
    forbiddenMm,
    firstCleanMm: 0,
    alwaysCleanMm: forbiddenMm.at(-1)?.[1] ?? 0,
    coverBodyMm: 0,
    coverBodyLines: 0,
  });
  const clean = (forbiddenMm: readonly OpenInterval[], width: number) =>
    !forbiddenMm.some(([low, high]) => width > low + 1e-9 && width < high - 1e-9);
  const sets: readonly (readonly OpenInterval[])[] = [
    [[280, 351.3]],
    [
      [250, 331],
      [331.2, 340],
      [352, 377.7],
    ],
    [
      [250, 300],
      [305, 310],
    ],
    [[250, 401]],
  ];
  // 300 mm in 240 lines, 250 acquired: W is 312.5 mm.
  const at = (
    acquiredLines: number,
    overrides: Partial<Case['prescription']> = {},
    scanner = typicalScanner(),
  ) => freeze(sketchCase({ scanner, prescription: typicalPrescription({ acquiredLines, ...overrides }) }));

  it('at the same lines is the first whole millimetre whose acquired width is free', () => {
    for (const forbiddenMm of sets)
      for (const lines of [240, 250, 288]) {
        const given = at(lines);
        const result = largerFovSameMatrix(
          given,
          solverThat({ requirement: () => requirement(forbiddenMm) }),
        );
        let fov = 300;
        while (!clean(forbiddenMm, (fov * lines) / 240)) fov++;
        if (fov === 300) expect(code(result)).toBe('nothing-to-change');
        else {
          expect(planned(result).prescription).toMatchObject({ fovPhaseMm: fov, acquiredLines: lines });
          expect(planned(result).prescription.fovReadoutMm).toBe(480);
        }
      }
  });
  it('at the same pixel is the first number of lines whose acquired width is free on the scanner’s lines', () => {
    for (const lineStep of [
      { kind: 'line' },
      { kind: 'even-lines' },
      { kind: 'percent', percent: 10 },
    ] as const)
      for (const forbiddenMm of sets)
        for (const lines of [240, 264]) {
          const given = at(lines, {}, typicalScanner({ lineStep }));
          const result = largerFovSameVoxel(
            given,
            solverThat({ requirement: () => requirement(forbiddenMm) }),
          );
          if (clean(forbiddenMm, lines * 1.25)) {
            expect(code(result)).toBe('nothing-to-change');
            continue;
          }
          const share = lines / 240;
          const onGrid = (n: number) => {
            const needed = Math.max(n, Math.ceil(n * share - 1e-9));
            if (lineStep.kind === 'line') return needed;
            if (lineStep.kind === 'even-lines') return needed + (needed % 2);
            let steps = 0;
            while (Math.ceil(n * (1 + steps * 0.1) - 1e-9) < needed) steps++;
            return Math.ceil(n * (1 + steps * 0.1) - 1e-9);
          };
          let n = 241;
          while (!clean(forbiddenMm, onGrid(n) * 1.25)) n++;
          const after = planned(result).prescription;
          expect([after.linesAcrossFov, after.acquiredLines]).toEqual([n, onGrid(n)]);
          expect(after.fovPhaseMm).toBeCloseTo(n * 1.25, 9);
        }
  });
  it('goes up to the scanner’s largest, itself included', () => {
    const solver = solverThat({ requirement: () => requirement([[250, 400]]) });
    const limited = (fovMaxMm: number, matrixMax = 1024) =>
      typicalScanner({ limits: { fovMaxMm, matrixMax } });
    expect(planned(largerFovSameMatrix(at(240, {}, limited(400)), solver)).prescription.fovPhaseMm).toBe(400);
    expect(code(largerFovSameMatrix(at(240, {}, limited(399)), solver))).toBe('fov-over-maximum');
    expect(planned(largerFovSameVoxel(at(240, {}, limited(400)), solver)).prescription.linesAcrossFov).toBe(
      320,
    );
    expect(code(largerFovSameVoxel(at(240, {}, limited(399)), solver))).toBe('fov-over-maximum');
    expect(
      planned(largerFovSameVoxel(at(240, {}, limited(500, 320)), solver)).prescription.linesAcrossFov,
    ).toBe(320);
    expect(code(largerFovSameVoxel(at(240, {}, limited(500, 319)), solver))).toBe('fov-over-maximum');
  });
  it('takes the readout FOV with it only where it would exceed it and must not', () => {
    const solver = solverThat({ requirement: () => requirement([[250, 400]]) });
    const free = typicalScanner({ phaseFovMayExceedReadoutFov: true });
    const after = (fovReadoutMm: number, change = largerFovSameMatrix, scanner = typicalScanner()) =>
      planned(change(at(240, { fovReadoutMm, readoutMatrix: 256 }, scanner), solver)).prescription;
    expect(after(400)).toMatchObject({ fovPhaseMm: 400, fovReadoutMm: 400, readoutMatrix: 256 });
    expect(after(399)).toMatchObject({ fovReadoutMm: 400, readoutMatrix: 256 });
    expect(after(320)).toMatchObject({ fovReadoutMm: 400, readoutMatrix: 256 });
    expect(after(320, largerFovSameMatrix, free)).toMatchObject({ fovReadoutMm: 320 });
    // At the same pixel the readout keeps its own too: 400 / (320 / 256) = 320.
    expect(after(320, largerFovSameVoxel)).toMatchObject({ fovReadoutMm: 400, readoutMatrix: 320 });
    expect(after(410, largerFovSameVoxel)).toMatchObject({ fovReadoutMm: 410, readoutMatrix: 256 });
  });
  it('is no help while tissue wraps along the slab', () => {
    const solver = solverThat({
      requirement: () => ({ ...requirement([]), alwaysCleanMm: Infinity }),
    });
    expect(code(largerFovSameMatrix(at(240), solver))).toBe('wraps-along-slab');
    expect(code(largerFovSameVoxel(at(240), solver))).toBe('wraps-along-slab');
  });
});

describe('recentring', () => {
  const ends = accelerated(2, { unfolding: 'image-domain-grid-ends' });
  const inside = solverThat({ bodyAlongPhaseMm: () => [-150, 190], leavesPicture: () => undefined });
  const mustStay = { xMm: [-50, 50], yMm: [-40, 40], zMm: [-30, 30] } as const;
  const given = (overrides: Partial<Case> = {}, p: Partial<Case['prescription']> = {}) =>
    freeze(sketchCase({ prescription: typicalPrescription({ acceleration: ends, ...p }), ...overrides }));
  it('moves the centre along phase to the middle of the body, in whole millimetres', () => {
    const after = planned(recentre(given(), inside));
    expect(after.prescription.centreMm).toEqual([0, 20, 0]);
    expect(planned(recentre(given({}, { centreMm: [3, 44, 5] }), inside)).prescription.centreMm).toEqual([
      3, 20, 5,
    ]);
    expect(code(recentre(given({}, { centreMm: [0, 20.3, 0] }), inside))).toBe('nothing-to-change');
  });
  it('goes only as far as what must stay does', () => {
    const upTo = (most: number) =>
      solverThat({
        bodyAlongPhaseMm: () => [-150, 190],
        leavesPicture: (asked) =>
          Math.abs(asked.prescription.centreMm[1]) > most
            ? { code: 'area-leaves-picture', text: '' }
            : undefined,
      });
    expect(planned(recentre(given(), upTo(7.5))).prescription.centreMm[1]).toBe(7);
    expect(planned(recentre(given(), upTo(1))).prescription.centreMm[1]).toBe(1);
    expect(code(recentre(given(), upTo(0.5)))).toBe('area-leaves-picture');
  });
  it('changes nothing where fold does not depend on the centre', () => {
    const plain = { acceleration: accelerated(2, { unfolding: 'k-space-self-calibrating' }) };
    expect(code(recentre(given({}, plain), inside))).toBe('recentring-changes-nothing');
    const one = { acceleration: accelerated(1, { unfolding: 'image-domain-grid-ends' }) };
    expect(code(recentre(given({}, one), inside))).toBe('recentring-changes-nothing');
    const unknown = { acceleration: accelerated(2, { unfolding: 'unknown' }) };
    expect(
      code(recentre(given({ scanner: typicalScanner({ unfolding: 'unknown' }) }, unknown), inside)),
    ).toBe('changed');
    const following = (followsWindow: boolean, stays: boolean) =>
      code(
        recentre(
          given(
            { keepClear: { ...LIVER_BOX, followsWindow, mustStayDisplayed: stays ? mustStay : undefined } },
            plain,
          ),
          inside,
        ),
      );
    expect([following(true, true), following(true, false), following(false, true)]).toEqual([
      'changed',
      'recentring-changes-nothing',
      'recentring-changes-nothing',
    ]);
  });
  it('takes along an area that follows, and no other', () => {
    const box = { xMm: [-100, 60], yMm: [-70, 50], zMm: [-40, 40] } as const;
    const of = (keepClear: Case['keepClear']) => {
      const start = given({ keepClear });
      return { start, after: planned(recentre(start, inside)) };
    };
    const moving = of({ area: { kind: 'box', box }, followsWindow: true, mustStayDisplayed: mustStay });
    expect(moving.after.frozen!.rangesMm).toEqual([
      [-100, 60],
      [-50, 70],
      [-40, 40],
    ]);
    const fixed = of({ area: { kind: 'box', box }, followsWindow: false, mustStayDisplayed: mustStay });
    expect(fixed.after.frozen).toEqual(fixed.start.frozen);
    const unbound = of({ area: { kind: 'box', box }, followsWindow: true });
    expect(unbound.after.frozen).toEqual(unbound.start.frozen);
    const whole = of({ area: { kind: 'whole-picture' }, followsWindow: true, mustStayDisplayed: mustStay });
    expect(whole.after.frozen).toEqual(windowRegion(whole.after.prescription));
  });
  it('is told by its distance and side', () => {
    const say = (before: readonly [number, number, number], after: readonly [number, number, number]) =>
      remedySentence(
        ['recentre'],
        undefined,
        given({}, { centreMm: before }),
        given({}, { centreMm: after }),
      );
    expect(say([0, 5, 0], [0, 25, 0])).toBe('Move the FOV centre 20 mm posterior.');
    expect(say([0, 25, 0], [0, 5, 0])).toBe('Move the FOV centre 20 mm anterior.');
    expect(say([8, 0, 0], [-4, 0, 0])).toBe('Move the FOV centre 12 mm right.');
    expect(say([-4, 0, 0], [8, 0, 0])).toBe('Move the FOV centre 12 mm left.');
    expect(say([0, 0, 7], [0, 0, 10])).toBe('Move the FOV centre 3 mm superior.');
    expect(say([0, 0, 10], [0, 0, 7])).toBe('Move the FOV centre 3 mm inferior.');
    expect(say([0, 0, 0], [0, 3, 4])).toBe('Move the FOV centre 5 mm posterior.');
  });
});

describe('coil elements', () => {
  const named = (ranges: readonly (readonly [number, number])[]) =>
    ranges.map(([seesFromMm, seesToMm], i) => ({ name: `e${i + 1}`, seesFromMm, seesToMm }));
  const choose = (ranges: readonly (readonly [number, number])[], halfMm: number, isocentreZMm = 0) => {
    const given = freeze(
      sketchCase({
        patient: typicalPatient({ isocentreZMm }),
        prescription: prescriptionOf('balanced', {
          phaseAxis: 'SI',
          fovPhaseMm: 2 * halfMm,
          fovReadoutMm: 500,
          centreMm: [0, 0, isocentreZMm],
        }),
        scanner: typicalScanner({ coils: [{ name: 'body array', elements: named(ranges) }] }),
      }),
    );
    return coilElements(given, solverThat({}));
  };
  const kept = (...args: Parameters<typeof choose>) => planned(choose(...args)).prescription.coilElements;
  it('kept are as few neighbours as see the picture, and of equally many those that see least beyond it', () => {
    const rows = [
      [-250, -90],
      [-160, 10],
      [-10, 160],
      [90, 250],
    ] as const;
    expect(kept(rows, 120)).toEqual(['e2', 'e3']);
    expect(kept(rows, 160)).toEqual(['e2', 'e3']);
    expect(code(choose(rows, 161))).toBe('nothing-to-change');
    expect(kept(rows, 120, 30)).toEqual(['e2', 'e3']);
    // One sees it all: the narrowest of those, whichever comes first.
    expect(
      kept(
        [
          [-200, 200],
          [-130, 140],
          [-150, 150],
        ],
        100,
      ),
    ).toEqual(['e2']);
    expect(
      kept(
        [
          [-130, 140],
          [-200, 200],
          [-120, 125],
        ],
        100,
      ),
    ).toEqual(['e3']);
    expect(
      kept(
        [
          [-120, 125],
          [-200, 200],
          [-130, 140],
        ],
        100,
      ),
    ).toEqual(['e1']);
    expect(
      code(
        choose(
          [
            [-90, 200],
            [-200, 90],
          ],
          100,
        ),
      ),
    ).toBe('nothing-to-change');
  });
  it('nobody described are refused', () => {
    const given = freeze(sketchCase({ prescription: typicalPrescription({ coil: 'another' }) }));
    expect(code(coilElements(given, solverThat({})))).toBe('coil-elements-unknown');
  });
});
