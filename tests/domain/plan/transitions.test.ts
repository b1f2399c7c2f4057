import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Assessment, Verdict } from '@/lib/domain/case/model';
import { readShortCode, SHORT_CODE_ALPHABET, shortCodeFrom } from '@/lib/domain/plan/short-code';
import { PLAN_STATES, type PlanState } from '@/lib/domain/plan/states';
import { needsSignOff, refusalToMove, signOffCause, stateAfterSave } from '@/lib/domain/plan/transitions';

const withVerdict = (...verdicts: Verdict[]): Assessment[] =>
  verdicts.map((verdict) => ({ verdict, reasons: [{ code: 'x', text: 'why' }] }) as unknown as Assessment);
const relaxed = { signOffAlways: false, tolerateFoldOutsidePct: 100 };
const strict = { ...relaxed, signOffAlways: true };
const clean = withVerdict('no-fold-expected', 'fold-outside-keep-clear');
const may = (state: PlanState, to: PlanState, assessments = clean, policy = relaxed) =>
  refusalToMove({ state, assessments, policy }, to) === undefined;

describe('plan states', () => {
  it('are exactly these moves when nothing is left to decide', () => {
    const allowed = PLAN_STATES.flatMap((state) => PLAN_STATES.filter((to) => may(state, to)).map((to) => `${state} → ${to}`));
    expect(allowed).toEqual([
      'draft → for use',
      'for use → draft', 'for use → signed off', 'for use → used',
      'signed off → draft', 'signed off → used',
    ]);
  });

  it('a radiologist decides when fold is left in the keep-clear area, or when the policy says so', () => {
    const left = withVerdict('no-fold-expected', 'fold-in-keep-clear');
    expect(needsSignOff(clean, relaxed)).toBe(false);
    expect(needsSignOff(left, relaxed)).toBe(true);
    expect(needsSignOff(clean, strict)).toBe(true);
    expect(may('for use', 'used', left)).toBe(false);
    expect(may('for use', 'used', clean, strict)).toBe(false);
    expect(may('signed off', 'used', left)).toBe(true);
  });

  it('a radiologist decides when more fold is left beside the area than is tolerated, and not at the limit itself', () => {
    const outside = (displayedShare: number) =>
      [{ verdict: 'fold-outside-keep-clear', reasons: [], fold: { displayedShare } }] as unknown as Assessment[];
    const policy = { ...relaxed, tolerateFoldOutsidePct: 25 };
    expect(signOffCause(outside(0.25), policy)).toBeUndefined();
    expect(signOffCause(outside(0.26), policy)).toBe('fold-outside-beyond-tolerated');
    expect(signOffCause(outside(0.26), relaxed)).toBeUndefined();
  });

  it.each(['cannot-be-scanned', 'not-modelled'] as const)('a plan with a sequence that is %s is not put for use', (verdict) => {
    expect(may('draft', 'for use', withVerdict('no-fold-expected', verdict))).toBe(false);
    expect(refusalToMove({ state: 'draft', assessments: withVerdict('no-fold-expected', verdict), policy: relaxed }, 'for use')).toContain('Sequence 2');
  });

  it('a new version goes back to draft: what was agreed on was another plan', () => {
    expect(PLAN_STATES.map(stateAfterSave)).toEqual(['draft', 'draft', 'draft', 'used']);
  });
});

describe('a short code', () => {
  it('is read back as written, in any case, with spaces or dashes', () => {
    fc.assert(
      fc.property(fc.uint8Array({ minLength: 8, maxLength: 8 }), (bytes) => {
        const code = shortCodeFrom(bytes);
        expect([...code].every((letter) => SHORT_CODE_ALPHABET.includes(letter))).toBe(true);
        expect(readShortCode(`${code.slice(0, 4).toLowerCase()}-${code.slice(4)} `)).toBe(code);
      }),
      { seed: 7, numRuns: 200 },
    );
  });
  it.each(['', 'ABC', 'ABCDEFG0', 'ABCDEFGHJ'])('“%s” is none', (text) => expect(readShortCode(text)).toBeUndefined());
});
