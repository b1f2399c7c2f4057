import '@/lib/schemas/fields/jitless';
import { acquiredLinesFor, acquiredPartitionsFor } from '@/lib/domain/case/lines';
import {
  DEFAULT_POLICY, DomainError, SIDES, type Case, type KeepClear, type Patient, type PatientBox, type Prescription, type Reading,
  type Scanner, type Side, type SitePolicy, type SolidPart,
} from '@/lib/domain/case/model';
import { CASE_DEFAULTS, caseInput, type CaseInput, type ParsedCaseInput } from '@/lib/schemas/case/case-input';
import { caseSchema } from '@/lib/schemas/case/case-schema';
import { displayedBox } from '@/lib/domain/case/displayed-box';
import { boundsOfParts } from '@/lib/schemas/case/part-bounds';
import { fieldIssues, type FieldIssue } from '@/lib/schemas/fields/field-issues';

/** The input does not make a case; every reason at once. */
export class CaseInputError extends Error {
  override readonly name = 'CaseInputError';

  constructor(readonly issues: readonly FieldIssue[]) {
    super(issues.map(({ path, message }) => `${path || '(whole)'}: ${message}`).join('\n'));
  }
}

type Report = (path: string, message: string) => void;
type LooseReading = ParsedCaseInput['patient']['breathHoldS'];

function toReading(loose: LooseReading): Reading {
  if (typeof loose === 'number') return { value: loose, source: 'measured', spread: 0 };
  return { ...loose, spread: loose.spread ?? 0 };
}

const OPPOSITE_PAIR: Partial<Record<Side, 'breadthMm' | 'depthMm'>> = {
  right: 'breadthMm', left: 'breadthMm', anterior: 'depthMm', posterior: 'depthMm',
};

function toExtents(input: ParsedCaseInput['patient'], report: Report): Record<Side, Reading> {
  const bounds = input.parts ? boundsOfParts(input.parts as readonly SolidPart[], CASE_DEFAULTS.patient.reachMm) : undefined;
  const extentOf = (side: Side): Reading => {
    const given = input.extents?.[side];
    const whole = OPPOSITE_PAIR[side];
    const size = whole === undefined ? undefined : input[whole];
    if (given !== undefined && size !== undefined) {
      report(`patient.extents.${side}`, `given beside ${whole}; allowed: one of the two`);
    }
    if (given !== undefined) return toReading(given);
    if (size !== undefined) return { value: size / 2, source: 'measured', spread: 0 };
    if (bounds) return { value: bounds[side], source: 'measured', spread: 0 };
    if (whole === undefined) return { value: CASE_DEFAULTS.patient.reachMm, source: 'policy-default', spread: 0 };
    report(`patient.extents.${side}`, `nothing given; allowed: a number, 0 to 1000 mm, or patient.${whole}, or patient.parts`);
    return { value: 0, source: 'policy-default', spread: 0 };
  };
  return Object.fromEntries(SIDES.map((side) => [side, extentOf(side)])) as Record<Side, Reading>;
}

function toPatient(input: ParsedCaseInput['patient'], report: Report): Patient {
  const { extents: _given, breadthMm: _breadth, depthMm: _depth, parts, weightKg, heightCm, ...rest } = input;
  return {
    ...rest,
    extents: toExtents(input, report),
    ...(weightKg === undefined ? {} : { weightKg: toReading(weightKg) }),
    ...(heightCm === undefined ? {} : { heightCm: toReading(heightCm) }),
    breathHoldS: toReading(input.breathHoldS),
    breathPeriodS: toReading(input.breathPeriodS),
    ...(parts === undefined ? {} : { parts: parts as readonly SolidPart[] }),
  };
}

/** One of two ways to give a number; both given is refused. */
function either<T>(report: Report, path: string, name: string, value: T | undefined, other: string, fromOther: T | undefined) {
  if (value !== undefined && fromOther !== undefined) report(`${path}.${name}`, `given beside ${other}; allowed: one of the two`);
  return value ?? fromOther;
}

/** A request the scanner's step cannot meet is an issue of the field that asked for it. */
function onStep(report: Report, path: string, work: () => number): number | undefined {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    report(path, error.message);
    return undefined;
  }
}

function toSlices(input: ParsedCaseInput['prescription'], scanner: Scanner, report: Report): Prescription['slices'] {
  const { slices } = input;
  if (slices === undefined) return { mode: 'stack', slices: 1, thicknessMm: 5, gapMm: 0 };
  if (slices.mode === 'stack') return slices;
  const { sliceOversamplingPct, acquiredPartitions, ...rest } = slices;
  const asked = sliceOversamplingPct === undefined ? undefined : acquiredPartitionsFor(slices.partitions, sliceOversamplingPct, scanner.partitionStep);
  return {
    ...rest,
    acquiredPartitions:
      either(report, 'prescription.slices', 'acquiredPartitions', acquiredPartitions, 'sliceOversamplingPct', asked) ?? slices.partitions,
  };
}

