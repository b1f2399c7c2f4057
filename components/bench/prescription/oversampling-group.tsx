'use client';

import { acquiredLinesFor, acquiredPartitionsFor } from '@/lib/domain/case/lines';
import { phaseOversamplingSetting, sliceOversamplingSetting } from '@/lib/presentation/oversampling-form';
import { useBenchState } from '../bench-context';
import { PlainNumber } from '../bench-number';
import { requestedOversamplingPct, requestedSliceOversamplingPct } from '../state/prescription-edit';
import { Group, usable, usePatch, type GroupProps } from './group';

export function OversamplingGroup({ prescription: p, ...panel }: GroupProps) {
  const patch = usePatch();
  const scanner = useBenchState((state) => state.document.scanner);
  const { limits, lineStep, partitionStep } = scanner;
  const phase = phaseOversamplingSetting(p, scanner);
  const slice = sliceOversamplingSetting(p, scanner);
  const { slices } = p;
  const step = lineStep.kind === 'percent' ? lineStep.percent : lineStep.kind === 'doubling' ? 100 : 1;
  return (
    <Group title="Oversampling" summary={slice ? `${phase.value}, slice ${slice.value}` : phase.value} {...panel}>
      <PlainNumber
        label="Phase oversampling"
        name="phaseOversampling"
        value={requestedOversamplingPct(p, scanner)}
        unit="%"
        min={0}
        max={limits.phaseOversamplingMaxPct}
        step={step}
        hint={`${p.acquiredLines} of ${p.linesAcrossFov} lines · scanner takes ${phase.value}`}
        onEdit={(value, key) => {
          if (!usable(value) || value < 0 || value > limits.phaseOversamplingMaxPct) return;
          patch({ acquiredLines: acquiredLinesFor(p.linesAcrossFov, value, lineStep) }, key);
        }}
      />
      {slices.mode === 'slab' && slice && (
        <PlainNumber
          label="Slice oversampling"
          name="sliceOversampling"
          value={requestedSliceOversamplingPct(slices)}
          unit="%"
          min={0}
          max={limits.sliceOversamplingMaxPct}
          hint={`${slices.acquiredPartitions} of ${slices.partitions} partitions · scanner takes ${slice.value}`}
          onEdit={(value, key) => {
            if (!usable(value) || value < 0 || value > limits.sliceOversamplingMaxPct) return;
            const acquiredPartitions = acquiredPartitionsFor(slices.partitions, value, partitionStep);
            patch({ slices: { ...slices, acquiredPartitions } }, key);
          }}
        />
      )}
    </Group>
  );
}
