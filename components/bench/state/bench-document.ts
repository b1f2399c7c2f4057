import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Patient } from '@/lib/physics/model/patient';
import type { SitePolicy } from '@/lib/physics/model/policy';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Scanner } from '@/lib/physics/model/scanner';

/** The remedy a sequence carries, as it was adopted. */
export interface AdoptedRemedy {
  readonly key: string;
  readonly sentence: string;
  readonly costTenths: number;
}

export interface BenchSequence {
  /** Stable inside the plan: the protocol's sequence id, or one made for a bench without a booking. */
  readonly id: string;
  readonly prescription: Prescription;
  /**
   * Set when a remedy changed the window while the keep-clear area was the whole picture: the area stays what it
   * was in the patient, so that a larger FOV is not asked to keep its own new margin free.
   */
  readonly frozenKeepClear?: KeepClear;
  readonly adopted: readonly AdoptedRemedy[];
}

/** Everything a person edits on the bench and a plan stores; undo and redo move between these. */
export interface BenchDocument {
  readonly patient: Patient;
  readonly keepClear: KeepClear;
  readonly scanner: Scanner;
  readonly sequences: readonly BenchSequence[];
}

/** What the bench is given and never edits. */
export interface BenchSetting {
  readonly policy: SitePolicy;
  /** Today's date at the site, YYYY-MM-DD: a size corrected now is dated now. */
  readonly today: string;
}

export function sequenceById(document: BenchDocument, id: string): BenchSequence {
  const found = document.sequences.find((sequence) => sequence.id === id) ?? document.sequences[0];
  if (!found) throw new Error('A bench needs at least one sequence.');
  return found;
}

export function replaceSequence(document: BenchDocument, sequence: BenchSequence): BenchDocument {
  return {
    ...document,
    sequences: document.sequences.map((each) => (each.id === sequence.id ? sequence : each)),
  };
}

/** The keep-clear area a sequence is judged by. */
export function keepClearOf(document: BenchDocument, sequence: BenchSequence): KeepClear {
  return sequence.frozenKeepClear ?? document.keepClear;
}
