'use client';

import { cx } from '@/components/ui/class-names';
import { useActiveResult } from '../bench-context';
import { describeProbability } from '@/lib/presentation/certainty-words';
import { useFoldProbability } from './use-fold-probability';

/** How likely it is, in a sentence that says which figure counts the margin. It follows the verdict from a Worker. */
export function ProbabilityLine() {
  const { question } = useActiveResult();
  const { value, waiting, tried } = useFoldProbability();
  return (
    <p
      className={cx('min-h-[1lh] px-5 pb-1.5 text-sm text-ink-soft', waiting && 'opacity-60')}
      aria-busy={waiting}
      data-probability={value && !waiting ? value.probability.toFixed(3) : undefined}
    >
      {value ? describeProbability(value, question.policy.sureAt, tried) : ''}
    </p>
  );
}
