import { describe, expect, it } from 'vitest';
import type {
  Assessment,
  DetailResult,
  FoldResult,
  SlabResult,
  TimeResult,
} from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { CostTermKind } from '@/lib/physics/model/remedy';
import type { CostWeights } from '@/lib/physics/model/policy';
import { costTerms, holdExcessS, leavesFoldInKeepClear, totalTenths } from '@/lib/physics/remedy/cost';
import {
  accelerated,
  measured,
  prescriptionOf,
  sketchCase,
  slabOf,
  typicalPatient,
  typicalPolicy,
} from '@/tests/support/physics-cases';

/** Weights of no common measure, so that no price can stand for another. */
const WEIGHTS: CostWeights = {
  ...DEFAULT_POLICY.weights,
  timePct: 1.1,
  snrLostPct: 1.3,
  voxelPct: 1.7,
  breathHoldS: 12.3,
  extraBreathHold: 21,
  foldDisplayedPct: 0.7,
  foldKeepClearPct: 19,
  swap: { ...DEFAULT_POLICY.weights.swap, abdomen: 8.5 },
  presaturationBand: 7.7,
  edit: 0.3,
  recentre: 1.9,
  armsUp: 6.1,
  coilElements: 2.3,
  fewerAverages: 10.1,
  moreAcceleration: 5.9,
  partialFourier: 4.7,
  coverageMm: 0.9,
  trainPct: 0.4,
};
const policy = typicalPolicy({ weights: WEIGHTS });
const TIME: TimeResult = {
  scanS: 100,
  shots: 1,
  acquiredViews: 240,
  batches: 1,
  breathHolds: 1,
  longestHoldS: 10,
};
const DETAIL: DetailResult = { voxelMm: [1, 2, 5], snr: 80, snrRange: [80, 80] };
const FOLD: FoldResult = {
  inKeepClear: false,
  outsideKeepClear: false,
  depthWithMarginMm: 0,
  depthMm: 0,
  displayedAreaMm2: 0,
  keepClearAreaMm2: 0,
  displayedShare: 0,
  keepClearShare: 0,
  placeUncertain: false,
  ghosts: false,
};
const slabResult = (
  partitions: number,
  contaminated: number,
  contaminatedInKeepClear: number,
): SlabResult => ({
  timeBandwidthProduct: 8,
  profileKind: 'spoiled',
  skirtShareLow: 0,
  skirtShareHigh: 0,
  partitions: Array.from({ length: partitions }, (_, index) => ({
    index,
    offsetMm: 0,
    signal: 1,
    alias: 0,
    state: 'clean' as const,
    dim: false,
    bright: false,
    inKeepClear: true,
  })),
  contaminated,
  contaminatedInKeepClear,
});
type Changes = {
  time?: Partial<TimeResult>;
  detail?: Partial<DetailResult>;
  fold?: Partial<FoldResult>;
} & Partial<Pick<Assessment, 'verdict' | 'slab'>>;
const answer = ({ time, detail, fold, ...rest }: Changes = {}): Assessment => ({
  engineVersion: '1',
  policyVersion: 1,
  verdict: 'no-fold-expected',
  reasons: [],
  assumptions: [],
  phaseAxis: 'AP',
  readoutAxis: 'RL',
  time: { ...TIME, ...time },
  detail: { ...DETAIL, ...detail },
  fold: { ...FOLD, ...fold },
  ...rest,
});
const bare: Assessment = { ...answer(), time: undefined, detail: undefined, fold: undefined };
const given = sketchCase({ policy, patient: typicalPatient({ breathHoldS: measured(12) }) });
const changed = (prescription: Partial<Case['prescription']>, base = given): Case => ({
  ...base,
  prescription: { ...base.prescription, ...prescription },
});
/** Kind and points of every term. */
const prices = (then: Changes, now: Changes = {}, planned = given, base = given) =>
  Object.fromEntries(
    costTerms(base, planned, answer(now), answer(then)).map(({ kind, tenths }) => [kind, tenths]),
  ) as Partial<Record<CostTermKind, number>>;
