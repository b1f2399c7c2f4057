'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { Button, LinkButton } from '@/components/ui/button';
import type { DemonstrationView } from '@/lib/schemas/demonstration';
import { PictureEngine } from '../stage/picture-engine';
import { openChannel } from './channel';
import { Show } from './show';

/** The window the room looks at. All it needs is loaded with it, so it goes on when the network does not. */
export function Presentation({ demonstration }: { demonstration: DemonstrationView }) {
  const { id, title, scenes } = demonstration;
  const [index, setIndex] = useState(0);
  const [startedAt, setStartedAt] = useState<number | null>(null);
  const [blocked, setBlocked] = useState(false);
  const room = useRef<HTMLDivElement>(null);
  const place = useRef({ index, startedAt });
  const channel = useRef<ReturnType<typeof openChannel> | null>(null);

  useEffect(() => {
    const tell = () => {
      const { index: at, startedAt: since } = place.current;
      if (since !== null) channel.current?.send({ kind: 'at', index: at, startedAt: since });
    };
    channel.current = openChannel(id, (message) => {
      if (message.kind === 'ask') tell();
      if (message.kind === 'go') setIndex(Math.min(scenes.length - 1, Math.max(0, message.index)));
    });
    return () => channel.current?.close();
  }, [id, scenes.length]);

  useEffect(() => {
    place.current = { index, startedAt };
    if (startedAt !== null) channel.current?.send({ kind: 'at', index, startedAt });
  }, [index, startedAt]);

  const fullScreen = useCallback(() => {
    // Refused where the browser has none, as on some tablets: the page fills the window anyway.
    if (document.fullscreenElement) void document.exitFullscreen();
    else void room.current?.requestFullscreen?.().catch(() => undefined);
  }, []);
  const start = (withPresenter: boolean) => {
    if (withPresenter) {
      const opened = window.open(`/demonstrations/${id}/presenter`, `selvedge-presenter-${id}`, 'popup,width=900,height=720');
      setBlocked(opened === null);
    } else fullScreen();
    setStartedAt(Date.now());
  };
  const leave = <LinkButton href={`/demonstrations/${id}`} size="sm">Leave</LinkButton>;

  return (
    <div className="fixed inset-0 z-40 overflow-y-auto bg-cloth" ref={room}>
      <PictureEngine>
        {startedAt === null ? (
          <div className="mx-auto flex min-h-full max-w-2xl flex-col justify-center gap-5 px-6 py-10">
            <h1 className="text-3xl">{title}</h1>
            <p className="text-lg text-ink-soft">
              {scenes.length} {scenes.length === 1 ? 'scene' : 'scenes'}. Step with the arrow keys, Page Up and Page Down, or a clicker. Once opened it needs no network.
            </p>
            <div className="flex flex-wrap gap-3">
              <Button variant="primary" onClick={() => start(true)}>Start with the presenter’s window</Button>
              <Button onClick={() => start(false)}>Start without it</Button>
              <LinkButton href={`/demonstrations/${id}`}>Back to building</LinkButton>
            </div>
          </div>
        ) : (
          <Show title={title} scenes={scenes} index={index} onGo={setIndex} large>
            <Button size="sm" onClick={fullScreen}>Full screen</Button>
            {leave}
          </Show>
        )}
        {blocked && startedAt !== null && (
          <p role="alert" className="fixed right-4 bottom-4 max-w-md bg-ink px-4 py-2 text-paper">
            The browser kept the presenter’s window from opening. Allow windows for this site, leave, and start again.
          </p>
        )}
      </PictureEngine>
    </div>
  );
}
