import type { Prescription } from '@/lib/physics/model/prescription';
import type { Remedy } from '@/lib/physics/model/remedy';
import { keepClearOf, replaceSequence, sequenceById, type BenchDocument, type BenchSequence } from './bench-document';
import { windowBox } from './window-box';

/** Writes a tried remedy into the plan: the prescription of its sequence, and the arms, which every sequence shares. */
export function adoptRemedy(document: BenchDocument, sequenceId: string, remedy: Remedy): BenchDocument {
  const before = sequenceById(document, sequenceId);
  const after: BenchSequence = {
    ...before,
    ...frozen(document, before, remedy.prescription),
    prescription: remedy.prescription,
    adopted: [
      ...before.adopted,
      { key: remedy.key, sentence: remedy.sentence, costTenths: remedy.costTenths },
    ],
  };
  const arms = { ...document.patient.arms, position: remedy.arms };
  return replaceSequence({ ...document, patient: { ...document.patient, arms } }, after);
}

function frozen(
  document: BenchDocument,
  sequence: BenchSequence,
  prescription: Prescription,
): Pick<BenchSequence, 'frozenKeepClear'> {
  const keepClear = keepClearOf(document, sequence);
  const asBefore = windowBox(sequence.prescription);
  if (keepClear.area.kind !== 'whole-picture' || sameBox(asBefore, windowBox(prescription))) return {};
  return {
    frozenKeepClear: { ...keepClear, area: { kind: 'box', box: asBefore, label: 'picture as it was planned' } },
  };
}

function sameBox(a: ReturnType<typeof windowBox>, b: ReturnType<typeof windowBox>): boolean {
  return (['xMm', 'yMm', 'zMm'] as const).every((axis) => a[axis][0] === b[axis][0] && a[axis][1] === b[axis][1]);
}
