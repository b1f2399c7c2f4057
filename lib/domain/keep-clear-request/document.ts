import type { KeepClear, SitePolicy } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

/** What a radiologist asks of one exam: what must stay free of fold, and how much fold beside it is tolerated. */
export interface KeepClearRequestDocument {
  readonly schemaVersion: 1;
  /** Key of a preset, which follows the body's size, or "own" for the box as typed. */
  readonly keepClearPreset: string;
  readonly keepClear: KeepClear;
  /** Largest share of the displayed picture, percent; null leaves it to site policy. */
  readonly toleratedFoldOutsidePct: number | null;
  readonly note: string;
}

export interface KeepClearRequest {
  readonly id: string;
  readonly document: KeepClearRequestDocument;
  readonly requestedAt: Date;
  readonly requestedBy: string;
}

const UPCASTS: Upcasts = {};

export function readKeepClearRequest(stored: unknown): KeepClearRequestDocument {
  return readDocument<KeepClearRequestDocument>(stored, 1, UPCASTS);
}

/** Site policy for one exam: what was asked for this patient goes before what holds for everyone. */
export function policyForExam(policy: SitePolicy, toleratedFoldOutsidePct: number | null | undefined): SitePolicy {
  return toleratedFoldOutsidePct === null || toleratedFoldOutsidePct === undefined
    ? policy
    : { ...policy, tolerateFoldOutsidePct: toleratedFoldOutsidePct };
}
