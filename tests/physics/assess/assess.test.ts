import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { assess, ENGINE_VERSION, roundAssessment } from '@/lib/physics';
import { DomainError } from '@/lib/physics/model/domain-error';
import type { Trajectory } from '@/lib/physics/model/prescription';
import {
  accelerated,
  evenMargin,
  LIVER_BOX,
  measured,
  NO_MARGIN,
  prescriptionOf,
  SEQUENCE_FAMILIES,
  sketchCase,
  slabOf,
  typicalCase,
  typicalPatient,
  typicalPolicy,
  typicalPrescription,
  typicalScanner,
  workedCase,
} from '@/tests/support/physics-cases';
import { runsOf } from '@/tests/support/tally';

const SEED = 20261201;

describe('every family', () => {
  it.each(SEQUENCE_FAMILIES)('answers %s with time, detail, fold and the engine’s version', (family) => {
    const answer = assess(sketchCase({ prescription: prescriptionOf(family) }));
    expect(answer.engineVersion).toBe(ENGINE_VERSION);
    expect(answer.verdict).toBe('fold-in-keep-clear');
    expect(answer.time?.scanS).toBeGreaterThan(0);
    expect(answer.detail?.snr).toBeGreaterThan(0);
    // Where tissue wraps along the slab onto the keep-clear area, no phase oversampling is enough by itself.
    const alongSlab = (answer.slab?.contaminatedInKeepClear ?? 0) > 0;
    if (alongSlab) expect(answer.width?.firstCleanLines).toBeUndefined();
    else expect(answer.width?.firstCleanLines).toBeGreaterThan(answer.sampling!.acquiredLines);
    expect(answer.slab === undefined).toBe(!family.endsWith('-3d'));
  });

  it('takes its five arguments one by one as well', () => {
    const given = sketchCase();
    const { patient, prescription, keepClear, scanner, policy } = given;
    expect(assess(patient, prescription, keepClear, scanner, policy)).toEqual(assess(given));
  });

  it.each(['axial', 'coronal', 'sagittal'] as const)(
    'answers the %s plane with both phase directions',
    (plane) => {
      const axes = { axial: ['RL', 'AP'], coronal: ['RL', 'SI'], sagittal: ['AP', 'SI'] } as const;
      for (const phaseAxis of axes[plane]) {
        const answer = assess(
          typicalCase({ prescription: typicalPrescription({ plane, phaseAxis, fovReadoutMm: 400 }) }),
        );
        expect(answer.phaseAxis).toBe(phaseAxis);
        expect(answer.readoutAxis).toBe(axes[plane].find((axis) => axis !== phaseAxis));
      }
    },
  );
});

describe('not modelled', () => {
  const trajectories: Trajectory[] = [
    'radial',
    'spiral',
    'rotating-blade',
    'simultaneous-multi-slice',
    'outer-volume-suppressed',
  ];
  it.each(trajectories)('says so for %s, with a reason and without a fold result', (trajectory) => {
    const answer = assess(sketchCase({ prescription: typicalPrescription({ trajectory }) }));
    expect(answer.verdict).toBe('not-modelled');
    expect(answer.fold).toBeUndefined();
    expect(answer.reasons[0]?.code).toBe(`trajectory-${trajectory}`);
  });
});

