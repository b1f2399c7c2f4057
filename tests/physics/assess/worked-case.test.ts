import { describe, expect, it } from 'vitest';
import { assess } from '@/lib/physics';
import { accelerated, sketchCase, typicalScanner, workedCase } from '@/tests/support/physics-cases';

describe('worked case: body 480 × 340, axial, phase A–P, FOV 300, 256 lines, whole FOV, margin 0', () => {
  it('takes 274 lines on a one-line grid (7.03 %; the law says 6.67 %)', () => {
    const { width, verdict } = assess(workedCase());
    expect(verdict).toBe('fold-in-keep-clear');
    expect(width?.firstCleanLines).toBe(274);
    expect(width?.firstCleanMm).toBeCloseTo(320, 6);
    expect(274 / 256 - 1).toBeCloseTo(0.0703, 4);
  });

  it('takes 291 lines to cover the body', () => {
    expect(assess(workedCase()).width?.coverBodyLines).toBe(291);
  });

  it('takes 291 lines with an unfolding grid that ends at the acquired width, 292 on an even-line grid', () => {
    const ends = accelerated(2, { unfolding: 'image-domain-grid-ends' });
    const given = workedCase({ acceleration: ends });
    expect(assess(given).width?.firstCleanLines).toBe(291);
    const even = { ...given, scanner: typicalScanner({ lineStep: { kind: 'even-lines' } }) };
    expect(assess(even).width?.firstCleanLines).toBe(292);
  });

  it('is clean at 274 lines and not at 273', () => {
    expect(assess(workedCase({ acquiredLines: 273 })).verdict).toBe('fold-in-keep-clear');
    expect(assess(workedCase({ acquiredLines: 274 })).verdict).not.toBe('fold-in-keep-clear');
  });
});

describe('sketch case: margin 5 every side, keep-clear from 140 anterior, FOV 300', () => {
  it('folds 15 mm deep with margin and says so', () => {
    const { verdict, fold, reasons } = assess(sketchCase());
    expect(verdict).toBe('fold-in-keep-clear');
    expect(fold?.depthWithMarginMm).toBeCloseTo(15, 3);
    expect(reasons[0]?.text).toBe('Posterior tissue lands on the anterior side, 15 mm deep with margin.');
    expect(reasons[1]?.text).toBe(
      '5 % oversampling is enough (315 mm acquired). Covering the whole body would take 16.7 %.',
    );
  });
  it('compares with covering the body only where that would take more', () => {
    const words = (given: ReturnType<typeof workedCase>) =>
      assess(given).reasons.find(({ code }) => code === 'enough-width')?.text;
    expect(words(workedCase())).toContain('Covering the whole body would take 13.3 %.');
    // A scanner that can only double asks for more than the body.
    const doubling = { ...workedCase(), scanner: typicalScanner({ lineStep: { kind: 'doubling' } }) };
    expect(words(doubling)).toBe('100 % oversampling is enough (600 mm acquired).');
  });
});
