import type { SitePolicy } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

export interface PolicyDocument {
  readonly schemaVersion: 1;
  readonly policy: SitePolicy;
}

const UPCASTS: Upcasts = {};

export function readPolicyDocument(stored: unknown): PolicyDocument {
  return readDocument<PolicyDocument>(stored, 1, UPCASTS);
}

export interface PolicyRecord {
  readonly siteId: string;
  readonly version: number;
  readonly changedAt: Date;
  readonly policy: SitePolicy;
}
