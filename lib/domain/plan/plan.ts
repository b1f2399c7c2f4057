import type { PlanDocument, PlanResultDocument } from '@/lib/domain/plan/document';
import type { PlanState } from '@/lib/domain/plan/states';

export type SignOffDecision = 'signed off' | 'sent back';

export interface PlanHead {
  readonly siteId: string;
  readonly id: string;
  readonly bookingId: string | null;
  readonly state: PlanState;
  readonly currentVersion: number;
  readonly shortCode: string;
}

/** A plan in one of its versions. */
export interface PlanRecord extends PlanHead {
  readonly accession: string | null;
  readonly version: number;
  readonly document: PlanDocument;
  readonly result: PlanResultDocument;
  readonly engineVersion: string;
  readonly policyVersion: number;
  readonly inputHash: string;
  readonly note: string;
  readonly savedAt: Date;
  readonly savedBy: string;
  /** The account behind the name: who is told when the plan is sent back. */
  readonly savedById: string;
  /** Asked for this exam by a radiologist; null: site policy says. */
  readonly toleratedFoldOutsidePct: number | null;
  readonly signOff: { readonly decision: SignOffDecision; readonly reason: string; readonly at: Date; readonly by: string } | null;
}
