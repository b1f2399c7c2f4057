import { describe, expect, it } from 'vitest';
import { assess, drawSection } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import type { Reading } from '@/lib/physics/model/patient';
import {
  accelerated,
  extentsOf,
  LIVER_BOX,
  measured,
  prescriptionOf,
  sketchCase,
  slabOf,
  typicalPatient,
  typicalPolicy,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';

const codes = (overrides: Partial<Case>): readonly string[] =>
  assess(sketchCase(overrides)).reasons.map(({ code }) => code);

/** What stops a scan, just at its limit and just beyond it (scanner maxima of tests/support/physics-cases.ts). */
const LIMITS: readonly (readonly [
  code: string,
  of: (value: number) => Partial<Case>,
  at: number,
  beyond: number,
])[] = [
  ['table-load-over-limit', (kg) => ({ patient: typicalPatient({ weightKg: measured(kg) }) }), 220, 220.01],
  ['fov-over-maximum', (mm) => ({ prescription: typicalPrescription({ fovReadoutMm: mm }) }), 520, 520.01],
  ['fov-under-minimum', (mm) => ({ prescription: typicalPrescription({ fovPhaseMm: mm }) }), 100, 99.99],
  [
    'phase-fov-over-readout-fov',
    (mm) => ({ prescription: typicalPrescription({ fovReadoutMm: mm }) }),
    300,
    299.99,
  ],
  ['matrix-over-maximum', (n) => ({ prescription: typicalPrescription({ readoutMatrix: n }) }), 1024, 1025],
  [
    'matrix-over-maximum',
    (n) => ({ prescription: typicalPrescription({ linesAcrossFov: n, acquiredLines: n }) }),
    1024,
    1025,
  ],
  [
    'lines-over-maximum',
    (n) => ({ prescription: typicalPrescription({ linesAcrossFov: 600, acquiredLines: n }) }),
    1024,
    1025,
  ],
  [
    'phase-oversampling-over-maximum',
    (n) => ({ prescription: typicalPrescription({ acquiredLines: n }) }),
    480,
    481,
  ],
  [
    'slice-oversampling-over-maximum',
    (n) => ({
      prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf({ acquiredPartitions: n }) }),
    }),
    128,
    129,
  ],
  [
    'acceleration-over-maximum',
    (r) => ({ prescription: typicalPrescription({ acceleration: accelerated(r) }) }),
    4,
    4.01,
  ],
  [
    'acceleration-over-maximum',
    (r) => ({
      prescription: prescriptionOf('gradient-echo-3d', {
        acceleration: accelerated(2, { factorSlice: r, referencePartitions: 24 }),
      }),
    }),
    3,
    3.01,
  ],
  [
    'partial-fourier-under-minimum',
    (f) => ({ prescription: typicalPrescription({ partialFourierPhase: f }) }),
    0.625,
    0.6249,
  ],
  [
    'partial-fourier-under-minimum',
    (f) => ({ prescription: prescriptionOf('gradient-echo-3d', { partialFourierSlice: f }) }),
    0.625,
    0.6249,
  ],
  ['averages-over-maximum', (n) => ({ prescription: typicalPrescription({ averages: n }) }), 16, 17],
  ['train-over-maximum', (n) => ({ prescription: typicalPrescription({ echoTrainLength: n }) }), 400, 401],
  // One slice's time at 130 ms, thirty slices.
  ['tr-under-minimum', (ms) => ({ prescription: prescriptionOf('echo-planar', { trMs: ms }) }), 3600, 3599.9],
  [
    'te-under-minimum',
    (ms) => ({ prescription: prescriptionOf('single-shot-echo-train', { teMs: ms }) }),
    52.5,
    52.49,
  ],
  [
    'lines-off-grid',
    (n) => ({
      scanner: typicalScanner({ lineStep: { kind: 'even-lines' } }),
      prescription: typicalPrescription({ acquiredLines: n }),
    }),
    254,
    253,
  ],
];