describe('hard limits, each with its reason and number', () => {
  const limits = [
    ['table-load-over-limit', { patient: typicalPatient({ weightKg: measured(240) }) }, '240 kg'],
    ['fov-over-maximum', { prescription: typicalPrescription({ fovReadoutMm: 540 }) }, '540 mm'],
    ['fov-under-minimum', { prescription: typicalPrescription({ fovPhaseMm: 80 }) }, '80 mm'],
    ['phase-fov-over-readout-fov', { prescription: typicalPrescription({ fovReadoutMm: 280 }) }, '280 mm'],
    ['matrix-over-maximum', { prescription: typicalPrescription({ readoutMatrix: 1100 }) }, '1100'],
    [
      'lines-over-maximum',
      { prescription: typicalPrescription({ linesAcrossFov: 600, acquiredLines: 1100 }) },
      '1100',
    ],
    [
      'phase-oversampling-over-maximum',
      { prescription: typicalPrescription({ acquiredLines: 481 }) },
      '100.4 %',
    ],
    [
      'slice-oversampling-over-maximum',
      { prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf({ acquiredPartitions: 129 }) }) },
      '101.6 %',
    ],
    [
      'acceleration-over-maximum',
      { prescription: typicalPrescription({ acceleration: accelerated(5) }) },
      '5',
    ],
    [
      'partial-fourier-under-minimum',
      { prescription: typicalPrescription({ partialFourierPhase: 0.55 }) },
      '0.550',
    ],
    ['averages-over-maximum', { prescription: typicalPrescription({ averages: 17 }) }, '17'],
    ['train-over-maximum', { prescription: typicalPrescription({ echoTrainLength: 500 }) }, '500'],
    ['tr-under-minimum', { prescription: prescriptionOf('echo-planar', { trMs: 3000 }) }, '3600 ms'],
    ['te-under-minimum', { prescription: prescriptionOf('single-shot-echo-train', { teMs: 20 }) }, '52.5 ms'],
    [
      'lines-off-grid',
      {
        scanner: typicalScanner({ lineStep: { kind: 'even-lines' } }),
        prescription: typicalPrescription({ acquiredLines: 253 }),
      },
      '253',
    ],
    [
      'breath-hold-over-limit',
      { prescription: prescriptionOf('gradient-echo-3d'), policy: typicalPolicy({ strictBreathHold: true }) },
      '21.5 s',
    ],
    ['slice-does-not-fit', { prescription: typicalPrescription({ trMs: 100 }) }, '0'],
    [
      'reference-lines-too-many',
      {
        prescription: typicalPrescription({
          partialFourierPhase: 0.625,
          acceleration: accelerated(2, { referenceLines: 80 }),
        }),
      },
      '80',
    ],
  ] as const;

  it.each(limits)('%s', (code, changes, number) => {
    const answer = assess(sketchCase(changes));
    expect(answer.verdict).toBe('cannot-be-scanned');
    const reason = answer.reasons.find((entry) => entry.code === code);
    expect(reason?.text).toContain(number);
  });

  it('stops nothing at the limits themselves', () => {
    const answer = assess(
      sketchCase({
        patient: typicalPatient({ weightKg: measured(220) }),
        prescription: typicalPrescription({ fovReadoutMm: 520, acquiredLines: 480, averages: 16 }),
      }),
    );
    expect(answer.verdict).not.toBe('cannot-be-scanned');
  });

  it('counts the table first: nothing overrides it', () => {
    const answer = assess(
      sketchCase({
        patient: typicalPatient({ weightKg: measured(240) }),
        prescription: typicalPrescription({ averages: 17 }),
      }),
    );
    expect(answer.reasons.slice(0, 2).map((reason) => reason.code)).toEqual([
      'table-load-over-limit',
      'averages-over-maximum',
    ]);
  });
});

