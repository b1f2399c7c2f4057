import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  acquiredWidthMmOf,
  chemicalShift,
  epiDisplacementMm,
  minimumTeMs,
} from '@/lib/physics/sequence/displacement';
import { swapAxes } from '@/lib/physics/sequence/swap-axes';
import { typicalPrescription } from '@/tests/support/physics-cases';

describe('displacement', () => {
  it('EPI: 100 Hz, 0.7 ms, 300 mm, R 2: 10.5 mm (fixtures/published/scan-time, case 19)', () => {
    expect(epiDisplacementMm(100, 0.7, 300, 2, 1)).toBeCloseTo(10.5, 12);
    expect(epiDisplacementMm(-100, 0.7, 300, 2, 3)).toBeCloseTo(-3.5, 12);
  });
  it('fat along readout: 223.5 Hz at 1.5 T and 447.1 Hz at 3 T (3.5 ppm)', () => {
    const shift = chemicalShift(1.5, 223.5, 1.25);
    expect(shift.hz).toBeCloseTo(223.5, 1);
    expect(shift.pixels).toBeCloseTo(1, 3);
    expect(shift.mm).toBeCloseTo(1.25, 3);
    expect(chemicalShift(3, 223.55, 1).pixels).toBeCloseTo(2, 3);
  });
  it('minimum TE: (f − ½)·L·ESP/R', () => {
    expect(minimumTeMs(0.625, 256, 4, 2, 1)).toBe(64);
    expect(minimumTeMs(1, 160, 0.7, 2, 2)).toBeCloseTo(14, 12);
  });
  it('W = L·F/N', () => {
    expect(
      acquiredWidthMmOf(typicalPrescription({ fovPhaseMm: 300, linesAcrossFov: 256, acquiredLines: 274 })),
    ).toBeCloseTo(321.09375, 9);
  });
  it.each([
    [() => epiDisplacementMm(100, 0, 300, 1, 1), 'echo-spacing-not-positive'],
    [() => epiDisplacementMm(100, 0.7, 0, 1, 1), 'width-not-positive'],
    [() => epiDisplacementMm(100, 0.7, 300, 0, 1), 'acceleration-not-positive'],
    [() => epiDisplacementMm(100, 0.7, 300, 1, 0), 'shots-not-whole'],
    [() => chemicalShift(1.5, 0, 1), 'bandwidth-not-positive'],
    [() => chemicalShift(1.5, 200, 0), 'pixel-not-positive'],
    [() => chemicalShift(0, 200, 1), 'field-strength-not-positive'],
    [() => minimumTeMs(1, 100, 4, 0, 1), 'acceleration-not-positive'],
    [() => minimumTeMs(1, 100, 0, 1, 1), 'echo-spacing-not-positive'],
  ])('refuses what has no meaning (%#)', (act, code) => {
    expect(act).toThrow(expect.objectContaining({ code }));
  });
});

describe('swapping phase and readout', () => {
  const rectangular = { fovPhaseMm: 300, linesAcrossFov: 256, fovReadoutMm: 480, readoutMatrix: 384 };

  it('reverses a rectangular saving: 300/256 phase, 480/384 readout → 384 lines', () => {
    expect(swapAxes(rectangular, true)).toEqual({
      fovPhaseMm: 480,
      linesAcrossFov: 384,
      fovReadoutMm: 300,
      readoutMatrix: 256,
      readoutFovRaised: false,
    });
  });
  it('raises the readout FOV where phase may not exceed it, at its own pixel', () => {
    // 480 mm at 300/256 mm: 409.6 → 410.
    expect(swapAxes(rectangular, false)).toMatchObject({
      fovPhaseMm: 480,
      fovReadoutMm: 480,
      readoutMatrix: 410,
      readoutFovRaised: true,
    });
  });
  it('does not raise it the other way round', () => {
    expect(
      swapAxes({ fovPhaseMm: 480, linesAcrossFov: 384, fovReadoutMm: 300, readoutMatrix: 256 }, false),
    ).toMatchObject({
      fovPhaseMm: 300,
      fovReadoutMm: 480,
      readoutFovRaised: false,
    });
  });
  it('twice is the same picture, and no axis’s pixel ever grows', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 100, max: 520 }),
        fc.integer({ min: 64, max: 640 }),
        fc.integer({ min: 100, max: 520 }),
        fc.integer({ min: 64, max: 640 }),
        fc.boolean(),
        (fovPhaseMm, linesAcrossFov, fovReadoutMm, readoutMatrix, mayExceed) => {
          const now = { fovPhaseMm, linesAcrossFov, fovReadoutMm, readoutMatrix };
          const swapped = swapAxes(now, mayExceed);
          const { readoutFovRaised, ...back } = swapAxes(swapAxes(now, true), true);
          expect(back).toEqual(now);
          expect(readoutFovRaised).toBe(false);
          expect(swapped.fovReadoutMm / swapped.readoutMatrix).toBeLessThanOrEqual(
            fovPhaseMm / linesAcrossFov + 1e-9,
          );
          expect(swapped.fovPhaseMm / swapped.linesAcrossFov).toBeCloseTo(fovReadoutMm / readoutMatrix, 9);
        },
      ),
      { seed: 20269 },
    );
  });
  it.each([
    [{ fovPhaseMm: 0 }, 'fov-not-positive'],
    [{ linesAcrossFov: 1.5 }, 'lines-not-whole'],
    [{ fovReadoutMm: Number.NaN }, 'fov-not-positive'],
    [{ readoutMatrix: 0 }, 'lines-not-whole'],
  ])('refuses %o', (overrides, code) => {
    expect(() => swapAxes({ ...rectangular, ...overrides }, true)).toThrow(expect.objectContaining({ code }));
  });
});
