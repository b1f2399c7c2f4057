import { describe, expect, it } from 'vitest';
import { validateCase } from '@/lib/physics/assess/validate-case';
import type { Case } from '@/lib/physics/model/case';
import { DomainError } from '@/lib/physics/model/domain-error';
import type { PartShape } from '@/lib/physics/model/patient';
import { SIDES } from '@/lib/physics/model/axes';
import {
  LIVER_BOX,
  prescriptionOf,
  slabOf,
  typicalCase,
  typicalPatient,
  typicalScanner,
} from '@/tests/support/physics-cases';

const cylinder: PartShape = {
  type: 'elliptic-cylinder',
  along: 'z',
  centreMm: [0, 0, 0],
  semiAxesMm: [100, 80],
  fromMm: -50,
  toMm: 50,
};
const outline: PartShape = {
  type: 'outline-prism',
  along: 'z',
  rings: [
    [
      [0, 0],
      [100, 0],
      [0, 90],
    ],
  ],
};
const part = (name: string, shape: PartShape) => ({
  name,
  kind: 'trunk' as const,
  shape,
  signalWeight: 1,
  estimated: false,
});

/** A slab case in which every optional number is given. */
const FULL: Case = typicalCase({
  keepClear: { ...LIVER_BOX, mustStayDisplayed: { xMm: [-50, 50], yMm: [-50, 50], zMm: [-20, 20] } },
  patient: typicalPatient({ parts: [part('cylinder', cylinder), part('outline', outline)] }),
  prescription: prescriptionOf('gradient-echo-3d', {
    breathing: 'triggered',
    slices: slabOf({ partitions: 20, acquiredPartitions: 24 }),
    linesAcrossFov: 100,
    acquiredLines: 120,
    acceleration: { ...prescriptionOf('gradient-echo-3d').acceleration, geometryFactor: 1.2 },
    presaturation: [{ side: 'anterior', innerEdgeMm: 100, thicknessMm: 60, nominalFlipDeg: 90, delayMs: 10 }],
  }),
  scanner: typicalScanner({
    lineStep: { kind: 'percent', percent: 5 },
    coils: [{ name: 'body', elements: [{ name: 'one', seesFromMm: -100, seesToMm: 100 }] }],
  } as Partial<Case['scanner']>),
});
const STACK: Case = typicalCase();

/** The same case with one number replaced; the path is the argument's name, as an error says it. */
function replaced(given: Case, path: string, value: unknown): Case {
  const [head, ...rest] = path.split(/[.[\]]+/).filter(Boolean) as [string, ...string[]];
  const put = (owner: unknown, key: string, keys: string[]): unknown => {
    const copy = (Array.isArray(owner) ? [...owner] : { ...(owner as object) }) as Record<string, unknown>;
    copy[key] = keys.length === 0 ? value : put(copy[key], keys[0]!, keys.slice(1));
    return copy;
  };
  return put(given, head, rest) as Case;
}

type Row = readonly [path: string, low: number, high: number, base?: Case];

const LENGTHS: readonly Row[] = SIDES.flatMap((side): Row[] => [
  [`patient.extents.${side}.value`, 0, 1500],
  [`patient.extents.${side}.spread`, 0, 1500],
  [`policy.marginMm.${side}`, 0, 200],
]);