/** Whole tenths of so many points. */
const tenths = (points: number) => Math.round(points * 10);

describe('the price of time, SNR and voxel', () => {
  it('nothing changed costs nothing, and a saving earns nothing', () => {
    expect(prices({})).toEqual({});
    expect(prices({ time: { scanS: 60 }, detail: { snr: 120, voxelMm: [1, 1, 5] } })).toEqual({});
  });
  it('is by the percent more time, SNR lost and voxel grown', () => {
    expect(prices({ time: { scanS: 130 } })).toEqual({ time: tenths(30 * 1.1) });
    expect(prices({ detail: { snr: 60 } })).toEqual({ snr: tenths(25 * 1.3) });
    expect(prices({ detail: { voxelMm: [1.2, 2, 5] } })).toEqual({ voxel: tenths(20 * 1.7) });
    expect(prices({ detail: { voxelMm: [1, 2, 6] } })).toEqual({ voxel: tenths(20 * 1.7) });
  });
  it('small changes are priced as well, from half a tenth of a point on', () => {
    expect(prices({ time: { scanS: 100.5 } })).toEqual({ time: tenths(0.5 * 1.1) });
    expect(prices({ time: { scanS: 100.02 } })).toEqual({});
    expect(prices({ detail: { snr: 79.6 } })).toEqual({ snr: tenths(0.5 * 1.3) });
  });
  it('what was not worked out before has no price', () => {
    expect(costTerms(given, given, bare, answer({ time: { breathHolds: 0 } }))).toEqual([]);
    expect(costTerms(given, given, bare, bare)).toEqual([]);
    // All of an SNR is lost where there is none afterwards.
    expect(costTerms(given, given, answer(), { ...answer(), detail: undefined })).toMatchObject([
      { kind: 'snr', tenths: tenths(100 * 1.3) },
    ]);
  });
});

describe('the price of breath-holds', () => {
  const held = changed({ breathing: 'breath-hold' });
  it('is by the second over the limit, and by the further hold', () => {
    expect(prices({ time: { longestHoldS: 15 } }, {}, held, held)).toEqual({
      'breath-hold': tenths(3 * 12.3),
    });
    expect(prices({ time: { longestHoldS: 12 } }, {}, held, held)).toEqual({});
    expect(prices({ time: { breathHolds: 3 } }, {}, held, held)).toEqual({ 'breath-hold': tenths(2 * 21) });
    expect(prices({ time: { breathHolds: 2 } }, { time: { breathHolds: 3 } }, held, held)).toEqual({});
    expect(prices({ time: { longestHoldS: 13, breathHolds: 2 } }, {}, held, held)).toEqual({
      'breath-hold': tenths(12.3 + 21),
    });
  });
  it('is nothing where nothing is held', () => {
    const free = changed({ breathing: 'free' });
    expect(holdExcessS(free, answer({ time: { longestHoldS: 99 } }))).toBe(0);
    expect(holdExcessS(held, bare)).toBe(0);
    expect(holdExcessS(held, answer({ time: { longestHoldS: 12.25 } }))).toBe(0.25);
  });
  it('says how many', () => {
    const said = (breathHolds: number) =>
      costTerms(held, held, answer(), answer({ time: { breathHolds } }))[0]!.text;
    expect(said(2)).toBe('1 more breath-hold');
    expect(said(3)).toBe('2 more breath-holds');
  });
});

