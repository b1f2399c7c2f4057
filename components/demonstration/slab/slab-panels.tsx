'use client';

import { useMemo } from 'react';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { cx } from '@/components/ui/class-names';
import type { SlabResult } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { SimulatedPicture } from '../stage/simulated-picture';
import { curveScene, oversamplingCurve } from './oversampling-curve';
import { nearestPartition } from './slab-stage';

const PARTITION_SIZE = { widthPx: 340, heightPx: 250 };
const CURVE_SIZE = { widthPx: 340, heightPx: 168 };

const PROFILE_WORDS: Readonly<Record<SlabResult['profileKind'], string>> = {
  'single-pulse': 'The profile is that of a single pulse.',
  spoiled: 'The profile is that of a spoiled steady state: beyond its best flip angle the skirt is brighter than the middle.',
  'non-selective': 'No slab is selected: all tissue the coil sees counts in full.',
};

export interface SlabPanelsProps {
  readonly question: Case;
  readonly slab: SlabResult;
  readonly sliceOffsetMm: number;
  readonly onSlice: (offsetMm: number) => void;
  /** As high as the room leaves, without scrolling. */
  readonly fill?: boolean;
}

/** Partition browser with its simulated picture, and the count against oversampling. */
export function SlabPanels({ question, slab, sliceOffsetMm, onSlice, fill = false }: SlabPanelsProps) {
  const chosen = nearestPartition(slab, sliceOffsetMm);
  const { slices } = question.prescription;
  const acquired = slices.mode === 'slab' ? slices.acquiredPartitions : 0;
  const curve = useMemo(() => oversamplingCurve(question), [question]);
  if (!chosen) return null;
  const words =
    chosen.state === 'contaminated'
      ? `holds tissue from the other end, ${Math.round(chosen.alias * 100)} % of full signal`
      : 'holds no tissue from the other end';
  return (
    <div className={cx('grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-1', fill && 'lg:h-full lg:grid-rows-[minmax(0,1fr)_auto]')}>
      <section aria-label="One partition" className="flex min-h-0 flex-col">
        <SimulatedPicture
          question={question}
          sliceOffsetMm={chosen.offsetMm}
          size={PARTITION_SIZE}
          label={`Simulated partition ${chosen.index + 1}`}
          className={cx('w-full', fill ? 'min-h-48 flex-1' : 'aspect-[34/25]')}
        />
        <label className="block leading-tight">
          <span className="font-semibold" data-partition={chosen.index + 1} data-partition-state={chosen.state}>
            Partition <span className="figures">{chosen.index + 1}</span> of <span className="figures">{slab.partitions.length}</span>
          </span>{' '}
          <span className={cx(chosen.state === 'contaminated' && (chosen.inKeepClear ? 'text-thread' : 'text-ochre'))}>{words}</span>
          <input
            type="range"
            min={1}
            max={slab.partitions.length}
            value={chosen.index + 1}
            aria-label="Partition shown"
            aria-valuetext={`Partition ${chosen.index + 1} ${words}`}
            onChange={(event) => onSlice(slab.partitions[Number(event.target.value) - 1]?.offsetMm ?? 0)}
            className="mt-1 block w-full accent-indigo"
          />
        </label>
      </section>
      <section aria-label="Partitions with wrap against slice oversampling">
        <h2 className="font-semibold text-ink-soft">Partitions with wrap, by slice oversampling</h2>
        <SceneSvg scene={curveScene(curve, acquired)} label={`At ${acquired} acquired partitions ${slab.contaminated} hold wrap`} {...CURVE_SIZE} className="block w-full" />
        {!fill && <p className="text-sm text-ink-soft">{PROFILE_WORDS[slab.profileKind]}</p>}
      </section>
    </div>
  );
}
