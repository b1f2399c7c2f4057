'use client';

import { wrap, type Remote } from 'comlink';
import type { EngineWorker } from './engine.worker';

export interface RunningEngine {
  readonly engine: Remote<EngineWorker>;
  readonly stop: () => void;
}

export function startEngineWorker(onFault: (error: unknown) => void): RunningEngine {
  const worker = new Worker(new URL('./engine.worker.ts', import.meta.url), { type: 'module' });
  // Without this a script that cannot be loaded would leave every question unanswered and say nothing.
  worker.addEventListener('error', (event) => onFault(event.error ?? new Error(event.message || 'The worker did not start.')));
  return { engine: wrap<EngineWorker>(worker), stop: () => worker.terminate() };
}
