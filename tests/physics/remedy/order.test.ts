import { describe, expect, it } from 'vitest';
import { compareRemedies } from '@/lib/physics';
import { freeze } from '@/lib/physics/assess/geometry-class';
import type { Case } from '@/lib/physics/model/case';
import type { CostTerm, Remedy } from '@/lib/physics/model/remedy';
import { markDominated } from '@/lib/physics/remedy/dominance';
import { geometrySolver } from '@/lib/physics/remedy/geometry-solver';
import { outcomeKey } from '@/lib/physics/remedy/outcome-key';
import {
  evenMargin,
  LIVER_BOX,
  prescriptionOf,
  sketchCase,
  slabOf,
  typicalPolicy,
  typicalPrescription,
} from '@/tests/support/physics-cases';

interface Figures {
  readonly key: string;
  readonly cost: number;
  readonly actions: number;
  readonly folds: boolean;
  readonly scanS: number;
  readonly snr: number;
  readonly edgeMm: number;
  readonly shown: number;
  readonly kept: number;
  readonly partitions: readonly [number, number];
  readonly terms: Partial<Record<CostTerm['kind'], number>>;
}
const remedy = (values: Partial<Figures>): Remedy => {
  const f: Figures = {
    key: 'a',
    cost: 10,
    actions: 0,
    folds: false,
    scanS: 100,
    snr: 1,
    edgeMm: 1,
    shown: 0,
    kept: 0,
    partitions: [0, 0],
    terms: {},
    ...values,
  };
  return {
    key: f.key,
    costTenths: f.cost,
    physicalActions: f.actions,
    terms: Object.entries(f.terms).map(([kind, tenths]) => ({ kind, tenths, text: '' })),
    dominated: false,
    assessment: {
      verdict: 'no-fold-expected',
      time: { scanS: f.scanS },
      detail: { snr: f.snr, voxelMm: [f.edgeMm, 2, 3] },
      fold: { inKeepClear: f.folds, displayedShare: f.shown, keepClearShare: f.kept },
      slab: { contaminated: f.partitions[0], contaminatedInKeepClear: f.partitions[1], partitions: [] },
    },
  } as unknown as Remedy;
};

describe('the order of remedies', () => {
  it('fold left in the keep-clear area comes last, then cost, then physical actions, then key', () => {
    const order = [
      remedy({ key: 'b', cost: 5 }),
      remedy({ key: 'a', cost: 7 }),
      remedy({ key: 'c', cost: 7 }),
      remedy({ key: 'a', cost: 7, actions: 1 }),
      remedy({ key: 'a', cost: 9 }),
      remedy({ key: 'a', cost: 1, folds: true }),
      remedy({ key: 'b', cost: 1, folds: true }),
    ];
    for (let i = 0; i < order.length; i++)
      for (let j = 0; j < order.length; j++)
        expect(Math.sign(compareRemedies(order[i]!, order[j]!)), `${i}, ${j}`).toBe(Math.sign(i - j));
  });
});

describe('a remedy is beaten', () => {
  const beaten = (a: Partial<Figures>, b: Partial<Figures>) =>
    markDominated([remedy(a), remedy(b)])[0]!.dominated;
  it('by one that is better in one thing and worse in none', () => {
    for (const worse of [
      { scanS: 101 },
      { snr: 0.99 },
      { edgeMm: 1.01 },
      { shown: 0.01 },
      { kept: 0.01 },
      { folds: true },
      { partitions: [1, 0] },
      { partitions: [0, 1] },
      { terms: { 'breath-hold': 1 } },
      { terms: { 'side-effects': 1 } },
      { terms: { effort: 1 } },
    ] as const satisfies readonly Partial<Figures>[]) {
      expect(beaten(worse, {}), JSON.stringify(worse)).toBe(true);
      expect(beaten({}, worse), JSON.stringify(worse)).toBe(false);
      // Better in something else: neither beats the other.
      const otherwise = 'scanS' in worse ? { snr: 0.9 } : { scanS: 130 };
      expect(beaten(worse, otherwise), JSON.stringify(worse)).toBe(false);
      expect(beaten(otherwise, worse), JSON.stringify(worse)).toBe(false);
    }
  });
  it('by none that is like it, and not for its price alone', () => {
    expect(beaten({}, {})).toBe(false);
    expect(beaten({ cost: 50, terms: { time: 9 } }, { cost: 1 })).toBe(false);
  });
});

