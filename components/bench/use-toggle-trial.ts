'use client';

import { useCallback } from 'react';
import type { Remedy } from '@/lib/physics/model/remedy';
import { useBench } from './bench-context';
import type { LiveAssessor } from './live/live-assessor';
import { presentRanking } from './live/results';

/** For the moment in which a newer ranking is on its way, a remedy would write an older prescription back. */
export function isPresentRemedy(live: LiveAssessor, sequenceId: string, remedy: Remedy): boolean {
  const result = live.read()[sequenceId];
  return result !== undefined && presentRanking(result)?.remedies.includes(remedy) === true;
}

/** Selecting a remedy is trying it; selecting it again leaves the trial. From the list as from the comparison. */
export function useToggleTrial(): (remedy: Remedy) => void {
  const { store, live } = useBench();
  return useCallback(
    (remedy) => {
      const { trial, activeId } = store.read();
      if (trial?.remedy.key === remedy.key) store.dispatch({ type: 'leave-trial' });
      else if (isPresentRemedy(live, activeId, remedy)) store.dispatch({ type: 'try', remedy });
    },
    [store, live],
  );
}
