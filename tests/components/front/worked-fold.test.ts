import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EXAMPLE, THRESHOLDS, workFold } from '@/components/front/worked-fold';

describe('the worked example of the front page', () => {
  it('needs half of what covering the body takes to free the whole picture', () => {
    // s ≥ (e − F/2)/F for a centred body and a whole, centred picture; covering it takes (2e − F)/F.
    // Body 340 mm deep, FOV 300 mm: (170 − 150)/300 and (340 − 300)/300.
    expect(THRESHOLDS.picturePct).toBeCloseTo(100 / 15, 9);
    expect(THRESHOLDS.bodyPct).toBeCloseTo(200 / 15, 9);
    expect(THRESHOLDS.bodyPct).toBeCloseTo(2 * THRESHOLDS.picturePct, 9);
  });

  it('lands at the opposite side, one acquired width away', () => {
    const { thread, depthMm, verdict } = workFold(0);
    expect(thread).toEqual({ fromMm: 170, toMm: -130 });
    expect(depthMm).toBe(10);
    expect(verdict).toBe('fold-in-keep-clear');
  });

  it('changes its verdict exactly at the thresholds it prints', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 20, noNaN: true }), (pct) => {
        // Within a billionth of a threshold either side may be right: binary rounding of the percent.
        fc.pre(
          Math.abs(pct - THRESHOLDS.keepClearPct) > 1e-9 && Math.abs(pct - THRESHOLDS.picturePct) > 1e-9,
        );
        const expected =
          pct < THRESHOLDS.keepClearPct
            ? 'fold-in-keep-clear'
            : pct < THRESHOLDS.picturePct
              ? 'fold-outside-keep-clear'
              : 'no-fold-expected';
        const worked = workFold(pct);
        expect(worked.verdict).toBe(expected);
        if (worked.thread) expect(worked.thread.fromMm - worked.thread.toMm).toBeCloseTo(worked.widthMm, 9);
        expect(worked.widthMm).toBeCloseTo(EXAMPLE.fovMm * (1 + pct / 100), 9);
      }),
      { seed: 20_261_201 },
    );
  });
});
