'use client';

import { wrap, type Remote } from 'comlink';
import type { ImportWorker } from './import.worker';

export interface RunningImport {
  readonly session: Remote<ImportWorker>;
  readonly end: () => void;
}

export function startImportWorker(onFault: (message: string) => void): RunningImport {
  const worker = new Worker(new URL('./import.worker.ts', import.meta.url), { type: 'module' });
  worker.addEventListener('error', (event) => onFault(event.message || 'The reader of files did not start. Reload the page.'));
  return { session: wrap<ImportWorker>(worker), end: () => worker.terminate() };
}
