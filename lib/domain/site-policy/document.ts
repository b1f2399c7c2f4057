import type { SitePolicy } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

/** What of a site's policy the pathway rests on and the engine does not. */
export interface PathwayPolicy {
  /** Positioning, coils and pauses beside the scan itself, minutes of a slot. */
  readonly setUpMinutes: number;
}

/** What a new site starts from (common practice, no source). */
export const DEFAULT_PATHWAY: PathwayPolicy = { setUpMinutes: 10 };

export interface PolicyDocument {
  readonly schemaVersion: 2;
  readonly policy: SitePolicy;
  readonly pathway: PathwayPolicy;
}

const UPCASTS: Upcasts = {
  // Set-up was the same ten minutes everywhere.
  1: (old) => ({ ...old, pathway: { setUpMinutes: 10 } }),
};

export function readPolicyDocument(stored: unknown): PolicyDocument {
  return readDocument<PolicyDocument>(stored, 2, UPCASTS);
}

export interface PolicyRecord {
  readonly siteId: string;
  readonly version: number;
  readonly changedAt: Date;
  readonly policy: SitePolicy;
  readonly pathway: PathwayPolicy;
}
