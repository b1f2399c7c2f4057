import type { Browser, Page } from '@playwright/test';

interface TraceEvent {
  readonly name: string;
  readonly ph: string;
  readonly ts: number;
  readonly dur?: number;
  readonly tdur?: number;
  readonly pid: number;
  readonly tid: number;
}

export interface FrameWork {
  /** Milliseconds of the page's main thread in each animation frame: by the clock, and of the processor. */
  readonly wall: readonly number[];
  readonly processor: readonly number[];
  readonly longTasks: number;
}

/** Tasks of the main thread, summed from one animation frame to the next. */
function sumFrames(events: readonly TraceEvent[]): FrameWork {
  const frames = events.filter(({ name }) => name === 'FireAnimationFrame').sort((a, b) => a.ts - b.ts);
  const main = frames[0];
  if (!main) throw new Error('The trace holds no animation frame.');
  const tasks = events.filter(({ name, ph, pid, tid }) => name === 'RunTask' && ph === 'X' && pid === main.pid && tid === main.tid);
  // Several callbacks fire in one frame, in one task: its end is the frame's.
  const ends = tasks.filter(({ ts, dur = 0 }) => frames.some((frame) => frame.ts >= ts && frame.ts <= ts + dur)).map(({ ts, dur = 0 }) => ts + dur);
  const sums = (of: (task: TraceEvent) => number): number[] =>
    ends.slice(1).map((end, i) => tasks.filter(({ ts }) => ts >= ends[i]! && ts < end).reduce((sum, task) => sum + of(task) / 1_000, 0));
  return {
    wall: sums(({ dur = 0 }) => dur),
    processor: sums(({ tdur, dur = 0 }) => tdur ?? dur),
    longTasks: tasks.filter(({ dur = 0 }) => dur >= 50_000).length,
  };
}

/** What the page's main thread does in each animation frame of `act`. */
export async function frameWork(browser: Browser, page: Page, act: () => Promise<unknown>): Promise<FrameWork> {
  await browser.startTracing(page, { categories: ['toplevel', 'devtools.timeline', 'disabled-by-default-devtools.timeline'] });
  await act();
  const trace = JSON.parse((await browser.stopTracing()).toString()) as { traceEvents: TraceEvent[] };
  return sumFrames(trace.traceEvents);
}
