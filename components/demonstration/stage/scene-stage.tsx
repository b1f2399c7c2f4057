'use client';

import { useDeferredValue, useMemo, useRef, type ReactNode } from 'react';
import { VerdictWords } from '@/components/bench/verdict-words';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { cx } from '@/components/ui/class-names';
import { PhaseOrSlicePanel } from '../slab/phase-or-slice-panel';
import { SlabPanels } from '../slab/slab-panels';
import { betweenScenes } from './between-scenes';
import { figureLines, figuresOf, mixFigures } from './figures';
import { answerOf, drawScene, type ShownScene } from './shown-scene';
import { SimulatedPicture } from './simulated-picture';
import { useBetween } from './use-between';
import { usePictureSize } from './use-picture-size';

export interface SceneStageProps {
  readonly scene: ShownScene;
  readonly onSlice: (offsetMm: number) => void;
  /** For a room: what is beside the picture is the one thing the scene is about. */
  readonly large?: boolean;
  readonly className?: string;
  /** What moves the scene, next to what it moves. */
  readonly children?: ReactNode;
}

const EMPTY = { bounds: { left: 0, right: 1, top: 0, bottom: 1 }, nodes: [] } as const;
const NO_FIGURES = { scanS: 0, phaseOversampling: 0, lines: 0, foldCm2: 0 } as const;
/** What a slab is about, from the back row. */
const SLAB_FIGURES = new Set(['contaminated', 'slice-oversampling', 'phase-oversampling', 'time']);
const FIRST_SIZE = { widthPx: 760, heightPx: 480 } as const;

/** One scene: verdict, picture and numbers, each the engine's answer to the scene as it stands. */
export function SceneStage({ scene, onSlice, large = false, className, children }: SceneStageProps) {
  const { question } = scene;
  const box = useRef<HTMLDivElement>(null);
  const { widthPx, heightPx } = usePictureSize(box, FIRST_SIZE, scene.view === 'slab' ? Infinity : undefined);
  const size = { widthPx, heightPx };
  const answer = useMemo(() => answerOf(question), [question]);
  const drawn = useMemo(() => drawScene(scene, answer, { widthPx, heightPx }), [scene, answer, widthPx, heightPx]);
  const picture = useBetween(scene.id, drawn?.picture ?? EMPTY, betweenScenes);
  const target = useMemo(() => (answer.assessment ? figuresOf(answer.assessment) : NO_FIGURES), [answer]);
  const figures = useBetween(scene.id, target, mixFigures);
  // What is beside the picture may come a frame later: a control answers in the picture first.
  const beside = useDeferredValue(scene);
  const besideSlab = useMemo(() => (beside.view === 'slab' ? answerOf(beside.question).assessment?.slab : undefined), [beside]);
  const { assessment } = answer;
  if (!assessment) return <p className={cx('p-6', className)}>This scene cannot be worked out: {answer.refusal}</p>;
  const slab = scene.view === 'slab' ? assessment.slab : undefined;
  const lines = figureLines(figures, assessment, question.prescription).filter(({ key }) => !large || !slab || SLAB_FIGURES.has(key));
  // In a room one thing at a time stands beside the slab.
  const comparing = large && scene.controls.includes('phase-oversampling');
  return (
    <div className={cx('grid min-h-0 gap-x-8 gap-y-4', slab && 'lg:grid-cols-[minmax(0,2fr)_minmax(17rem,1fr)]', className)}>
      <div className="flex min-h-0 min-w-0 flex-col">
        <div className={large ? 'text-2xl' : 'text-lg'} data-stage-verdict={assessment.verdict}>
          <VerdictWords verdict={assessment.verdict} />
          {assessment.reasons[0] && <p className={cx('text-ink-soft', large ? 'text-lg' : 'mt-0.5 text-base')}>{assessment.reasons[0].text}</p>}
        </div>
        <div ref={box} className={cx('relative my-2 min-h-72 flex-1', !large && 'aspect-[76/48] w-full flex-none sm:min-h-96')} data-stage-picture>
          {scene.view === 'picture' ? (
            <SimulatedPicture question={question} sliceOffsetMm={scene.sliceOffsetMm} size={size} label={`Simulated picture: ${scene.title}`} className="!absolute inset-0" />
          ) : drawn ? (
            <SceneSvg scene={picture} label={`${scene.title}. ${drawn.words.join(' ')}`} {...size} className="absolute inset-0 block size-full" />
          ) : (
            <p className="text-ink-soft">This sequence has no slab; show its section instead.</p>
          )}
        </div>
        <dl className={cx('flex flex-wrap gap-x-8 gap-y-2 border-t border-line pt-2', large && 'gap-x-10')}>
          {lines.map(({ key, label, value }) => (
            <div key={key}>
              <dt className={cx('text-ink-soft', large ? 'text-base leading-tight' : 'text-sm')}>{label}</dt>
              <dd className={cx('figures', large && 'text-2xl leading-tight')} data-figure={key}>{value}</dd>
            </div>
          ))}
        </dl>
        {children}
        {slab && !large && <PhaseOrSlicePanel question={beside.question} wide />}
      </div>
      {slab && besideSlab && (
        <div className="min-h-0 lg:overflow-y-auto">
          {comparing ? (
            <PhaseOrSlicePanel question={beside.question} />
          ) : (
            <SlabPanels question={beside.question} slab={besideSlab} sliceOffsetMm={beside.sliceOffsetMm} onSlice={onSlice} fill={large} />
          )}
        </div>
      )}
    </div>
  );
}
