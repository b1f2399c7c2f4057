import { describe, expect, expectTypeOf, it } from 'vitest';
import * as z from 'zod';
import type { Case } from '@/lib/domain/case/model';
import { assess } from '@/lib/physics';
import { caseInput, CaseInputError, type caseSchema, parseCase, toCase, type CaseInput } from '@/lib/schemas/case';
import { typicalCase } from '@/tests/support/physics-cases';

/** The least that makes a case. */
const LEAST = { patient: { breadthMm: 480, depthMm: 340 }, prescription: { fovReadoutMm: 480 } } satisfies CaseInput;

function refusals(json: unknown): Record<string, string> {
  try {
    parseCase(json);
  } catch (error) {
    if (!(error instanceof CaseInputError)) throw error;
    return Object.fromEntries(error.issues.map(({ path, message }) => [path, message]));
  }
  return {};
}

describe('the worked case through the check’s JSON', () => {
  const worked = (prescription: Partial<CaseInput['prescription']> = {}, scanner: CaseInput['scanner'] = {}): CaseInput => ({
    patient: { breadthMm: 480, depthMm: 340, arms: { position: 'up' } },
    prescription: { phaseAxis: 'AP', fovPhaseMm: 300, fovReadoutMm: 480, linesAcrossFov: 256, ...prescription },
    policy: { marginMm: 0 },
    scanner,
  });
  const accelerated = { acceleration: { factorPhase: 2, unfolding: 'image-domain-grid-ends' } } as const;

  it('asks 274 lines on a one-line grid; the law says 6.67 %, the grid gives 7.03 %', () => {
    const { width } = assess(toCase(worked()));
    expect(width!.firstCleanLines).toBe(274);
    expect(width!.firstCleanMm / 300 - 1).toBeCloseTo(1 / 15, 9);
    expect(274 / 256 - 1).toBeCloseTo(0.0703, 4);
  });
  it('would take 291 lines to cover the body', () => expect(assess(toCase(worked())).width!.coverBodyLines).toBe(291));
  it('asks 291 lines when the unfolding grid ends at the acquired width, 292 on an even-line grid', () => {
    expect(assess(toCase(worked(accelerated))).width!.firstCleanLines).toBe(291);
    expect(assess(toCase(worked(accelerated, { lineStep: { kind: 'even-lines' } }))).width!.firstCleanLines).toBe(292);
  });
});

describe('a case written down', () => {
  it('takes a case in the engine’s own form as it is, and its own answer again', () => {
    const own = typicalCase();
    expect(parseCase(own)).toEqual(own);
    const completed = toCase(LEAST);
    expect(parseCase(JSON.parse(JSON.stringify(completed)))).toEqual(completed);
    expectTypeOf<z.output<typeof caseSchema>>().toExtend<Case>();
  });

  it('fills in what is left out, cautiously: arms at the side, whole picture, one-line grid, standard policy', () => {
    const { patient, keepClear, scanner, policy, prescription } = toCase(LEAST);
    expect(patient.arms.position).toBe('down');
    expect(patient.breathHoldS.source).toBe('policy-default');
    expect(keepClear.area.kind).toBe('whole-picture');
    expect(scanner.lineStep.kind).toBe('line');
    expect(policy.marginMm.anterior).toBe(10);
    expect(prescription).toMatchObject({ phaseAxis: 'AP', fovPhaseMm: 480, linesAcrossFov: 256, acquiredLines: 256 });
  });

  it('reads FOV and lines as Percent Phase Field of View and Percent Sampling alike', () => {
    const byPercent = toCase({ ...LEAST, prescription: { fovReadoutMm: 480, readoutMatrix: 320, percentPhaseFieldOfView: 62.5, percentSampling: 80 } });
    const byLines = toCase({ ...LEAST, prescription: { fovReadoutMm: 480, readoutMatrix: 320, fovPhaseMm: 300, linesAcrossFov: 160 } });
    expect(byPercent).toEqual(byLines);
  });

  it.each([
    [{ kind: 'line' }, 270], [{ kind: 'even-lines' }, 270], [{ kind: 'percent', percent: 10 }, 282], [{ kind: 'doubling' }, 512],
  ] as const)('rounds 5.1 %% of 256 lines up to the scanner’s step %o', (lineStep, lines) => {
    const asked = toCase({ ...LEAST, prescription: { fovReadoutMm: 480, phaseOversamplingPct: 5.1 }, scanner: { lineStep } });
    expect(asked.prescription.acquiredLines).toBe(lines);
  });

  it('reads a keep-clear box by its sides or by ranges, and ends what is left out with the picture', () => {
    const prescription = { fovReadoutMm: 480, fovPhaseMm: 300 };
    const bySides = toCase({ ...LEAST, prescription, keepClear: { area: { kind: 'box', box: { right: 190, left: 60, anterior: 140 } } } });
    const byRanges = toCase({ ...LEAST, prescription, keepClear: { area: { kind: 'box', box: { xMm: [-190, 60], yMm: [-140, 150] } } } });
    expect(bySides).toEqual(byRanges);
    expect(bySides.keepClear.area).toMatchObject({ box: { yMm: [-140, 150], zMm: [-2.5, 2.5] } });
  });

  it('takes the extents of a body given as parts from the parts', () => {
    const { patient } = toCase({
      patient: { parts: [{ name: 'a', shape: { type: 'elliptic-cylinder', along: 'z', centreMm: [30, 0, 0], semiAxesMm: [100, 60], rotationDeg: 90 } }] },
      prescription: { fovReadoutMm: 300 },
    });
    expect(patient.extents.left.value).toBeCloseTo(90, 9);
    expect(patient.extents.right.value).toBeCloseTo(30, 9);
    expect(patient.extents.anterior.value).toBeCloseTo(100, 9);
  });
});

