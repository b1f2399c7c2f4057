import type { OutcomeRecord } from '@/lib/domain/outcome/document';
import type { OutcomeView } from '@/lib/schemas/outcome';

export function toOutcomeView({ id, planVersion, wrap, document, recordedAt, recordedBy }: OutcomeRecord): OutcomeView {
  const { schemaVersion: _schemaVersion, ...rest } = document;
  return { id, planVersion, wrap, ...rest, by: recordedBy, at: recordedAt.toISOString() };
}
