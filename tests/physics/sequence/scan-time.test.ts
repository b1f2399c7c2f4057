import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Patient } from '@/lib/physics/model/patient';
import type { Prescription } from '@/lib/physics/model/prescription';
import { carryTiming, minimumTrMs, scanTime } from '@/lib/physics/sequence/scan-time';
import {
  sequentialBreathHolds,
  sliceBatches,
  slicesPerTr,
  slicesPerTrigger,
} from '@/lib/physics/sequence/slice-groups';
import { readPublished } from '@/tests/support/read-published';
import {
  accelerated,
  measured,
  slabOf,
  stackOf,
  typicalPatient,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';

const free = (overrides: Partial<Prescription>): Prescription =>
  typicalPrescription({
    breathing: 'free',
    averages: 1,
    slices: stackOf(10, 5),
    sliceTimeMs: 10,
    ...overrides,
  });
const time = (p: Prescription, patient: Partial<Patient> = {}) =>
  scanTime(p, typicalPatient(patient), typicalScanner());

/** Each published case as a prescription; the inputs are those of its row. */
const PUBLISHED: Readonly<Record<number, Prescription>> = {
  1: free({ family: 'spin-echo', trMs: 500, acquiredLines: 256 }),
  3: free({ family: 'spin-echo', trMs: 500, linesAcrossFov: 256, acquiredLines: 384 }),
  5: free({ family: 'spin-echo', trMs: 500, linesAcrossFov: 192, acquiredLines: 250 }),
  7: free({ family: 'spin-echo', trMs: 500, acquiredLines: 256, slices: stackOf(20, 5), sliceTimeMs: 40 }),
  9: free({
    family: 'echo-train-spin-echo',
    trMs: 4000,
    linesAcrossFov: 320,
    acquiredLines: 416,
    echoTrainLength: 15,
  }),
  11: free({
    family: 'echo-train-spin-echo',
    trMs: 4000,
    linesAcrossFov: 320,
    acquiredLines: 640,
    echoTrainLength: 15,
  }),
  13: free({
    family: 'echo-train-spin-echo',
    trMs: 4000,
    linesAcrossFov: 320,
    acquiredLines: 640,
    echoTrainLength: 15,
  }),
  15: free({
    family: 'gradient-echo',
    trMs: 150,
    acquiredLines: 173,
    slices: stackOf(20, 5),
    sliceTimeMs: 15,
  }),
  17: free({
    family: 'single-shot-echo-train',
    trMs: 1200,
    acquiredLines: 173,
    echoSpacingMs: 4.2,
    slices: stackOf(25, 5),
  }),
  19: free({
    family: 'echo-planar',
    trMs: 5000,
    volumes: 4,
    fovPhaseMm: 300,
    linesAcrossFov: 160,
    acquiredLines: 160,
    echoSpacingMs: 0.7,
    acceleration: accelerated(2, { referenceLines: 0 }),
  }),
  21: free({
    family: 'gradient-echo-3d',
    trMs: 4.5,
    acquiredLines: 262,
    slices: slabOf({ partitions: 64, acquiredPartitions: 64 }),
  }),
  23: free({
    family: 'gradient-echo-3d',
    trMs: 4.5,
    acquiredLines: 262,
    slices: slabOf({ partitions: 64, acquiredPartitions: 77 }),
  }),
  // 176 partitions of 7.5 ms a shot, and 980 ms of preparation: 2.3 s a shot.
  25: free({
    family: 'gradient-echo-3d',
    trMs: 7.5,
    acquiredLines: 282,
    slices: slabOf({ partitions: 176, acquiredPartitions: 176 }),
    preparationMs: 980,
    segments: 282,
  }),
};

describe('scan time against fixtures/published/scan-time', () => {
  const rows = readPublished('scan-time');
  it('covers every published case', () => {
    expect(rows.map((row) => row.number('case'))).toEqual(Object.keys(PUBLISHED).map(Number));
  });
  for (const row of rows) {
    it(`${row.number('case')}: ${row.text('sequence')}`, () => {
      // Exact but for the last bits of a double.
      expect(time(PUBLISHED[row.number('case')]!).scanS).toBeCloseTo(row.number('time_s'), 9);
    });
  }
  it('shots, trains, minimum TE and displacement printed beside the cases', () => {
    expect(time(PUBLISHED[9]!).shots).toBe(28);
    expect(time(PUBLISHED[11]!).shots).toBe(43);
    const twoAverages = free({
      family: 'echo-train-spin-echo',
      trMs: 4000,
      acquiredLines: 320,
      echoTrainLength: 15,
      averages: 2,
    });
    expect(time(twoAverages).scanS).toBe(176);
    expect(time(PUBLISHED[17]!).trainMs).toBeCloseTo(726.6, 9);
    const planar = time(PUBLISHED[19]!);
    expect(planar.acquiredViews).toBe(80);
    expect(planar.trainMs).toBeCloseTo(56, 9);
    expect(planar.displacementPer100HzMm).toBeCloseTo(10.5, 9);
    expect(planar.minimumTeMs).toBeCloseTo(28, 9);
    expect(time(PUBLISHED[1]!).trainMs).toBeUndefined();
  });
});

describe('what oversampling does to the time', () => {
  it('50 % phase oversampling takes half as long again, 100 % doubles the lines (common practice, no source)', () => {
    const base = free({ family: 'spin-echo', acquiredLines: 240 });
    const at = (acquiredLines: number) => time({ ...base, acquiredLines }).scanS / time(base).scanS;
    expect(at(360)).toBe(1.5);
    expect(at(480)).toBe(2);
  });
  it('an echo train grows in whole shots', () => {
    const shots = [240, 241, 256, 257].map(
      (acquiredLines) => time(free({ acquiredLines, echoTrainLength: 16 })).shots,
    );
    expect(shots).toEqual([15, 16, 16, 17]);
  });
  it('a single shot keeps its time and lengthens its train and minimum TE', () => {
    const base = free({
      family: 'single-shot-echo-train',
      trMs: 1200,
      acquiredLines: 240,
      echoSpacingMs: 4,
      partialFourierPhase: 0.625,
    });
    const more = { ...base, acquiredLines: 360 };
    expect(time(more).scanS).toBe(time(base).scanS);
    expect([time(base).trainMs, time(more).trainMs]).toEqual([600, 900]);
    // (f − ½)·L·ESP/R: 0.125 · 240 · 4 and 0.125 · 360 · 4.
    expect([time(base).minimumTeMs, time(more).minimumTeMs]).toEqual([120, 180]);
    expect(time({ ...more, acceleration: accelerated(2, { referenceLines: 0 }) }).minimumTeMs).toBe(90);
  });
  it('EPI keeps its time, and its displacement grows with W', () => {
    const base = { ...PUBLISHED[19]!, shots: 2 };
    const more = { ...base, acquiredLines: 240 };
    expect(time(more).scanS).toBe(time(base).scanS);
    expect(time(more).displacementPer100HzMm! / time(base).displacementPer100HzMm!).toBeCloseTo(1.5, 12);
    expect(time(base).trainMs).toBeCloseTo(28, 9);
    // Twice the shots, twice the time, half the displacement.
    expect(time(base).scanS).toBe(40);
    expect(time(base).displacementPer100HzMm).toBeCloseTo(5.25, 9);
  });
  it('never shortens the scan (every family)', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...Object.values(PUBLISHED)),
        fc.integer({ min: 0, max: 200 }),
        fc.integer({ min: 1, max: 40 }),
        (p, extra, more) => {
          const before = { ...p, acquiredLines: p.acquiredLines + extra };
          const after = { ...before, acquiredLines: before.acquiredLines + more };
          expect(time(after).scanS).toBeGreaterThanOrEqual(time(before).scanS);
        },
      ),
      { seed: 20265 },
    );
  });
});