describe('a case that cannot be taken', () => {
  it('names every unknown key and what is known', () => {
    const { patient, prescription } = refusals({
      patient: { ...LEAST.patient, name: 'x' }, prescription: { ...LEAST.prescription, fov: 300, turbo: 3 },
    });
    expect(patient).toMatch(/^not known here: name; allowed: region, extents, /);
    expect(prescription).toMatch(/^not known here: fov, turbo; allowed: /);
  });

  it('says for each field what was given and what is allowed', () => {
    expect(
      refusals({
        patient: { breadthMm: '480', depthMm: 34000, arms: { position: 'folded' } },
        prescription: { fovReadoutMm: 480, averages: 1.5, slices: { mode: 'slab', partitions: 1, partitionThicknessMm: 3 } },
      }),
    ).toEqual({
      'patient.breadthMm': '“480” given; allowed: a number, 1 to 2000 mm',
      'patient.depthMm': '34000 given; allowed: a number, 1 to 2000 mm',
      'patient.arms.position': '“folded” given; allowed: one of down, up, cannot-be-raised',
      'prescription.averages': '1.5 given; allowed: a whole number, 1 to 256',
      'prescription.slices.partitions': '1 given; allowed: a whole number, 2 to 1024 partitions',
    });
  });

  it.each([
    ['fovPhaseMm', { fovPhaseMm: 300, percentPhaseFieldOfView: 60 }],
    ['linesAcrossFov', { linesAcrossFov: 200, percentSampling: 60 }],
    ['acquiredLines', { acquiredLines: 300, phaseOversamplingPct: 10 }],
  ])('refuses two ways of saying %s at once', (field, both) => {
    expect(refusals({ ...LEAST, prescription: { fovReadoutMm: 480, ...both } })).toHaveProperty([`prescription.${field}`]);
  });

  it('asks for a size when there is none, and for the spread of an estimate', () => {
    expect(refusals({ patient: {}, prescription: LEAST.prescription })).toHaveProperty(['patient.extents.right']);
    expect(
      refusals({ ...LEAST, patient: { ...LEAST.patient, breathHoldS: { value: 12, source: 'reported' } } }),
    ).toEqual({ 'patient.breathHoldS.spread': 'left out for a value that is reported; allowed: one standard deviation in s' });
  });

  it.each([
    ['prescription.phaseAxis', { prescription: { fovReadoutMm: 480, phaseAxis: 'SI' } }],
    ['prescription.acquiredLines', { prescription: { fovReadoutMm: 480, acquiredLines: 200 } }],
    ['prescription.slices.mode', { prescription: { fovReadoutMm: 480, family: 'gradient-echo-3d' } }],
    ['prescription.phaseOversamplingPct', { prescription: { fovReadoutMm: 480, phaseOversamplingPct: 150 }, scanner: { lineStep: { kind: 'doubling' } } }],
    ['keepClear.area.box', { keepClear: { area: { kind: 'box', box: { right: -50, left: 20 } } } }],
    ['scanner.oversamplingForm', { scanner: { oversamplingForm: 'doubling-switch' } }],
  ])('refuses what contradicts itself at %s', (field, change) => {
    expect(Object.keys(refusals({ ...LEAST, ...change }))).toContain(field);
  });

  it('refuses outlines with more points than can be answered while someone waits', () => {
    const ring = (points: number) =>
      Array.from({ length: points }, (_, i): [number, number] => [200 * Math.cos((2 * Math.PI * i) / points), 150 * Math.sin((2 * Math.PI * i) / points)]);
    const outlined = (points: number) => ({
      patient: { parts: [{ name: 'a', shape: { type: 'outline-prism', along: 'z', rings: [ring(points)] } }] },
      prescription: LEAST.prescription,
    });
    expect(refusals(outlined(240))).toEqual({});
    expect(refusals(outlined(241))).toEqual({ 'patient.parts': expect.stringContaining('allowed: 240 in all parts together') });
  });

  it.each([[null], [[]], ['text'], [7], [{}]])('refuses %j as a whole without failing', (json) => {
    expect(Object.keys(refusals(json)).length).toBeGreaterThan(0);
  });
});

describe('the schema of a case', () => {
  it('describes every field in words, numbers with their unit', () => {
    const nameless: string[] = [];
    const visit = (node: unknown, path: string): void => {
      if (typeof node !== 'object' || node === null) return;
      const { properties, items, anyOf, oneOf, prefixItems } = node as Record<string, never>;
      for (const [name, field] of Object.entries((properties ?? {}) as Record<string, Record<string, unknown>>)) {
        const at = `${path}.${name}`;
        if (typeof field.description !== 'string' && field.const === undefined) nameless.push(at);
        if (field.type === 'number' && !/\[.+\]/.test(String(field.description))) nameless.push(`${at} (unit)`);
        visit(field, at);
      }
      for (const each of [items, ...((anyOf ?? oneOf ?? prefixItems ?? []) as unknown[])]) visit(each, `${path}[]`);
    };
    visit(z.toJSONSchema(caseInput, { io: 'input' }), 'case');
    expect(nameless).toEqual([]);
  });
});
