import type { ArmPosition, Assessment, KeepClear, Patient, Prescription } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

export interface PlannedSequenceDocument {
  readonly prescription: Prescription;
  readonly arms: ArmPosition;
  readonly adopted: { readonly key: string; readonly sentence: string } | null;
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
  readonly sequence: string;
  readonly field: 'verdict' | 'scanS';
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
