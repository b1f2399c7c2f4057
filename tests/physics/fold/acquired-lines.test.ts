import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  acquiredLines,
  acquiredPartitions,
  acquiredWidthMm,
  effectiveOversampling,
  nextAcquiredLines,
  smallestAcquiredLines,
  smallestAcquiredPartitions,
} from '@/lib/physics/fold/acquired-lines';
import { toMicrometres } from '@/lib/physics/geometry/micrometres';
import type { LineStep } from '@/lib/physics/model/scanner';
import { runsOf } from '@/tests/support/tally';

const LINE: LineStep = { kind: 'line' };
const EVEN: LineStep = { kind: 'even-lines' };
const DOUBLING: LineStep = { kind: 'doubling' };
const percent = (value: number): LineStep => ({ kind: 'percent', percent: value });

describe('acquired lines on the scanner’s step', () => {
  it('rounds the request up, guarding whole results against rounding', () => {
    expect(acquiredLines(256, 0, LINE)).toBe(256);
    // 250 · 1.1 is 275.00000000000006 in doubles.
    expect(acquiredLines(250, 0.1, LINE)).toBe(275);
    expect(acquiredLines(256, 0.0667, LINE)).toBe(274);
    expect(acquiredLines(256, 0.0667, EVEN)).toBe(274);
    expect(acquiredLines(255, 0, EVEN)).toBe(256);
    expect(acquiredLines(256, 0.133, EVEN)).toBe(292);
    expect(acquiredLines(256, 0.001, DOUBLING)).toBe(512);
    expect(acquiredLines(256, 0, DOUBLING)).toBe(256);
    // 7 % rounds up to 10 % of 256 = 281.6, then up to whole lines.
    expect(acquiredLines(256, 0.07, percent(5))).toBe(282);
    expect(acquiredLines(256, 0.05, percent(5))).toBe(269);
  });

  it('refuses what the step cannot do, naming what was given', () => {
    expect(() => acquiredLines(256, 1.2, DOUBLING)).toThrow('oversampling is 1.2');
    expect(() => acquiredLines(256, -0.1, LINE)).toThrow('oversampling is -0.1; allowed: ≥ 0');
    expect(() => acquiredLines(255.5, 0, LINE)).toThrow('linesAcrossFov is 255.5');
    expect(() => nextAcquiredLines(256, 300, percent(0))).toThrow('step.percent is 0');
  });

  it('worked case: 320 mm at 300 mm over 256 lines takes 274 lines, 7.03 %', () => {
    const lines = smallestAcquiredLines({ linesAcrossFov: 256, fovMm: 300, minWidthMm: 320, step: LINE });
    expect(lines).toBe(274);
    expect(effectiveOversampling(274, 256) * 100).toBeCloseTo(7.03, 2);
    expect(
      smallestAcquiredLines({ linesAcrossFov: 256, fovMm: 300, minWidthMm: 601, step: DOUBLING }),
    ).toBeUndefined();
  });

  const step = fc.oneof(
    fc.constant(LINE),
    fc.constant(EVEN),
    fc.constant(DOUBLING),
    fc.constantFrom(1, 2.5, 5, 10, 25).map(percent),
  );

  it('always lies on the grid, never below the request, and is the smallest that is enough', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 32, max: 640 }),
        fc.double({ min: 80, max: 500, noNaN: true }),
        fc.double({ min: 1, max: 1.99, noNaN: true }),
        step,
        (n, fov, factor, grid) => {
          const lines = smallestAcquiredLines({
            linesAcrossFov: n,
            fovMm: fov,
            minWidthMm: fov * factor,
            step: grid,
          })!;
          expect(nextAcquiredLines(n, lines, grid)).toBe(lines);
          expect(toMicrometres(acquiredWidthMm(lines, n, fov))).toBeGreaterThanOrEqual(
            toMicrometres(fov * factor),
          );
          const onGrid: number[] = [];
          for (
            let at = nextAcquiredLines(n, n, grid);
            at !== undefined && at < lines;
            at = nextAcquiredLines(n, at + 1, grid)
          ) {
            onGrid.push(at);
          }
          for (const fewer of onGrid) {
            expect(toMicrometres(acquiredWidthMm(fewer, n, fov))).toBeLessThan(toMicrometres(fov * factor));
          }
        },
      ),
      { seed: 11, numRuns: runsOf(300) },
    );
  });

  it('adds whole partitions in the scanner’s step', () => {
    expect(acquiredPartitions(64, 0.2, 1)).toBe(77);
    expect(acquiredPartitions(64, 0.2, 4)).toBe(80);
    expect(acquiredPartitions(64, 0, 4)).toBe(64);
    expect(
      smallestAcquiredPartitions({ partitions: 64, partitionThicknessMm: 3, minSlabMm: 230.4, step: 1 }),
    ).toBe(77);
    expect(
      smallestAcquiredPartitions({ partitions: 64, partitionThicknessMm: 3, minSlabMm: 100, step: 2 }),
    ).toBe(64);
  });
});