describe('hard limits hold at the limit and stop beyond it', () => {
  it.each(LIMITS.map(([code, of, at, beyond]) => ({ code, of, at, beyond })))(
    '$code at $at, not at $beyond',
    ({ code, of, at, beyond }) => {
      expect(codes(of(at))).not.toContain(code);
      expect(codes(of(beyond))).toContain(code);
    },
  );

  it('counts a single shot’s echoes as its acquired views, an EPI train’s by its shots', () => {
    const single = (echoTrainMax: number) =>
      codes({
        scanner: typicalScanner({ limits: { echoTrainMax } }),
        prescription: prescriptionOf('single-shot-echo-train'),
      });
    const { acquiredViews } = assess(
      sketchCase({ prescription: prescriptionOf('single-shot-echo-train') }),
    ).time!;
    expect(single(acquiredViews)).not.toContain('train-over-maximum');
    expect(single(acquiredViews - 1)).toContain('train-over-maximum');
    const planar = (shots: number, echoTrainMax: number) =>
      codes({
        scanner: typicalScanner({ limits: { echoTrainMax } }),
        prescription: prescriptionOf('echo-planar', { shots, teMs: 200, trMs: 9000 }),
      });
    // 96 lines at R 2: 48 views; three shots play 16 each, five 10 at most.
    for (const [shots, echoes] of [
      [1, 48],
      [3, 16],
      [5, 10],
    ] as const) {
      expect(planar(shots, echoes)).not.toContain('train-over-maximum');
      expect(planar(shots, echoes - 1)).toContain('train-over-maximum');
    }
    // A family without a train has none to be too long.
    expect(
      codes({
        scanner: typicalScanner({ limits: { echoTrainMax: 1 } }),
        prescription: prescriptionOf('gradient-echo'),
      }),
    ).not.toContain('train-over-maximum');
  });

  it('a strict breath-hold stops what is longer than the patient can hold, a lenient one does not', () => {
    const prescription = prescriptionOf('gradient-echo-3d');
    const holdS = assess(sketchCase({ prescription })).time!.longestHoldS;
    const at = (limitS: number, strictBreathHold: boolean) =>
      codes({
        prescription,
        patient: typicalPatient({ breathHoldS: measured(limitS) }),
        policy: typicalPolicy({ strictBreathHold }),
      });
    expect(at(holdS, true)).not.toContain('breath-hold-over-limit');
    expect(at(holdS - 0.01, true)).toContain('breath-hold-over-limit');
    expect(at(holdS - 0.01, false)).not.toContain('breath-hold-over-limit');
  });

  it('asks no minimum TR of a triggered sequence', () => {
    expect(
      codes({ prescription: prescriptionOf('echo-planar', { trMs: 3000, breathing: 'triggered' }) }),
    ).not.toContain('tr-under-minimum');
  });
});

describe('what stood in for something unknown', () => {
  const fields = (overrides: Partial<Case>) =>
    assess(sketchCase(overrides)).assumptions.map(({ field }) => field);
  const from = (source: Reading['source'], value = 170, spread = 0): Reading => ({ value, source, spread });
  const sized = (anterior: Reading) => typicalPatient({ extents: { ...extentsOf({}), anterior } });

  it.each(['girth-and-depth', 'girth', 'weight-and-height', 'population', 'policy-default'] as const)(
    'a size from %s is named',
    (source) => {
      const found = assess(sketchCase({ patient: sized(from(source)) })).assumptions.find(
        ({ field }) => field === 'patient.extents',
      );
      expect(found).toMatchObject({ used: source, text: expect.stringContaining('anterior') as string });
    },
  );
  it.each(['measured', 'localiser', 'reported'] as const)('a size that is %s is not', (source) => {
    expect(fields({ patient: sized(from(source)) })).not.toContain('patient.extents');
  });
  it('certainty is named where a size has a spread and more than half is asked for', () => {
    expect(
      fields({ patient: sized(from('measured', 170, 4)), policy: typicalPolicy({ sureAt: 0.9 }) }),
    ).toContain('policy.sureAt');
    expect(
      fields({ patient: sized(from('measured', 170, 4)), policy: typicalPolicy({ sureAt: 0.5 }) }),
    ).not.toContain('policy.sureAt');
    expect(fields({ patient: sized(from('measured')) })).not.toContain('policy.sureAt');
  });
  it('breath-hold and breath period only where they are used', () => {
    const patient = typicalPatient({
      breathHoldS: from('policy-default', 15),
      breathPeriodS: from('policy-default', 4),
    });
    expect(fields({ patient, prescription: prescriptionOf('gradient-echo') })).toContain(
      'patient.breathHoldS',
    );
    expect(fields({ patient, prescription: prescriptionOf('gradient-echo') })).not.toContain(
      'patient.breathPeriodS',
    );
    expect(fields({ patient, prescription: prescriptionOf('echo-train-spin-echo') })).toContain(
      'patient.breathPeriodS',
    );
    expect(fields({ patient, prescription: prescriptionOf('spin-echo') })).not.toContain(
      'patient.breathHoldS',
    );
  });
  it('unknown weight, and the coil always', () => {
    expect(fields({ patient: typicalPatient({ weightKg: undefined }) })).toContain('patient.weightKg');
    expect(fields({})).not.toContain('patient.weightKg');
    expect(fields({})).toContain('prescription.coil');
  });
  it('unknown unfolding, with what knowing it would change', () => {
    const acceleration = accelerated(2, { unfolding: 'unknown' });
    const answer = (
      values: Parameters<typeof typicalPrescription>[0],
      scanner = typicalScanner({ unfolding: 'unknown' }),
    ) =>
      assess(
        sketchCase({ scanner, prescription: typicalPrescription({ acceleration, ...values }) }),
      ).assumptions.find(({ field }) => field === 'prescription.acceleration.unfolding');
    expect(answer({})!.text).toMatch(/asks for \d+ mm; unfolding in k-space would need \d+ mm/);
    expect(answer({ fovPhaseMm: 460 })!.text).toContain('change nothing');
    expect(answer({ acceleration: accelerated(1, { unfolding: 'unknown' }) })).toBeUndefined();
    expect(answer({}, typicalScanner({ unfolding: 'k-space-self-calibrating' }))).toBeUndefined();
    const slab = prescriptionOf('gradient-echo-3d', {
      acceleration: accelerated(1, { factorSlice: 2, referencePartitions: 24, unfolding: 'unknown' }),
    });
    expect(answer(slab)).toBeDefined();
  });
  it('a slab pulse whose sharpness or duration is unknown, if there is one', () => {
    const slab = (values: Parameters<typeof slabOf>[0]) =>
      fields({ prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf(values) }) });
    expect(slab({ timeBandwidthProduct: undefined })).toContain('prescription.slices.timeBandwidthProduct');
    expect(slab({ pulseDurationMs: undefined })).toContain('prescription.slices.pulseDurationMs');
    expect(slab({})).not.toContain('prescription.slices.timeBandwidthProduct');
    expect(slab({ selective: false, timeBandwidthProduct: undefined })).not.toContain(
      'prescription.slices.timeBandwidthProduct',
    );
    expect(fields({})).not.toContain('prescription.slices.pulseDurationMs');
  });
});

