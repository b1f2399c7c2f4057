'use client';

import { useEffect, useRef, useState } from 'react';
import { useBench, useBenchState } from '../bench-context';
import { policyAt } from '../state/certainty';
import { solveAll, type SolvedPlan } from './solve-all';

export type Solving =
  | { readonly kind: 'idle' }
  | { readonly kind: 'working'; readonly done: number; readonly total: number }
  | { readonly kind: 'proposed'; readonly plan: SolvedPlan };

export interface SolveAll {
  readonly solving: Solving;
  /** The bench has changed since: what is proposed no longer answers it. */
  readonly stale: boolean;
  readonly start: () => void;
  readonly leave: () => void;
  readonly adopt: () => void;
}

/** Solves in the Worker, one sequence after another; can be stopped, and adopts everything in one step of undo. */
export function useSolveAll(onFault: (error: unknown) => void): SolveAll {
  const { store, engine, setting } = useBench();
  const document = useBenchState((state) => state.document);
  const [solving, setSolving] = useState<Solving>({ kind: 'idle' });
  const run = useRef(0);

  useEffect(() => () => void (run.current += 1), []);

  const start = () => {
    const mine = (run.current += 1);
    const stopped = () => run.current !== mine;
    setSolving({ kind: 'working', done: 0, total: 0 });
    const { document: from, sureAt } = store.read();
    solveAll(from, { ...setting, policy: policyAt(setting.policy, sureAt) }, engine, {
      onProgress: (done, total) => !stopped() && setSolving({ kind: 'working', done, total }),
      stopped,
    }).then(
      (plan) => !stopped() && setSolving(plan ? { kind: 'proposed', plan } : { kind: 'idle' }),
      (error: unknown) => !stopped() && onFault(error),
    );
  };
  const leave = () => {
    run.current += 1;
    setSolving({ kind: 'idle' });
  };
  return {
    solving,
    stale: solving.kind === 'proposed' && solving.plan.from !== document,
    start,
    leave,
    adopt() {
      if (solving.kind !== 'proposed' || solving.plan.from !== store.read().document) return;
      store.dispatch({ type: 'replace-document', document: solving.plan.document, saved: false });
      setSolving({ kind: 'idle' });
    },
  };
}
