'use client';

import { useEffect, useRef, useState } from 'react';
import { benchOfPlan } from '@/lib/presentation/bench-of-plan';
import type { PlanView } from '@/lib/schemas/plan';
import { useBench } from '../bench-context';
import type { BenchDocument } from '../state/bench-document';
import { documentOfPlan, planInputOf, type PlanBasis } from '../state/plan-document';
import { keptEditsKey, readKeptEdits, writeKeptEdits, type KeptEdits } from './kept-edits';
import type { PlanIdentity } from './plan-identity';
import { getStoredPlan, putPlan, type Problem, type PutPlan, type PutResult } from './put-plan';
import { isNews, useNewestVersion, type NewestVersion } from './use-newest-version';

export type Saving =
  | { readonly kind: 'idle' }
  | { readonly kind: 'saving'; readonly attempt: number }
  | { readonly kind: 'refused'; readonly problem: Problem }
  /** Somebody else saved first; theirs is shown, ours is still on the bench. */
  | { readonly kind: 'overtaken'; readonly theirs: PlanView };

const RETRY_MS = [1000, 2000, 4000, 8000, 15000];
const KEEP_AFTER_MS = 300;

export interface PlanSaving {
  readonly identity: PlanIdentity;
  readonly saving: Saving;
  readonly differences: PlanView['differences'];
  /** Edits that an earlier visit in this tab left unsaved were put back on the bench. */
  readonly restored: boolean;
  /** Who saved the version this bench rests on, and when; null while that is not known. */
  readonly restsOn: NewestVersion | null;
  /** A version that somebody saved while this bench was open. */
  readonly news: NewestVersion | null;
  /** Shows it beside what is on the bench, with the choice between them. */
  readonly showNews: () => void;
  readonly save: (expectedVersion?: number) => void;
  readonly takeTheirs: () => void;
}

/** The plan that kept edits belong to: saving them must meet whatever was saved in between, never go round it. */
export function identityOfKept(kept: KeptEdits, stored: PlanIdentity): PlanIdentity {
  if (kept.planId === stored.planId) return { ...stored, version: Math.min(kept.version, stored.version) };
  return stored.version > 0 ? { ...stored, version: 0 } : { ...stored, planId: kept.planId, version: kept.version };
}

/** What unsaved edits are kept for: the booking, the saved plan, or the choice of scanner and protocol. */
export function keptSubject(bookingId: string | null, choice: string, { planId, version }: PlanIdentity): string {
  return bookingId ?? (version > 0 ? `plan/${planId}` : choice);
}

export function usePlanSaving(first: PlanIdentity, basis: PlanBasis, userId: string): PlanSaving {
  const { store, live } = useBench();
  const [identity, setIdentity] = useState(first);
  const [saving, setSaving] = useState<Saving>({ kind: 'idle' });
  const [differences, setDifferences] = useState<PlanView['differences']>([]);
  const [restored, setRestored] = useState(false);
  const newest = useNewestVersion(basis.bookingId);
  const known = useRef(identity);
  const gone = useRef(false);
  const { bookingId } = basis;
  const choice = `${basis.scannerId}/${basis.protocolId ?? ''}`;

  useEffect(() => {
    known.current = identity;
  }, [identity]);

  useEffect(() => {
    gone.current = false;
    return () => {
      gone.current = true;
    };
  }, []);

  useEffect(() => {
    let waiting: ReturnType<typeof setTimeout> | null = null;
    let closed = false;
    // Without a booking a saved plan has a bench of its own, and its edits wait there.
    const keyNow = () => keptEditsKey(userId, keptSubject(bookingId, choice, known.current));
    const keep = (): void => {
      waiting = null;
      const { document, saved, past } = store.read();
      const untouched = document === saved || (saved === null && past.length === 0);
      const { planId, version } = known.current;
      writeKeptEdits(sessionStorage, keyNow(), untouched ? null : { shape: 1, planId, version, document });
    };
    // After the first paint: the page that came from the server is the one that hydrates.
    queueMicrotask(() => {
      const kept = closed ? null : readKeptEdits(sessionStorage, keyNow());
      if (!kept) return;
      store.dispatch({ type: 'replace-document', document: kept.document, saved: false });
      setIdentity((now) => identityOfKept(kept, now));
      setRestored(true);
    });
    const unsubscribe = store.subscribe(() => {
      waiting ??= setTimeout(keep, KEEP_AFTER_MS);
    });
    return () => {
      closed = true;
      unsubscribe();
      if (waiting === null) return;
      clearTimeout(waiting);
      keep();
    };
  }, [bookingId, choice, store, userId]);

  const meet = async (planId: string): Promise<boolean> => {
    const theirs = await getStoredPlan(planId);
    if (!theirs) return false;
    setIdentity((now) => ({ ...now, planId: theirs.id }));
    setSaving({ kind: 'overtaken', theirs });
    return true;
  };

  const settle = async (result: Exclude<PutResult, { kind: 'unreached' }>, put: PutPlan, document: BenchDocument) => {
    if (result.kind === 'saved') {
      const { id, version, state, shortCode } = result.plan;
      if (bookingId === null) {
        // What was kept under the choice is saved now; the page, opened again, shows the plan and not the protocol.
        writeKeptEdits(sessionStorage, keptEditsKey(userId, keptSubject(null, choice, identity)), null);
        window.history.replaceState(null, '', benchOfPlan({ id, bookingId }));
      }
      known.current = { planId: id, version, state, shortCode };
      setIdentity(known.current);
      setDifferences(result.plan.differences);
      setSaving({ kind: 'idle' });
      setRestored(false);
      store.dispatch({ type: 'mark-saved', document });
      return;
    }
    const { problem } = result;
    if (problem.code === 'conflict' && typeof problem.details?.currentVersion === 'number') {
      // Somebody else may have begun the plan of this booking under an id of their own: then theirs is the plan.
      const { planId } = problem.details;
      if (await meet(typeof planId === 'string' ? planId : put.id)) return;
    }
    setSaving({ kind: 'refused', problem });
  };

  const save = async (expectedVersion: number): Promise<void> => {
    const { document } = store.read();
    // The same key and body at every attempt: an answer lost on the way does not save a second version.
    const put: PutPlan = {
      id: identity.planId,
      expectedVersion,
      idempotencyKey: crypto.randomUUID(),
      plan: planInputOf(document, basis, live.read()),
    };
    for (let attempt = 1; !gone.current; attempt += 1) {
      setSaving({ kind: 'saving', attempt });
      const result = await putPlan(put);
      if (result.kind !== 'unreached') return settle(result, put, document);
      const pause = RETRY_MS[Math.min(attempt, RETRY_MS.length) - 1];
      await new Promise((resolve) => setTimeout(resolve, pause));
    }
  };

  return {
    identity,
    saving,
    differences,
    restored,
    restsOn: newest?.planId === identity.planId && newest.version === identity.version ? newest : null,
    news: isNews(newest, identity) ? newest : null,
    showNews() {
      if (newest && saving.kind !== 'saving') void meet(newest.planId);
    },
    save(expectedVersion) {
      if (saving.kind !== 'saving') void save(expectedVersion ?? identity.version);
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
