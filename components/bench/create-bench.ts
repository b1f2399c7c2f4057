import { assess } from '@/lib/physics';
import type { BenchContextValue } from './bench-context';
import { createLiveAssessor } from './live/live-assessor';
import type { Results } from './live/results';
import { startEngineWorker, type RunningEngine } from './live/start-engine-worker';
import { createViewsEngine } from './live/views-engine';
import type { BenchDocument, BenchSetting } from './state/bench-document';
import { startBench } from './state/bench-state';
import { createBenchStore } from './state/bench-store';

const WORK_MEASURE = 'selvedge:assess';

/** Kept as a performance measure for whoever observes it; not collected, or a long day would fill memory. */
function measured(_id: string, work: () => void): void {
  const start = performance.now();
  work();
  performance.measure(WORK_MEASURE, { start, end: performance.now() });
  performance.clearMeasures(WORK_MEASURE);
}

export interface BenchStart {
  readonly document: BenchDocument;
  readonly setting: BenchSetting;
  readonly initial: Results;
  readonly activeId: string;
  /** The document is one that the server has stored. */
  readonly stored: boolean;
  readonly onFault: (error: unknown) => void;
}

export interface RunningBench extends BenchContextValue {
  /** Begins to answer; returns what ends it. */
  readonly run: () => () => void;
}

/** Store, live answers and the Worker behind them: one bench, for as long as its page is open. */
export function createBench({ document, setting, initial, activeId, stored, onFault }: BenchStart): RunningBench {
  const store = createBenchStore(startBench(document, activeId, stored ? document : null));
  let running: RunningEngine | null = null;
  const views = createViewsEngine(onFault);
  const engine = () => (running ??= startEngineWorker(onFault)).engine;
  const live = createLiveAssessor({
    store,
    setting,
    initial,
    assess,
    rank: (question) => engine().rank(question),
    assessOthers: (questions) => engine().assessAll(questions.map(({ question }) => question)),
    requestFrame: (callback) => requestAnimationFrame(callback),
    cancelFrame: (handle) => cancelAnimationFrame(handle),
    onWork: measured,
    onFault,
  });
  return {
    store,
    live,
    setting,
    engine: { rank: (question) => engine().rank(question), assessAll: (questions) => engine().assessAll(questions) },
    views,
    run() {
      // Loaded while the network is there: the open bench keeps working when it drops.
      engine();
      views.engine();
      const stop = live.start();
      return () => {
        stop();
        running?.stop();
        running = null;
        views.stop();
      };
    },
  };
}
