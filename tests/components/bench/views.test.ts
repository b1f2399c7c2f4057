import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisOf } from '@/components/bench/compare/chart-axes';
import { comparePoints, frontOf, listedFirst } from '@/components/bench/compare/compare-points';
import { pictureBounds, pictureBox } from '@/components/bench/picture/picture-layout';
import { startBench } from '@/components/bench/state/bench-state';
import { caseOf } from '@/components/bench/state/case-of';
import { chosenCertainty, policyAt } from '@/components/bench/state/certainty';
import { boreHandles, moveHandle, nudgeHandle } from '@/components/bench/state/handles';
import { reduceBench } from '@/components/bench/state/reduce-bench';
import { pictureScene } from '@/components/schematic/scene/picture-scene';
import { assess } from '@/lib/physics';
import type { Assessment } from '@/lib/physics/model/assessment';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { Remedy } from '@/lib/physics/model/remedy';
import { describeProbability, shortProbability } from '@/lib/presentation/certainty-words';
import { benchDocument } from '@/tests/support/bench-documents';
import { extentsOf, sketchCase, typicalPatient, typicalPrescription, typicalScanner } from '@/tests/support/physics-cases';

const setting = { policy: DEFAULT_POLICY, today: '2026-03-02' };

const assessed = (scanS: number, snr: number, verdict: Assessment['verdict'] = 'no-fold-expected') =>
  ({ verdict, time: { scanS }, detail: { snr } }) as Assessment;
const remedyOf = (key: string, assessment: Assessment, dominated = false) => ({ key, assessment, dominated }) as Remedy;

describe('how sure', () => {
  it('asks every question at the chosen certainty, with one policy object while it is the same', () => {
    const document = benchDocument();
    const [sequence] = document.sequences;
    expect(caseOf(document, setting, sequence!).policy).toBe(DEFAULT_POLICY);
    const asked = caseOf(document, setting, sequence!, 0.99).policy;
    expect(asked.sureAt).toBe(0.99);
    expect(caseOf(document, setting, sequence!, 0.99).policy).toBe(asked);
    expect(policyAt(DEFAULT_POLICY, DEFAULT_POLICY.sureAt)).toBe(DEFAULT_POLICY);
  });

  it('keeps to what the engine answers, to the tenth of a percent; the site’s own figure is no choice', () => {
    expect(chosenCertainty(DEFAULT_POLICY.sureAt * 100, DEFAULT_POLICY)).toBeNull();
    fc.assert(
      fc.property(fc.double({ min: -50, max: 150, noNaN: true }), (percent) => {
        const sureAt = chosenCertainty(percent, DEFAULT_POLICY) ?? DEFAULT_POLICY.sureAt;
        expect(sureAt).toBeGreaterThanOrEqual(0.5);
        expect(sureAt).toBeLessThanOrEqual(0.999);
        expect(Math.abs(sureAt * 1000 - Math.round(sureAt * 1000))).toBeLessThan(1e-9);
      }),
      { seed: 4, numRuns: 200 },
    );
  });

  it('changes neither the plan nor what is undone, and leaves what was tried at another certainty', () => {
    const start = { ...startBench(benchDocument(), 'a', null), trial: { sequenceId: 'a', remedy: remedyOf('x', assessed(1, 1)) } };
    const sure = reduceBench(start, { type: 'choose-certainty', sureAt: 0.9 });
    expect(sure).toMatchObject({ sureAt: 0.9, trial: null });
    expect(sure.document).toBe(start.document);
    expect(sure.past).toBe(start.past);
    expect(reduceBench(sure, { type: 'choose-certainty', sureAt: 0.9 })).toBe(sure);
  });

  it('says which figure counts the margin', () => {
    const words = (probability: number, method: 'certain' | 'exact' | 'quasi-random') =>
      describeProbability({ probability, method, draws: 1 }, 0.95, false);
    expect(words(0.342, 'exact')).toBe(
      'Without margin: fold in the keep-clear area in 34 % of such patients; the verdict adds it, sure at 95 %.',
    );
    expect(words(0.342, 'quasi-random')).toContain('in about 34 % of');
    expect(words(0, 'quasi-random')).toContain('in < 1 % of');
    expect(words(1, 'quasi-random')).toContain('in > 99 % of');
    expect(words(1e-9, 'exact')).toContain('in < 1 % of');
    expect(words(0, 'certain')).toContain(': no fold in the keep-clear area; the sizes have no spread');
    expect(words(1, 'certain')).toMatch(/: fold in the keep-clear area/);
  });
});

describe('how likely, in a few words', () => {
  it('claims no more than the sentence does', () => {
    expect(shortProbability({ probability: 0.934, method: 'quasi-random' }, false)).toBe('fold in about 93 %');
    expect(shortProbability({ probability: 0, method: 'quasi-random' }, true)).toBe('tried: fold in < 1 %');
    expect(shortProbability({ probability: 0, method: 'certain' }, false)).toBe('no fold');
    expect(shortProbability({ probability: 1, method: 'certain' }, false)).toBe('fold');
  });
});

describe('lateral offset in the bore', () => {
  const start = startBench(benchDocument(), 'a', null);

  it('follows the pointer and the keys in whole millimetres, within what can be typed, as one undo', () => {
    let state = start;
    for (const u of [3.2, 7.9, 12.4]) state = reduceBench(state, moveHandle(state, setting, 'lateral-offset', [u, 400], 'drag')!);
    expect(state.document.patient.lateralOffsetMm).toBe(12);
    expect(state.past).toHaveLength(1);
    state = reduceBench(state, nudgeHandle(state, setting, 'lateral-offset', [-10, 0])!);
    expect(state.document.patient.lateralOffsetMm).toBe(2);
    expect(nudgeHandle(state, setting, 'lateral-offset', [0, 1])).toBeNull();
    state = reduceBench(state, moveHandle(state, setting, 'lateral-offset', [900, 0])!);
    expect(state.document.patient.lateralOffsetMm).toBe(300);
  });

  it('says which way in words', () => {
    const figure = (lateralOffsetMm: number) => boreHandles({ patient: typicalPatient({ lateralOffsetMm }), scanner: typicalScanner() })[0]!.figure;
    expect([figure(0), figure(12), figure(-7)]).toEqual(['in the middle', '12 mm to the left', '7 mm to the right']);
  });
});

