'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { SCENES_MAX, type Scene } from '@/lib/domain/demonstration/scene';
import { SET_PIECES } from '@/lib/domain/demonstration/set-pieces';

const OPTIONS = SET_PIECES.map(({ key, title }) => ({ value: key, label: title }));

/** Scenes of a set piece behind those there are: several can be told as one story. */
export function AddSetPiece({ scenes, onAdd }: { scenes: readonly Scene[]; onAdd: (added: readonly Scene[]) => void }) {
  const [key, setKey] = useState(OPTIONS[0]!.value);
  const [problem, setProblem] = useState<string | null>(null);
  const add = () => {
    const added = SET_PIECES.find((piece) => piece.key === key)!.scenes();
    const all = scenes.length + added.length;
    if (all > SCENES_MAX) return setProblem(`That would make ${all} scenes; allowed: up to ${SCENES_MAX}.`);
    setProblem(null);
    onAdd(added.map((scene) => ({ ...scene, id: crypto.randomUUID() })));
  };
  return (
    <div className="space-y-2">
      <Select label="Add scenes from a set piece" value={key} options={OPTIONS} onChange={(event) => setKey(event.target.value)} />
      <Button size="sm" onClick={add}>Add its scenes</Button>
      {problem && <p role="alert" className="text-sm">{problem}</p>}
    </div>
  );
}
