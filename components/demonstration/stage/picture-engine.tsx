'use client';

import { createContext, useCallback, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import { useLatest } from '@/components/bench/live/use-latest';
import { createViewsEngine, type ViewsEngine } from '@/components/bench/live/views-engine';
import type { AskedPicture, PaintedPicture } from '@/components/bench/picture/painted-picture';
import type { Case } from '@/lib/physics/model/case';
import { useSettled } from './use-settled';

const EngineContext = createContext<ViewsEngine | null>(null);

/** One Worker for the simulated pictures of a page, loaded while the network is there. */
export function PictureEngine({ children }: { children: ReactNode }) {
  const [fault, setFault] = useState<unknown>(null);
  const [engine] = useState(() => createViewsEngine(setFault));
  useEffect(() => {
    engine.engine();
    return () => engine.stop();
  }, [engine]);
  if (fault) throw fault;
  return <EngineContext.Provider value={engine}>{children}</EngineContext.Provider>;
}

/** The newest simulated picture; while the next is worked out the one before it stays. */
export function useSimulated(asked: Case | null, sliceOffsetMm: number, sizePx: number) {
  const question = useSettled(asked);
  const engine = useContext(EngineContext);
  if (!engine) throw new Error('Only inside a PictureEngine.');
  const run = useCallback(async (wanted: AskedPicture): Promise<PaintedPicture> => engine.engine().picture(wanted), [engine]);
  const job = useMemo(() => (question ? { question, sliceOffsetMm, sizePx, fitWhite: true } : null), [question, sliceOffsetMm, sizePx]);
  return useLatest(job, run);
}
