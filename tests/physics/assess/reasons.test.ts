import { describe, expect, it } from 'vitest';
import { reasonsFor, type ReasonInputs } from '@/lib/physics/assess/reasons';
import { figure, millimetres, percentBeyond, squareCentimetres } from '@/lib/physics/assess/words';
import type {
  FoldResult,
  PartitionResult,
  SlabResult,
  WidthRequirement,
} from '@/lib/physics/model/assessment';
import { typicalPrescription } from '@/tests/support/physics-cases';

const NO_FOLD: FoldResult = {
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
const partition = (index: number): PartitionResult => ({
  index,
  offsetMm: 0,
  signal: 1,
  alias: 0,
  state: 'clean',
  dim: false,
  bright: false,
  inKeepClear: true,
});
const slabOf = (contaminated: number, contaminatedInKeepClear: number): SlabResult => ({
  timeBandwidthProduct: 8,
  profileKind: 'spoiled',
  skirtShareLow: 0.2,
  skirtShareHigh: 0.2,
  partitions: Array.from({ length: 40 }, (_, i) => partition(i)),
  contaminated,
  contaminatedInKeepClear,
});
// 300 mm over 240 lines, acquired 240: 1.25 mm a line.
const p = typicalPrescription({
  phaseAxis: 'AP',
  fovPhaseMm: 300,
  linesAcrossFov: 240,
  acquiredLines: 240,
});
const width = (overrides: Partial<WidthRequirement> = {}): WidthRequirement => ({
  forbiddenMm: [],
  firstCleanMm: 350,
  alwaysCleanMm: 350,
  firstCleanLines: 280,
  alwaysCleanLines: 280,
  coverBodyMm: 420,
  coverBodyLines: 336,
  ...overrides,
});
const reasons = (overrides: Partial<ReasonInputs>) =>
  reasonsFor({
    verdict: 'fold-in-keep-clear',
    hard: [],
    prescription: p,
    keepClearIsDisplayed: true,
    ...overrides,
  });
const codes = (overrides: Partial<ReasonInputs>) => reasons(overrides).map(({ code }) => code);
const words = (overrides: Partial<ReasonInputs>) =>
  reasons(overrides)
    .map(({ text }) => text)
    .join(' ');

describe('figures in sentences', () => {
  it('have one decimal at most, none without need, and halves go up', () => {
    expect([12, 12.04, 12.05, 12.25, 0.96, -3.2].map(figure)).toEqual([
      '12',
      '12',
      '12.1',
      '12.3',
      '1',
      '-3.2',
    ]);
  });
  it('a length that is there is never 0 mm', () => {
    expect([0, 0.004, 0.99, 1, 1.4, 1.5, 27].map(millimetres)).toEqual([
      '0 mm',
      'under 1 mm',
      'under 1 mm',
      '1 mm',
      '1 mm',
      '2 mm',
      '27 mm',
    ]);
  });
  it('a width beyond another is its excess in percent of that', () => {
    expect([percentBeyond(330, 300), percentBeyond(300, 300), percentBeyond(274, 240)]).toEqual([
      '10 %',
      '0 %',
      '14.2 %',
    ]);
  });
  it('areas are whole square centimetres, below one a tenth at least', () => {
    expect([2540, 100, 99, 40, 1].map(squareCentimetres)).toEqual([
      '25 cm²',
      '1 cm²',
      '1 cm²',
      '0.4 cm²',
      '0.1 cm²',
    ]);
  });
});

describe('how fold in the keep-clear area is told', () => {
  const fold = (overrides: Partial<FoldResult> = {}): FoldResult => ({
    ...NO_FOLD,
    inKeepClear: true,
    depthWithMarginMm: 14,
    depthMm: 4,
    from: { part: 'trunk', side: 'anterior', order: 1, distanceMm: 300 },
    ...overrides,
  });
  it('lands on the side across from where the tissue is', () => {
    expect(words({ fold: fold() })).toBe(
      'Anterior tissue lands on the posterior side, 14 mm deep with margin.',
    );
    expect(
      words({ fold: fold({ from: { part: 'left arm', side: 'left', order: 1, distanceMm: 300 } }) }),
    ).toContain('Tissue of the left arm lands on the right side');
    expect(words({ fold: fold({ from: undefined }) })).toContain('Tissue lands in the keep-clear area');
  });
  it('is only within the margin where it reaches no further', () => {
    expect(words({ fold: fold({ depthMm: 0 }) })).toContain('only within the margin, 14 mm deep');
    expect(words({ fold: fold({ depthMm: -0.2 }) })).toContain('only within the margin');
    expect(words({ fold: fold({ depthMm: 0.2 }) })).not.toContain('only within');
  });
  it('is ghosts where nothing but ghosts reaches it', () => {
    expect(codes({ fold: fold({ ghosts: true, depthWithMarginMm: 0 }) })).toEqual(['ghosts-in-keep-clear']);
    expect(codes({ fold: fold({ ghosts: true, depthWithMarginMm: 0.4 }) })).toEqual(['fold-in-keep-clear']);
    expect(codes({ fold: fold({ depthWithMarginMm: 0 }) })).toEqual(['fold-in-keep-clear']);
  });
  it('a ghost of unfolding is told as one, with where it appears', () => {
    const ghost = (from: Partial<NonNullable<FoldResult['from']>>) =>
      words({
        fold: fold({
          ghosts: true,
          from: { part: 'trunk', side: 'anterior', order: 0.5, distanceMm: 150, ...from },
        }),
      });
    expect(ghost({})).toBe(
      'Unfolding shows a ghost of tissue from the anterior side, 150 mm away, 14 mm deep with margin.',
    );
    expect(ghost({ part: 'left arm', side: 'posterior' })).toContain(
      'a ghost of tissue of the left arm from the posterior side, 150 mm away',
    );
    expect(ghost({ fatDisplacedMm: 18.4 })).toContain(
      'a ghost of fat from the anterior side, displaced 18 mm by EPI, 150 mm away',
    );
    // What comes along the slab has not come through unfolding along phase.
    expect(ghost({ side: 'superior' })).not.toContain('ghost');
  });
  it('says when its place is not certain', () => {
    expect(words({ fold: fold({ placeUncertain: true }) })).toContain('its place is uncertain');
    expect(words({ fold: fold() })).not.toContain('uncertain');
  });
  it('fat that EPI displaced is called so, with how far', () => {
    const from = (part: string) => ({
      part,
      side: 'anterior' as const,
      order: 1,
      distanceMm: 300,
      fatDisplacedMm: 18.4,
    });
    expect(words({ fold: fold({ from: from('trunk') }) })).toContain(
      'Fat on the anterior side, displaced 18 mm by EPI,',
    );
    expect(words({ fold: fold({ from: from('left arm') }) })).toContain(
      'Fat of the left arm, displaced 18 mm',
    );
  });
  it('is left to the slab’s own sentence where the tissue comes along the slab', () => {
    const along = fold({ from: { part: 'trunk', side: 'superior', order: 1, distanceMm: 200 } });
    expect(codes({ fold: along, slab: slabOf(3, 2) })).toEqual(['slab-wrap-in-keep-clear']);
    expect(codes({ fold: along, slab: slabOf(3, 0) })).toEqual([
      'fold-in-keep-clear',
      'slab-wrap-outside-keep-clear',
    ]);
    // Outside the keep-clear area the slab's wrap leads: it is what covers most of the picture.
    const outside: FoldResult = { ...NO_FOLD, outsideKeepClear: true, displayedAreaMm2: 123200 };
    expect(codes({ fold: outside, slab: slabOf(3, 0) })).toEqual([
      'slab-wrap-outside-keep-clear',
      'fold-outside-keep-clear',
    ]);
    // Tissue that comes along phase is told beside the slab's wrap.
    expect(codes({ fold: fold(), slab: slabOf(3, 2) })).toEqual([
      'fold-in-keep-clear',
      'slab-wrap-in-keep-clear',
    ]);
    expect(codes({ fold: fold({ from: undefined }), slab: slabOf(3, 2) })).toEqual([
      'fold-in-keep-clear',
      'slab-wrap-in-keep-clear',
    ]);
  });
});

describe('what else is told', () => {
  it('what stops the scan comes first, what lies outside only where nothing lies inside', () => {
    const outside: FoldResult = { ...NO_FOLD, outsideKeepClear: true, displayedAreaMm2: 2540 };
    const hard = [{ code: 'table-limit', text: 'Too heavy.' }];
    expect(codes({ hard, fold: outside })).toEqual(['table-limit', 'fold-outside-keep-clear']);
    expect(words({ fold: outside })).toBe('Tissue lands outside the keep-clear area: 25 cm² of the picture.');
    expect(codes({ fold: { ...outside, inKeepClear: true } })).toEqual(['fold-in-keep-clear']);
    expect(codes({ fold: NO_FOLD })).toEqual([]);
  });
  it('slab wrap counts the partitions that matter, one of them holds and two hold', () => {
    expect(words({ slab: slabOf(5, 1) })).toContain('1 of 40 partitions in the keep-clear area holds');
    expect(words({ slab: slabOf(5, 2) })).toContain('2 of 40 partitions in the keep-clear area hold tissue');
    expect(words({ slab: slabOf(5, 0) })).toContain('5 of 40 partitions outside the keep-clear area hold');
    expect(codes({ slab: slabOf(0, 0) })).toEqual([]);
    expect(codes({ slab: slabOf(1, 0) })).toEqual(['slab-wrap-outside-keep-clear']);
  });
  it('fat displaced by EPI: its share of the acquired width, in mm', () => {
    // 5 % of 240 lines of 1.25 mm.
    const given = { prescription: { ...p, acquiredLines: 288 }, fatShare: 0.05 };
    expect(words(given)).toContain('EPI shows fat 18 mm from its place along A–P');
    expect(codes(given)).toEqual(['fat-displaced']);
  });
  it('a keep-clear area that no slice shows', () => {
    expect(codes({ keepClearIsDisplayed: false })).toEqual(['keep-clear-not-displayed']);
  });
});

describe('what is enough', () => {
  const folds: FoldResult = { ...NO_FOLD, outsideKeepClear: true };
  const last = (overrides: Partial<WidthRequirement>) =>
    reasons({ fold: folds, width: width(overrides) }).at(-1)!;
  it('is the smallest oversampling on the scanner’s lines, beside what the whole body would take', () => {
    // 280 of 240 lines: 16.7 %, 350 mm; the body's 420 mm are 40 % more than 300.
    expect(last({})).toEqual({
      code: 'enough-width',
      text: '16.7 % oversampling is enough (350 mm acquired). Covering the whole body would take 40 %.',
    });
    expect(last({ firstCleanLines: 240 }).text).toContain('No oversampling is needed (300 mm acquired)');
    expect(last({ firstCleanLines: 241 }).text).toContain('0.4 % oversampling is enough');
  });
  it('is compared with the body only where the body asks for more', () => {
    for (const coverBodyMm of [250, 350, 350.04])
      expect(last({ coverBodyMm }).text).not.toContain('whole body');
    expect(last({ coverBodyMm: 350.06 }).text).toContain('whole body would take 16.7 %');
  });
  it('may be more than the scanner can be set to, or out of reach while tissue wraps along the slab', () => {
    expect(last({ firstCleanMm: 540, firstCleanLines: undefined })).toMatchObject({
      code: 'no-width-on-grid',
      text: expect.stringContaining('80 % oversampling (540 mm acquired)') as string,
    });
    expect(last({ firstCleanMm: Infinity, firstCleanLines: undefined }).code).toBe('wraps-along-slab');
  });
  it('where nothing folds, what is acquired beyond need is told from a whole millimetre on', () => {
    const spare = (alwaysCleanMm: number) => words({ fold: NO_FOLD, width: width({ alwaysCleanMm }) });
    expect(spare(300)).toBe('300 mm acquired A–P is enough with margin.');
    expect(spare(299.01)).not.toContain('more than needed');
    expect(spare(299)).toContain('1 mm more than needed');
    expect(spare(270.5)).toContain('29 mm more than needed');
    expect(codes({ width: width() })).toEqual(['no-fold-expected']);
    expect(codes({ fold: { ...folds, inKeepClear: true, outsideKeepClear: false }, width: width() })).toEqual(
      ['fold-in-keep-clear', 'enough-width'],
    );
  });
});