describe('what else goes into the time', () => {
  it('averages, batches and a separate calibration', () => {
    const base = free({ family: 'spin-echo', trMs: 500, acquiredLines: 200 });
    expect(time({ ...base, averages: 3 }).scanS).toBe(300);
    expect(
      time({ ...base, acceleration: accelerated(2, { referenceLines: 0, calibrationS: 12 }) }).scanS,
    ).toBe(62);
    expect(time({ ...base, sliceTimeMs: 60 }).batches).toBe(2);
    expect(time({ ...base, sliceTimeMs: 60 }).scanS).toBe(200);
  });
  it('balanced, sequential: TR·Y·slices·averages', () => {
    expect(
      time(free({ family: 'balanced', trMs: 4, acquiredLines: 250, slices: stackOf(20, 5), averages: 2 }))
        .scanS,
    ).toBeCloseTo(40, 9);
  });
  it('echo-train spin echo 3D: whole shots of all views', () => {
    const p = free({
      family: 'echo-train-spin-echo-3d',
      trMs: 1500,
      acquiredLines: 256,
      echoTrainLength: 60,
      slices: slabOf(),
    });
    // ⌈256 · 64 / 60⌉ = 274 shots.
    expect(time(p).scanS).toBe(411);
  });
  it('slices in a TR: 500/10 = 50; 200 slices are 4 batches; one slice too long for TR is refused', () => {
    expect(slicesPerTr(500, 10)).toBe(50);
    // 0.3/0.1 is 2.9999999999999996 in doubles and must count as 3.
    expect(slicesPerTr(0.3, 0.1)).toBe(3);
    expect(sliceBatches(200, 50)).toBe(4);
    expect(sliceBatches(201, 50)).toBe(5);
    expect(slicesPerTr(500, 501)).toBe(0);
    expect(() => sliceBatches(10, 0)).toThrow(expect.objectContaining({ code: 'slice-does-not-fit' }));
    expect(() => time(free({ family: 'spin-echo', trMs: 500, sliceTimeMs: 501 }))).toThrow(
      expect.objectContaining({ code: 'slice-does-not-fit' }),
    );
  });
  it('the smallest TR holds all slices of an EPI volume, one slice elsewhere', () => {
    expect(minimumTrMs(free({ family: 'echo-planar', sliceTimeMs: 90, slices: stackOf(40, 5) }))).toBe(3600);
    expect(minimumTrMs(free({ family: 'single-shot-echo-train', sliceTimeMs: 900 }))).toBe(900);
    expect(minimumTrMs(free({ family: 'gradient-echo-3d', slices: slabOf() }))).toBe(0);
    expect(minimumTrMs(free({ family: 'balanced' }))).toBe(0);
  });
});

