'use client';

import { useCallback, useMemo } from 'react';
import type { FoldProbability } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import { useActiveResult, useBench, useBenchState } from '../bench-context';
import { useLatest } from '../live/use-latest';
import { triedCase } from '../state/case-of';

export interface KnownProbability {
  /** The newest there is; null while nothing is known, or nothing can be said. */
  readonly value: FoldProbability | null;
  /** It answers an older question than the one on the bench. */
  readonly waiting: boolean;
  readonly tried: boolean;
}

/** Probability of fold in the keep-clear area, now or with what is tried, worked out in a Worker. */
export function useFoldProbability(): KnownProbability {
  const { views } = useBench();
  const { question, assessment } = useActiveResult();
  const trial = useBenchState((state) => state.trial);
  const run = useCallback((job: Case) => views.engine().foldProbability(job), [views]);
  const askable = assessment !== undefined && assessment.verdict !== 'not-modelled';
  const { patient, prescription, keepClear, scanner, policy } = question;
  const job = useMemo(() => {
    if (!askable) return null;
    const now: Case = { patient, prescription, keepClear, scanner, policy };
    return trial ? triedCase(now, trial.remedy) : now;
  }, [askable, patient, prescription, keepClear, scanner, policy, trial]);
  const { answer, waiting } = useLatest(job, run);
  return { value: answer?.result ?? null, waiting, tried: trial !== null };
}
