'use client';

import { useMemo } from 'react';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { cx } from '@/components/ui/class-names';
import type { SlabResult } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { SimulatedPicture } from '../stage/simulated-picture';
import { curveScene, oversamplingCurve } from './oversampling-curve';
import { phaseOrSlice } from './phase-or-slice';
import { nearestPartition } from './slab-stage';

const PARTITION_SIZE = { widthPx: 340, heightPx: 260 };
const CURVE_SIZE = { widthPx: 380, heightPx: 190 };

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
}

/** Partition browser with its simulated picture, the count against oversampling, and phase against slice. */
export function SlabPanels({ question, slab, sliceOffsetMm, onSlice }: SlabPanelsProps) {
  const chosen = nearestPartition(slab, sliceOffsetMm);
  const { slices } = question.prescription;
  const acquired = slices.mode === 'slab' ? slices.acquiredPartitions : 0;
  const curve = useMemo(() => oversamplingCurve(question), [question]);
  const lines = useMemo(() => phaseOrSlice(question), [question]);
  if (!chosen) return null;
  const words =
    chosen.state === 'contaminated'
      ? `holds tissue from the other end, ${Math.round(chosen.alias * 100)} % of full signal`
      : 'holds no tissue from the other end';
  return (
    <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-1">
      <section aria-label="One partition">
        <SimulatedPicture
          question={question}
          sliceOffsetMm={chosen.offsetMm}
          size={PARTITION_SIZE}
          label={`Simulated partition ${chosen.index + 1}`}
          className="aspect-[17/13] max-h-72"
        />
        <label className="block">
          <span className="figures text-ink" data-partition={chosen.index + 1} data-partition-state={chosen.state}>
            Partition {chosen.index + 1} of {slab.partitions.length}
          </span>{' '}
          <span className={cx(chosen.state === 'contaminated' && (chosen.inKeepClear ? 'text-thread' : 'text-ochre'))}>{words}</span>
          <input
            type="range"
            min={1}
            max={slab.partitions.length}
            value={chosen.index + 1}
            aria-label="Partition shown"
            onChange={(event) => onSlice(slab.partitions[Number(event.target.value) - 1]?.offsetMm ?? 0)}
            className="mt-1 block w-full accent-indigo"
          />
        </label>
      </section>
      <section aria-label="Partitions with wrap against slice oversampling">
        <h3 className="text-sm font-semibold text-ink-soft">Partitions with wrap</h3>
        <SceneSvg scene={curveScene(curve, acquired)} label={`At ${acquired} acquired partitions ${slab.contaminated} hold wrap`} {...CURVE_SIZE} className="block w-full" />
      </section>
      <section aria-label="Phase or slice oversampling" className="sm:col-span-2 lg:col-span-1">
        <table className="w-full text-sm">
          <caption className="pb-1 text-left font-semibold text-ink-soft">Phase or slice oversampling</caption>
          <thead>
            <tr className="border-b border-line text-left text-ink-soft">
              <th scope="col" className="py-1 font-normal">oversampling</th>
              <th scope="col" className="py-1 font-normal">fold along phase</th>
              <th scope="col" className="py-1 text-right font-normal">partitions with wrap</th>
            </tr>
          </thead>
          <tbody>
            {lines.map(({ key, label, foldAlongPhase, contaminated }) => (
              <tr key={key} className="border-b border-line" data-direction={key}>
                <th scope="row" className="py-1 text-left font-normal">{label}</th>
                <td className="py-1">{foldAlongPhase ? 'yes' : 'none'}</td>
                <td className="figures py-1 text-right">{contaminated}</td>
              </tr>
            ))}
          </tbody>
        </table>
        <p className="mt-2 text-sm text-ink-soft">{PROFILE_WORDS[slab.profileKind]}</p>
      </section>
    </div>
  );
}