describe('bad input', () => {
  const refusals = [
    ['prescription.fovPhaseMm', { prescription: typicalPrescription({ fovPhaseMm: Number.NaN }) }],
    ['prescription.acquiredLines', { prescription: typicalPrescription({ acquiredLines: 239 }) }],
    ['prescription.averages', { prescription: typicalPrescription({ averages: 1.5 }) }],
    ['prescription.phaseAxis', { prescription: typicalPrescription({ phaseAxis: 'SI' }) }],
    ['prescription.slices.mode', { prescription: typicalPrescription({ slices: slabOf() }) }],
    [
      'patient.extents.left.value',
      { patient: typicalPatient({ extents: { ...typicalPatient().extents, left: measured(-1) } }) },
    ],
    ['policy.sureAt', { policy: typicalPolicy({ sureAt: 0.2 }) }],
    ['scanner.partitionStep', { scanner: typicalScanner({ partitionStep: 0 }) }],
    [
      'keepClear.area.box.xMm',
      {
        keepClear: { ...LIVER_BOX, area: { kind: 'box', box: { xMm: [10, -10], yMm: [0, 1], zMm: [0, 1] } } },
      },
    ],
  ] as const;

  it.each(refusals)('names %s, what was given and what is allowed', (argument, changes) => {
    let thrown: unknown;
    try {
      assess(sketchCase(changes as Parameters<typeof sketchCase>[0]));
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(DomainError);
    expect((thrown as DomainError).argument).toBe(argument);
    expect((thrown as DomainError).allowed).not.toBe('');
  });
});

describe('assumptions', () => {
  it('says what unknown unfolding was taken for and what would change', () => {
    const prescription = typicalPrescription({ acceleration: accelerated(2, { unfolding: 'unknown' }) });
    const given = sketchCase({ prescription, scanner: typicalScanner({ unfolding: 'unknown' }) });
    const assumption = assess(given).assumptions.find((entry) => entry.field.endsWith('unfolding'));
    expect(assumption?.used).toBe('image-domain-grid-ends');
    expect(assumption?.text).toContain('unfolding in k-space would need 315 mm');
    const known = assess({ ...given, scanner: typicalScanner({ unfolding: 'k-space-self-calibrating' }) });
    expect(known.assumptions.some((entry) => entry.field.endsWith('unfolding'))).toBe(false);
    expect(known.width?.firstCleanMm).toBeCloseTo(315, 6);
  });

  it('names the cautious slab pulse, the policy’s breath-hold and an unknown weight', () => {
    const { weightKg: _, ...patient } = typicalPatient({
      breathHoldS: { value: 15, source: 'policy-default', spread: 0 },
    });
    const slices = slabOf();
    const { timeBandwidthProduct: __, pulseDurationMs: ___, ...unknownPulse } = slices;
    const fields = assess(
      sketchCase({ patient, prescription: prescriptionOf('gradient-echo-3d', { slices: unknownPulse }) }),
    ).assumptions.map((entry) => entry.field);
    expect(fields).toEqual(
      expect.arrayContaining([
        'patient.weightKg',
        'patient.breathHoldS',
        'prescription.slices.timeBandwidthProduct',
        'prescription.slices.pulseDurationMs',
      ]),
    );
  });
});

describe('in both directions at once', () => {
  // Trunk |y| < 150, |z| < 100; arm y 200–260, z 150–250; W_y 360, W_z 300: the arm moved by (−360, −300) lands at
  // y −160…−100, z −150…−50, inside the trunk's place, while neither move alone brings it into |y| < 150, |z| < 100.
  const boxPart = (name: string, y: readonly [number, number], z: readonly [number, number]) => ({
    name,
    kind: 'other' as const,
    signalWeight: 1,
    estimated: false,
    shape: {
      type: 'outline-prism' as const,
      along: 'x' as const,
      rings: [
        [
          [y[0], z[0]],
          [y[1], z[0]],
          [y[1], z[1]],
          [y[0], z[1]],
        ] as [number, number][],
      ],
    },
  });
  const caseAt = (acquiredLines: number, acquiredPartitions: number) =>
    typicalCase({
      patient: typicalPatient({
        parts: [boxPart('trunk', [-150, 150], [-100, 100]), boxPart('arm', [200, 260], [150, 250])],
      }),
      prescription: prescriptionOf('gradient-echo-3d', {
        fovPhaseMm: 300,
        linesAcrossFov: 300,
        acquiredLines,
        acceleration: accelerated(1),
        slices: slabOf({ selective: false, partitions: 200, partitionThicknessMm: 1, acquiredPartitions }),
      }),
      keepClear: {
        area: { kind: 'box', box: { xMm: [-100, 100], yMm: [-150, 150], zMm: [-100, 100] } },
        followsWindow: false,
      },
      policy: typicalPolicy({ marginMm: NO_MARGIN }),
      scanner: typicalScanner({ tissueReachMm: 260 }),
    });

  it('finds the diagonal fold that neither direction has alone', () => {
    expect(assess(caseAt(360, 300)).fold?.inKeepClear).toBe(true);
    // Wide in either direction, nothing is left: 410 lines carry the arm past the trunk, 350 partitions likewise.
    expect(assess(caseAt(410, 300)).fold?.inKeepClear).toBe(false);
    expect(assess(caseAt(360, 350)).fold?.inKeepClear).toBe(false);
  });
});

describe('monotone', () => {
  const order = {
    'no-fold-expected': 0,
    'fold-outside-keep-clear': 1,
    'fold-in-keep-clear': 2,
    'cannot-be-scanned': 3,
    'not-modelled': 4,
  };
  it('a larger margin never turns fold in the keep-clear area into none', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 240, max: 300 }),
        fc.integer({ min: 0, max: 30 }),
        fc.integer({ min: 0, max: 30 }),
        (acquiredLines, margin, more) => {
          const at = (mm: number) =>
            assess(
              sketchCase({
                prescription: typicalPrescription({ acquiredLines }),
                policy: typicalPolicy({ marginMm: evenMargin(mm) }),
              }),
            );
          const small = at(margin);
          const large = at(margin + more);
          expect(order[large.verdict]).toBeGreaterThanOrEqual(order[small.verdict]);
          expect(large.width!.alwaysCleanMm).toBeGreaterThanOrEqual(small.width!.alwaysCleanMm);
        },
      ),
      { seed: SEED, numRuns: runsOf(200) },
    );
  });

  it('a higher certainty never asks for less', () => {
    const extents = Object.fromEntries(
      Object.entries(typicalPatient().extents).map(([side, reading]) => [side, { ...reading, spread: 8 }]),
    ) as unknown as ReturnType<typeof typicalPatient>['extents'];
    const at = (sureAt: number) =>
      assess(
        sketchCase({
          patient: typicalPatient({ extents }),
          policy: typicalPolicy({ sureAt, marginMm: evenMargin(5) }),
        }),
      );
    const widths = [0.5, 0.7, 0.9, 0.95, 0.99].map((sureAt) => at(sureAt).width!.alwaysCleanMm);
    expect(widths).toEqual([...widths].sort((a, b) => a - b));
    expect(widths[0]).toBeCloseTo(315, 6);
    // One-sided: 1.6449 spreads of 8 mm more behind the patient.
    expect(widths[3]).toBeCloseTo(315 + 1.6449 * 8, 3);
  });
});

describe('rounding for parity', () => {
  it('rounds to stated quanta, keeps shape and words, and has no negative zero', () => {
    const rounded = roundAssessment({
      depthMm: 1.23456,
      displayedShare: 0.12345678,
      snr: 1234.56789,
      scanS: -0.0001,
      text: 'x',
      list: [0.1, Infinity],
    });
    expect(rounded).toEqual({
      depthMm: 1.235,
      displayedShare: 0.123457,
      snr: 1234.57,
      scanS: 0,
      text: 'x',
      list: [0.1, Infinity],
    });
    expect(Object.is(rounded.scanS, 0)).toBe(true);
  });

  it('changes nothing the second time', () => {
    const once = roundAssessment(assess(workedCase()));
    expect(roundAssessment(once)).toEqual(once);
  });
});