describe('sentences beside the verdict', () => {
  const texts = (overrides: Partial<Case>) =>
    assess(sketchCase(overrides))
      .reasons.map(({ text }) => text)
      .join(' ');
  const lines = (acquiredLines: number) => typicalPrescription({ acquiredLines });

  it('say how deep the fold reaches, and where only the margin does', () => {
    // Body to 170 mm, liver box to −140 and 95, margin 5: enough is 315 mm, 252 lines.
    expect(texts({ prescription: lines(251) })).toMatch(
      /only within the margin, 1(\.\d+)? mm deep with margin/,
    );
    expect(texts({ prescription: lines(240) })).toMatch(
      /lands on the (anterior|posterior) side, \d+ mm deep with margin/,
    );
    expect(texts({ prescription: lines(240) })).toContain('oversampling is enough (315 mm acquired)');
  });
  it('say how much more than needed is acquired, from one millimetre on', () => {
    const whole = (acquiredLines: number) =>
      texts({
        prescription: lines(acquiredLines),
        patient: typicalPatient({ extents: extentsOf({ anterior: 140, posterior: 140 }) }),
      });
    const needed = assess(
      sketchCase({
        prescription: lines(240),
        patient: typicalPatient({ extents: extentsOf({ anterior: 140, posterior: 140 }) }),
      }),
    ).width!;
    expect(needed.alwaysCleanMm).toBe(300);
    expect(whole(240)).not.toContain('more than needed');
    expect(whole(241)).toContain(', 1 mm more than needed');
    expect(whole(250)).toContain(', 12 mm more than needed');
  });
  it('tell one contaminated partition from many, inside and outside', () => {
    const slab = (acquiredPartitions: number) =>
      texts({
        keepClear: LIVER_BOX,
        prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf({ acquiredPartitions }) }),
      });
    const answer = assess(sketchCase({ prescription: prescriptionOf('gradient-echo-3d') })).slab!;
    expect(slab(64)).toContain(
      answer.contaminatedInKeepClear > 0
        ? `${answer.contaminatedInKeepClear} of 64 partitions in the keep-clear area`
        : `${answer.contaminated} of 64 partitions outside the keep-clear area`,
    );
  });
});

describe('the section as drawn', () => {
  it('shows what a slab’s own profile lets in from its other end', () => {
    const given = sketchCase({ prescription: prescriptionOf('gradient-echo-3d') });
    // The outermost of 64 partitions of 3.5 mm; with an ideal slab nothing would come from beyond the other end.
    const drawn = drawSection(given, { sliceOffsetMm: 31.5 * 3.5 });
    expect(drawn.pieces.some(({ sliceOrder }) => sliceOrder !== 0)).toBe(true);
    const ideal = drawSection(given, {
      sliceOffsetMm: 31.5 * 3.5,
      slabWeight: (mm) => (Math.abs(mm) < 112 ? 1 : 0),
    });
    expect(ideal.pieces.some(({ sliceOrder }) => sliceOrder !== 0)).toBe(false);
  });
});
