import { DEFAULT_POLICY } from '@/lib/domain/case/model';
import { DEFAULT_PATHWAY, type PolicyRecord } from '@/lib/domain/site-policy/document';
import type { PolicyView } from '@/lib/schemas/site-policy';

/** A site that has not written a policy works with the standard one, as version 0. */
export function effectivePolicy(record: PolicyRecord | null): PolicyView {
  if (!record) return { version: 0, policy: { ...DEFAULT_POLICY, version: 0 }, pathway: DEFAULT_PATHWAY, changedAt: '' };
  return { version: record.version, policy: record.policy, pathway: record.pathway, changedAt: record.changedAt.toISOString() };
}