describe('the price of side effects', () => {
  const only = (planned: Case, then: Changes = {}, now: Changes = {}, base = given) =>
    prices(then, now, planned, base)['side-effects'];
  it('a swap by the region, a band each, an average each', () => {
    expect(only(changed({ phaseAxis: 'RL' }))).toBe(tenths(8.5));
    const band = {
      side: 'anterior',
      innerEdgeMm: 150,
      thicknessMm: 40,
      nominalFlipDeg: 90,
      delayMs: 10,
    } as const;
    expect(only(changed({ presaturation: [band] }))).toBe(tenths(7.7));
    expect(only(changed({ presaturation: [band, band] }))).toBe(tenths(15.4));
    expect(only(given, {}, {}, changed({ presaturation: [band] }))).toBeUndefined();
    const four = changed({ averages: 4 });
    expect(only(changed({ averages: 2 }), {}, {}, four)).toBe(tenths(20.2));
    expect(only(changed({ averages: 5 }), {}, {}, four)).toBeUndefined();
  });
  it('acceleration and partial Fourier by the step', () => {
    const plain = changed({ acceleration: accelerated(1), partialFourierPhase: 1 });
    const faster = changed({ acceleration: accelerated(1.5) }, plain);
    expect(only(faster, {}, {}, plain)).toBe(59);
    expect(only(changed({ acceleration: accelerated(2) }, plain), {}, {}, plain)).toBe(2 * 59);
    expect(only(changed({ acceleration: accelerated(1.4) }, plain), {}, {}, plain)).toBeUndefined();
    expect(only(plain, {}, {}, faster)).toBeUndefined();
    const part = (partialFourierPhase: number) =>
      only(changed({ partialFourierPhase }, plain), {}, {}, plain);
    // Seven eighths, six, five: a step each.
    expect([part(0.9), part(0.875), part(0.75), part(0.625)]).toEqual([undefined, 47, 94, 141]);
    expect(only(plain, {}, {}, changed({ partialFourierPhase: 0.75 }, plain))).toBeUndefined();
  });
  it('a longer train or displacement, by the percent of the worse', () => {
    const train = { trainMs: 200, displacementPer100HzMm: 4 };
    const priced = (then: Partial<TimeResult>) =>
      only(given, { time: { ...train, ...then } }, { time: train });
    expect(priced({})).toBeUndefined();
    expect(priced({ trainMs: 250 })).toBe(tenths(25 * 0.4));
    expect(priced({ trainMs: 201 })).toBe(tenths(0.5 * 0.4));
    expect(priced({ displacementPer100HzMm: 5.2 })).toBe(tenths(30 * 0.4));
    expect(priced({ trainMs: 250, displacementPer100HzMm: 5.2 })).toBe(tenths(30 * 0.4));
    expect(priced({ trainMs: 150, displacementPer100HzMm: 3 })).toBeUndefined();
    // No train before: nothing grew.
    expect(only(given, { time: train }, {})).toBeUndefined();
    const said = (then: Partial<TimeResult>) =>
      costTerms(given, given, answer({ time: train }), answer({ time: { ...train, ...then } }))[0]!.text;
    expect(said({ trainMs: 250, displacementPer100HzMm: 5.2 })).toBe('displacement +30 %');
    expect(said({ trainMs: 260, displacementPer100HzMm: 5.2 })).toBe('echo train +30 %');
  });
});

describe('the price of effort', () => {
  const only = (planned: Case, base = given) => prices({}, {}, planned, base).effort;
  const p = given.prescription;
  it('is by the setting; moving, arms and elements have their own', () => {
    expect(only(changed({ trMs: p.trMs + 10 }))).toBe(tenths(0.3));
    expect(only(changed({ trMs: p.trMs + 10, teMs: p.teMs + 1 }))).toBe(tenths(0.6));
    const [x, y, z] = p.centreMm;
    for (const centreMm of [
      [x + 1, y, z],
      [x, y + 1, z],
      [x, y, z + 1],
    ] as const)
      expect(only(changed({ centreMm }))).toBe(tenths(1.9));
    expect(only(changed({ coilElements: ['a'] }))).toBe(tenths(0.3 + 2.3));
    const up: Case = {
      ...given,
      patient: { ...given.patient, arms: { ...given.patient.arms, position: 'down' } },
    };
    expect(only(up)).toBe(tenths(6.1));
    expect(costTerms(given, changed({ trMs: 1, teMs: 1 }), answer(), answer())[0]!.text).toBe(
      '2 settings to change',
    );
  });
  it('coverage given up, both ends together, by the millimetre', () => {
    const slab = sketchCase({
      policy,
      prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf() }),
    });
    const dropped = (droppedPartitionsPerEnd: number) =>
      changed({ slices: slabOf({ droppedPartitionsPerEnd }) }, slab);
    // 3.5 mm partitions, 2 an end: 14 mm.
    expect(only(dropped(2), slab)).toBe(tenths(14 * 0.9));
    expect(only(slab, dropped(2))).toBeUndefined();
  });
});

