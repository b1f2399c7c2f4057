import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  acquiredLinesOneWay,
  acquiredViewsOf,
  acquiredViewsTwoWay,
  partialFourierLines,
} from '@/lib/physics/sequence/acquired-views';
import { accelerated, slabOf, typicalPrescription } from '@/tests/support/physics-cases';

const whole = (count: number) => ({ count, fraction: 1, factor: 1, reference: 0 });

describe('acquired lines and views (physics: Y = ⌈L·f⌉; Y_acq = ⌈(Y − ref)/R⌉ + ref)', () => {
  it.each([
    [256, 1, 256],
    [256, 0.75, 192],
    [255, 0.75, 192],
    // 0.55 · 100 is 55.000000000000007 in doubles and must stay 55.
    [100, 0.55, 55],
  ])('partial Fourier: %i lines at %d keeps %i', (lines, fraction, kept) => {
    expect(partialFourierLines(lines, fraction)).toBe(kept);
  });

  it.each([
    [256, 1, 1, 0, 256],
    [256, 1, 2, 0, 128],
    [256, 1, 2, 24, 140],
    [256, 0.75, 2, 24, 108],
    [255, 1, 2, 24, 140],
    [256, 1, 3, 24, 102],
  ])('one way: %i lines, f %d, R %d, ref %i play %i', (lines, fraction, factor, reference, played) => {
    expect(acquiredLinesOneWay(lines, fraction, factor, reference)).toBe(played);
  });

  it('both ways: 256 × 64, 2 × 2, block 24 × 24 plays 4528', () => {
    const two = (count: number) => ({ count, fraction: 1, factor: 2, reference: 24 });
    expect(acquiredViewsTwoWay(two(256), two(64))).toBe(4528);
  });

  it('one accelerated direction multiplies by the other’s whole count', () => {
    const phase = { count: 256, fraction: 1, factor: 2, reference: 24 };
    expect(acquiredViewsTwoWay(phase, whole(64))).toBe(140 * 64);
    expect(acquiredViewsTwoWay(whole(64), phase)).toBe(140 * 64);
    expect(acquiredViewsTwoWay(whole(262), whole(77))).toBe(262 * 77);
  });

  it('reads the stored integers of a prescription, slab or stack', () => {
    expect(acquiredViewsOf(typicalPrescription({ acquiredLines: 291, acceleration: accelerated(2) }))).toBe(
      158,
    );
    const p = typicalPrescription({
      family: 'gradient-echo-3d',
      acquiredLines: 256,
      slices: slabOf({ acquiredPartitions: 64 }),
      acceleration: accelerated(2, { factorSlice: 2, referencePartitions: 24 }),
    });
    expect(acquiredViewsOf(p)).toBe(4528);
  });

  it('ignores reference lines without acceleration', () => {
    expect(acquiredLinesOneWay(256, 1, 1, 24)).toBe(256);
  });

  it.each([
    [() => partialFourierLines(25.5, 1), 'lines-not-whole'],
    [() => partialFourierLines(256, 0.5), 'partial-fourier-out-of-range'],
    [() => partialFourierLines(256, 1.01), 'partial-fourier-out-of-range'],
    [() => acquiredLinesOneWay(256, 1, 0.9, 0), 'acceleration-out-of-range'],
    // L(2f − 1) = 51.2 lines are sampled on both sides of the centre.
    [() => acquiredLinesOneWay(256, 0.6, 2, 52), 'reference-lines-too-many'],
    [() => acquiredLinesOneWay(256, 1, 2, 1.5), 'reference-lines-not-whole'],
  ])('refuses what cannot be acquired (%#)', (act, code) => {
    expect(act).toThrow(expect.objectContaining({ code }));
  });
  it('accepts reference lines up to the symmetric centre', () => {
    expect(acquiredLinesOneWay(256, 0.6, 2, 51)).toBe(Math.ceil((154 - 51) / 2) + 51);
  });

  it('never plays more than L, nor fewer than the reference lines, and falls as R grows', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 32, max: 1024 }),
        fc.constantFrom(0.625, 0.75, 0.875, 1),
        fc.integer({ min: 0, max: 8 }),
        (lines, fraction, reference) => {
          let previous = lines;
          for (const factor of [1, 1.5, 2, 3, 4]) {
            const played = acquiredLinesOneWay(lines, fraction, factor, reference);
            expect(played).toBeLessThanOrEqual(previous);
            expect(played).toBeGreaterThanOrEqual(reference);
            previous = played;
          }
        },
      ),
      { seed: 20264 },
    );
  });
});