const REAL: readonly Row[] = [
  ...LENGTHS,
  ...(['breadthMm', 'depthMm', 'gapMm'] as const).map((name): Row => [`patient.arms.${name}`, 0, 400]),
  ['patient.weightKg.value', 1, 600],
  ['patient.weightKg.spread', 0, 600],
  ['patient.heightCm.value', 30, 260],
  ['patient.breathHoldS.value', 0, 120],
  ['patient.breathPeriodS.value', 1, 20],
  ['patient.lateralOffsetMm', -500, 500],
  ['patient.isocentreZMm', -2000, 2000],
  ['patient.parts[0].signalWeight', 0, 100],
  ['patient.parts[0].shape.centreMm[1]', -2000, 2000],
  ['patient.parts[0].shape.semiAxesMm[0]', 0.1, 2000],
  ['patient.parts[0].shape.semiAxesMm[1]', 0.1, 2000],
  ['patient.parts[1].shape.rings[0][1][0]', -2000, 2000],
  ['patient.parts[1].shape.rings[0][1][1]', -2000, 2000],
  ['prescription.tiltAboutReadoutDeg', -90, 90],
  ['prescription.tiltAboutPhaseDeg', -90, 90],
  ['prescription.inPlaneRotationDeg', -180, 180],
  ...[0, 1, 2].map((axis): Row => [`prescription.centreMm[${axis}]`, -2000, 2000]),
  ['prescription.fovPhaseMm', 1, 2000],
  ['prescription.fovReadoutMm', 1, 2000],
  ['prescription.slices.thicknessMm', 0.1, 500, STACK],
  ['prescription.slices.gapMm', -200, 500, STACK],
  ['prescription.slices.partitionThicknessMm', 0.1, 100],
  ['prescription.slices.timeBandwidthProduct', 1, 64],
  ['prescription.slices.pulseDurationMs', 0.01, 50],
  ['prescription.acceleration.factorPhase', 1, 16],
  ['prescription.acceleration.factorSlice', 1, 16],
  ['prescription.acceleration.calibrationS', 0, 600],
  ['prescription.acceleration.geometryFactor', 1, 20],
  ['prescription.presaturation[0].innerEdgeMm', -1000, 2000],
  ['prescription.presaturation[0].thicknessMm', 1, 2000],
  ['prescription.presaturation[0].nominalFlipDeg', 1, 180],
  ['prescription.presaturation[0].delayMs', 0, 1000],
  ['prescription.trMs', 0.5, 60_000],
  ['prescription.teMs', 0, 10_000],
  ['prescription.flipDeg', 0.1, 180],
  ['prescription.partialFourierPhase', 0.501, 1],
  ['prescription.partialFourierSlice', 0.501, 1],
  ['prescription.echoSpacingMs', 0, 1000],
  ['prescription.bandwidthHzPerPixel', 1, 20_000],
  ['prescription.sliceTimeMs', 0, 60_000],
  ['prescription.preparationMs', 0, 60_000],
  ['scanner.fieldStrengthT', 0.01, 20],
  ['scanner.lineStep.percent', 0.01, 100],
  ['scanner.tissueReachMm', 1, 2000],
  ['scanner.respiratoryWindow', 0.01, 1],
  ['scanner.coils[0].elements[0].seesFromMm', -2000, 100],
  ['scanner.coils[0].elements[0].seesToMm', -100, 2000],
  ['scanner.limits.fovMaxMm', 100, 2000],
  ['scanner.limits.fovMinMm', 0, 520],
  ...[0, 1, 2].map((axis): Row => [`scanner.limits.usableFovMm[${axis}]`, 1, 3000]),
  ['scanner.limits.phaseOversamplingMaxPct', 0, 1000],
  ['scanner.limits.sliceOversamplingMaxPct', 0, 1000],
  ['scanner.limits.accelerationPhaseMax', 1, 16],
  ['scanner.limits.accelerationSliceMax', 1, 16],
  ['scanner.limits.partialFourierMin', 0.5, 1],
  ['scanner.limits.tableLimitKg', 1, 1000],
  ['policy.tissueTolerance', 0, 1],
  ['policy.slabTolerance', 0.0001, 1],
  ['policy.sureAt', 0.5, 0.999],
  ['policy.unknownTimeBandwidthProduct', 1, 64],
  ['policy.presaturationB1Scale', 0.3, 2],
  ['policy.tissueT1Ms.parenchyma', 1, 10_000],
  ['policy.tissueT1Ms.fat', 1, 10_000],
  ['policy.tolerateFoldOutsidePct', 0, 100],
  ['policy.weights.timePct', 0, 100_000],
  ['policy.weights.swap.knee', 0, 100_000],
  ['keepClear.area.box.xMm[0]', -2000, 59.99],
  ['keepClear.area.box.xMm[1]', -189.99, 2000],
  ['keepClear.mustStayDisplayed.yMm[1]', -49.99, 2000],
  ['keepClear.mustStayDisplayed.zMm[0]', -2000, 19.99],
];

const WHOLE: readonly Row[] = [
  ['prescription.linesAcrossFov', 8, 120],
  ['prescription.linesAcrossFov', 8, 4096, replaced(FULL, 'prescription.acquiredLines', 16_384)],
  ['prescription.readoutMatrix', 8, 4096],
  ['prescription.acquiredLines', 100, 16_384],
  ['prescription.slices.slices', 1, 1024, STACK],
  ['prescription.slices.partitions', 1, 24],
  ['prescription.slices.partitions', 1, 2048, replaced(FULL, 'prescription.slices.acquiredPartitions', 4096)],
  ['prescription.slices.acquiredPartitions', 20, 4096],
  ['prescription.slices.droppedPartitionsPerEnd', 0, 9],
  ['prescription.averages', 1, 256],
  ['prescription.echoTrainLength', 1, 4096],
  ['prescription.shots', 1, 1024],
  ['prescription.volumes', 1, 10_000],
  ['prescription.segments', 0, 10_000],
  ['prescription.breathsPerTr', 1, 10],
  ['prescription.acceleration.referenceLines', 0, 1024],
  ['prescription.acceleration.referencePartitions', 0, 1024],
  ['scanner.partitionStep', 1, 256],
  ['scanner.limits.matrixMax', 8, 16_384],
  ['scanner.limits.acquiredLinesMax', 8, 16_384],
  ['scanner.limits.averagesMax', 1, 256],
  ['scanner.limits.echoTrainMax', 1, 4096],
];

