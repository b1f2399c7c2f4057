'use client';

import { useCallback, useMemo } from 'react';
import type { Case } from '@/lib/physics/model/case';
import type { Remedy } from '@/lib/physics/model/remedy';
import { useActiveResult, useBench } from '../bench-context';
import { useLatest } from '../live/use-latest';
import { triedCase } from '../state/case-of';
import type { AskedPicture, PaintedPicture } from './painted-picture';

const SIZE_PX = 256;

interface Asked {
  readonly now: AskedPicture;
  readonly tried: AskedPicture | null;
}

interface Painted {
  readonly now: PaintedPicture;
  readonly tried: PaintedPicture | null;
}

/** The picture of the slice shown, now and with what is tried, of one and the same moment. */
export function usePictures(remedy: Remedy | undefined, sliceOffsetMm: number) {
  const { views } = useBench();
  const { question, assessment } = useActiveResult();
  const run = useCallback(
    async ({ now, tried }: Asked): Promise<Painted> => {
      const engine = views.engine();
      const [a, b] = await Promise.all([engine.picture(now), tried ? engine.picture(tried) : null]);
      return { now: a, tried: b };
    },
    [views],
  );
  const { patient, prescription, keepClear, scanner, policy } = question;
  const before = assessment?.detail?.snr;
  const job = useMemo((): Asked | null => {
    if (before === undefined) return null;
    const asked: Case = { patient, prescription, keepClear, scanner, policy };
    const after = remedy?.assessment.detail?.snr;
    return {
      now: { question: asked, sliceOffsetMm, sizePx: SIZE_PX },
      tried: remedy ? { question: triedCase(asked, remedy), sliceOffsetMm, sizePx: SIZE_PX, relativeSnr: (after ?? before) / before } : null,
    };
  }, [patient, prescription, keepClear, scanner, policy, before, remedy, sliceOffsetMm]);
  return useLatest(job, run);
}
