import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Prescription } from '@/lib/physics/model/prescription';
import {
  detail,
  parallelImagingSnr,
  partialFourierSnr,
  referenceShareOf,
  snrRatio,
} from '@/lib/physics/sequence/detail';
import { readPublished } from '@/tests/support/read-published';
import { accelerated, slabOf, typicalPrescription } from '@/tests/support/physics-cases';

const base = typicalPrescription({
  fovPhaseMm: 256,
  fovReadoutMm: 256,
  linesAcrossFov: 256,
  readoutMatrix: 256,
  acquiredLines: 256,
  averages: 1,
});
const slab = typicalPrescription({
  family: 'gradient-echo-3d',
  slices: slabOf({ partitions: 64, acquiredPartitions: 64 }),
});
const ratio = (after: Partial<Prescription>, from: Prescription = base, geometryFactor = 1): number =>
  snrRatio(detail(from, { geometryFactor }), detail({ ...from, ...after }, { geometryFactor })).ratio;
const withPartitions = (acquiredPartitions: number) =>
  ratio({ slices: slabOf({ partitions: 64, acquiredPartitions }) }, slab);

/** Each published change as a pair of prescriptions, in the order of the file. */
const PUBLISHED: readonly (() => number)[] = [
  () => ratio({}),
  () => ratio({ acquiredLines: 320 }),
  () => ratio({ acquiredLines: 384 }),
  () => ratio({ acquiredLines: 512 }),
  () => ratio({ averages: 2 }),
  () => ratio({ averages: 4 }),
  () => ratio({ acquiredLines: 512, averages: 2 }),
  () => ratio({ linesAcrossFov: 512, acquiredLines: 512 }),
  () => ratio({ linesAcrossFov: 128, acquiredLines: 128 }),
  () => ratio({ partialFourierPhase: 0.75, partialFourierFill: 'zero-filled' }),
  () => ratio({ fovPhaseMm: 192, linesAcrossFov: 192, acquiredLines: 192 }),
  () => ratio({ partialFourierPhase: 0.75 }),
  () => ratio({ partialFourierPhase: 0.625 }),
  () => withPartitions(80),
  () => withPartitions(96),
  () => withPartitions(128),
  // Mean g over the object 1.012, as printed beside the measurement.
  () => ratio({ acceleration: accelerated(2, { referenceLines: 0, geometryFactor: 1.012 }) }, base, 1.012),
];

describe('SNR against fixtures/published/snr-time', () => {
  const rows = readPublished('snr-time');
  it('covers every published change', () => expect(rows).toHaveLength(PUBLISHED.length));
  rows.forEach((row, index) => {
    it(row.text('change'), () => {
      // 0.2 %: the statistical error stated with the measurement.
      expect(Math.abs(PUBLISHED[index]!() / row.number('measured_SNR_ratio') - 1)).toBeLessThanOrEqual(0.002);
      // The closed form is printed to four digits.
      expect(PUBLISHED[index]!()).toBeCloseTo(row.number('expected_ratio'), 3);
    });
  });
});

describe('SNR factors', () => {
  it('conjugate synthesis at 6/8 keeps 0.8165; √f would be 6.1 % optimistic', () => {
    expect(partialFourierSnr(0.75, 'conjugate')).toBeCloseTo(0.8165, 4);
    expect(Math.sqrt(0.75) / partialFourierSnr(0.75, 'conjugate') - 1).toBeCloseTo(0.061, 3);
    expect(partialFourierSnr(1, 'conjugate')).toBe(1);
    expect(partialFourierSnr(1, 'zero-filled')).toBe(1);
  });
  it('N 64, R 2, ref 16, g 1.22: 0.635 ± 0.002', () => {
    expect(Math.abs(parallelImagingSnr(2, 1.22, 16 / 64) - 0.635)).toBeLessThanOrEqual(0.002);
    const p = typicalPrescription({ linesAcrossFov: 64, acquiredLines: 64 });
    const fast = { acceleration: accelerated(2, { referenceLines: 16 }) };
    expect(referenceShareOf({ ...p, ...fast })).toBe(0.25);
    expect(Math.abs(ratio(fast, p, 1.22) - 0.635)).toBeLessThanOrEqual(0.002);
  });
  it('oversampling 25, 50, 100 % is ×1.118, 1.225, 1.414; 50 % raises SNR by nearly a quarter (common practice)', () => {
    expect(ratio({ acquiredLines: 320 })).toBeCloseTo(1.118, 3);
    expect(ratio({ acquiredLines: 384 })).toBeCloseTo(1.2247, 4);
    expect(ratio({ acquiredLines: 512 })).toBeCloseTo(Math.SQRT2, 12);
  });
  it('100 % oversampling with half the averages keeps the SNR', () => {
    expect(ratio({ acquiredLines: 512, averages: 2 }, { ...base, averages: 4 })).toBeCloseTo(1, 12);
  });
  it('100 % oversampling with R 2 where aliases do not overlap (g = 1) keeps the SNR of neither', () => {
    expect(ratio({ acquiredLines: 512, acceleration: accelerated(2, { referenceLines: 0 }) })).toBeCloseTo(
      1,
      12,
    );
  });
  it('a larger FOV at the same matrix: 40 → 48 cm both ways is ×1.44', () => {
    const forty = { ...base, fovPhaseMm: 400, fovReadoutMm: 400 };
    expect(ratio({ fovPhaseMm: 480, fovReadoutMm: 480 }, forty)).toBeCloseTo(1.44, 12);
  });
  it('halving the bandwidth is ×√2; partial Fourier along the slice counts too', () => {
    expect(ratio({ bandwidthHzPerPixel: 100 })).toBeCloseTo(Math.SQRT2, 12);
    expect(ratio({ partialFourierSlice: 0.75 }, slab)).toBeCloseTo(0.8165, 4);
    expect(ratio({ partialFourierSlice: 0.75 }, base)).toBe(1);
  });
  it('reference lines count only where they enter the image, as a share of what partial Fourier leaves', () => {
    const p = { ...base, acceleration: accelerated(2, { referenceLines: 24 }) };
    expect(referenceShareOf(p)).toBe(24 / 256);
    expect(referenceShareOf({ ...p, partialFourierPhase: 0.75 })).toBe(24 / 192);
    expect(referenceShareOf({ ...p, acceleration: accelerated(2, { referenceInImage: false }) })).toBe(0);
    expect(referenceShareOf(base)).toBe(0);
    const both = {
      ...slab,
      acquiredLines: 240,
      acceleration: accelerated(2, { factorSlice: 2, referencePartitions: 16 }),
    };
    expect(referenceShareOf(both)).toBe((24 * 16) / (240 * 64));
    expect(referenceShareOf({ ...slab, acceleration: accelerated(2) })).toBe(24 / 240);
  });
});

