'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import type { PlanView } from '@/lib/schemas/plan';
import { useBench } from '../bench-context';
import { documentOfPlan, planInputOf, type PlanBasis } from '../state/plan-document';
import { keptEditsKey, readKeptEdits, writeKeptEdits } from './kept-edits';
import { getStoredPlan, putPlan, type Problem, type PutPlan } from './put-plan';

export interface PlanIdentity {
  readonly planId: string;
  /** 0 before the first save. */
  readonly version: number;
  readonly state: PlanView['state'] | null;
  readonly shortCode: string | null;
}

export type Saving =
  | { readonly kind: 'idle' }
  | { readonly kind: 'saving'; readonly attempt: number }
  | { readonly kind: 'refused'; readonly problem: Problem }
  /** Somebody else saved first; theirs is shown, ours is still on the bench. */
  | { readonly kind: 'overtaken'; readonly theirs: PlanView };

const RETRY_MS = [1000, 2000, 4000, 8000, 15000];

export interface PlanSaving {
  readonly identity: PlanIdentity;
  readonly saving: Saving;
  readonly differences: PlanView['differences'];
  /** Edits that an earlier visit in this tab left unsaved were put back on the bench. */
  readonly restored: boolean;
  readonly save: (expectedVersion?: number) => void;
  readonly takeTheirs: () => void;
}

export function usePlanSaving(first: PlanIdentity, basis: PlanBasis, userId: string): PlanSaving {
  const { store, live } = useBench();
  const [identity, setIdentity] = useState(first);
  const [saving, setSaving] = useState<Saving>({ kind: 'idle' });
  const [differences, setDifferences] = useState<PlanView['differences']>([]);
  const [restored, setRestored] = useState(false);
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const key = keptEditsKey(userId, basis.bookingId ?? `${basis.scannerId}/${basis.protocolId ?? ''}`);
  const known = useRef(identity);
  known.current = identity;

  useEffect(() => {
    const kept = readKeptEdits(sessionStorage, key);
    if (kept) {
      store.dispatch({ type: 'replace-document', document: kept.document, saved: false });
      if (kept.version <= known.current.version) setIdentity((now) => ({ ...now, planId: kept.planId }));
      setRestored(true);
    }
    let waiting: ReturnType<typeof setTimeout> | null = null;
    const keep = (): void => {
      waiting = null;
      const { document, saved } = store.read();
      const { planId, version } = known.current;
      const initial = saved === null && store.read().past.length === 0;
      writeKeptEdits(sessionStorage, key, document === saved || initial ? null : { shape: 1, planId, version, document });
    };
    const unsubscribe = store.subscribe(() => {
      waiting ??= setTimeout(keep, 300);
    });
    return () => {
      unsubscribe();
      if (waiting !== null) {
        clearTimeout(waiting);
        keep();
      }
    };
  }, [key, store]);

  useEffect(() => () => void (timer.current && clearTimeout(timer.current)), []);

  const attempt = useCallback(
    async (put: PutPlan, document: ReturnType<typeof store.read>['document'], count: number): Promise<void> => {
      setSaving({ kind: 'saving', attempt: count });
      const result = await putPlan(put);
      if (result.kind === 'saved') {
        const { id, version, state, shortCode } = result.plan;
        setIdentity({ planId: id, version, state, shortCode });
        setDifferences(result.plan.differences);
        setSaving({ kind: 'idle' });
        setRestored(false);
        store.dispatch({ type: 'mark-saved', document });
        return;
      }
      if (result.kind === 'unreached') {
        // The same key and body: an answer that was lost on the way does not save a second version.
        timer.current = setTimeout(() => void attempt(put, document, count + 1), RETRY_MS[Math.min(count, RETRY_MS.length) - 1]);
        return;
      }
      if (result.problem.code === 'conflict' && typeof result.problem.details?.currentVersion === 'number') {
        const theirs = await getStoredPlan(put.id);
        if (theirs) return setSaving({ kind: 'overtaken', theirs });
      }
      setSaving({ kind: 'refused', problem: result.problem });
    },
    [store],
  );

  return {
    identity,
    saving,
    differences,
    restored,
    save(expectedVersion) {
      if (saving.kind === 'saving') return;
      const { document } = store.read();
      void attempt(
        {
          id: identity.planId,
          expectedVersion: expectedVersion ?? identity.version,
          idempotencyKey: crypto.randomUUID(),
          plan: planInputOf(document, basis, live.read()),
        },
        document,
        1,
      );
    },
    takeTheirs() {
      if (saving.kind !== 'overtaken') return;
      const { theirs } = saving;
      store.dispatch({ type: 'replace-document', document: documentOfPlan(theirs), saved: true });
      setIdentity({ planId: theirs.id, version: theirs.version, state: theirs.state, shortCode: theirs.shortCode });
      setSaving({ kind: 'idle' });
    },
  };
}
