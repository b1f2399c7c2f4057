'use client';

import { useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import type { DemonstrationView } from '@/lib/schemas/demonstration';
import { formatClock } from '@/lib/presentation/duration';
import { openChannel } from './channel';
import { NextScene } from './next-scene';
import { isBlankKey, stepOfKey } from './step-of-key';

/** The presenter's own window: what to say, what comes next, and how long it has been. */
export function PresenterWindow({ demonstration }: { demonstration: DemonstrationView }) {
  const { id, title, scenes } = demonstration;
  const [at, setAt] = useState<{ index: number; startedAt: number; blank: boolean } | null>(null);
  const [now, setNow] = useState(0);
  const channel = useRef<ReturnType<typeof openChannel> | null>(null);
  useEffect(() => {
    channel.current = openChannel(id, (message) => {
      if (message.kind === 'at') setAt({ index: message.index, startedAt: message.startedAt, blank: message.blank });
    });
    channel.current.send({ kind: 'ask' });
    const tick = setInterval(() => setNow(Date.now()), 500);
    return () => {
      clearInterval(tick);
      channel.current?.close();
    };
  }, [id]);

  const index = at?.index ?? 0;
  const blank = at?.blank ?? false;
  const last = scenes.length - 1;
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (isBlankKey(event)) return channel.current?.send({ kind: 'blank', blank: !blank });
      const to = stepOfKey(event, index, last);
      if (to === null) return;
      event.preventDefault();
      channel.current?.send({ kind: 'go', index: to });
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [index, last, blank]);

  const scene = scenes[index];
  const next = scenes[index + 1];
  const seconds = at ? Math.max(0, Math.floor((now - at.startedAt) / 1000)) : 0;
  return (
    <div className="fixed inset-0 z-40 overflow-y-auto bg-cloth px-6 py-5">
      <header className="flex flex-wrap items-baseline justify-between gap-4 border-b border-line pb-3">
        <p className="text-ink-soft">{title} · presenter’s window</p>
        <p className="figures text-3xl" role="timer" aria-label="Time since the start">{formatClock(seconds)}</p>
      </header>
      {!at && <p className="mt-4 text-lg">Waiting for the presentation to start in the other window.</p>}
      {scene && (
        <div className="mt-4 grid gap-6 md:grid-cols-[minmax(0,3fr)_minmax(14rem,2fr)]">
          <section>
            <h1 className="text-2xl" data-presenter-scene={index + 1}>
              {index + 1} / {scenes.length} {scene.title}
            </h1>
            <p className="mt-4 text-xl whitespace-pre-wrap" data-presenter-note>{scene.note || 'No note for this scene.'}</p>
            <div className="mt-6 flex gap-3">
              <Button onClick={() => channel.current?.send({ kind: 'go', index: index - 1 })}>Back</Button>
              <Button variant="primary" onClick={() => channel.current?.send({ kind: 'go', index: index + 1 })}>Next</Button>
              <Button aria-pressed={blank} onClick={() => channel.current?.send({ kind: 'blank', blank: !blank })}>{blank ? 'Bring the screen back' : 'Darken the screen'}</Button>
            </div>
          </section>
          <section aria-label="Next scene">
            <h2 className="text-lg text-ink-soft">{next ? 'Next' : 'This is the last scene'}</h2>
            {next && <NextScene scene={next} />}
          </section>
        </div>
      )}
    </div>
  );
}