function toPrescription(input: ParsedCaseInput['prescription'], scanner: Scanner, report: Report): Prescription {
  const { percentPhaseFieldOfView, percentSampling, phaseOversamplingPct, acceleration, ...rest } = input;
  const path = 'prescription';
  const fovPhaseMm =
    either(report, path, 'fovPhaseMm', input.fovPhaseMm, 'percentPhaseFieldOfView',
      percentPhaseFieldOfView === undefined ? undefined : (input.fovReadoutMm * percentPhaseFieldOfView) / 100) ?? input.fovReadoutMm;
  const squareLines = (input.readoutMatrix * fovPhaseMm) / input.fovReadoutMm;
  const linesAcrossFov =
    either(report, path, 'linesAcrossFov', input.linesAcrossFov, 'percentSampling',
      percentSampling === undefined ? undefined : Math.round((squareLines * percentSampling) / 100)) ?? Math.round(squareLines);
  const acquiredLines =
    either(report, path, 'acquiredLines', input.acquiredLines, 'phaseOversamplingPct',
      phaseOversamplingPct === undefined
        ? undefined
        : onStep(report, `${path}.phaseOversamplingPct`, () =>
            acquiredLinesFor(linesAcrossFov, phaseOversamplingPct, scanner.lineStep),
          )) ?? linesAcrossFov;
  const slices = toSlices(input, scanner, report);
  return {
    ...rest,
    phaseAxis: input.phaseAxis ?? (input.plane === 'coronal' ? 'RL' : 'AP'),
    fovPhaseMm,
    linesAcrossFov,
    acquiredLines,
    slices,
    sliceTimeMs: input.sliceTimeMs ?? (slices.mode === 'slab' ? 0 : input.trMs / slices.slices),
    acceleration: { ...acceleration, unfolding: acceleration.unfolding ?? scanner.unfolding },
  };
}

type BoxInput = NonNullable<ParsedCaseInput['keepClear']['mustStayDisplayed']>;

/** Sides are distances outward, so right, anterior and inferior become negative coordinates. */
function toBox(input: BoxInput, window: PatientBox, path: string, report: Report): PatientBox {
  const axis = (name: 'xMm' | 'yMm' | 'zMm', low: Side, high: Side): readonly [number, number] => {
    const sides = input as Partial<Record<Side, number>>;
    const [lowSide, highSide] = [sides[low], sides[high]];
    const given = input[name];
    if (given && (lowSide !== undefined || highSide !== undefined)) {
      report(`${path}.${name}`, `given beside ${low} or ${high}; allowed: the range or the sides`);
    }
    const edges: readonly [number, number] = given ?? [
      lowSide === undefined ? window[name][0] : -lowSide,
      highSide ?? window[name][1],
    ];
    if (edges[0] > edges[1]) report(path, `${low} and ${high} leave nothing between them; allowed: sides that enclose something`);
    return edges;
  };
  return { xMm: axis('xMm', 'right', 'left'), yMm: axis('yMm', 'anterior', 'posterior'), zMm: axis('zMm', 'inferior', 'superior') };
}

function toKeepClear(input: ParsedCaseInput['keepClear'], prescription: Prescription, report: Report): KeepClear {
  const window = displayedBox(prescription);
  const { area, mustStayDisplayed, followsWindow } = input;
  return {
    area: area.kind === 'whole-picture' ? area : { ...area, box: toBox(area.box, window, 'keepClear.area.box', report) },
    ...(mustStayDisplayed === undefined
      ? {}
      : { mustStayDisplayed: toBox(mustStayDisplayed, window, 'keepClear.mustStayDisplayed', report) }),
    followsWindow,
  };
}

function toScanner(input: ParsedCaseInput['scanner']): Scanner {
  return {
    ...input,
    oversamplingForm: input.oversamplingForm ?? (input.lineStep.kind === 'doubling' ? 'doubling-switch' : 'percent'),
  };
}

function toPolicy(input: ParsedCaseInput['policy']): SitePolicy {
  const { marginMm, tissueT1Ms, geometryFactorByOverlap, weights, ...rest } = input;
  const margins = typeof marginMm === 'number' ? Object.fromEntries(SIDES.map((side) => [side, marginMm])) : marginMm;
  return {
    ...DEFAULT_POLICY,
    ...rest,
    marginMm: { ...DEFAULT_POLICY.marginMm, ...margins },
    tissueT1Ms: { ...DEFAULT_POLICY.tissueT1Ms, ...tissueT1Ms },
    geometryFactorByOverlap: { ...DEFAULT_POLICY.geometryFactorByOverlap, ...geometryFactorByOverlap },
    weights: { ...DEFAULT_POLICY.weights, ...weights, swap: { ...DEFAULT_POLICY.weights.swap, ...weights?.swap } },
  };
}

/** JSON of unknown shape to a case; every problem is reported at once. @throws CaseInputError */
export function parseCase(json: unknown): Case {
  const parsed = caseInput.safeParse(json);
  if (!parsed.success) throw new CaseInputError(fieldIssues(parsed.error));
  const issues: FieldIssue[] = [];
  const report: Report = (path, message) => issues.push({ path, message });
  const scanner = toScanner(parsed.data.scanner);
  const prescription = toPrescription(parsed.data.prescription, scanner, report);
  const question: Case = {
    patient: toPatient(parsed.data.patient, report),
    prescription,
    keepClear: toKeepClear(parsed.data.keepClear, prescription, report),
    scanner,
    policy: toPolicy(parsed.data.policy),
  };
  if (issues.length === 0) {
    const checked = caseSchema.safeParse(question);
    if (checked.success) return question;
    issues.push(...fieldIssues(checked.error));
  }
  throw new CaseInputError(issues);
}

/** The friendly form to the engine's. @throws CaseInputError */
export function toCase(input: CaseInput): Case {
  return parseCase(input);
}
