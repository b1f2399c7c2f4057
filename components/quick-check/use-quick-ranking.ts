'use client';

import { useEffect, useRef, useState } from 'react';
import { createLatestWins, type LatestWins } from '@/components/bench/live/latest-wins';
import { startEngineWorker } from '@/components/bench/live/start-engine-worker';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking } from '@/lib/physics/model/remedy';

/** The ranking of the newest question, from a Worker. Absent until it is there, and when no Worker can be had. */
export function useQuickRanking(question: Case | undefined): Ranking | undefined {
  const [ranked, setRanked] = useState<{ question: Case; ranking: Ranking } | null>(null);
  const asker = useRef<LatestWins<Case> | null>(null);
  useEffect(() => {
    // The verdict stands without it; only the list of remedies would be missing.
    const running = startEngineWorker(() => setRanked(null));
    asker.current = createLatestWins(
      (asked: Case) => running.engine.rank(asked),
      (asked, ranking: Ranking) => setRanked({ question: asked, ranking }),
      () => setRanked(null),
    );
    return () => {
      asker.current?.stop();
      running.stop();
    };
  }, []);
  useEffect(() => {
    if (question) asker.current?.ask(question);
  }, [question]);
  return ranked && ranked.question === question ? ranked.ranking : undefined;
}
