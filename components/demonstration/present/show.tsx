'use client';

import { useEffect, type ReactNode, type Ref } from 'react';
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
  readonly large?: boolean;
  readonly className?: string;
  readonly ref?: Ref<HTMLDivElement>;
}

/** One scene at a time, stepped by keys, clicker or buttons, with the controls its builder left open. */
export function Show({ title, scenes, index, onGo, children, large, className, ref }: ShowProps) {
  const { scene, moved, setQuestion, setSlice, putBack } = useMovedScene(scenes, index);
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
  return (
    <div ref={ref} className={cx('flex min-h-dvh flex-col bg-cloth px-4 py-4 text-ink sm:px-8', className)}>
      <header className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
        <div className="min-w-0">
          <p className="text-sm text-ink-soft">{title}</p>
          <h1 className={large ? 'text-3xl' : 'text-2xl'} aria-live="polite" data-scene={index + 1}>{scene.title}</h1>
        </div>
        <div className="flex flex-wrap items-center gap-2">
          <Button size="sm" aria-disabled={index === 0 || undefined} onClick={() => index > 0 && onGo(index - 1)}>Back</Button>
          <span className="figures px-1">{index + 1} / {scenes.length}</span>
          <Button size="sm" variant="primary" aria-disabled={index === last || undefined} onClick={() => index < last && onGo(index + 1)}>Next</Button>
          {children}
        </div>
      </header>
      <SceneStage scene={scene} onSlice={setSlice} large={large} className="mt-3 flex-1" />
      <footer className="mt-3 flex flex-wrap items-end gap-4">
        <SceneControls key={scene.id} ids={scene.controls} question={scene.question} onChange={setQuestion} className="min-w-0 flex-1 lg:grid-cols-3" />
        {moved && <Button size="sm" onClick={putBack}>Put back as it was</Button>}
      </footer>
    </div>
  );
}