describe('the price of leftover fold', () => {
  const only = (then: Changes) => prices(then)['leftover-fold'];
  it('is by the percent of the picture and of the keep-clear area', () => {
    expect(only({ fold: { displayedShare: 0.04 } })).toBe(tenths(4 * 0.7));
    expect(only({ fold: { displayedShare: 0.005 } })).toBe(tenths(0.5 * 0.7));
    expect(only({ fold: { keepClearShare: 0.03, inKeepClear: true } })).toBe(tenths(3 * 19));
    expect(only({ fold: { displayedShare: 1.5 } })).toBe(tenths(100 * 0.7));
    expect(only({ fold: { keepClearShare: 1.5, inKeepClear: true } })).toBe(tenths(100 * 19));
  });
  it('counts as 1 % of the area at least, wherever fold is left in it', () => {
    const one = tenths(19);
    expect(only({ fold: { inKeepClear: true } })).toBe(one);
    expect(only({ fold: { inKeepClear: true, keepClearShare: 0.004 } })).toBe(one);
    expect(only({ verdict: 'fold-in-keep-clear' })).toBe(one);
    expect(only({})).toBeUndefined();
    expect(leavesFoldInKeepClear(bare)).toBe(false);
    expect(leavesFoldInKeepClear(answer({ slab: slabResult(50, 1, 1) }))).toBe(true);
    expect(leavesFoldInKeepClear(answer({ slab: slabResult(50, 1, 0) }))).toBe(false);
  });
  it('along a slab is the share of its partitions that hold wrap', () => {
    // Ten of fifty partitions wholly under fold: a fifth of what is displayed.
    expect(only({ slab: slabResult(50, 10, 0), fold: { displayedShare: 1 } })).toBe(tenths(20 * 0.7));
    expect(only({ slab: slabResult(50, 10, 2), fold: { displayedShare: 1 } })).toBe(
      tenths(20 * 0.7 + 4 * 19),
    );
    expect(only({ slab: slabResult(50, 10, 2), fold: { keepClearShare: 0.1, inKeepClear: true } })).toBe(
      tenths(10 * 19),
    );
    expect(only({ slab: slabResult(50, 0, 0), fold: { displayedShare: 0.1 } })).toBe(tenths(10 * 0.7));
  });
});

it('the total is the sum of the rounded terms, in a fixed order', () => {
  const planned = changed({ phaseAxis: 'RL', trMs: 1 });
  const terms = costTerms(
    given,
    planned,
    answer(),
    answer({
      time: { scanS: 133.3 },
      detail: { snr: 70, voxelMm: [1.1, 2, 5] },
      fold: { displayedShare: 0.1 },
    }),
  );
  expect(terms.map(({ kind }) => kind)).toEqual([
    'time',
    'snr',
    'voxel',
    'side-effects',
    'effort',
    'leftover-fold',
  ]);
  expect(totalTenths(terms)).toBe(terms.reduce((sum, term) => sum + term.tenths, 0));
  expect(terms.every((term) => Number.isInteger(term.tenths))).toBe(true);
});
