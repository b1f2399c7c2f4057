import { describe, expect, it } from 'vitest';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { windowRegion } from '@/lib/physics/geometry/oriented-region';
import type { Case } from '@/lib/physics/model/case';
import { coilElements } from '@/lib/physics/remedy/coil-elements';
import { countEdits } from '@/lib/physics/remedy/prescription-difference';
import { recentre } from '@/lib/physics/remedy/recentre';
import { remedySentence } from '@/lib/physics/remedy/sentence';
import {
  accelerated,
  LIVER_BOX,
  prescriptionOf,
  sketchCase,
  typicalPatient,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';
import { codeOf, planned, solverThat } from './stated-solver';

describe('settings to change in a plane', () => {
  const p = typicalPrescription();
  const edits = (values: Partial<typeof p>) => countEdits(p, { ...p, ...values });
  it('are one each', () => {
    for (const values of [
      { trMs: 1 },
      { teMs: 1 },
      { averages: 9 },
      { partialFourierPhase: 0.75 },
      { coilElements: ['a'] },
      { fovPhaseMm: 333 },
      { fovReadoutMm: 333 },
      { readoutMatrix: 333 },
      { acquiredLines: 300 },
      { acceleration: accelerated(2) },
      { linesAcrossFov: 300, acquiredLines: 300 },
    ])
      expect(edits(values), JSON.stringify(values)).toBe(1);
    expect(edits({ linesAcrossFov: 300 })).toBe(2);
    expect(edits({})).toBe(0);
  });
  it('a swap is one, and its FOVs and matrices follow by themselves', () => {
    const swap = { phaseAxis: 'RL', fovPhaseMm: 480, fovReadoutMm: 300, readoutMatrix: 240 } as const;
    expect(edits({ ...swap, linesAcrossFov: 384, acquiredLines: 384 })).toBe(1);
    expect(edits({ ...swap, linesAcrossFov: 384, acquiredLines: 480 })).toBe(2);
  });
});

describe('recentring', () => {
  const ends = accelerated(2, { unfolding: 'image-domain-grid-ends' });
  const inside = solverThat({ bodyAlongPhaseMm: () => [-150, 190], leavesPicture: () => undefined });
  const mustStay = { xMm: [-50, 50], yMm: [-40, 40], zMm: [-30, 30] } as const;
  const given = (overrides: Partial<Case> = {}, p: Partial<Case['prescription']> = {}) =>
    freeze(sketchCase({ prescription: typicalPrescription({ acceleration: ends, ...p }), ...overrides }));
  it('moves the centre along phase to the middle of the body, in whole millimetres', () => {
    const after = planned(recentre(given(), inside));
    expect(after.prescription.centreMm).toEqual([0, 20, 0]);
    expect(planned(recentre(given({}, { centreMm: [3, 44, 5] }), inside)).prescription.centreMm).toEqual([
      3, 20, 5,
    ]);
    expect(codeOf(recentre(given({}, { centreMm: [0, 20.3, 0] }), inside))).toBe('nothing-to-change');
  });
  it('goes only as far as what must stay does', () => {
    const upTo = (most: number) =>
      solverThat({
        bodyAlongPhaseMm: () => [-150, 190],
        leavesPicture: (asked) =>
          Math.abs(asked.prescription.centreMm[1]) > most
            ? { code: 'area-leaves-picture', text: '' }
            : undefined,
      });
    expect(planned(recentre(given(), upTo(7.5))).prescription.centreMm[1]).toBe(7);
    expect(planned(recentre(given(), upTo(1))).prescription.centreMm[1]).toBe(1);
    expect(codeOf(recentre(given(), upTo(0.5)))).toBe('area-leaves-picture');
  });
  it('changes nothing where fold does not depend on the centre', () => {
    const plain = { acceleration: accelerated(2, { unfolding: 'k-space-self-calibrating' }) };
    expect(codeOf(recentre(given({}, plain), inside))).toBe('recentring-changes-nothing');
    const one = { acceleration: accelerated(1, { unfolding: 'image-domain-grid-ends' }) };
    expect(codeOf(recentre(given({}, one), inside))).toBe('recentring-changes-nothing');
    const unknown = { acceleration: accelerated(2, { unfolding: 'unknown' }) };
    expect(
      codeOf(recentre(given({ scanner: typicalScanner({ unfolding: 'unknown' }) }, unknown), inside)),
    ).toBe('changed');
    const following = (followsWindow: boolean, stays: boolean) =>
      codeOf(
        recentre(
          given(
            { keepClear: { ...LIVER_BOX, followsWindow, mustStayDisplayed: stays ? mustStay : undefined } },
            plain,
          ),
          inside,
        ),
      );
    expect([following(true, true), following(true, false), following(false, true)]).toEqual([
      'changed',
      'recentring-changes-nothing',
      'recentring-changes-nothing',
    ]);
  });
  it('takes along an area that follows, and no other', () => {
    const box = { xMm: [-100, 60], yMm: [-70, 50], zMm: [-40, 40] } as const;
    const of = (keepClear: Case['keepClear']) => {
      const start = given({ keepClear });
      return { start, after: planned(recentre(start, inside)) };
    };
    const moving = of({ area: { kind: 'box', box }, followsWindow: true, mustStayDisplayed: mustStay });
    expect(moving.after.frozen!.rangesMm).toEqual([
      [-100, 60],
      [-50, 70],
      [-40, 40],
    ]);
    const fixed = of({ area: { kind: 'box', box }, followsWindow: false, mustStayDisplayed: mustStay });
    expect(fixed.after.frozen).toEqual(fixed.start.frozen);
    const unbound = of({ area: { kind: 'box', box }, followsWindow: true });
    expect(unbound.after.frozen).toEqual(unbound.start.frozen);
    const whole = of({ area: { kind: 'whole-picture' }, followsWindow: true, mustStayDisplayed: mustStay });
    expect(whole.after.frozen).toEqual(windowRegion(whole.after.prescription));
  });
  it('is told by its distance and side', () => {
    const say = (before: readonly [number, number, number], after: readonly [number, number, number]) =>
      remedySentence(
        ['recentre'],
        undefined,
        given({}, { centreMm: before }),
        given({}, { centreMm: after }),
      );
    expect(say([0, 5, 0], [0, 25, 0])).toBe('Move the FOV centre 20 mm posterior.');
    expect(say([0, 25, 0], [0, 5, 0])).toBe('Move the FOV centre 20 mm anterior.');
    expect(say([8, 0, 0], [-4, 0, 0])).toBe('Move the FOV centre 12 mm right.');
    expect(say([-4, 0, 0], [8, 0, 0])).toBe('Move the FOV centre 12 mm left.');
    expect(say([0, 0, 7], [0, 0, 10])).toBe('Move the FOV centre 3 mm superior.');
    expect(say([0, 0, 10], [0, 0, 7])).toBe('Move the FOV centre 3 mm inferior.');
    expect(say([0, 0, 0], [0, 3, 4])).toBe('Move the FOV centre 5 mm posterior.');
  });
});

describe('coil elements', () => {
  const named = (ranges: readonly (readonly [number, number])[]) =>
    ranges.map(([seesFromMm, seesToMm], i) => ({ name: `e${i + 1}`, seesFromMm, seesToMm }));
  const choose = (ranges: readonly (readonly [number, number])[], halfMm: number, isocentreZMm = 0) => {
    const given = freeze(
      sketchCase({
        patient: typicalPatient({ isocentreZMm }),
        prescription: prescriptionOf('balanced', {
          phaseAxis: 'SI',
          fovPhaseMm: 2 * halfMm,
          fovReadoutMm: 500,
          centreMm: [0, 0, isocentreZMm],
        }),
        scanner: typicalScanner({ coils: [{ name: 'body array', elements: named(ranges) }] }),
      }),
    );
    return coilElements(given, solverThat({}));
  };
  const kept = (...args: Parameters<typeof choose>) => planned(choose(...args)).prescription.coilElements;
  it('kept are as few neighbours as see the picture, and of equally many those that see least beyond it', () => {
    const rows = [
      [-250, -90],
      [-160, 10],
      [-10, 160],
      [90, 250],
    ] as const;
    expect(kept(rows, 120)).toEqual(['e2', 'e3']);
    expect(kept(rows, 160)).toEqual(['e2', 'e3']);
    expect(codeOf(choose(rows, 161))).toBe('nothing-to-change');
    expect(kept(rows, 120, 30)).toEqual(['e2', 'e3']);
    // One sees it all: the narrowest of those, whichever comes first.
    expect(
      kept(
        [
          [-200, 200],
          [-130, 140],
          [-150, 150],
        ],
        100,
      ),
    ).toEqual(['e2']);
    expect(
      kept(
        [
          [-130, 140],
          [-200, 200],
          [-120, 125],
        ],
        100,
      ),
    ).toEqual(['e3']);
    expect(
      kept(
        [
          [-120, 125],
          [-200, 200],
          [-130, 140],
        ],
        100,
      ),
    ).toEqual(['e1']);
    expect(
      codeOf(
        choose(
          [
            [-90, 200],
            [-200, 90],
          ],
          100,
        ),
      ),
    ).toBe('nothing-to-change');
  });
  it('nobody described are refused', () => {
    const given = freeze(sketchCase({ prescription: typicalPrescription({ coil: 'another' }) }));
    expect(codeOf(coilElements(given, solverThat({})))).toBe('coil-elements-unknown');
  });
});
