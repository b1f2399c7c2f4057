'use client';

import { useEffect, useRef, useState } from 'react';
import { useBench, useBenchState } from '@/components/bench/bench-context';
import { keptEditsKey, readKeptEdits, writeKeptEdits } from '@/components/bench/saving/kept-edits';
import { isUnsaved } from '@/components/bench/state/bench-state';
import type { BenchDocument } from '@/components/bench/state/bench-document';
import { planInputOf } from '@/components/bench/state/plan-document';
import { SIDES, type Side } from '@/lib/physics/model/axes';
import type { Patient } from '@/lib/physics/model/patient';
import type { PlanView } from '@/lib/schemas/plan';
import type { AtScannerProps } from './at-scanner';
import type { SendItem } from './send-queue';
import { useSending, type Sending } from './use-sending';

export interface ScannerSaving extends Sending {
  readonly unsaved: boolean;
  readonly save: () => void;
  /** State of the plan as it was last stored. */
  readonly planState: PlanView['state'] | null;
}

/** Readings off the localiser that are not in the size record yet. */
function newReadings(now: Patient['extents'], recorded: Patient['extents']) {
  return SIDES.filter((side: Side) => now[side].source === 'localiser' && now[side] !== recorded[side]).map((side) => ({
    id: crypto.randomUUID(),
    quantity: `extent-${side}-mm` as const,
    value: now[side].value,
    source: 'localiser' as const,
    spread: now[side].spread,
    takenOn: now[side].takenOn ?? '',
  }));
}

/** Saves the sizes into the record and the plan as its next version, through a queue that outlives a lost network. */
export function useScannerSaving({ document: first, basis, plan, userId }: AtScannerProps): ScannerSaving {
  const { store, live } = useBench();
  const unsaved = useBenchState(isUnsaved);
  const document = useBenchState((state) => state.document);
  const [planState, setPlanState] = useState(plan.state);
  const recorded = useRef(first.patient.extents);
  const saving = useRef<BenchDocument | null>(null);
  const benchKey = keptEditsKey(userId, basis.bookingId);

  const sending = useSending({ userId, bookingId: basis.bookingId }, { planId: plan.planId, version: plan.version }, (queue, stored) => {
    if (!stored) return;
    setPlanState(stored.state);
    if (queue.items.length > 0 || !saving.current) return;
    store.dispatch({ type: 'mark-saved', document: saving.current });
    if (store.read().document === saving.current) writeKeptEdits(sessionStorage, benchKey, null);
  });

  // The bench keeps unsaved edits of this booking under the same name: what is changed here is there as well.
  useEffect(() => {
    queueMicrotask(() => {
      const kept = readKeptEdits(sessionStorage, benchKey);
      if (!kept) return;
      store.dispatch({ type: 'replace-document', document: kept.document, saved: false });
      saving.current = kept.document;
    });
  }, [benchKey, store]);
  useEffect(() => {
    if (document === first || !isUnsaved(store.read())) return;
    writeKeptEdits(sessionStorage, benchKey, { shape: 1, planId: plan.planId, version: plan.version, document });
  }, [benchKey, document, first, plan, store]);

  return {
    ...sending,
    unsaved,
    planState,
    save() {
      const now = store.read().document;
      const readings = newReadings(now.patient.extents, recorded.current);
      recorded.current = now.patient.extents;
      saving.current = now;
      const items: SendItem[] = [
        ...(readings.length > 0 ? [{ kind: 'readings' as const, bookingId: basis.bookingId, readings }] : []),
        { kind: 'plan', idempotencyKey: crypto.randomUUID(), plan: planInputOf(now, basis, live.read()) },
      ];
      sending.add(items);
    },
  };
}
