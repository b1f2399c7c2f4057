import type { BenchAction, BenchState } from './bench-state';
import { reduceBench } from './reduce-bench';

export interface BenchStore {
  readonly read: () => BenchState;
  readonly dispatch: (action: BenchAction) => void;
  readonly subscribe: (listener: () => void) => () => void;
}

/** One bench, outside React's tree, so that a drag re-renders only what shows the value that moved. */
export function createBenchStore(initial: BenchState): BenchStore {
  let state = initial;
  const listeners = new Set<() => void>();
  return {
    read: () => state,
    dispatch(action) {
      const next = reduceBench(state, action);
      if (next === state) return;
      state = next;
      for (const listener of [...listeners]) listener();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