describe('breath-holds', () => {
  const held = (overrides: Partial<Prescription>): Prescription =>
    free({ breathing: 'breath-hold', ...overrides });

  it('interleaved: as many as batches, each TR·Y·averages', () => {
    const p = held({
      family: 'gradient-echo',
      trMs: 150,
      acquiredLines: 120,
      slices: stackOf(20, 5),
      sliceTimeMs: 15,
    });
    expect(time(p)).toMatchObject({ breathHolds: 2, batches: 2, scanS: 36, longestHoldS: 18 });
  });
  it('sequential: the smallest number that keeps each inside the limit', () => {
    const p = held({ family: 'balanced', trMs: 4, acquiredLines: 250, slices: stackOf(25, 5) });
    // One second a slice: 18 s hold 18 slices; two holds of 13 and 12.
    expect(time(p)).toMatchObject({ breathHolds: 2, longestHoldS: 13, scanS: 25 });
    expect(time(p, { breathHoldS: measured(25) })).toMatchObject({ breathHolds: 1, longestHoldS: 25 });
    expect(time(p, { breathHoldS: measured(0.5) })).toMatchObject({ breathHolds: 25, longestHoldS: 1 });
    const single = held({ family: 'single-shot-echo-train', trMs: 1200, slices: stackOf(25, 5) });
    // 15 slices in 18 s: two holds of 13 and 12.
    expect(time(single)).toMatchObject({ breathHolds: 2, longestHoldS: expect.closeTo(15.6, 9) as number });
  });
  it('is as few as any grouping can be', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 60 }),
        fc.integer({ min: 1, max: 40 }),
        fc.integer({ min: 1, max: 60 }),
        (slices, perSliceTenths, limitS) => {
          const perSlice = perSliceTenths / 10;
          const { breathHolds, longestHoldS } = sequentialBreathHolds(slices, perSlice, limitS);
          let fewest = 1;
          while (fewest < slices && Math.ceil(slices / fewest) * perSliceTenths > limitS * 10) fewest += 1;
          expect(breathHolds).toBe(fewest);
          expect(longestHoldS).toBeCloseTo(Math.ceil(slices / fewest) * perSlice, 9);
        },
      ),
      { seed: 20266 },
    );
  });
  it('3D and EPI: one, not divisible; calibration is not part of a hold', () => {
    const p = held({
      family: 'gradient-echo-3d',
      trMs: 4,
      acquiredLines: 100,
      slices: slabOf({ partitions: 50, acquiredPartitions: 50 }),
    });
    const calibrated = { ...p, acceleration: accelerated(2, { referenceLines: 0, calibrationS: 8 }) };
    expect(time(p)).toMatchObject({ breathHolds: 1, longestHoldS: 20, scanS: 20 });
    expect(time(calibrated)).toMatchObject({ breathHolds: 1, longestHoldS: 10, scanS: 18 });
    expect(time(held({ family: 'echo-planar', trMs: 3000, volumes: 4 }))).toMatchObject({
      breathHolds: 1,
      longestHoldS: 12,
    });
  });
  it('none when breathing freely', () => {
    expect(time(free({ family: 'balanced' }))).toMatchObject({ breathHolds: 0, longestHoldS: 0 });
  });
});

