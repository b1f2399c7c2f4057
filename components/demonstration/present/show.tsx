'use client';

import { useEffect, useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import { SceneControls } from '../controls/scene-controls';
import { SceneStage } from '../stage/scene-stage';
import type { ShownScene } from '../stage/shown-scene';
import { useMovedScene } from '../stage/use-moved-scene';
import { stepOfKey } from './step-of-key';

export interface ShowProps {
  readonly title: string;
  readonly scenes: readonly ShownScene[];
  readonly index: number;
  readonly onGo: (index: number) => void;
  /** Beside the steps: full screen, leave. */
  readonly children?: ReactNode;
  /** For a room: fills the screen without scrolling, letters grow with it, and controls open when they are wanted. */
  readonly large?: boolean;
}

/** One scene at a time, stepped by keys, clicker or buttons, with the controls its builder left open. */
export function Show({ title, scenes, index, onGo, children, large = false }: ShowProps) {
  const { scene, moved, setQuestion, setSlice, putBack } = useMovedScene(scenes, index);
  const [open, setOpen] = useState(false);
  const last = scenes.length - 1;
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const to = stepOfKey(event, index, last);
      if (to === null) return;
      event.preventDefault();
      if (to !== index) onGo(to);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [index, last, onGo]);
  const mayMove = scene.controls.length > 0;
  const controls = (
    <footer className="mt-3 flex flex-wrap items-end gap-x-6 gap-y-3">
      {(!large || open) && (
        <SceneControls key={scene.id} ids={scene.controls} question={scene.question} onChange={setQuestion} className="min-w-0 flex-1 lg:grid-cols-3" />
      )}
      {moved && <Button size="sm" onClick={putBack}>Put back as it was</Button>}
    </footer>
  );
  return (
    <div className={cx('flex flex-col bg-cloth px-4 py-4 text-ink sm:px-8', large ? 'min-h-dvh lg:h-dvh lg:overflow-hidden' : 'min-h-dvh')}>
      <header className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
        <p className={cx('min-w-0 text-ink-soft', large ? 'text-base' : 'text-sm')}>{title}</p>
        <div className="flex flex-wrap items-center gap-2">
          {large && mayMove && (
            <Button size="sm" aria-expanded={open} onClick={() => setOpen(!open)}>{open ? 'Close controls' : 'Controls'}</Button>
          )}
          <Button size="sm" aria-disabled={index === 0 || undefined} onClick={() => index > 0 && onGo(index - 1)}>Back</Button>
          <span className="figures px-1">{index + 1} / {scenes.length}</span>
          <Button size="sm" variant="primary" aria-disabled={index === last || undefined} onClick={() => index < last && onGo(index + 1)}>Next</Button>
          {children}
        </div>
      </header>
      <h1 className={cx('mt-4 text-pretty sm:mt-2', large ? 'text-3xl sm:text-4xl' : 'text-2xl')} aria-live="polite" data-scene={index + 1}>{scene.title}</h1>
      <SceneStage scene={scene} onSlice={setSlice} large={large} className="mt-2 flex-1">{!large && controls}</SceneStage>
      {large && (open || moved) && controls}
    </div>
  );
}
