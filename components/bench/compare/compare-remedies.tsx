'use client';

import { useMemo } from 'react';
import { assess } from '@/lib/physics';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { Remedy } from '@/lib/physics/model/remedy';
import { scanTimeFigure } from '@/lib/presentation/assessment-figures';
import { formatPercent } from '@/lib/presentation/percent';
import { remedyTitle } from '@/lib/presentation/remedy-words';
import { useActiveResult } from '../bench-context';
import { CompareChart } from './compare-chart';
import { comparePoints, frontOf } from './compare-points';
import { PriceAndGain, type PriceRow } from './price-and-gain';

export interface CompareRemediesProps {
  readonly remedies: readonly Remedy[];
  readonly now: Assessment;
  readonly linkedKey: string | null;
  readonly triedKey: string | null;
  readonly onLink: (key: string | null) => void;
  readonly onTry: (remedy: Remedy) => void;
}

/** Most rows beside each other: more is a list again, and the list is below. */
const ROWS = 4;

/** Time against SNR for every remedy, and price and gain side by side for those that cost least. */
export function CompareRemedies({ remedies, now, linkedKey, triedKey, onLink, onTry }: CompareRemediesProps) {
  const { question } = useActiveResult();
  const points = useMemo(() => comparePoints(remedies, now), [remedies, now]);
  const titles = useMemo(() => new Map(remedies.map((remedy) => [remedy.key, remedyTitle(remedy)])), [remedies]);
  const reference = useMemo(() => coverRow(question, now), [question, now]);
  if (points.length === 0) return null;

  const without = points.filter(({ leavesFold }) => !leavesFold);
  const shown = (without.length > 0 ? without : points).slice(0, ROWS);
  for (const key of [triedKey, linkedKey]) {
    const extra = points.find((point) => point.key === key);
    if (extra && !shown.includes(extra)) shown.push(extra);
  }
  const rows = shown.map((point): PriceRow => {
    const remedy = remedies.find(({ key }) => key === point.key)!;
    const [before, after] = [scanTimeFigure(now, question.prescription), scanTimeFigure(remedy.assessment, remedy.prescription)];
    return { ...point, title: titles.get(point.key)!, timeWords: before === after ? after : `${before} → ${after}` };
  });
  return (
    <section aria-label="Remedies compared" className="border-b border-line px-4 py-3">
      <CompareChart
        {...{ points, titles, linkedKey, triedKey, onLink }}
        onTry={(key) => {
          const remedy = remedies.find((each) => each.key === key);
          if (remedy) onTry(remedy);
        }}
      />
      {frontOf(points).length > 1 && (
        <p className="mb-2 text-sm text-ink-soft">Dotted: nothing gives more SNR in less time. Below it, minutes buy nothing.</p>
      )}
      <PriceAndGain rows={reference ? [...rows, reference] : rows} linkedKey={linkedKey} onLink={onLink} />
    </section>
  );
}

/** What covering the whole body would cost, where less is enough: time and SNR of oversampling that nobody needs. */
function coverRow(question: Case, now: Assessment): PriceRow | null {
  const { width, time, detail } = now;
  const { prescription } = question;
  const enough = width?.firstCleanLines;
  if (!width || !time || !detail || enough === undefined || width.coverBodyLines <= enough) return null;
  const cover = answerAt(question, width.coverBodyLines);
  if (!cover?.time || !cover.detail) return null;
  const percent = (width.coverBodyLines / prescription.linesAcrossFov - 1) * 100;
  const least = (enough / prescription.linesAcrossFov - 1) * 100;
  return {
    key: 'covering-the-body',
    title: `Covering the whole body, ${formatPercent(percent, 1)} where ${formatPercent(least, 1)} is enough:`,
    timeWords: `${scanTimeFigure(now, prescription)} → ${scanTimeFigure(cover, prescription)}`,
    timePct: (cover.time.scanS / time.scanS - 1) * 100,
    snrPct: (cover.detail.snr / detail.snr - 1) * 100,
    onFront: false,
    leavesFold: false,
    reference: true,
  };
}

function answerAt(question: Case, acquiredLines: number): Assessment | null {
  try {
    return assess({ ...question, prescription: { ...question.prescription, acquiredLines } });
  } catch (error) {
    if (error instanceof Error && error.name === 'DomainError') return null;
    throw error;
  }
}
