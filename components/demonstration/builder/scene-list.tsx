'use client';

import { useState, type KeyboardEvent } from 'react';
import { IconButton } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import type { Scene } from '@/lib/domain/demonstration/scene';

export interface SceneListProps {
  readonly scenes: readonly Scene[];
  readonly chosenId: string | undefined;
  readonly onChoose: (id: string) => void;
  readonly onMove: (from: number, to: number) => void;
}

/** The scenes in their order. Dragged, moved by the buttons, or with Alt and the arrow keys. */
export function SceneList({ scenes, chosenId, onChoose, onMove }: SceneListProps) {
  const [dragged, setDragged] = useState<number | null>(null);
  const [over, setOver] = useState<number | null>(null);
  const last = scenes.length - 1;
  const onKeyDown = (event: KeyboardEvent, index: number) => {
    const step = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : 0;
    if (!event.altKey || step === 0) return;
    event.preventDefault();
    const to = index + step;
    if (to >= 0 && to <= last) onMove(index, to);
  };
  return (
    <ol aria-label="Scenes" aria-describedby="scene-list-help" className="space-y-1">
      {scenes.map((scene, index) => (
        <li
          key={scene.id}
          draggable
          onDragStart={(event) => {
            event.dataTransfer.effectAllowed = 'move';
            event.dataTransfer.setData('text/plain', String(index));
            setDragged(index);
          }}
          onDragOver={(event) => {
            if (dragged === null) return;
            event.preventDefault();
            setOver(index);
          }}
          onDrop={(event) => {
            event.preventDefault();
            if (dragged !== null && dragged !== index) onMove(dragged, index);
          }}
          onDragEnd={() => {
            setDragged(null);
            setOver(null);
          }}
          className={cx(
            'flex items-start gap-1 rounded border',
            scene.id === chosenId ? 'border-indigo bg-wash' : 'border-line bg-paper',
            over === index && dragged !== index && 'outline-2 outline-dashed outline-indigo',
          )}
        >
          <button
            type="button"
            aria-current={scene.id === chosenId || undefined}
            aria-keyshortcuts="Alt+ArrowUp Alt+ArrowDown"
            onClick={() => onChoose(scene.id)}
            onKeyDown={(event) => onKeyDown(event, index)}
            className="min-w-0 flex-1 px-3 py-2 text-left"
          >
            <span className="figures text-sm text-ink-soft">{index + 1}</span> {scene.title}
            <span className="block text-sm text-ink-soft">{scene.view}</span>
          </button>
          <span className="flex flex-col">
            <IconButton label={`Move “${scene.title}” up`} disabled={index === 0} onClick={() => onMove(index, index - 1)}>↑</IconButton>
            <IconButton label={`Move “${scene.title}” down`} disabled={index === last} onClick={() => onMove(index, index + 1)}>↓</IconButton>
          </span>
        </li>
      ))}
      <li id="scene-list-help" className="list-none text-sm text-ink-soft">Drag to reorder, or Alt with ↑ and ↓.</li>
    </ol>
  );
}
