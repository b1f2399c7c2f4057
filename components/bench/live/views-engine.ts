'use client';

import { wrap, type Remote } from 'comlink';
import type { ViewsWorker } from './views.worker';

export interface ViewsEngine {
  /** Started when first asked for. */
  readonly engine: () => Remote<ViewsWorker>;
  readonly stop: () => void;
}

export function createViewsEngine(onFault: (error: unknown) => void): ViewsEngine {
  let running: { readonly worker: Worker; readonly remote: Remote<ViewsWorker> } | null = null;
  const start = () => {
    const worker = new Worker(new URL('./views.worker.ts', import.meta.url), { type: 'module' });
    worker.addEventListener('error', (event) => onFault(event.error ?? new Error(event.message || 'The worker did not start.')));
    return { worker, remote: wrap<ViewsWorker>(worker) };
  };
  return {
    engine: () => (running ??= start()).remote,
    stop() {
      running?.worker.terminate();
      running = null;
    },
  };
}