describe('remedies side by side', () => {
  const now = assessed(100, 1, 'fold-in-keep-clear');

  it('keeps what leaves fold in the keep-clear area behind "show all" while some remedy leaves none', () => {
    const leaves = remedyOf('leaves', assessed(90, 1, 'fold-in-keep-clear'));
    const outside = remedyOf('outside', assessed(100, 1, 'fold-outside-keep-clear'));
    const beaten = remedyOf('beaten', assessed(120, 1), true);
    const keys = (remedies: readonly Remedy[], tried: string | null = null) => listedFirst(remedies, tried).map(({ key }) => key);
    expect(keys([leaves, outside, beaten])).toEqual(['outside']);
    expect(keys([leaves, beaten])).toEqual(['leaves']);
    expect(keys([leaves])).toEqual(['leaves']);
    expect(keys([leaves, outside, beaten], 'leaves')).toEqual(['leaves', 'outside']);
    expect(keys([leaves, outside, beaten], 'beaten')).toEqual(['outside', 'beaten']);
  });

  it('threads the front through what nothing beats in time and SNR, whatever leaves fold', () => {
    const points = comparePoints(
      [
        remedyOf('quick', assessed(100, 1)),
        remedyOf('loud', assessed(150, 1.2)),
        remedyOf('worse', assessed(150, 1.1)),
        remedyOf('leaves', assessed(80, 2, 'fold-in-keep-clear')),
        remedyOf('untimed', { verdict: 'no-fold-expected' } as Assessment),
      ],
      now,
    );
    expect(frontOf(points).map(({ key }) => key)).toEqual(['quick', 'loud']);
    expect(points.map(({ key }) => key)).not.toContain('untimed');
    expect(points.find(({ key }) => key === 'loud')).toMatchObject({ timePct: 50, leavesFold: false });
  });

  it('finds the same front as comparing every pair', () => {
    const remedies = fc.array(fc.tuple(fc.integer({ min: 50, max: 60 }), fc.integer({ min: 1, max: 10 })), { minLength: 1, maxLength: 30 });
    fc.assert(
      fc.property(remedies, (pairs) => {
        const points = comparePoints(pairs.map(([scanS, snr], i) => remedyOf(String(i), assessed(scanS, snr))), now);
        for (const [i, [time, snr]] of pairs.entries()) {
          const beaten = pairs.some(([t, s]) => t <= time && s >= snr && (t < time || s > snr));
          expect(points[i]!.onFront).toBe(!beaten);
        }
      }),
      { seed: 11, numRuns: 200 },
    );
  });

  it('draws axes that hold every value and the present plan', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -90, max: 900, noNaN: true }), { minLength: 1, maxLength: 20 }), (values) => {
        const { low, high, ticks } = axisOf(values);
        for (const value of [0, ...values]) expect(value >= low && value <= high).toBe(true);
        expect(ticks.length).toBeLessThanOrEqual(9);
        expect(ticks.some((tick) => Math.abs(tick) < 1e-9)).toBe(true);
      }),
      { seed: 7, numRuns: 200 },
    );
  });
});

describe('the picture beside the tried one', () => {
  it('lays both where they lie in the body, with the wipe and the keep-clear area over them', () => {
    const now = typicalPrescription();
    const tried = typicalPrescription({ fovPhaseMm: now.fovPhaseMm + 40, centreMm: [0, 10, 0] });
    const [a, b] = [pictureBox(now), pictureBox(tried)];
    expect(a.bottom - a.top).toBeCloseTo(now.fovPhaseMm, 9);
    expect(b.bottom - b.top - (a.bottom - a.top)).toBeCloseTo(40, 9);
    expect((b.bottom + b.top) / 2 - (a.bottom + a.top) / 2).toBeCloseTo(10, 9);
    const bounds = pictureBounds(now, tried);
    const { nodes } = pictureScene({ prescription: now, keepClear: benchDocument().keepClear, now: a, tried: b, wipeAt: 5, bounds });
    const names = nodes.map(({ name }) => name);
    expect(names).toEqual(expect.arrayContaining(['picture/now', 'picture/tried', 'keep-clear', 'wipe', 'letter/left']));
    expect(nodes.find(({ name }) => name === 'wipe')).toMatchObject({ lines: [[[5, expect.any(Number)], [5, expect.any(Number)]]] });
    const alone = pictureScene({ prescription: now, keepClear: benchDocument().keepClear, now: a, bounds }).nodes.map(({ name }) => name);
    expect(alone).not.toContain('wipe');
  });
});

describe('assumptions', () => {
  it('can be told apart by field and what was used, whatever sides were got how', () => {
    const spread = (source: 'girth' | 'population') => ({ value: 170, source, spread: 8 });
    const extents = { ...extentsOf({ right: 240, left: 240 }), anterior: spread('girth'), posterior: spread('population') };
    const { assumptions } = assess(sketchCase({ patient: typicalPatient({ extents }) }));
    const keys = assumptions.map(({ field, used }) => `${field} ${used}`);
    expect(assumptions.filter(({ field }) => field === 'patient.extents')).toHaveLength(2);
    expect(new Set(keys).size).toBe(keys.length);
  });
});