describe('outcomes', () => {
  const given = sketchCase({ prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf() }) });
  const key = (p: Partial<Case['prescription']>) =>
    outcomeKey(freeze({ ...given, prescription: { ...given.prescription, ...p } }));
  it('are told apart by everything a remedy can change, and by nothing else', () => {
    const band = {
      side: 'left',
      innerEdgeMm: 10,
      thicknessMm: 20,
      nominalFlipDeg: 90,
      delayMs: 10,
    } as const;
    const keys = [
      {},
      { phaseAxis: 'RL' as const },
      { fovPhaseMm: 1 },
      { fovReadoutMm: 1 },
      { linesAcrossFov: 1 },
      { readoutMatrix: 1 },
      { acquiredLines: 1 },
      { centreMm: [1, 0, 0] as const },
      { trMs: 1 },
      { teMs: 1 },
      { averages: 9 },
      { partialFourierPhase: 0.9 },
      { coilElements: ['a'] },
      { slices: slabOf({ partitions: 60 }) },
      { slices: slabOf({ acquiredPartitions: 70 }) },
      { slices: slabOf({ droppedPartitionsPerEnd: 1 }) },
      { slices: slabOf({ timeBandwidthProduct: 9 }) },
      { presaturation: [band] },
      { presaturation: [{ ...band, side: 'right' as const }] },
      { presaturation: [{ ...band, innerEdgeMm: 11 }] },
      { presaturation: [{ ...band, thicknessMm: 21 }] },
    ].map(key);
    expect(new Set(keys).size).toBe(keys.length);
    expect(key({ name: 'another', flipDeg: 11 })).toBe(key({}));
  });
});

describe('what a change is worked out with', () => {
  it('edges: the farther of the picture and the area that must stay free, and the body’s own', () => {
    const given = freeze(
      sketchCase({
        keepClear: {
          area: { kind: 'box', box: { xMm: [-260, 100], yMm: [-70, 170], zMm: [-40, 40] } },
          followsWindow: false,
        },
        policy: typicalPolicy({ marginMm: evenMargin(0) }),
        prescription: typicalPrescription({ centreMm: [10, -20, 0] }),
      }),
    );
    const solver = geometrySolver(given);
    const edge = (side: 'right' | 'left' | 'anterior' | 'posterior') => solver.windowEdgeMm(given, side);
    // The picture: x from −230 to 250, y from −170 to 130.
    expect([edge('right'), edge('left'), edge('anterior'), edge('posterior')]).toEqual([260, 250, 170, 170]);
    expect([solver.bodyEdgeMm(given, 'left'), solver.bodyEdgeMm(given, 'anterior')]).toEqual([240, 170]);
    const [low, high] = solver.bodyAlongPhaseMm(given);
    expect([low, high]).toEqual([-170, 170]);
  });
  it('the body along phase has each side’s own margin', () => {
    const given = freeze(
      sketchCase({
        policy: typicalPolicy({
          marginMm: { ...evenMargin(0), anterior: 9, posterior: 4, right: 2, left: 3 },
        }),
      }),
    );
    const across = freeze({ ...given, prescription: { ...given.prescription, phaseAxis: 'RL' as const } });
    expect(geometrySolver(given).bodyAlongPhaseMm(given)).toEqual([-179, 174]);
    expect(geometrySolver(across).bodyAlongPhaseMm(across)).toEqual([-242, 243]);
  });
  it('an area leaves the picture with as much of it as was shown before', () => {
    const given = freeze(sketchCase({ keepClear: LIVER_BOX }));
    const solver = geometrySolver(given);
    const { area } = LIVER_BOX;
    if (area.kind !== 'box') throw new Error('the liver is a box');
    const [front, back] = area.box.yMm;
    const moved = (fovPhaseMm: number, centreY: number) =>
      solver.leavesPicture({
        ...given,
        prescription: { ...given.prescription, fovPhaseMm, centreMm: [0, centreY, 0] },
      })?.code;
    const middle = (front + back) / 2;
    expect(moved(back - front, middle)).toBeUndefined();
    expect(moved(back - front - 0.01, middle)).toBe('area-leaves-picture');
    expect(moved(back - front, middle + 0.01)).toBe('area-leaves-picture');
    expect(moved(back - front, middle - 0.01)).toBe('area-leaves-picture');
    expect(moved(300, 0)).toBeUndefined();
  });
});