const check =
  (path: string, value: unknown, base = FULL) =>
  () =>
    validateCase(replaced(base, path, value));

const rows = (list: readonly Row[]) =>
  list.map(([path, low, high, base = FULL]) => ({ path, low, high, base }));

describe('what a case may hold', () => {
  it.each(rows(REAL))('$path from $low to $high', ({ path, low, high, base }) => {
    for (const value of [low, high, (low + high) / 2])
      expect(check(path, value, base), `${value}`).not.toThrow();
    // A thousandth of the range is far less than any change of a limit would be.
    const step = (high - low) / 1000;
    // Below a limit that is itself far less than that, a hundredth of the limit.
    const below = Math.min(step, low === 0 ? step : Math.abs(low) / 100);
    for (const value of [low - below, high + step, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(check(path, value, base), `${value}`).toThrow(DomainError);
    }
  });

  it.each(rows(WHOLE))('$path, a whole number from $low to $high', ({ path, low, high, base }) => {
    for (const value of [low, high]) expect(check(path, value, base), `${value}`).not.toThrow();
    for (const value of [low - 1, high + 1, low + 0.5, Number.NaN])
      expect(check(path, value, base), `${value}`).toThrow(DomainError);
  });

  it('names the argument, what was given and what is allowed', () => {
    expect(check('policy.sureAt', 0.4)).toThrow(
      expect.objectContaining({ code: 'out-of-range', argument: 'policy.sureAt' }),
    );
    expect(check('prescription.shots', 1.5)).toThrow(
      expect.objectContaining({ code: 'not-whole', argument: 'prescription.shots' }),
    );
    expect(check('patient.region', 'foot')).toThrow(/patient\.region.*foot.*abdomen/s);
  });

  it('refuses ranges the wrong way round or empty', () => {
    expect(check('keepClear.area.box.xMm', [60, 60])).toThrow(
      expect.objectContaining({ code: 'range-reversed' }),
    );
    expect(check('patient.parts[0].shape.toMm', -51)).toThrow(
      expect.objectContaining({ code: 'range-reversed' }),
    );
    expect(check('patient.parts[0].shape.toMm', -50)).not.toThrow();
  });

  it('refuses outlines without three points, parts without a name or with one name twice', () => {
    expect(check('patient.parts[1].shape.rings', [])).toThrow(
      expect.objectContaining({ code: 'no-outline' }),
    );
    expect(
      check('patient.parts[1].shape.rings[0]', [
        [0, 0],
        [1, 0],
      ]),
    ).toThrow(expect.objectContaining({ code: 'outline-too-short' }));
    expect(check('patient.parts[0].name', ' ')).toThrow(expect.objectContaining({ code: 'no-name' }));
    expect(check('patient.parts[0].name', 'outline')).toThrow(
      expect.objectContaining({ code: 'name-repeated' }),
    );
  });

  it('refuses a slab for a 2D family, a stack for a 3D one, and slice acceleration of a stack', () => {
    expect(check('prescription.family', 'spin-echo')).toThrow(
      expect.objectContaining({ code: 'slices-do-not-fit-family' }),
    );
    expect(check('prescription.family', 'gradient-echo-3d', STACK)).toThrow(
      expect.objectContaining({ code: 'slices-do-not-fit-family' }),
    );
    expect(check('prescription.acceleration.factorSlice', 2, STACK)).toThrow(
      expect.objectContaining({ code: 'slice-acceleration-of-a-stack' }),
    );
  });

  it('reads breaths per TR only of a triggered sequence', () => {
    expect(
      check('prescription.breathsPerTr', 0, replaced(FULL, 'prescription.breathing', 'free')),
    ).not.toThrow();
  });

  it('refuses words it does not know', () => {
    for (const path of [
      'patient.position',
      'patient.arms.position',
      'patient.parts[0].kind',
      'patient.parts[0].shape.along',
      'prescription.trajectory',
      'prescription.plane',
      'prescription.phaseAxis',
      'prescription.breathing',
      'prescription.partialFourierFill',
      'prescription.acceleration.unfolding',
      'prescription.presaturation[0].side',
      'scanner.lineStep.kind',
      'keepClear.area.kind',
    ]) {
      expect(check(path, 'unheard of'), path).toThrow(expect.objectContaining({ code: 'not-allowed' }));
    }
  });
});

it('accepts the cases it starts from', () => {
  expect(() => validateCase(FULL)).not.toThrow();
  expect(() => validateCase(STACK)).not.toThrow();
});
