export interface LatestWins<Job> {
  /** Runs the job now, or as soon as the running one ends; a job that still waits is replaced. */
  readonly ask: (job: Job) => void;
  /** Results that are still on their way are dropped. */
  readonly stop: () => void;
}

/**
 * At most one job runs and at most one waits: while a handle is dragged, work that nobody will look at is never
 * begun, and an old answer never overwrites a newer one.
 */
export function createLatestWins<Job, Result>(
  run: (job: Job) => Promise<Result>,
  onResult: (job: Job, result: Result) => void,
  onFailure: (job: Job, error: unknown) => void,
): LatestWins<Job> {
  let running = false;
  let stopped = false;
  let waiting: { readonly job: Job } | null = null;

  const begin = (job: Job): void => {
    running = true;
    run(job)
      .then(
        (result) => {
          if (!stopped) onResult(job, result);
        },
        (error: unknown) => {
          if (!stopped) onFailure(job, error);
        },
      )
      .finally(() => {
        running = false;
        const next = waiting;
        waiting = null;
        if (next && !stopped) begin(next.job);
      });
  };

  return {
    ask(job) {
      if (stopped) return;
      if (running) waiting = { job };
      else begin(job);
    },
    stop() {
      stopped = true;
      waiting = null;
    },
  };
}
