'use client';

import { useMemo } from 'react';
import type { Scene } from '@/components/schematic/scene/scene';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import type { Case } from '@/lib/physics/model/case';
import { cx } from '@/components/ui/class-names';
import { answerOf, drawScene, type ShownScene } from '../stage/shown-scene';
import { COMPARED_PCT, phaseOrSlice } from './phase-or-slice';

const SIZE = { widthPx: 400, heightPx: 236 };
const WORDS = { 'as-set': 'No oversampling', phase: `${COMPARED_PCT} % along phase`, slice: `${COMPARED_PCT} % along slice` } as const;

/** Small: what names sides and sizes would lie over what matters. */
const bare = (picture: Scene): Scene => ({ ...picture, nodes: picture.nodes.filter(({ name }) => !/^letter|^scale|^phase|^stack\/label|^profile\/name|^partition\/(first|last)$|^travel\/.*label$/.test(name)) });

/** The same oversampling given to phase and to slice, each in the picture it changes: people take one for the other. */
export function PhaseOrSlicePanel({ question, wide = false }: { question: Case; wide?: boolean }) {
  const lines = useMemo(
    () =>
      phaseOrSlice(question).map((line) => {
        const scene: ShownScene = {
          id: line.key, schemaVersion: 1, title: line.label, question: line.question, view: line.key === 'slice' ? 'slab' : 'section',
          highlight: 'acquired-edge', sliceOffsetMm: 0, controls: [],
        };
        return { ...line, drawn: line.key === 'as-set' ? null : drawScene(scene, answerOf(line.question), SIZE) };
      }),
    [question],
  );
  return (
    <section aria-label="Phase or slice oversampling" className={cx(wide && 'mt-6 border-t border-line pt-3')}>
      <h2 className="font-semibold text-ink-soft">Phase or slice oversampling</h2>
      <ul className={cx('mt-1 grid gap-x-8 gap-y-2', wide && 'sm:grid-cols-2')}>
        {lines.map(({ key, foldAlongPhase, contaminated, drawn }) => (
          <li key={key} className={cx(wide && key === 'as-set' && 'sm:col-span-2')} data-direction={key}>
            {drawn && <SceneSvg scene={bare(drawn.picture)} label={`${WORDS[key]}. ${drawn.words.join(' ')}`} {...SIZE} className="block w-full" />}
            <p className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-line py-1">
              <span className="font-semibold">{WORDS[key]}</span>
              <span>
                fold along phase <span className="figures">{foldAlongPhase ? 'yes' : 'none'}</span> · partitions with wrap <span className="figures">{contaminated}</span>
              </span>
            </p>
          </li>
        ))}
      </ul>
    </section>
  );
}
