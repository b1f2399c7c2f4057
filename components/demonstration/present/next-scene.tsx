'use client';

import { useMemo } from 'react';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import { answerOf, drawScene, type ShownScene } from '../stage/shown-scene';

const SIZE = { widthPx: 520, heightPx: 340 };

/** A scene in small: title, verdict and picture. A simulated picture is stood for by its section. */
export function NextScene({ scene }: { scene: ShownScene }) {
  const { answer, drawn } = useMemo(() => {
    const answer = answerOf(scene.question);
    const drawable = scene.view === 'picture' ? { ...scene, view: 'section' as const } : scene;
    return { answer, drawn: drawScene(drawable, answer, SIZE) };
  }, [scene]);
  return (
    <div>
      <p className="text-lg font-semibold">{scene.title}</p>
      <p className="text-ink-soft">{answer.assessment ? VERDICT_WORDS[answer.assessment.verdict] : answer.refusal}</p>
      {drawn && <SceneSvg scene={drawn.picture} label={scene.title} {...SIZE} className="mt-2 block w-full border border-line" />}
    </div>
  );
}
