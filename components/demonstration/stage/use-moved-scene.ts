'use client';

import { useState } from 'react';
import type { Case } from '@/lib/physics/model/case';
import type { ShownScene } from './shown-scene';

export interface MovedScene {
  readonly scene: ShownScene;
  readonly moved: boolean;
  readonly setQuestion: (question: Case) => void;
  readonly setSlice: (offsetMm: number) => void;
  readonly putBack: () => void;
}

/** What is moved in a shown scene stays as it was left until it is put back; what was built stays as it is. */
export function useMovedScene(scenes: readonly ShownScene[], index: number): MovedScene {
  const [moves, setMoves] = useState<Readonly<Record<string, Pick<ShownScene, 'question' | 'sliceOffsetMm'>>>>({});
  const [together, setTogether] = useState<{ of: ShownScene; with: unknown; scene: ShownScene } | null>(null);
  const built = scenes[index]!;
  const move = moves[built.id];
  // One object as long as neither part changes: the picture is drawn anew only then.
  let current = together;
  if (!current || current.of !== built || current.with !== move) {
    current = { of: built, with: move, scene: move ? { ...built, ...move } : built };
    setTogether(current);
  }
  const { scene } = current;
  const change = (patch: Partial<Pick<ShownScene, 'question' | 'sliceOffsetMm'>>) =>
    setMoves((all) => ({ ...all, [built.id]: { question: scene.question, sliceOffsetMm: scene.sliceOffsetMm, ...all[built.id], ...patch } }));
  return {
    scene,
    moved: move !== undefined,
    setQuestion: (question) => change({ question }),
    setSlice: (sliceOffsetMm) => change({ sliceOffsetMm }),
    putBack: () => setMoves(({ [built.id]: _gone, ...rest }) => rest),
  };
}
