import { describe, expect, it } from 'vitest';
import type { Prescription } from '@/lib/physics/model/prescription';
import {
  acquiredLinesOneWay,
  acquiredViewsTwoWay,
  requirePartialFourier,
} from '@/lib/physics/sequence/acquired-views';
import { parallelImagingSnr, referenceShareOf, snrRatio } from '@/lib/physics/sequence/detail';
import { minimumTeMs } from '@/lib/physics/sequence/displacement';
import { echoTrainTimeS } from '@/lib/physics/sequence/scan-time-formulas';
import { swapAxes } from '@/lib/physics/sequence/swap-axes';
import { scanTime } from '@/lib/physics/sequence/scan-time';
import {
  sequentialBreathHolds,
  sliceBatches,
  slicesPerTr,
  slicesPerTrigger,
} from '@/lib/physics/sequence/slice-groups';
import {
  accelerated,
  measured,
  slabOf,
  stackOf,
  typicalPatient,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';
import { expectLimits } from '@/tests/support/expect-limits';

const time = (overrides: Partial<Prescription>, breath = measured(4, 0.5), window = 0.4) =>
  scanTime(
    typicalPrescription({ breathing: 'free', ...overrides }),
    typicalPatient({ breathPeriodS: breath }),
    typicalScanner({ respiratoryWindow: window }),
  );

describe('what a sequence may be', () => {
  it('partial Fourier above 0.5 to 1; acceleration 1 to 64; g 1 to 100; ρ 0 to 1', () => {
    expect(requirePartialFourier(0.5000001)).toBe(0.5000001);
    for (const f of [0.5, 1.0000001, Number.NaN]) {
      expect(() => requirePartialFourier(f)).toThrow(
        expect.objectContaining({ code: 'partial-fourier-out-of-range' }),
      );
    }
    const code = 'acceleration-out-of-range';
    expectLimits((factor) => acquiredLinesOneWay(256, 1, factor, 0), code, 1, 64);
    const two = (y: number, z: number) =>
      acquiredViewsTwoWay(
        { count: 256, fraction: 1, factor: y, reference: 0 },
        { count: 64, fraction: 1, factor: z, reference: 0 },
      );
    expectLimits((factor) => two(factor, 2), code, 1, 64);
    expectLimits((factor) => two(2, factor), code, 1, 64);
    expectLimits((factor) => parallelImagingSnr(factor, 1, 0), code, 1, 4096);
    expectLimits((g) => parallelImagingSnr(2, g, 0), 'geometry-factor-out-of-range', 1, 100);
    expectLimits((share) => parallelImagingSnr(2, 1, share), 'reference-share-out-of-range', 0, 1);
  });
  it('preparation up to a minute, calibration up to an hour', () => {
    expectLimits((preparationMs) => time({ preparationMs }), 'preparation-out-of-range', 0, 60_000);
    expectLimits(
      (calibrationS) => time({ acceleration: accelerated(2, { calibrationS }) }),
      'calibration-out-of-range',
      0,
      3600,
    );
  });
  it('a trigger’s window 1 to 100 % of a breath; a breath’s spread up to a minute', () => {
    const triggered = { breathing: 'triggered', slices: stackOf(1, 5), sliceTimeMs: 10 } as const;
    expectLimits((window) => time(triggered, measured(4), window), 'window-out-of-range', 0.01, 1);
    expectLimits((spread) => time(triggered, measured(4, spread)), 'spread-out-of-range', 0, 60);
    expect(() => time({ ...triggered, breathsPerTr: 0 })).toThrow(
      expect.objectContaining({ code: 'breaths-not-whole' }),
    );
    expect(() => time(triggered, measured(0))).toThrow(
      expect.objectContaining({ code: 'breath-not-positive' }),
    );
    // One segment is enough for a triggered 3D scan.
    expect(
      time({ ...triggered, family: 'gradient-echo-3d', slices: slabOf(), segments: 1, averages: 1 }).scanS,
    ).toBe(4);
  });
  it('at least one slice, line, sample and shot', () => {
    expect(() => time({ slices: stackOf(0, 5) })).toThrow(
      expect.objectContaining({ code: 'slices-not-whole' }),
    );
    expect(() => minimumTeMs(0.75, 200, 5, 2, 0)).toThrow(
      expect.objectContaining({ code: 'shots-not-whole' }),
    );
    expect(minimumTeMs(0.75, 200, 5, 2, 1)).toBeCloseTo(125, 9);
    const square = { fovPhaseMm: 300, fovReadoutMm: 300, linesAcrossFov: 200, readoutMatrix: 200 };
    for (const none of [{ linesAcrossFov: 0 }, { readoutMatrix: 0 }])
      expect(() => swapAxes({ ...square, ...none }, true)).toThrow(
        expect.objectContaining({ code: 'lines-not-whole' }),
      );
    expect(swapAxes({ ...square, linesAcrossFov: 1, readoutMatrix: 1 }, true)).toMatchObject({
      linesAcrossFov: 1,
      readoutMatrix: 1,
    });
  });
  it('slice groups need whole slices and positive times', () => {
    expect(() => sliceBatches(0, 4)).toThrow(expect.objectContaining({ code: 'slices-not-whole' }));
    expect(sliceBatches(1, 1)).toBe(1);
    expect(() => slicesPerTr(0, 10)).toThrow(expect.objectContaining({ code: 'tr-not-positive' }));
    expect(() => slicesPerTr(10, 0)).toThrow(expect.objectContaining({ code: 'slice-time-not-positive' }));
    expect(() => slicesPerTrigger(0, 4, 10)).toThrow(
      expect.objectContaining({ code: 'window-not-positive' }),
    );
    expect(() => slicesPerTrigger(0.4, 0, 10)).toThrow(
      expect.objectContaining({ code: 'breath-not-positive' }),
    );
    expect(() => slicesPerTrigger(0.4, 4, 0)).toThrow(
      expect.objectContaining({ code: 'slice-time-not-positive' }),
    );
    expect(() => sequentialBreathHolds(0, 1, 18)).toThrow(
      expect.objectContaining({ code: 'slices-not-whole' }),
    );
    expect(() => sequentialBreathHolds(4, 0, 18)).toThrow(
      expect.objectContaining({ code: 'slice-time-not-positive' }),
    );
    expect(() => sequentialBreathHolds(4, 1, 0)).toThrow(
      expect.objectContaining({ code: 'breath-hold-not-positive' }),
    );
  });
  it('a sequential or single-volume scan is one batch', () => {
    expect(time({ family: 'balanced', trMs: 4 }).batches).toBe(1);
    expect(time({ family: 'single-shot-echo-train', trMs: 1200 }).batches).toBe(1);
    expect(time({ family: 'echo-planar' }).batches).toBe(1);
    expect(time({ family: 'gradient-echo-3d', slices: slabOf() }).batches).toBe(1);
    expect(
      time({ family: 'gradient-echo-3d', slices: slabOf(), breathing: 'triggered', segments: 2 }).batches,
    ).toBe(1);
  });
  it('a slab is one batch in every family', () => {
    for (const family of ['spin-echo', 'gradient-echo', 'echo-train-spin-echo'] as const)
      expect(time({ family, slices: slabOf(), trMs: 10, sliceTimeMs: 10 }).batches).toBe(1);
  });
  it('a single shot is one shot, an echo-planar series has its own', () => {
    expect(time({ family: 'single-shot-echo-train', trMs: 1200 }).shots).toBe(1);
    expect(time({ family: 'echo-planar', shots: 3 }).shots).toBe(3);
    expect(time({ family: 'balanced', acquiredLines: 250 }).shots).toBe(250);
  });
  it('a breath that may be next to nothing counts as a tenth of a second', () => {
    const slab = {
      family: 'gradient-echo-3d',
      slices: slabOf(),
      breathing: 'triggered',
      segments: 40,
      averages: 1,
    } as const;
    expect(time(slab, measured(1, 1)).scanRangeS![0]).toBeCloseTo(4, 9);
    expect(time(slab, measured(0.05, 1)).scanRangeS![0]).toBeCloseTo(2, 9);
  });
  it('names the most reference lines there can be', () => {
    expect(() => acquiredLinesOneWay(256, 0.6, 2, 60)).toThrow('referenceLines is 60; allowed: 0 to 51');
    expect(() => acquiredLinesOneWay(256, 0.75, 2, 129)).toThrow('referenceLines is 129; allowed: 0 to 128');
    // 256 · (2 · 0.75 − 1) = 128, exactly allowed.
    expect(acquiredLinesOneWay(256, 0.75, 2, 128)).toBe(32 + 128);
  });
});

describe('figures compared', () => {
  it('nothing refers to itself without acceleration', () => {
    const share = (factorPhase: number) =>
      referenceShareOf(
        typicalPrescription({ acceleration: { ...accelerated(factorPhase), referenceInImage: true } }),
      );
    expect(share(1)).toBe(0);
    // 24 reference lines of 240.
    expect(share(2)).toBeCloseTo(0.1, 12);
  });
  it('an SNR ratio’s range takes low with low and high with high, whichever comes first', () => {
    const of = (snr: number, low: number, high: number) => ({
      voxelMm: [1, 1, 1] as const,
      snr,
      snrRange: [low, high] as const,
    });
    expect(snrRatio(of(10, 8, 16), of(20, 12, 40))).toEqual({ ratio: 2, range: [1.5, 2.5] });
    expect(snrRatio(of(10, 8, 16), of(20, 24, 20))).toEqual({ ratio: 2, range: [1.25, 3] });
  });
  it('an echo train’s time is TR for every train, average and batch (TR·⌈views/ETL⌉·averages·batches)', () => {
    // 250 views in trains of 16: 16 trains; 3 s · 16 · 2 · 4.
    expect(echoTrainTimeS(3, 250, 16, 2, 4)).toBeCloseTo(384, 9);
  });
});
