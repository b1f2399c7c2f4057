import type { Case, KeepClear, Patient, PatientBox, RangeMm, Reading } from '@/lib/domain/case/model';
import { SIDES } from '@/lib/domain/case/model';
import { nameless } from './scene';

/** Sizes are rounded to this, so that a scene is nobody's measurement. */
export const CAPTURE_STEP_MM = 5;

const toStep = (value: number, step: number): number => Math.round(value / step) * step;
const grid = (value: number): number => toStep(value, CAPTURE_STEP_MM);

/** A size without the day it was taken, on a coarse grid, said to be assumed: it is no patient's any more. */
function coarse({ value, spread }: Reading, step: number): Reading {
  return { value: toStep(value, step), source: 'policy-default', spread: toStep(spread, step / 5) };
}

function coarsePatient(patient: Patient): Patient {
  const { weightKg, heightCm: _height, sex: _sex, ...rest } = patient;
  return {
    ...rest,
    extents: Object.fromEntries(SIDES.map((side) => [side, coarse(patient.extents[side], CAPTURE_STEP_MM)])) as Patient['extents'],
    breathHoldS: coarse(patient.breathHoldS, 1),
    breathPeriodS: coarse(patient.breathPeriodS, 0.5),
    ...(weightKg ? { weightKg: coarse(weightKg, 5) } : {}),
    arms: { position: patient.arms.position, breadthMm: grid(patient.arms.breadthMm), depthMm: grid(patient.arms.depthMm), gapMm: grid(patient.arms.gapMm) },
    ...(patient.legGapMm === undefined ? {} : { legGapMm: grid(patient.legGapMm) }),
    lateralOffsetMm: grid(patient.lateralOffsetMm),
    isocentreZMm: grid(patient.isocentreZMm),
  };
}

function coarseBox({ xMm, yMm, zMm }: PatientBox): PatientBox {
  const range = ([low, high]: RangeMm): RangeMm => [grid(low), grid(high)];
  return { xMm: range(xMm), yMm: range(yMm), zMm: range(zMm) };
}

/** A keep-clear area drawn for one person follows that person's organs: it goes on the same grid. */
function coarseKeepClear({ area, mustStayDisplayed, followsWindow }: KeepClear): KeepClear {
  return {
    area: area.kind === 'box' ? { kind: 'box', box: coarseBox(area.box) } : area,
    ...(mustStayDisplayed ? { mustStayDisplayed: coarseBox(mustStayDisplayed) } : {}),
    followsWindow,
  };
}

/**
 * What of a bench may become a scene: extents and keep-clear area on 5 mm steps, no dates, no height or sex, no words that name a scanner,
 * a coil or a preset. Uploaded outlines are one person's shape, so they are left out and the body is built from the extents.
 */
export function captureCase(question: Case): Case {
  const { parts: _parts, ...patient } = coarsePatient(question.patient);
  return nameless({ ...question, patient, keepClear: coarseKeepClear(question.keepClear) });
}

const SIGNS: readonly { readonly pattern: RegExp; readonly text: string }[] = [
  { pattern: /\b\d{4}-\d{2}-\d{2}\b|\b\d{1,2}[./]\d{1,2}[./]\d{2,4}\b|\b\d{1,2}\s+(?:Jan|Feb|Mar|Apr|May|Jun|Jul|Aug|Sep|Oct|Nov|Dec)[a-z]*\.?\s+\d{4}\b/i, text: 'a date' },
  { pattern: /\b[A-Z]{1,4}-?\d{4,}\b|\b\d{6,}\b/, text: 'a reference number' },
  { pattern: /\S+@\S+\.\S+/, text: 'an e-mail address' },
  { pattern: /\b(?:Mr|Mrs|Ms|Miss|Dr)\.?\s+\p{Lu}/u, text: 'a person’s name' },
  { pattern: /\b(?:born|DOB|aged?\s+\d)/i, text: 'a birth date or age' },
];

/** What in a text looks as if it were about one person, in words; a warning, because nobody can be sure by machine. */
export function personalSigns(text: string, reference?: string): readonly string[] {
  const signs = SIGNS.filter(({ pattern }) => pattern.test(text)).map(({ text: sign }) => sign);
  const named = reference !== undefined && text.toLowerCase().includes(reference.toLowerCase());
  return named ? [...signs, 'the reference of this booking'] : signs;
}
