import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { foldOrder, foldPosition } from '@/lib/physics/fold/fold-position';
import { DomainError } from '@/lib/physics/model/domain-error';
import { readTable } from './read-table';
import { runsOf } from '@/tests/support/tally';

const SEED = { seed: 20240611, numRuns: runsOf(500) };
// Sums and differences of lengths under a metre: a few units in the last place, far below 1 µm.
const ROUNDING_MM = 1e-9;
const length = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('where tissue lands', () => {
  it.each(readTable('fold-position/fold-position.csv'))(
    'W $acquired_width_mm: $true_position_mm is seen at $measured_position_mm (fold-position.csv)',
    (row) => {
      const seen = foldPosition(Number(row.true_position_mm), 0, Number(row.acquired_width_mm));
      // 1e-4 mm: see the fixture's note.
      expect(Math.abs(seen - Number(row.measured_position_mm))).toBeLessThan(1e-4);
    },
  );

  it('shifts to the opposite side, never mirrored (worked by hand)', () => {
    expect(foldPosition(260, 0, 400)).toBe(-140);
    expect(foldPosition(-220, 0, 400)).toBe(180);
    expect(foldPosition(260, 0, 600)).toBe(260);
    expect(foldOrder(260, 0, 400)).toBe(-1);
    expect(foldOrder(-220, 0, 400)).toBe(1);
    expect(foldOrder(100, 0, 400)).toBe(0);
    expect(foldOrder(-900, 0, 400)).toBe(2);
  });

  it('refuses a width that is not positive, naming it', () => {
    expect(() => foldPosition(0, 0, 0)).toThrow(DomainError);
    expect(() => foldPosition(0, 0, Number.NaN)).toThrow('widthMm is NaN; allowed: > 0 mm');
  });

  it('folding twice is folding once', () => {
    fc.assert(
      fc.property(length(-900, 900), length(-100, 100), length(50, 800), (p, c, w) => {
        const once = foldPosition(p, c, w);
        const twice = foldPosition(once, c, w);
        // At the very edge rounding may fold once more: the same place, one width away.
        expect(Math.min(Math.abs(twice - once), Math.abs(Math.abs(twice - once) - w))).toBeLessThan(
          ROUNDING_MM,
        );
        expect(Math.abs(once - c)).toBeLessThanOrEqual(w / 2 + ROUNDING_MM);
        expect(once).toBeCloseTo(p + foldOrder(p, c, w) * w, 8);
      }),
      SEED,
    );
  });

  const away = (p: number, c: number, w: number) => {
    const x = ((((p - c + w / 2) % w) + w) % w) / w;
    return x > 1e-6 && x < 1 - 1e-6;
  };

  it('is W-periodic, translation-invariant, and mirror-invariant away from ±W/2', () => {
    fc.assert(
      fc.property(
        length(-900, 900),
        length(-100, 100),
        length(50, 800),
        fc.integer({ min: -3, max: 3 }),
        (p, c, w, k) => {
          fc.pre(away(p, c, w));
          const seen = foldPosition(p, c, w);
          expect(Math.abs(foldPosition(p + k * w, c, w) - seen)).toBeLessThan(ROUNDING_MM);
          expect(Math.abs(foldPosition(p + 37.5, c + 37.5, w) - 37.5 - seen)).toBeLessThan(ROUNDING_MM);
          expect(Math.abs(foldPosition(-p, -c, w) + seen)).toBeLessThan(ROUNDING_MM);
        },
      ),
      SEED,
    );
  });
});
