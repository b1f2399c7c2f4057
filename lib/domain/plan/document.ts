import type { Assessment, KeepClear, Patient, Prescription } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

export interface PlannedSequenceDocument {
  /** The protocol's sequence id, or one made on the bench. */
  readonly id: string;
  readonly prescription: Prescription;
  /** What the whole picture was before a remedy changed the window. */
  readonly frozenKeepClear?: KeepClear;
  readonly adopted: readonly { readonly key: string; readonly sentence: string; readonly costTenths: number }[];
}

/** What is stored for one version of a plan: all the engine was asked, with the versions it rests on. */
export interface PlanDocument {
  readonly schemaVersion: 1;
  readonly scannerId: string;
  readonly scannerVersion: number;
  readonly protocolId: string | null;
  readonly protocolVersion: number;
  readonly policyVersion: number;
  readonly patient: Patient;
  readonly keepClear: KeepClear;
  readonly sequences: readonly PlannedSequenceDocument[];
}

/** Where bench and server did not agree; the server's value is what counts. */
export interface PlanDifference {
  /** Name of the sequence; empty where the difference is in what all of them rest on. */
  readonly sequence: string;
  readonly field: 'verdict' | 'scanS' | 'scanner' | 'policy';
  readonly bench: string;
  readonly server: string;
}

export interface PlanResultDocument {
  readonly schemaVersion: 1;
  readonly assessments: readonly Assessment[];
  readonly differences: readonly PlanDifference[];
}

const UPCASTS: Upcasts = {};
const RESULT_UPCASTS: Upcasts = {};

export function readPlanDocument(stored: unknown): PlanDocument {
  return readDocument<PlanDocument>(stored, 1, UPCASTS);
}

export function readPlanResult(stored: unknown): PlanResultDocument {
  return readDocument<PlanResultDocument>(stored, 1, RESULT_UPCASTS);
}
