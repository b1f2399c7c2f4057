'use client';

import { useEffect, useMemo, useState, type KeyboardEvent, type ReactNode } from 'react';
import { assess } from '@/lib/physics';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import { BenchProvider } from './bench-context';
import { BenchLayout } from './bench-layout';
import { createLiveAssessor } from './live/live-assessor';
import type { Results } from './live/results';
import { startEngineWorker, type RunningEngine } from './live/start-engine-worker';
import type { PlanIdentity } from './saving/use-plan-saving';
import type { BenchDocument, BenchSetting } from './state/bench-document';
import { startBench } from './state/bench-state';
import { createBenchStore } from './state/bench-store';
import type { PlanBasis } from './state/plan-document';

export interface BenchProps {
  readonly document: BenchDocument;
  readonly setting: BenchSetting;
  /** Worked out by the server, so that the first picture needs no waiting. */
  readonly initial: Results;
  readonly activeId: string;
  readonly basis: PlanBasis;
  readonly plan: PlanIdentity;
  readonly userId: string;
  /** Hiding the button is courtesy; the server decides. */
  readonly mayEdit: boolean;
  readonly keepClearPreset: KeepClear;
  readonly protocolLabel: string;
  /** Whose bench it is: the booking, or the choice of scanner and protocol. */
  readonly children: ReactNode;
}

const WORK_MEASURE = 'selvedge:assess';

/** Kept as a performance measure for whoever observes it; not collected, or a long day would fill memory. */
function measured(_id: string, work: () => void): void {
  const start = performance.now();
  work();
  performance.measure(WORK_MEASURE, { start, end: performance.now() });
  performance.clearMeasures(WORK_MEASURE);
}

export function Bench({ children, ...props }: BenchProps) {
  const [fault, setFault] = useState<unknown>(null);
  if (fault) throw fault;

  const bench = useMemo(() => {
    const store = createBenchStore(startBench(props.document, props.activeId, props.plan.version > 0 ? props.document : null));
    let running: RunningEngine | null = null;
    const engine = () => (running ??= startEngineWorker(setFault)).engine;
    const live = createLiveAssessor({
      store,
      setting: props.setting,
      initial: props.initial,
      assess,
      rank: (question) => engine().rank(question),
      assessOthers: (questions) => engine().assessAll(questions.map(({ question }) => question)),
      requestFrame: (callback) => requestAnimationFrame(callback),
      cancelFrame: (handle) => cancelAnimationFrame(handle),
      onWork: measured,
      onFault: setFault,
    });
    const stopEngine = () => {
      running?.stop();
      running = null;
    };
    return { store, live, setting: props.setting, stopEngine };
    // A bench lives as long as its page: another booking is another page, with its own key.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, []);

  useEffect(() => {
    const stop = bench.live.start();
    return () => {
      stop();
      bench.stopEngine();
    };
  }, [bench]);

  const onKeyDown = (event: KeyboardEvent<HTMLElement>) => {
    const { store } = bench;
    const typing = event.target instanceof HTMLInputElement && event.target.role === 'spinbutton';
    if (event.key === 'Escape' && store.read().trial) {
      event.preventDefault();
      store.dispatch({ type: 'leave-trial' });
    } else if ((event.ctrlKey || event.metaKey) && event.key.toLowerCase() === 'z' && !typing) {
      event.preventDefault();
      store.dispatch({ type: event.shiftKey ? 'redo' : 'undo' });
    } else if ((event.ctrlKey || event.metaKey) && event.key.toLowerCase() === 'y' && !typing) {
      event.preventDefault();
      store.dispatch({ type: 'redo' });
    }
  };

  return (
    <BenchProvider value={bench}>
      <div onKeyDown={onKeyDown} className="contents">
        <BenchLayout {...props}>{children}</BenchLayout>
      </div>
    </BenchProvider>
  );
}