describe('detail', () => {
  it('gives the voxel as readout, phase, slice', () => {
    expect(detail(typicalPrescription(), { geometryFactor: 1 }).voxelMm).toEqual([1.25, 1.25, 5]);
    expect(detail(slab, { geometryFactor: 1 }).voxelMm[2]).toBe(3.5);
  });
  it('is voxel · √(samples), mm³·√s, for a stack and a slab', () => {
    // 1 · 1 · 5 mm, 256 lines at 200 Hz a pixel.
    expect(detail(base, { geometryFactor: 1 }).snr).toBeCloseTo(5 * Math.sqrt(256 / 200), 9);
    // 1.25 · 1.25 · 3.5 mm, 240 lines, 64 partitions, 2 averages.
    expect(detail(slab, { geometryFactor: 1 }).snr).toBeCloseTo(
      1.25 * 1.25 * 3.5 * Math.sqrt((240 * 64 * 2) / 200),
      9,
    );
  });
  it('turns a range of g into a range of SNR, and leaves an unaccelerated scan alone', () => {
    const fast = { ...base, acceleration: accelerated(2, { referenceLines: 0 }) };
    const range = detail(fast, { geometryFactor: [1, 1.3] });
    expect(range.snrRange).toEqual([
      detail(fast, { geometryFactor: 1.3 }).snr,
      detail(fast, { geometryFactor: 1 }).snr,
    ]);
    expect(range.snr).toBe(detail(fast, { geometryFactor: 1.15 }).snr);
    expect(detail(base, { geometryFactor: [1, 3] }).snrRange).toEqual(
      detail(base, { geometryFactor: 1 }).snrRange,
    );
    const { range: change } = snrRatio(detail(base, { geometryFactor: [1, 1.3] }), range);
    expect(change[0]).toBeCloseTo(1 / Math.SQRT2 / 1.3, 12);
    expect(change[1]).toBeCloseTo(1 / Math.SQRT2, 12);
  });
  it('rises with lines, partitions and averages, and falls with g', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 240, max: 480 }),
        fc.integer({ min: 1, max: 8 }),
        fc.double({ min: 1, max: 2.5, noNaN: true }),
        (acquiredLines, averages, g) => {
          const p = { ...base, acquiredLines, averages, acceleration: accelerated(2) };
          const snr = detail(p, { geometryFactor: g }).snr;
          expect(
            detail({ ...p, acquiredLines: acquiredLines + 10 }, { geometryFactor: g }).snr,
          ).toBeGreaterThan(snr);
          expect(detail({ ...p, averages: averages + 1 }, { geometryFactor: g }).snr).toBeGreaterThan(snr);
          expect(detail(p, { geometryFactor: g + 0.1 }).snr).toBeLessThan(snr);
        },
      ),
      { seed: 20268 },
    );
  });
  it.each([
    [{ readoutMatrix: 0 }, 1, 'lines-not-whole'],
    [{ fovPhaseMm: -1 }, 1, 'fov-not-positive'],
    [{ bandwidthHzPerPixel: 0 }, 1, 'bandwidth-not-positive'],
    [{ averages: 0 }, 1, 'averages-not-whole'],
    [{ partialFourierPhase: 0.5 }, 1, 'partial-fourier-out-of-range'],
    [{ partialFourierPhase: 1.1 }, 1, 'partial-fourier-out-of-range'],
    [{ acceleration: accelerated(2) }, 0.9, 'geometry-factor-out-of-range'],
  ] as const)('refuses %o with g %d', (overrides, geometryFactor, code) => {
    expect(() => detail({ ...base, ...overrides }, { geometryFactor })).toThrow(
      expect.objectContaining({ code }),
    );
  });
});
