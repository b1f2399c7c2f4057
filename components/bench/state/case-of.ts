import type { Case } from '@/lib/physics/model/case';
import type { Remedy } from '@/lib/physics/model/remedy';
import { policyAt } from './certainty';
import { keepClearOf, type BenchDocument, type BenchSequence, type BenchSetting } from './bench-document';

/** The question one sequence of the bench puts to the engine, at the certainty chosen there or else the site's. */
export function caseOf(
  document: BenchDocument,
  setting: BenchSetting,
  sequence: BenchSequence,
  sureAt: number | null = null,
): Case {
  return {
    patient: document.patient,
    prescription: sequence.prescription,
    keepClear: keepClearOf(document, sequence),
    scanner: document.scanner,
    policy: policyAt(setting.policy, sureAt),
  };
}

/** Whether a question was put about the document as it stands: edits replace objects, they never change them. */
export function isAbout(question: Case, document: BenchDocument, sequence: BenchSequence): boolean {
  return (
    question.patient === document.patient &&
    question.prescription === sequence.prescription &&
    question.keepClear === keepClearOf(document, sequence) &&
    question.scanner === document.scanner
  );
}

/** The same question after a remedy, for drawing what is tried. */
export function triedCase(present: Case, remedy: Remedy): Case {
  return {
    ...present,
    patient: { ...present.patient, arms: { ...present.patient.arms, position: remedy.arms } },
    prescription: remedy.prescription,
  };
}
