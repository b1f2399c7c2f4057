'use client';

import { useMemo } from 'react';
import { VerdictWords } from '@/components/bench/verdict-words';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { cx } from '@/components/ui/class-names';
import { SlabPanels } from '../slab/slab-panels';
import { betweenScenes } from './between-scenes';
import { figureLines, figuresOf, mixFigures } from './figures';
import { answerOf, drawScene, type ShownScene } from './shown-scene';
import { SimulatedPicture } from './simulated-picture';
import { useBetween } from './use-between';

export interface SceneStageProps {
  readonly scene: ShownScene;
  readonly onSlice: (offsetMm: number) => void;
  /** For a room: fewer units across the picture, so that its letters grow with it. */
  readonly large?: boolean;
  readonly className?: string;
}

const EMPTY = { bounds: { left: 0, right: 1, top: 0, bottom: 1 }, nodes: [] } as const;
const NO_FIGURES = { scanS: 0, phaseOversampling: 0, lines: 0, foldCm2: 0 } as const;

/** One scene: verdict, picture and numbers, each the engine's answer to the scene as it stands. */
export function SceneStage({ scene, onSlice, large = false, className }: SceneStageProps) {
  const { question } = scene;
  const size = large ? { widthPx: 720, heightPx: 430 } : { widthPx: 760, heightPx: 480 };
  const { widthPx, heightPx } = size;
  const answer = useMemo(() => answerOf(question), [question]);
  const drawn = useMemo(() => drawScene(scene, answer, { widthPx, heightPx }), [scene, answer, widthPx, heightPx]);
  const picture = useBetween(scene.id, drawn?.picture ?? EMPTY, betweenScenes);
  const target = useMemo(() => (answer.assessment ? figuresOf(answer.assessment) : NO_FIGURES), [answer]);
  const figures = useBetween(scene.id, target, mixFigures);
  const { assessment } = answer;
  if (!assessment) return <p className={cx('p-6', className)}>This scene cannot be worked out: {answer.refusal}</p>;
  const slab = scene.view === 'slab' ? assessment.slab : undefined;
  return (
    <div className={cx('grid min-h-0 gap-x-6 gap-y-4', slab && 'lg:grid-cols-[minmax(0,2fr)_minmax(17rem,1fr)]', className)}>
      <div className="flex min-h-0 min-w-0 flex-col">
        <div className={large ? 'text-xl' : 'text-lg'} data-stage-verdict={assessment.verdict}>
          <VerdictWords verdict={assessment.verdict} />
          {assessment.reasons[0] && <p className={cx('mt-0.5 text-ink-soft', large ? 'text-lg' : 'text-base')}>{assessment.reasons[0].text}</p>}
        </div>
        <div className="min-h-56 flex-1 py-2" data-stage-picture>
          {scene.view === 'picture' ? (
            <SimulatedPicture question={question} sliceOffsetMm={scene.sliceOffsetMm} size={size} label={`Simulated picture: ${scene.title}`} className="mx-auto aspect-[760/480] max-h-full" />
          ) : drawn ? (
            <SceneSvg scene={picture} label={`${scene.title}. ${drawn.words.join(' ')}`} {...size} className="mx-auto block max-h-full w-full" />
          ) : (
            <p className="text-ink-soft">This sequence has no slab; show its section instead.</p>
          )}
        </div>
        <dl className={cx('flex flex-wrap gap-x-8 gap-y-2 border-t border-line pt-2', large && 'text-lg')}>
          {figureLines(figures, assessment, question.prescription).map(({ key, label, value }) => (
            <div key={key}>
              <dt className="text-sm text-ink-soft">{label}</dt>
              <dd className={cx('figures', large && 'text-xl')} data-figure={key}>{value}</dd>
            </div>
          ))}
        </dl>
      </div>
      {slab && (
        <div className="min-h-0 lg:overflow-y-auto">
          <SlabPanels question={question} slab={slab} sliceOffsetMm={scene.sliceOffsetMm} onSlice={onSlice} />
        </div>
      )}
    </div>
  );
}
