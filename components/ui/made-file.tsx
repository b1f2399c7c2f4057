'use client';

import { useEffect, useState } from 'react';
import { Button, buttonClass } from './button';

const LOOK_AGAIN_MS = 1000;

/** Where the making of a file stands, as its route answers. */
export interface FileState {
  readonly id: string;
  readonly state: 'queued' | 'done' | 'failed';
  readonly attempts: number;
  readonly sizeBytes?: number;
}

type Progress =
  | { readonly kind: 'none' }
  | { readonly kind: 'asked'; readonly file?: FileState; readonly seconds: number }
  | { readonly kind: 'refused'; readonly words: string };

const UNREACHED = 'The server did not answer; nothing was lost. Looking again.';

export interface MadeFileProps {
  /** Asked by POST; `/{id}` tells how far it is, `/{id}/pdf` is the file. */
  readonly base: string;
  readonly body: object;
  readonly fileName: string;
  /** "PDF, A4": completes "Make a …" and "Download the …". */
  readonly what: string;
  readonly failed: string;
}

/** Asks the worker for a file, says how far it is, and hands it over. Leaving the page loses nothing: asking again finds it. */
export function MadeFile({ base, body, fileName, what, failed }: MadeFileProps) {
  const [progress, setProgress] = useState<Progress>({ kind: 'none' });
  const [reached, setReached] = useState(true);

  const ask = async () => {
    setProgress({ kind: 'asked', seconds: 0 });
    try {
      const response = await fetch(base, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) });
      const answer = (await response.json()) as FileState & { title?: string };
      setProgress(response.ok ? { kind: 'asked', file: answer, seconds: 0 } : { kind: 'refused', words: answer.title ?? failed });
    } catch {
      setProgress({ kind: 'refused', words: 'The server did not answer. Try again shortly.' });
    }
  };

  const waiting = progress.kind === 'asked' && progress.file?.state === 'queued' ? progress.file.id : null;
  useEffect(() => {
    if (waiting === null) return;
    const look = async () => {
      const file = await fetch(`${base}/${waiting}`)
        .then((response) => (response.ok ? (response.json() as Promise<FileState>) : null))
        .catch(() => null);
      setReached(file !== null);
      setProgress((now) => (now.kind === 'asked' ? { ...now, seconds: now.seconds + 1, ...(file ? { file } : {}) } : now));
    };
    const timer = setInterval(() => void look(), LOOK_AGAIN_MS);
    return () => clearInterval(timer);
  }, [base, waiting]);

  const file = progress.kind === 'asked' ? progress.file : undefined;
  if (file?.state === 'done') {
    return (
      <a href={`${base}/${file.id}/pdf`} download={fileName} className={buttonClass('secondary')}>
        Download the {what}, {Math.ceil((file.sizeBytes ?? 0) / 1024)} kB
      </a>
    );
  }
  const busy = progress.kind === 'asked' && file?.state !== 'failed';
  return (
    <>
      <Button onClick={() => void ask()} pending={busy} pendingLabel={`Making the PDF, ${progress.kind === 'asked' ? progress.seconds : 0} s`}>
        Make a {what}
      </Button>
      <p role="status" className="self-center text-sm text-ink-soft">
        {progress.kind === 'refused' && progress.words}
        {file?.state === 'failed' && failed}
        {busy && (reached ? (file && file.attempts > 0 ? `Trying again, attempt ${file.attempts + 1}.` : '') : UNREACHED)}
      </p>
    </>
  );
}
