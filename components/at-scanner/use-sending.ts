'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { getStoredPlan, type Problem } from '@/components/bench/saving/put-plan';
import type { PlanView } from '@/lib/schemas/plan';
import { addToQueue, afterStored, markSent, onTopOf, queueKey, readQueue, sendFirst, writeQueue, type SendItem, type SendQueue } from './send-queue';

export type SendState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'sending' }
  | { readonly kind: 'waiting'; readonly attempts: number }
  | { readonly kind: 'refused'; readonly problem: Problem }
  | { readonly kind: 'overtaken'; readonly theirs: PlanView };

const RETRY_MS = [1000, 2000, 4000, 8000, 15_000];

export interface Sending {
  readonly state: SendState;
  readonly waiting: number;
  readonly version: number;
  readonly planId: string;
  readonly add: (items: readonly SendItem[]) => void;
  /** At once, instead of when its turn comes. */
  readonly retry: () => void;
  readonly saveOnTop: () => void;
}

/** Sends in order, keeps what waits in this tab, and tries again by itself: on a timer, and when the network is back. */
export function useSending(
  where: { readonly userId: string; readonly bookingId: string },
  first: Pick<SendQueue, 'planId' | 'version'>,
  onStored: (queue: SendQueue, plan: PlanView | undefined) => void,
): Sending {
  const key = queueKey(where.userId, where.bookingId);
  const queue = useRef<SendQueue>({ shape: 1, ...first, items: [] });
  const [state, setState] = useState<SendState>({ kind: 'idle' });
  const [shown, setShown] = useState({ waiting: 0, version: first.version, planId: first.planId });
  const busy = useRef(false);
  const attempts = useRef(0);
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const again = useRef<() => void>(() => {});
  const stored = useRef(onStored);
  useEffect(() => {
    stored.current = onStored;
  }, [onStored]);

  const keep = useCallback(
    (next: SendQueue) => {
      queue.current = next;
      writeQueue(sessionStorage, key, next);
      setShown({ waiting: next.items.length, version: next.version, planId: next.planId });
    },
    [key],
  );

  const drain = useCallback(async (): Promise<void> => {
    if (busy.current) return;
    busy.current = true;
    if (timer.current) clearTimeout(timer.current);
    timer.current = null;
    while (queue.current.items.length > 0) {
      if (attempts.current === 0) setState({ kind: 'sending' });
      keep(markSent(queue.current));
      const result = await sendFirst(queue.current);
      if (result.kind === 'stored') {
        attempts.current = 0;
        keep(afterStored(queue.current, result.plan));
        stored.current(queue.current, result.plan);
        continue;
      }
      busy.current = false;
      if (result.kind === 'unreached') {
        attempts.current += 1;
        setState({ kind: 'waiting', attempts: attempts.current });
        timer.current = setTimeout(() => again.current(), RETRY_MS[Math.min(attempts.current, RETRY_MS.length) - 1]);
        return;
      }
      attempts.current = 0;
      const { details } = result.problem;
      const isOvertaken = result.problem.code === 'conflict' && typeof details?.currentVersion === 'number';
      const theirs = isOvertaken ? await getStoredPlan(typeof details.planId === 'string' ? details.planId : queue.current.planId) : null;
      return setState(theirs ? { kind: 'overtaken', theirs } : { kind: 'refused', problem: result.problem });
    }
    busy.current = false;
    setState({ kind: 'idle' });
  }, [keep]);

  useEffect(() => {
    // What an earlier visit in this tab left unsent goes first.
    queueMicrotask(() => {
      const kept = readQueue(sessionStorage, key);
      if (!kept) return;
      keep(kept);
      void drain();
    });
    const onOnline = () => void drain();
    again.current = onOnline;
    window.addEventListener('online', onOnline);
    return () => {
      window.removeEventListener('online', onOnline);
      if (timer.current) clearTimeout(timer.current);
    };
  }, [drain, keep, key]);

  return {
    state,
    ...shown,
    add(items) {
      keep(addToQueue(queue.current, items));
      void drain();
    },
    retry: () => void drain(),
    saveOnTop() {
      if (state.kind !== 'overtaken') return;
      keep(onTopOf(queue.current, state.theirs));
      void drain();
    },
  };
}
