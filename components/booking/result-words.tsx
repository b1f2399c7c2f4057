import { Badge } from '@/components/ui/badge';
import type { PreCheckResult } from '@/lib/domain/pre-check/result';
import { RESULT_WORDS } from '@/lib/presentation/pre-check-words';

/** Inverse: it cannot work as booked. Dotted: something is not known. The words say it whole. */
const LOOKS: Readonly<Record<PreCheckResult | 'unchecked', { tone: 'plain' | 'strong' | 'tried'; edge: 'solid' | 'dotted' | 'dashed' }>> = {
  'as-booked': { tone: 'plain', edge: 'solid' },
  'plan-needed': { tone: 'tried', edge: 'solid' },
  'size-needed': { tone: 'plain', edge: 'dotted' },
  'another-scanner': { tone: 'strong', edge: 'solid' },
  escalate: { tone: 'strong', edge: 'solid' },
  unchecked: { tone: 'plain', edge: 'dashed' },
};

/** What the pre-check came to, and whether it still stands. */
export function ResultWords({ result = 'unchecked', stale = false }: { result?: PreCheckResult | 'unchecked'; stale?: boolean }) {
  return (
    <span className="inline-flex flex-wrap items-center gap-x-2 gap-y-1">
      <Badge {...LOOKS[result]}>{RESULT_WORDS[result]}</Badge>
      {stale && result !== 'unchecked' && <span className="text-sm text-ink-soft">stale, being checked</span>}
    </span>
  );
}
