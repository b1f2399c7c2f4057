import { describe, expect, it } from 'vitest';
import { assess, compareRemedies, rankRemedies } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking, Remedy } from '@/lib/physics/model/remedy';
import {
  ABDOMEN_PROTOCOL,
  accelerated,
  evenMargin,
  LIVER_BOX,
  measured,
  prescriptionOf,
  SEQUENCE_FAMILIES,
  sketchCase,
  slabOf,
  stackOf,
  typicalCase,
  typicalPatient,
  typicalPolicy,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';

const byKey = (ranking: Ranking, key: string): Remedy | undefined =>
  ranking.remedies.find((remedy) => remedy.key === key);
const refusal = (ranking: Ranking, key: string) =>
  ranking.notPossible.find((entry) => entry.key === key)?.reason;

/** The case once a remedy is adopted; its keep-clear area is a box, so it stays where it was. */
const adopted = (given: Case, remedy: Remedy): Case => ({
  ...given,
  prescription: remedy.prescription,
  patient: { ...given.patient, arms: { ...given.patient.arms, position: remedy.arms } },
});

const armsDown = { position: 'down', breadthMm: 90, depthMm: 100, gapMm: 15 } as const;

describe('every ranking', () => {
  const cases: [string, Case][] = [
    ...SEQUENCE_FAMILIES.map((family): [string, Case] => [
      family,
      sketchCase({ prescription: prescriptionOf(family) }),
    ]),
    [
      'arms down',
      sketchCase({ patient: typicalPatient({ arms: armsDown }), prescription: prescriptionOf('balanced') }),
    ],
    ['whole picture', typicalCase({ prescription: prescriptionOf('gradient-echo-3d') })],
    [
      'unfolding grid ends',
      sketchCase({
        prescription: typicalPrescription({
          acceleration: accelerated(2, { unfolding: 'image-domain-grid-ends' }),
        }),
      }),
    ],
  ];

  it.each(cases)(
    '%s: keys are unique, terms are whole tenths that add up, the order is the stated one',
    (_, given) => {
      const { remedies } = rankRemedies(given);
      expect(remedies.length).toBeGreaterThan(0);
      expect(new Set(remedies.map((remedy) => remedy.key)).size).toBe(remedies.length);
      for (const { costTenths, terms, changes, payback } of remedies) {
        expect(
          terms.every((term) => Number.isInteger(term.tenths) && term.tenths > 0 && term.text !== ''),
        ).toBe(true);
        expect(terms.reduce((sum, term) => sum + term.tenths, 0)).toBe(costTenths);
        expect(changes.length).toBeLessThanOrEqual(2);
        expect(changes.length + (payback === undefined ? 0 : 1)).toBeGreaterThan(0);
      }
      expect([...remedies].sort(compareRemedies)).toEqual(remedies);
    },
  );

  it.each(cases)(
    '%s: the first remedy leaves no fold in the keep-clear area, also when asked again after adopting it',
    (_, given) => {
      const { remedies } = rankRemedies(given);
      expect(remedies[0]!.assessment.verdict).not.toBe('fold-in-keep-clear');
      if (given.keepClear.area.kind !== 'box') return;
      const again = assess(adopted(given, remedies[0]!));
      expect(again.verdict).toBe(remedies[0]!.assessment.verdict);
      expect(again.fold).toEqual(remedies[0]!.assessment.fold);
      expect(again.time).toEqual(remedies[0]!.assessment.time);
    },
  );

  it.each(cases)(
    '%s: gives the same list twice, one sentence each, and a reason for everything not possible',
    (_, given) => {
      const ranking = rankRemedies(given);
      expect(rankRemedies({ ...given, patient: { ...given.patient } })).toEqual(ranking);
      for (const { sentence } of ranking.remedies) expect(sentence).toMatch(/^[A-Z0-9].*[^.]\.$/);
      for (const { reason } of ranking.notPossible) expect(reason.text).toMatch(/\.$/);
    },
  );

  it('marks exactly what another one beats', () => {
    const { remedies } = rankRemedies(sketchCase());
    const first = remedies[0]!;
    expect(first.dominated).toBe(false);
    expect(remedies.some((remedy) => remedy.dominated)).toBe(true);
    // Moving the lines from 252 to more lines and a larger FOV at once costs more of everything.
    const both = remedies.find((remedy) => remedy.key === 'swap+phase-oversampling');
    if (both) expect(both.dominated).toBe(true);
  });
});

describe('the sketch’s case', () => {
  const ranking = rankRemedies(sketchCase());

  it('puts 5 % phase oversampling first: 252 lines, one shot more', () => {
    const first = ranking.remedies[0]!;
    expect(first.key).toBe('phase-oversampling');
    expect(first.prescription.acquiredLines).toBe(252);
    expect(first.sentence).toBe('Set phase oversampling to 5 % (252 lines).');
    expect(first.assessment.time?.shots).toBe(16);
    expect(first.terms.find((term) => term.kind === 'time')?.tenths).toBe(67);
  });

  it('opens the FOV to 315 mm at the same matrix', () => {
    const larger = byKey(ranking, 'larger-fov-same-matrix')!;
    expect(larger.prescription.fovPhaseMm).toBe(315);
    expect(larger.terms.find((term) => term.kind === 'voxel')?.tenths).toBe(70);
  });

  it('spends one average of two on 100 % oversampling: same time, same SNR', () => {
    const paid = byKey(ranking, 'phase-oversampling+fewer-averages')!;
    expect(paid.prescription).toMatchObject({ averages: 1, acquiredLines: 480 });
    expect(paid.assessment.time?.scanS).toBeCloseTo(ranking.now.time!.scanS, 9);
    expect(paid.assessment.detail!.snr).toBeCloseTo(ranking.now.detail!.snr, 9);
  });

  it('does not offer recentring, because it changes nothing here, and says so', () => {
    expect(ranking.remedies.some((remedy) => remedy.changes.includes('recentre'))).toBe(false);
    expect(refusal(ranking, 'recentre')?.code).toBe('recentring-changes-nothing');
  });

  it('swaps at each axis’s own pixel: 384 lines, 60 % more time', () => {
    const swapped = byKey(ranking, 'swap')!;
    expect(swapped.prescription).toMatchObject({
      phaseAxis: 'RL',
      acquiredLines: 384,
      fovPhaseMm: 480,
      fovReadoutMm: 480,
    });
    expect(swapped.terms.find((term) => term.kind === 'time')?.tenths).toBe(600);
  });
});

describe('what is never silently dropped', () => {
  it('arms that cannot be raised', () => {
    const arms = { ...armsDown, position: 'cannot-be-raised' } as const;
    const ranking = rankRemedies(
      sketchCase({ patient: typicalPatient({ arms }), prescription: prescriptionOf('balanced') }),
    );
    expect(refusal(ranking, 'arms-up')?.code).toBe('arms-cannot-be-raised');
    expect(ranking.remedies.some((remedy) => remedy.changes.includes('arms-up'))).toBe(false);
  });

  it('fewer averages where there is only one', () => {
    const ranking = rankRemedies(sketchCase({ prescription: typicalPrescription({ averages: 1 }) }));
    expect(refusal(ranking, 'fewer-averages')?.code).toBe('one-average');
  });

  it('oversampling beyond the scanner’s maximum, with both numbers', () => {
    const ranking = rankRemedies(
      sketchCase({ scanner: typicalScanner({ limits: { phaseOversamplingMaxPct: 3 } }) }),
    );
    expect(refusal(ranking, 'phase-oversampling')?.text).toContain(
      '5 % phase oversampling (315 mm acquired) is more',
    );
  });

  it('a FOV beyond the scanner’s maximum', () => {
    const ranking = rankRemedies(
      sketchCase({
        prescription: typicalPrescription({ fovReadoutMm: 310 }),
        scanner: typicalScanner({ limits: { fovMaxMm: 310 } }),
      }),
    );
    expect(refusal(ranking, 'larger-fov-same-matrix')?.text).toContain('315 mm');
  });

  it('coil elements nobody described', () => {
    expect(refusal(rankRemedies(sketchCase()), 'coil-elements')?.code).toBe('coil-elements-unknown');
  });

  it('everything, when the patient is over the table limit', () => {
    const ranking = rankRemedies(sketchCase({ patient: typicalPatient({ weightKg: measured(260) }) }));
    expect(ranking.remedies).toEqual([]);
    expect(refusal(ranking, 'phase-oversampling')?.code).toBe('table-load-over-limit');
  });

  it('dropping end partitions that hold the area', () => {
    const prescription = prescriptionOf('echo-train-spin-echo-3d');
    expect(refusal(rankRemedies(sketchCase({ prescription })), 'drop-end-partitions')?.code).toBe(
      'area-leaves-picture',
    );
  });

  it('remedies that leave more fold outside than the site tolerates', () => {
    const ranking = rankRemedies(
      sketchCase({ policy: typicalPolicy({ marginMm: evenMargin(5), tolerateFoldOutsidePct: 0.1 }) }),
    );
    expect(refusal(ranking, 'phase-oversampling')?.code).toBe('fold-outside-over-tolerance');
    expect(ranking.remedies[0]!.assessment.fold!.displayedShare).toBeLessThanOrEqual(0.001);
  });
});

describe('recentring', () => {
  const ends = accelerated(2, { unfolding: 'image-domain-grid-ends' });

  it('is offered where the unfolding grid ends at the acquired width and the body is off-centre', () => {
    const given = sketchCase({
      prescription: typicalPrescription({ centreMm: [0, 10, 0], acceleration: ends }),
    });
    const ranking = rankRemedies(given);
    const moved = byKey(ranking, 'recentre+phase-oversampling')!;
    expect(moved.prescription.centreMm).toEqual([0, 0, 0]);
    expect(moved.prescription.acquiredLines).toBeLessThan(
      byKey(ranking, 'phase-oversampling')!.prescription.acquiredLines,
    );
    expect(moved.terms.find((term) => term.kind === 'effort')?.text).toContain('FOV centre to move');
  });

  it('lets a following area move only while what must stay displayed stays inside', () => {
    const prescription = typicalPrescription({ centreMm: [0, 30, 0] });
    const following = (yMm: readonly [number, number]) =>
      sketchCase({
        prescription,
        keepClear: {
          area: { kind: 'whole-picture' },
          followsWindow: true,
          mustStayDisplayed: { xMm: [-100, 100], yMm, zMm: [-50, 50] },
        },
      });
    const free = rankRemedies(following([-100, 100]));
    expect(byKey(free, 'recentre+phase-oversampling')?.prescription.centreMm[1]).toBe(0);
    // The window reaches 180 behind; anatomy to 175 there leaves 5 mm to move.
    const bound = rankRemedies(following([-100, 175]));
    expect(byKey(bound, 'recentre+phase-oversampling')?.prescription.centreMm[1]).toBe(25);
  });
});

describe('slab remedies', () => {
  const slabCase = (slices: Parameters<typeof slabOf>[0], changes: Partial<Case> = {}): Case =>
    sketchCase({
      prescription: prescriptionOf('gradient-echo-3d', {
        fovPhaseMm: 360,
        fovReadoutMm: 480,
        breathing: 'free',
        slices: slabOf({ partitions: 40, acquiredPartitions: 40, ...slices }),
      }),
      ...changes,
    });

  it('slice oversampling is the first whole partition that is enough', () => {
    const given = slabCase({});
    const remedy = byKey(rankRemedies(given), 'slice-oversampling')!;
    const { slices } = remedy.prescription;
    if (slices.mode !== 'slab') throw new Error('a slab stays one');
    expect(remedy.assessment.slab?.contaminatedInKeepClear).toBe(0);
    expect(slices.acquiredPartitions).toBe(rankRemedies(given).now.slab?.smallestCleanPartitions);
    const oneLess = {
      ...remedy.prescription,
      slices: { ...slices, acquiredPartitions: slices.acquiredPartitions - 1 },
    };
    expect(assess({ ...given, prescription: oneLess }).slab?.contaminatedInKeepClear).toBeGreaterThan(0);
  });

  it('a thicker slab keeps the area and its wrap apart', () => {
    const remedy = byKey(rankRemedies(slabCase({})), 'enlarge-slab')!;
    expect(remedy.assessment.slab?.contaminatedInKeepClear).toBe(0);
    expect(remedy.assessment.slab!.partitions.length).toBeGreaterThan(40);
    expect(remedy.sentence).toMatch(/^Take \d+ partitions instead of 40\.$/);
  });

  it('a sharper pulse lasts longer, and TR and TE with it', () => {
    const box = {
      ...LIVER_BOX,
      area: { kind: 'box', box: { xMm: [-190, 60], yMm: [-140, 95], zMm: [-50, 50] } },
    } as const;
    const remedy = byKey(
      rankRemedies(slabCase({ timeBandwidthProduct: 4, pulseDurationMs: 0.5 }, { keepClear: box })),
      'sharper-pulse',
    )!;
    const { slices, trMs, teMs } = remedy.prescription;
    if (slices.mode !== 'slab') throw new Error('a slab stays one');
    expect(slices.pulseDurationMs! / 0.5).toBeCloseTo(slices.timeBandwidthProduct! / 4, 9);
    expect(trMs - 4.2).toBeCloseTo(slices.pulseDurationMs! - 0.5, 9);
    expect(teMs - 1.9).toBeCloseTo((slices.pulseDurationMs! - 0.5) / 2, 9);
  });

  it('a pulse nobody described cannot be weighed', () => {
    const { timeBandwidthProduct: _, ...unknown } = slabOf({ partitions: 40, acquiredPartitions: 40 });
    const given = slabCase({});
    const ranking = rankRemedies({ ...given, prescription: { ...given.prescription, slices: unknown } });
    expect(refusal(ranking, 'sharper-pulse')?.code).toBe('pulse-unknown');
  });

  it('dropped end partitions cost their millimetres', () => {
    const whole = { area: { kind: 'whole-picture' }, followsWindow: false } as const;
    const remedy =
      byKey(rankRemedies(slabCase({}, { keepClear: whole })), 'drop-end-partitions+phase-oversampling') ??
      byKey(rankRemedies(slabCase({}, { keepClear: whole })), 'drop-end-partitions')!;
    const { slices } = remedy.prescription;
    if (slices.mode !== 'slab') throw new Error('a slab stays one');
    expect(remedy.terms.find((term) => term.kind === 'effort')?.text).toContain(
      `${2 * slices.droppedPartitionsPerEnd * 3.5} mm of coverage`,
    );
  });
});

describe('breath-holds', () => {
  const held = (
    family: 'gradient-echo' | 'gradient-echo-3d',
    seconds: number,
    changes: Partial<Case['prescription']> = {},
  ) =>
    sketchCase({
      patient: typicalPatient({ breathHoldS: measured(seconds) }),
      prescription: prescriptionOf(family, {
        acquiredLines: family === 'gradient-echo' ? 170 : 200,
        ...changes,
      }),
    });

  it('are paid for even where nothing folds', () => {
    const ranking = rankRemedies(held('gradient-echo', 10));
    expect(
      ranking.remedies.some((remedy) => remedy.changes.length === 0 && remedy.payback !== undefined),
    ).toBe(true);
  });

  it('are regrouped by a shorter TR and fewer slices a hold', () => {
    const given = held('gradient-echo', 10);
    const remedy = byKey(rankRemedies(given), 'regroup-breath-holds')!;
    expect(remedy.assessment.time!.longestHoldS).toBeLessThanOrEqual(10);
    expect(remedy.assessment.time!.breathHolds).toBe(2);
    expect(remedy.prescription.trMs).toBe(80);
    expect(remedy.terms.find((term) => term.kind === 'breath-hold')?.tenths).toBe(200);
  });

  it('cannot be divided in 3D', () => {
    expect(refusal(rankRemedies(held('gradient-echo-3d', 10)), 'regroup-breath-holds')?.code).toBe(
      'hold-not-divisible',
    );
  });

  it('beyond a strict limit are not possible', () => {
    const given = { ...held('gradient-echo-3d', 10), policy: typicalPolicy({ strictBreathHold: true }) };
    const ranking = rankRemedies(given);
    for (const remedy of ranking.remedies)
      expect(remedy.assessment.time!.longestHoldS).toBeLessThanOrEqual(10);
    expect(ranking.notPossible.some((entry) => entry.reason.code === 'breath-hold-over-limit')).toBe(true);
  });
});

describe('presaturation', () => {
  const given = sketchCase({ prescription: prescriptionOf('spin-echo', { slices: stackOf(20, 6) }) });

  it('lies over the side the fold comes from, outside the picture', () => {
    const remedy = byKey(rankRemedies(given), 'presaturation')!;
    const band = remedy.prescription.presaturation[0]!;
    expect(band).toMatchObject({ side: 'posterior', innerEdgeMm: 150, thicknessMm: 20 });
    expect(remedy.prescription.sliceTimeMs).toBeGreaterThan(given.prescription.sliceTimeMs);
    expect(remedy.sideEffects.join()).toContain('3 % stays at a true 90°');
  });

  // What a band leaves of fat at the site's true flip: 3, 20 and 36 % at 90, 80 and 70° (fat T1 300 ms, 10 ms later).
  it.each([
    [1, '3 % stays at a true 90°', 'fold-outside-keep-clear'],
    [80 / 90, '20 % stays at a true 80°', 'fold-in-keep-clear'],
    [70 / 90, '36 % stays at a true 70°', 'fold-in-keep-clear'],
    [undefined, '33 % stays at a true 72°, taken as this site has not measured it', 'fold-in-keep-clear'],
  ] as const)('at a true flip of %s of nominal %s', (presaturationB1Scale, words, verdict) => {
    const { presaturationB1Scale: _, ...unmeasured } = given.policy;
    const policy = { ...unmeasured, ...(presaturationB1Scale !== undefined && { presaturationB1Scale }) };
    const remedy = byKey(rankRemedies({ ...given, policy }), 'presaturation')!;
    expect(remedy.sideEffects.join()).toContain(words);
    expect(remedy.assessment.verdict).toBe(verdict);
    const said = assess({ ...given, policy, prescription: remedy.prescription }).assumptions;
    expect(said.some(({ field }) => field === 'policy.presaturationB1Scale')).toBe(
      presaturationB1Scale === undefined,
    );
  });

  it('follows the tolerance: dimmed to a fifth it counts no more where a quarter is tolerated', () => {
    const policy = typicalPolicy({ ...given.policy, presaturationB1Scale: 80 / 90, tissueTolerance: 0.25 });
    const remedy = byKey(rankRemedies({ ...given, policy }), 'presaturation')!;
    expect(remedy.assessment.verdict).toBe('fold-outside-keep-clear');
  });

  it('never counts as nothing: with no tolerance the dimmed tissue still folds', () => {
    const strict = { ...given, policy: typicalPolicy({ marginMm: evenMargin(5), tissueTolerance: 0.02 }) };
    const remedy = byKey(rankRemedies(strict), 'presaturation');
    expect(remedy?.assessment.verdict).toBe('fold-in-keep-clear');
    expect(rankRemedies(strict).remedies.findIndex((entry) => entry.key === 'presaturation')).toBeGreaterThan(
      0,
    );
  });

  it('has no place in a steady state that nothing may interrupt', () => {
    expect(
      refusal(rankRemedies(sketchCase({ prescription: prescriptionOf('balanced') })), 'presaturation')?.code,
    ).toBe('no-room-for-a-band');
  });
});

describe('coil elements', () => {
  const elements = [-200, -100, 0, 100, 200].map((middle, i) => ({
    name: `row ${i + 1}`,
    seesFromMm: middle - 100,
    seesToMm: middle + 100,
  }));
  const swapped = prescriptionOf('balanced', {
    phaseAxis: 'SI',
    fovPhaseMm: 300,
    fovReadoutMm: 500,
    linesAcrossFov: 168,
    acquiredLines: 168,
  });
  const keepClear = { area: { kind: 'whole-picture' }, followsWindow: false } as const;
  const given = sketchCase({
    prescription: swapped,
    keepClear,
    scanner: typicalScanner({ coils: [{ name: 'body array', elements }] }),
  });

  it('are left out where they see only what lies beyond the picture', () => {
    const ranking = rankRemedies(given);
    const remedy = byKey(ranking, 'coil-elements+phase-oversampling')!;
    expect(remedy.prescription.coilElements).toEqual(['row 2', 'row 3', 'row 4']);
    // Seen from −200 to 200 with 5 mm margin: W ≥ 205 + 150 = 355 mm; all elements: −250 to 250, W ≥ 405 mm.
    expect(remedy.assessment.width?.firstCleanMm).toBeCloseTo(355, 6);
    expect(ranking.now.width?.firstCleanMm).toBeCloseTo(405, 6);
    expect(remedy.terms.find((term) => term.kind === 'effort')?.text).toContain('coil elements to choose');
    expect(assess(adopted({ ...given, keepClear: LIVER_BOX }, remedy)).verdict).not.toBe(
      'fold-in-keep-clear',
    );
  });

  it('are refused by name when nobody knows them', () => {
    expect(() => assess({ ...given, prescription: { ...swapped, coilElements: ['row 9'] } })).toThrow(
      /row 9; allowed: row 1/,
    );
  });
});

describe('filters', () => {
  it('keep to the changes and paybacks asked for', () => {
    const ranking = rankRemedies(sketchCase(), {
      filters: { changes: ['swap', 'phase-oversampling'], paybacks: [] },
    });
    expect(ranking.remedies.length).toBeGreaterThan(0);
    for (const remedy of ranking.remedies) {
      expect(remedy.payback).toBeUndefined();
      expect(remedy.changes.every((kind) => kind === 'swap' || kind === 'phase-oversampling')).toBe(true);
    }
  });

  it('are not needed where nothing folds', () => {
    const clean = sketchCase({ prescription: typicalPrescription({ acquiredLines: 300 }) });
    expect(rankRemedies(clean)).toMatchObject({ remedies: [], notPossible: [], candidates: 0 });
  });
});

describe('five sequences of an abdomen', () => {
  it.each(ABDOMEN_PROTOCOL)('%s: cost grows with the weight of what it spends', (family) => {
    const given = sketchCase({ prescription: prescriptionOf(family) });
    const dear = {
      ...given,
      policy: {
        ...given.policy,
        weights: { ...given.policy.weights, timePct: 10, snrLostPct: 10, voxelPct: 10 },
      },
    };
    const costs = new Map(rankRemedies(given).remedies.map((remedy) => [remedy.key, remedy.costTenths]));
    for (const remedy of rankRemedies(dear).remedies)
      expect(remedy.costTenths).toBeGreaterThanOrEqual(costs.get(remedy.key) ?? 0);
  });
});