describe('triggered', () => {
  const triggered = (overrides: Partial<Prescription> = {}): Prescription =>
    free({
      breathing: 'triggered',
      breathsPerTr: 1,
      acquiredLines: 240,
      echoTrainLength: 16,
      sliceTimeMs: 130,
      slices: stackOf(30, 5),
      ...overrides,
    });
  const breathing = (value: number, spread: number) => ({ breathPeriodS: measured(value, spread) });

  it('slices per trigger: ⌊w·breath/t_slice⌋ (w 0.4, 4.2 s, 130 ms: 12)', () => {
    expect(slicesPerTrigger(0.4, 4.2, 130)).toBe(12);
    expect(slicesPerTrigger(0.4, 4, 160)).toBe(10);
  });
  it('takes n breaths a shot and a batch for every group of slices', () => {
    // 15 shots, 3 batches of up to 12 slices, 4.2 s each.
    expect(time(triggered(), breathing(4.2, 0))).toMatchObject({
      scanS: expect.closeTo(189, 9) as number,
      batches: 3,
      breathHolds: 0,
    });
    expect(time(triggered({ breathsPerTr: 2 }), breathing(4.2, 0)).scanS).toBeCloseTo(378, 9);
    expect(time(triggered({ averages: 2 }), breathing(4.2, 0)).scanS).toBeCloseTo(378, 9);
  });
  it('gives the range that the breath’s spread allows, with its jumps', () => {
    // At 4.225 s a 13th slice fits, which saves 25 slices a batch; 12 and 30 slices have no jump within the spread.
    for (const slices of [12, 25, 30, 40, 47]) {
      const p = triggered({ slices: stackOf(slices, 5) });
      const { scanRangeS } = time(p, breathing(4.2, 0.5));
      let low = Number.POSITIVE_INFINITY;
      let high = 0;
      // Brute force; 1e-4 s of breath times 60 triggers is 6 ms of scan.
      for (let b = 3.7; b <= 4.7 + 1e-9; b += 1e-4) {
        const scan = b * 15 * Math.ceil(slices / Math.floor((0.4 * b * 1000) / p.sliceTimeMs + 1e-9));
        low = Math.min(low, scan);
        high = Math.max(high, scan);
      }
      expect(Math.abs(scanRangeS![0] - low)).toBeLessThan(0.01);
      expect(Math.abs(scanRangeS![1] - high)).toBeLessThan(0.01);
    }
  });
  it('leaves out breaths too short for one slice, and has no such end for a slab', () => {
    // A 130 ms slice needs a breath of 0.325 s; 240/16 shots and one slice.
    const one = time(triggered({ slices: stackOf(1, 5) }), breathing(1, 0.9)).scanRangeS!;
    expect(one[0]).toBeCloseTo(0.325 * 15, 9);
    expect(one[1]).toBeCloseTo(1.9 * 15, 9);
    const slab = time(
      triggered({ family: 'gradient-echo-3d', slices: slabOf(), segments: 40 }),
      breathing(1, 0.5),
    ).scanRangeS!;
    expect(slab[0]).toBeCloseTo(20, 9);
    expect(slab[1]).toBeCloseTo(60, 9);
  });
  it('is a single value without spread, and holds the plain value within the range otherwise', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 2.5, max: 7, noNaN: true }),
        fc.double({ min: 0, max: 1.5, noNaN: true }),
        fc.integer({ min: 1, max: 60 }),
        (value, spread, slices) => {
          const result = time(triggered({ slices: stackOf(slices, 5) }), breathing(value, spread));
          expect(result.scanRangeS![0]).toBeLessThanOrEqual(result.scanS);
          expect(result.scanRangeS![1]).toBeGreaterThanOrEqual(result.scanS);
        },
      ),
      { seed: 20267 },
    );
    const still = time(triggered(), breathing(4.2, 0));
    expect(still.scanRangeS).toEqual([still.scanS, still.scanS]);
  });
  it('other families: single shot, EPI, balanced and prepared 3D', () => {
    const of = (overrides: Partial<Prescription>) => time(triggered(overrides), breathing(4, 0)).scanS;
    // 1.6 s window: one 900 ms slice a trigger.
    expect(of({ family: 'single-shot-echo-train', sliceTimeMs: 900 })).toBe(120);
    expect(of({ family: 'echo-planar', sliceTimeMs: 100, volumes: 8 })).toBe(64);
    // 240 lines of 4 ms: 960 ms a slice.
    expect(of({ family: 'balanced', trMs: 4, sliceTimeMs: 1 })).toBe(120);
    expect(of({ family: 'gradient-echo-3d', slices: slabOf(), segments: 40 })).toBe(160);
  });
  it('refuses a slice that does not fit into the window, and a 3D scan without segments', () => {
    expect(() => time(triggered({ sliceTimeMs: 2000 }))).toThrow(
      expect.objectContaining({ code: 'slice-does-not-fit' }),
    );
    expect(() => time(triggered({ family: 'gradient-echo-3d', slices: slabOf(), segments: 0 }))).toThrow(
      expect.objectContaining({ code: 'triggered-needs-segments' }),
    );
  });
});

