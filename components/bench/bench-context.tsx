'use client';

import { createContext, useContext, useSyncExternalStore } from 'react';
import { caseOf } from './state/case-of';
import { sequenceById, type BenchSequence, type BenchSetting } from './state/bench-document';
import type { BenchState } from './state/bench-state';
import type { BenchStore } from './state/bench-store';
import type { LiveAssessor } from './live/live-assessor';
import type { SequenceResult } from './live/results';
import type { ViewsEngine } from './live/views-engine';
import type { BenchEngine } from './solve-all/solve-all';

export interface BenchContextValue {
  readonly store: BenchStore;
  readonly live: LiveAssessor;
  readonly setting: BenchSetting;
  /** The engine away from the main thread. */
  readonly engine: BenchEngine;
  /** What is only looked at, worked out in a Worker of its own. */
  readonly views: ViewsEngine;
}

const BenchContext = createContext<BenchContextValue | null>(null);
export const BenchProvider = BenchContext.Provider;

export function useBench(): BenchContextValue {
  const bench = useContext(BenchContext);
  if (!bench) throw new Error('Only inside a bench.');
  return bench;
}

/** Re-renders only when what is selected is another value; select what is stored, build nothing new. */
export function useBenchState<T>(select: (state: BenchState) => T): T {
  const { store } = useBench();
  const read = () => select(store.read());
  return useSyncExternalStore(store.subscribe, read, read);
}

export function useActiveSequence(): BenchSequence {
  return useBenchState((state) => sequenceById(state.document, state.activeId));
}

/** What the engine last said about a sequence; the picture and the figures are drawn from one and the same answer. */
export function useResult(id: string): SequenceResult {
  const { store, live, setting } = useBench();
  const read = () => live.read()[id];
  const result = useSyncExternalStore(live.subscribe, read, read);
  const { document, sureAt } = store.read();
  return result ?? { question: caseOf(document, setting, sequenceById(document, id), sureAt) };
}

export function useActiveResult(): SequenceResult {
  return useResult(useBenchState((state) => state.activeId));
}
