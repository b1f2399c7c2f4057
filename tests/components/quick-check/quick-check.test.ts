import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { answerQuickCheck } from '@/components/quick-check/answer-quick-check';
import { assumedValues } from '@/components/quick-check/assumed-values';
import { parseCase } from '@/lib/schemas/case';
import { QUICK_SEQUENCES, quickCheckCase, quickCheckForm } from '@/lib/schemas/case/quick-check';
import { checkCase } from '@/lib/services/check/check-case';

const form = { extentMm: 340, fovMm: 300, oversamplingPct: 0, sequence: 'echo-train' as const };

describe('the quick check', () => {
  it('asks four fields and no more', () => {
    expect(Object.keys(quickCheckForm.shape)).toEqual(['extentMm', 'fovMm', 'oversamplingPct', 'sequence']);
  });

  it.each(QUICK_SEQUENCES)('%s: answers as the check does for the same case', (sequence) => {
    const values = { ...form, sequence };
    const answer = answerQuickCheck(values);
    if (answer.kind !== 'answered') throw new Error(answer.kind);
    const checked = checkCase(quickCheckCase(values));
    expect(checked.assessment.verdict).toBe(answer.assessment.verdict);
    expect(checked.case).toEqual(JSON.parse(JSON.stringify(answer.question)));
    expect(answer.assessment.verdict).not.toBe('not-modelled');
  });

  it('340 mm in a FOV of 300 mm folds; covering the body with its margin does not', () => {
    const verdict = (oversamplingPct: number) => {
      const answer = answerQuickCheck({ ...form, oversamplingPct });
      return answer.kind === 'answered' ? answer.assessment.verdict : answer.kind;
    };
    expect(verdict(0)).toBe('fold-in-keep-clear');
    // With the standard margin of 10 mm nothing lands in the picture from 340/2 + 10 + 300/2 = 330 mm on: 10 % and whole lines.
    expect(verdict(9)).toBe('fold-in-keep-clear');
    expect(verdict(11)).toBe('no-fold-expected');
  });

  it('never throws: every allowed form is answered or refused in words', () => {
    fc.assert(
      fc.property(
        fc.record({
          extentMm: fc.integer({ min: 50, max: 1000 }),
          fovMm: fc.integer({ min: 50, max: 600 }),
          oversamplingPct: fc.integer({ min: 0, max: 200 }),
          sequence: fc.constantFrom(...QUICK_SEQUENCES),
        }),
        (values) => {
          const answer = answerQuickCheck(values);
          expect(answer.kind).not.toBe('incomplete');
          if (answer.kind === 'refused') expect(answer.words).toMatch(/\w/);
        },
      ),
      { seed: 41, numRuns: 40 },
    );
  });

  it('waits while a field is not allowed', () => {
    for (const bad of [{ extentMm: null }, { extentMm: 12 }, { oversamplingPct: Number.NaN }, { sequence: 'spiral' }]) {
      expect(answerQuickCheck({ ...form, ...bad }).kind).toBe('incomplete');
    }
  });

  it('says every value that was assumed, with the values of the case', () => {
    const said = Object.fromEntries(assumedValues(parseCase(quickCheckCase(form))).map(({ name, value }) => [name, value]));
    expect(said).toMatchObject({
      'Phase direction': 'anterior–posterior, axial',
      Patient: 'abdomen, an ellipse 476 mm right–left, centred on the FOV',
      Arms: 'up',
      'Keep-clear area': 'whole picture',
      Readout: 'FOV 450 mm, matrix 320',
    });
    expect(Object.keys(said)).toHaveLength(14);
  });
});