describe('fields that follow the sampling', () => {
  it('an EPI slice and a single shot take longer by their longer train', () => {
    const before = { ...PUBLISHED[19]!, sliceTimeMs: 90 };
    // 80 → 100 echoes of 0.7 ms.
    expect(carryTiming(before, { ...before, acquiredLines: 200 }).sliceTimeMs).toBeCloseTo(104, 9);
    const shot = free({
      family: 'single-shot-echo-train',
      acquiredLines: 200,
      echoSpacingMs: 4,
      sliceTimeMs: 900,
    });
    expect(carryTiming(shot, { ...shot, acquiredLines: 250 }).sliceTimeMs).toBe(1100);
    const train = free({ acquiredLines: 240, sliceTimeMs: 130 });
    expect(carryTiming(train, { ...train, acquiredLines: 480 }).sliceTimeMs).toBe(130);
  });
  it('prepared segments grow with the views; EPI volumes follow the averages', () => {
    const prepared = PUBLISHED[25]!;
    const more = carryTiming(prepared, { ...prepared, acquiredLines: 300 });
    expect(more.segments).toBe(300);
    const planar = { ...PUBLISHED[19]!, averages: 2, volumes: 8 };
    expect(carryTiming(planar, { ...planar, averages: 1 }).volumes).toBe(4);
    expect(() => carryTiming({ ...planar, volumes: 7 }, { ...planar, volumes: 7, averages: 1 })).toThrow(
      expect.objectContaining({ code: 'volumes-not-whole' }),
    );
  });
});

describe('prescriptions that make no sense', () => {
  it.each([
    [{ trMs: 0 }, 'tr-not-positive'],
    [{ averages: 0 }, 'averages-not-whole'],
    [{ averages: 1.5 }, 'averages-not-whole'],
    [{ echoTrainLength: 0 }, 'echo-train-not-whole'],
    [{ acquiredLines: 0 }, 'lines-not-whole'],
    [{ preparationMs: -1 }, 'preparation-out-of-range'],
    [{ segments: 0.5 }, 'segments-not-whole'],
    [{ acceleration: accelerated(2, { calibrationS: -1 }) }, 'calibration-out-of-range'],
    [{ family: 'echo-planar', shots: 0 }, 'shots-not-whole'],
    [{ family: 'echo-planar', volumes: 0 }, 'volumes-not-whole'],
  ] as const)('refuses %o', (overrides, code) => {
    expect(() => time(free(overrides as Partial<Prescription>))).toThrow(expect.objectContaining({ code }));
  });
});
