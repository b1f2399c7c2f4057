'use client';

import { prescriptionShape } from '@/lib/schemas/case/prescription';
import type { SequenceFamily } from '@/lib/physics/model/prescription';
import { FAMILY_WORDS } from '@/lib/presentation/anatomy-words';
import { formatEchoTime } from '@/lib/presentation/duration';
import { BenchChoice, optionsOf } from '../bench-choice';
import { BenchFlag } from '../bench-flag';
import { BenchNumber } from '../bench-number';
import { Group, Pair, type GroupProps } from './group';
import { OptionalChoice } from './optional-value';

const FAMILY_OPTIONS = optionsOf<SequenceFamily>(FAMILY_WORDS);
/** Families with a train of echoes, of which one echo is a train too. */
const TRAINS: readonly SequenceFamily[] = ['echo-train-spin-echo', 'single-shot-echo-train', 'echo-train-spin-echo-3d'];
const PHASE_ENDS = {
  RL: { 'low-end': 'right', 'high-end': 'left' },
  AP: { 'low-end': 'anterior', 'high-end': 'posterior' },
  SI: { 'low-end': 'inferior', 'high-end': 'superior' },
} as const;
const BREATHING = { free: 'free', 'breath-hold': 'breath-hold', triggered: 'triggered' } as const;

export function TimingGroup({ prescription: p, ...panel }: GroupProps) {
  const train = p.echoTrainLength > 1;
  const slab = p.slices.mode === 'slab';
  const planar = p.family === 'echo-planar';
  return (
    <Group title="Timing" summary={`TR ${formatEchoTime(p.trMs)}, TE ${formatEchoTime(p.teMs)}, ${p.averages} avg.`} {...panel}>
      <BenchChoice path="family" label="Family" options={FAMILY_OPTIONS} />
      <BenchChoice path="breathing" label="Breathing" options={optionsOf(BREATHING)} className="mt-1.5" />
      <Pair>
        <BenchNumber path="trMs" schema={prescriptionShape.trMs} label="TR" sliderMax={8000} />
        <BenchNumber path="teMs" schema={prescriptionShape.teMs} label="TE" step={0.1} sliderMax={200} />
        <BenchNumber path="flipDeg" schema={prescriptionShape.flipDeg} label="Flip" />
        <BenchNumber path="averages" schema={prescriptionShape.averages} label="Averages" sliderMin={1} sliderMax={8} />
        <BenchNumber path="bandwidthHzPerPixel" schema={prescriptionShape.bandwidthHzPerPixel} label="BW" sliderMin={50} sliderMax={2000} />
        <BenchNumber path="sliceTimeMs" schema={prescriptionShape.sliceTimeMs} label="Slice" sliderMax={2000} />
        {(train || TRAINS.includes(p.family)) && <BenchNumber path="echoTrainLength" schema={prescriptionShape.echoTrainLength} label="Train" sliderMax={256} />}
        {(train || planar || TRAINS.includes(p.family)) && <BenchNumber path="echoSpacingMs" schema={prescriptionShape.echoSpacingMs} label="Spacing" step={0.1} sliderMax={20} />}
        {planar && <BenchNumber path="shots" schema={prescriptionShape.shots} label="Shots" sliderMax={16} />}
        {planar && <BenchNumber path="volumes" schema={prescriptionShape.volumes} label="Volumes" sliderMax={200} />}
        <BenchNumber path="sliceTimeMs" schema={prescriptionShape.sliceTimeMs} label="Per slice" sliderMax={500} />
        {slab && <BenchNumber path="preparationMs" schema={prescriptionShape.preparationMs} label="Prep." sliderMax={3000} />}
        {slab && <BenchNumber path="segments" schema={prescriptionShape.segments} label="Segments" sliderMax={200} />}
        {p.breathing === 'triggered' && <BenchNumber path="breathsPerTr" schema={prescriptionShape.breathsPerTr} label="Breaths" />}
      </Pair>
      {planar && (
        <OptionalChoice path="fatDisplacedTowards" value={p.fatDisplacedTowards} label="EPI displaces fat to" options={PHASE_ENDS[p.phaseAxis]} unknownLabel="not known: both ends" />
      )}
      <BenchFlag path="fatSuppressed" label="Fat suppressed" />
    </Group>
  );
}
