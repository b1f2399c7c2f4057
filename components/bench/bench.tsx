'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useEffect, useState, type KeyboardEvent, type ReactNode } from 'react';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import { BenchProvider } from './bench-context';
import { BenchLayout } from './bench-layout';
import type { ProtocolPrescriptions } from './prescription-panel';
import { createBench } from './create-bench';
import type { Results } from './live/results';
import type { PlanIdentity } from './saving/plan-identity';
import type { BenchDocument, BenchSetting } from './state/bench-document';
import type { PlanBasis } from './state/plan-document';

export interface BenchProps {
  readonly document: BenchDocument;
  readonly setting: BenchSetting;
  /** Worked out by the server, so that the first picture needs no waiting. */
  readonly initial: Results;
  readonly activeId: string;
  readonly basis: PlanBasis;
  readonly plan: PlanIdentity;
  readonly userId: string;
  /** Hiding the button is courtesy; the server decides. */
  readonly mayEdit: boolean;
  readonly keepClearPreset: KeepClear;
  /** Who asked for the keep-clear area and what for, in a sentence; absent when nobody did. */
  readonly keepClearAsked?: string;
  readonly protocolLabel: string;
  readonly protocolPrescriptions: ProtocolPrescriptions;
  /** Whose bench it is: the booking, or the choice of scanner and protocol. */
  readonly children: ReactNode;
}

export function Bench({ children, ...props }: BenchProps) {
  const [fault, setFault] = useState<unknown>(null);
  if (fault) throw fault;

  // A bench lives as long as its page: another booking is another page, with its own key.
  const [bench] = useState(() => createBench({ ...props, stored: props.plan.version > 0, onFault: setFault }));
  useEffect(() => bench.run(), [bench]);
  const [queries] = useState(() => new QueryClient());

  const onKeyDown = (event: KeyboardEvent<HTMLElement>) => {
    const { store } = bench;
    const typing = event.target instanceof HTMLInputElement && event.target.role === 'spinbutton';
    if (event.key === 'Escape' && store.read().trial) {
      event.preventDefault();
      store.dispatch({ type: 'leave-trial' });
    } else if ((event.ctrlKey || event.metaKey) && event.key.toLowerCase() === 'z' && !typing) {
      event.preventDefault();
      store.dispatch({ type: event.shiftKey ? 'redo' : 'undo' });
    } else if ((event.ctrlKey || event.metaKey) && event.key.toLowerCase() === 'y' && !typing) {
      event.preventDefault();
      store.dispatch({ type: 'redo' });
    }
  };

  return (
    <QueryClientProvider client={queries}>
      <BenchProvider value={bench}>
        <div onKeyDown={onKeyDown} className="contents">
          <BenchLayout {...props}>{children}</BenchLayout>
        </div>
      </BenchProvider>
    </QueryClientProvider>
  );
}
