'use client';

import { useCallback, useRef, useState, type ReactNode } from 'react';
import { Button, LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/page';
import { TextInput } from '@/components/ui/text-input';
import { applies } from '@/lib/domain/demonstration/controls';
import { CONTROL_IDS, SCENES_MAX, type Scene } from '@/lib/domain/demonstration/scene';
import type { DemonstrationView } from '@/lib/schemas/demonstration';
import { HandOut } from '../hand-out/hand-out';
import { SaveScene } from '../save/save-scene';
import { SceneControls } from '../controls/scene-controls';
import { PictureEngine } from '../stage/picture-engine';
import { SceneStage } from '../stage/scene-stage';
import { AddSetPiece } from './add-set-piece';
import { SaveState } from './save-state';
import { SceneFacts } from './scene-facts';
import { SceneList } from './scene-list';
import { useAutosave, type SaveAction } from './use-autosave';

/** Builds a demonstration: the order on the left, the chosen scene live in the middle, what is said about it on the right. */
export function Builder({ demonstration, save, children }: { demonstration: DemonstrationView; save: SaveAction; children: ReactNode }) {
  const [content, setContent] = useState({ title: demonstration.title, scenes: demonstration.scenes });
  const [chosenId, setChosenId] = useState(demonstration.scenes[0]?.id);
  const { storedVersion, ...autosave } = useAutosave(demonstration, content, save);
  const stage = useRef<HTMLDivElement>(null);
  const { scenes } = content;
  const at = Math.max(0, scenes.findIndex(({ id }) => id === chosenId));
  const chosen = scenes[at];

  const change = useCallback(
    (id: string, patch: Partial<Scene>) =>
      setContent((each) => ({ ...each, scenes: each.scenes.map((scene) => (scene.id === id ? { ...scene, ...patch } : scene)) })),
    [],
  );
  const move = (from: number, to: number) =>
    setContent((each) => {
      const next = [...each.scenes];
      const [taken] = next.splice(from, 1);
      if (taken) next.splice(to, 0, taken);
      return { ...each, scenes: next };
    });
  const duplicate = (scene: Scene) => {
    const copy = { ...scene, id: crypto.randomUUID(), title: `${scene.title} (copy)`.slice(0, 120) };
    setContent((each) => ({ ...each, scenes: [...each.scenes.slice(0, at + 1), copy, ...each.scenes.slice(at + 1)] }));
    setChosenId(copy.id);
  };
  const add = (added: readonly Scene[]) => {
    setContent((each) => ({ ...each, scenes: [...each.scenes, ...added] }));
    setChosenId(added[0]?.id);
  };
  const remove = (scene: Scene) => {
    setContent((each) => ({ ...each, scenes: each.scenes.filter(({ id }) => id !== scene.id) }));
    setChosenId((scenes[at + 1] ?? scenes[at - 1])?.id);
  };

  return (
    <PictureEngine>
      <div className="mb-4 flex flex-wrap items-end justify-between gap-4">
        <TextInput
          className="w-full max-w-xl"
          label="Title of the demonstration"
          value={content.title}
          maxLength={120}
          error={content.title.trim() === '' ? 'Nothing given; allowed: text of 1 to 120 characters.' : undefined}
          onChange={(event) => setContent((each) => ({ ...each, title: event.target.value }))}
        />
        <SaveState {...autosave} />
      </div>
      {!chosen ? (
        <div className="space-y-6">
          <EmptyState title="No scenes yet" action={<LinkButton href="/bench" variant="primary">Open the bench</LinkButton>}>
            Set something up on the bench and press “Add to a demonstration”, or begin with the scenes of a set piece.
          </EmptyState>
          <div className="max-w-md"><AddSetPiece scenes={scenes} onAdd={add} /></div>
        </div>
      ) : (
        <div className="grid gap-6 lg:grid-cols-[15rem_minmax(0,1fr)] 2xl:grid-cols-[15rem_minmax(0,1fr)_19rem]">
          <div>
            <SceneList scenes={scenes} chosenId={chosen.id} onChoose={setChosenId} onMove={move} />
            <div className="mt-3 flex flex-wrap gap-2">
              <Button size="sm" disabled={scenes.length >= SCENES_MAX} onClick={() => duplicate(chosen)}>Duplicate</Button>
              <Button size="sm" onClick={() => remove(chosen)}>Take out</Button>
            </div>
            <div className="mt-4 border-t border-line pt-4"><AddSetPiece scenes={scenes} onAdd={add} /></div>
          </div>
          <div className="min-w-0 space-y-4" ref={stage}>
            <SceneStage scene={chosen} onSlice={(sliceOffsetMm) => change(chosen.id, { sliceOffsetMm })}>
              <SceneControls
                key={chosen.id}
                ids={CONTROL_IDS.filter((id) => applies(id, chosen.question))}
                question={chosen.question}
                onChange={(question) => change(chosen.id, { question })}
                className="mt-4 border-t border-line pt-3 xl:grid-cols-3"
              />
            </SceneStage>
            <div className="flex flex-wrap gap-2"><SaveScene stage={stage} number={at + 1} title={chosen.title} /></div>
          </div>
          <div className="lg:col-span-2 2xl:col-span-1">
            <SceneFacts key={chosen.id} scene={chosen} onChange={(patch) => change(chosen.id, patch)} />
          </div>
        </div>
      )}
      <div className="mt-10 grid gap-x-12 gap-y-8 border-t border-line pt-6 lg:grid-cols-2">
        {children}
        {chosen && <HandOut id={demonstration.id} version={storedVersion} />}
      </div>
    </PictureEngine>
  );
}
