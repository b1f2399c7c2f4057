'use client';

import { useEffect, useState } from 'react';
import { Button, buttonClass } from '@/components/ui/button';
import type { SheetView } from '@/lib/schemas/plan-sheet';

const LOOK_AGAIN_MS = 1000;

type Progress =
  | { readonly kind: 'none' }
  | { readonly kind: 'asked'; readonly sheet?: SheetView; readonly seconds: number }
  | { readonly kind: 'refused'; readonly words: string };

const WORDS = {
  unreached: 'The server did not answer; nothing was lost. Looking again.',
  failed: 'The sheet could not be made on one page, or the plan moved on meanwhile. Ask again, or print this page.',
} as const;

/** Asks the worker for the PDF, says how far it is, and hands over the file. Leaving the page loses nothing: asking again finds it. */
export function SheetPdf({ planId, version, paper }: { planId: string; version: number; paper: 'A4' | 'Letter' }) {
  const [progress, setProgress] = useState<Progress>({ kind: 'none' });
  const [reached, setReached] = useState(true);
  const base = `/api/v1/plans/${planId}/sheets`;

  const ask = async () => {
    setProgress({ kind: 'asked', seconds: 0 });
    try {
      const response = await fetch(base, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({ version, paper }),
      });
      const answer = (await response.json()) as SheetView & { title?: string };
      setProgress(response.ok ? { kind: 'asked', sheet: answer, seconds: 0 } : { kind: 'refused', words: answer.title ?? WORDS.failed });
    } catch {
      setProgress({ kind: 'refused', words: 'The server did not answer. Try again shortly.' });
    }
  };

  const waiting = progress.kind === 'asked' && progress.sheet?.state === 'queued' ? progress.sheet.id : null;
  useEffect(() => {
    if (waiting === null) return;
    const look = async () => {
      const sheet = await fetch(`${base}/${waiting}`)
        .then((response) => (response.ok ? (response.json() as Promise<SheetView>) : null))
        .catch(() => null);
      setReached(sheet !== null);
      setProgress((now) => (now.kind === 'asked' ? { ...now, seconds: now.seconds + 1, ...(sheet ? { sheet } : {}) } : now));
    };
    const timer = setInterval(() => void look(), LOOK_AGAIN_MS);
    return () => clearInterval(timer);
  }, [base, waiting]);

  const sheet = progress.kind === 'asked' ? progress.sheet : undefined;
  if (sheet?.state === 'done') {
    return (
      <a href={`${base}/${sheet.id}/pdf`} download={`plan-sheet-v${version}.pdf`} className={buttonClass('secondary')}>
        Download the PDF, {paper}, {Math.ceil((sheet.sizeBytes ?? 0) / 1024)} kB
      </a>
    );
  }
  const busy = progress.kind === 'asked' && sheet?.state !== 'failed';
  return (
    <>
      <Button onClick={() => void ask()} pending={busy} pendingLabel={`Making the PDF, ${progress.kind === 'asked' ? progress.seconds : 0} s`}>
        Make a PDF, {paper}
      </Button>
      <p role="status" className="self-center text-sm text-ink-soft">
        {progress.kind === 'refused' && progress.words}
        {sheet?.state === 'failed' && WORDS.failed}
        {busy && (reached ? (sheet && sheet.attempts > 0 ? `Trying again, attempt ${sheet.attempts + 1}.` : '') : WORDS.unreached)}
      </p>
    </>
  );
}
