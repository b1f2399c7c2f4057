'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { Button, LinkButton } from '@/components/ui/button';
import type { DemonstrationView } from '@/lib/schemas/demonstration';
import { PictureEngine } from '../stage/picture-engine';
import { openChannel } from './channel';
import './room.css';
import { Show } from './show';
import { isBlankKey } from './step-of-key';

/** The window the room looks at. All it needs is loaded with it, so it goes on when the network does not. */
export function Presentation({ demonstration }: { demonstration: DemonstrationView }) {
  const { id, title, scenes } = demonstration;
  const [index, setIndex] = useState(0);
  const [startedAt, setStartedAt] = useState<number | null>(null);
  const [blocked, setBlocked] = useState(false);
  const [blank, setBlank] = useState(false);
  const room = useRef<HTMLDivElement>(null);
  const place = useRef({ index, startedAt, blank });
  const channel = useRef<ReturnType<typeof openChannel> | null>(null);

  // The screen goes dark while the room looks at the presenter; any step brings it back.
  const go = useCallback((to: number) => {
    setBlank(false);
    setIndex(to);
  }, []);
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (isBlankKey(event)) setBlank((dark) => !dark);
      else if (event.key === 'Escape') setBlank(false);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, []);

  useEffect(() => {
    const tell = () => {
      const { startedAt: since, ...rest } = place.current;
      if (since !== null) channel.current?.send({ kind: 'at', ...rest, startedAt: since });
    };
    channel.current = openChannel(id, (message) => {
      if (message.kind === 'ask') tell();
      if (message.kind === 'go') go(Math.min(scenes.length - 1, Math.max(0, message.index)));
      if (message.kind === 'blank') setBlank(message.blank);
    });
    return () => channel.current?.close();
  }, [id, scenes.length, go]);

  useEffect(() => {
    place.current = { index, startedAt, blank };
    if (startedAt !== null) channel.current?.send({ kind: 'at', index, startedAt, blank });
  }, [index, startedAt, blank]);

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
    <div className="fixed inset-0 z-40 overflow-y-auto bg-cloth" ref={room} data-room>
      <PictureEngine>
        {startedAt === null ? (
          <div className="mx-auto flex min-h-full max-w-2xl flex-col justify-center gap-5 px-6 py-10">
            <h1 className="text-3xl">{title}</h1>
            <p className="text-lg text-ink-soft">
              {scenes.length} {scenes.length === 1 ? 'scene' : 'scenes'}. Step with the arrow keys, Page Up and Page Down, or a clicker; B darkens the screen. Once opened it needs no network.
            </p>
            <div className="flex flex-wrap gap-3">
              <Button variant="primary" onClick={() => start(true)}>Start with the presenter’s window</Button>
              <Button onClick={() => start(false)}>Start without it</Button>
              <LinkButton href={`/demonstrations/${id}`}>Back to building</LinkButton>
            </div>
          </div>
        ) : (
          <Show title={title} scenes={scenes} index={index} onGo={go} large>
            <Button size="sm" onClick={fullScreen}>Full screen</Button>
            {leave}
          </Show>
        )}
        {blank && <div role="status" className="fixed inset-0 bg-unlit" data-blank><span className="sr-only">The screen is dark. B brings it back.</span></div>}
        {blocked && startedAt !== null && (
          <p role="alert" className="fixed right-4 bottom-4 max-w-md bg-ink px-4 py-2 text-paper">
            The browser kept the presenter’s window from opening. Allow windows for this site, leave, and start again.
          </p>
        )}
      </PictureEngine>
    </div>
  );
}
