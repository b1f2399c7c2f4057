import type { Side } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Patient, Reading } from '@/lib/physics/model/patient';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Remedy } from '@/lib/physics/model/remedy';
import type { Scanner } from '@/lib/physics/model/scanner';
import type { BenchDocument } from './bench-document';

export type BenchView = 'section' | 'slab' | 'picture' | 'bore';

/** A remedy being tried: the canvas and the ledger show now → tried until it is adopted or left. */
export interface Trial {
  readonly sequenceId: string;
  readonly remedy: Remedy;
}

export interface BenchState {
  readonly document: BenchDocument;
  readonly activeId: string;
  readonly trial: Trial | null;
  readonly view: BenchView;
  /** Index of the slice shown, per sequence; absent: the middle one. */
  readonly sliceIndex: Readonly<Record<string, number>>;
  /** Certainty asked for on this bench, 0.5–0.999; null: what site policy asks. Not part of the plan. */
  readonly sureAt: number | null;
  readonly past: readonly BenchDocument[];
  readonly future: readonly BenchDocument[];
  /** Edits that carry this key join the step that carried it before: one drag, one undo. */
  readonly openStep: string | null;
  /** What the server last confirmed; the document differs from it when something is unsaved. */
  readonly saved: BenchDocument | null;
}

export type BenchAction =
  | { type: 'edit-patient'; patch: Partial<Patient>; step?: string }
  | { type: 'edit-extent'; side: Side; reading: Reading; step?: string }
  | { type: 'edit-prescription'; patch: Partial<Prescription>; step?: string }
  /** The active sequence as its protocol has it, without what was adopted. */
  | { type: 'back-to-protocol'; prescription: Prescription }
  | { type: 'edit-keep-clear'; keepClear: KeepClear; step?: string }
  | { type: 'choose-scanner'; scanner: Scanner }
  | { type: 'settle' }
  | { type: 'choose-sequence'; id: string }
  | { type: 'choose-view'; view: BenchView }
  | { type: 'choose-slice'; index: number }
  | { type: 'choose-certainty'; sureAt: number | null }
  | { type: 'try'; remedy: Remedy }
  | { type: 'leave-trial' }
  | { type: 'adopt'; remedy: Remedy }
  | { type: 'undo' }
  | { type: 'redo' }
  | { type: 'mark-saved'; document: BenchDocument }
  | { type: 'replace-document'; document: BenchDocument; saved: boolean };

export const UNDO_STEPS = 200;

export function startBench(document: BenchDocument, activeId: string, saved: BenchDocument | null): BenchState {
  return {
    document,
    activeId,
    trial: null,
    view: 'section',
    sliceIndex: {},
    sureAt: null,
    past: [],
    future: [],
    openStep: null,
    saved,
  };
}

export function isUnsaved(state: BenchState): boolean {
  return state.document !== state.saved;
}
