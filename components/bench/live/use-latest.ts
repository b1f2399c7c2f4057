'use client';

import { useEffect, useRef, useState } from 'react';
import { createLatestWins, type LatestWins } from './latest-wins';

export interface Latest<Job, Result> {
  /** The newest answer there is, with the job it answers: while `waiting` that is an older one. */
  readonly answer: { readonly job: Job; readonly result: Result } | null;
  readonly waiting: boolean;
}

/**
 * Work away from the main thread for what is shown now. `job` keeps its identity while nothing in it changed; null asks
 * for nothing. `run` must not change.
 */
export function useLatest<Job extends object, Result>(
  job: Job | null,
  run: (job: Job) => Promise<Result>,
): Latest<Job, Result> {
  const [answer, setAnswer] = useState<Latest<Job, Result>['answer']>(null);
  const [fault, setFault] = useState<unknown>(null);
  const queue = useRef<LatestWins<Job> | null>(null);
  useEffect(() => {
    const mine = createLatestWins<Job, Result>(
      run,
      (asked, result) => setAnswer({ job: asked, result }),
      (_asked, error) => setFault(error ?? new Error('The worker failed without saying why.')),
    );
    queue.current = mine;
    return () => mine.stop();
  }, [run]);
  useEffect(() => {
    if (job) queue.current?.ask(job);
  }, [job, run]);
  if (fault) throw fault;
  return { answer: job ? answer : null, waiting: job !== null && answer?.job !== job };
}
