'use client';

import { useEffect, useState } from 'react';
import { BenchProvider } from '@/components/bench/bench-context';
import { createBench } from '@/components/bench/create-bench';
import type { Results } from '@/components/bench/live/results';
import type { PlanIdentity } from '@/components/bench/saving/plan-identity';
import type { BenchDocument, BenchSetting } from '@/components/bench/state/bench-document';
import type { PlanBasis } from '@/components/bench/state/plan-document';
import { AtScannerLayout } from './at-scanner-layout';

export interface AtScannerProps {
  readonly document: BenchDocument;
  readonly setting: BenchSetting;
  readonly initial: Results;
  readonly activeId: string;
  readonly basis: PlanBasis & { readonly bookingId: string };
  readonly plan: PlanIdentity;
  readonly userId: string;
  readonly reference: string;
  readonly scannerName: string;
}

/** The bench for one hand: sizes off the localiser, verdict, adopt, save. It is the same bench, and the same engine. */
export function AtScanner(props: AtScannerProps) {
  const [fault, setFault] = useState<unknown>(null);
  if (fault) throw fault;
  const [bench] = useState(() => createBench({ ...props, stored: props.plan.version > 0, onFault: setFault }));
  useEffect(() => bench.run(), [bench]);
  return (
    <BenchProvider value={bench}>
      <AtScannerLayout {...props} />
    </BenchProvider>
  );
}
