'use client';

import { slabShape, stackShape } from '@/lib/schemas/case/prescription';
import { BenchFlag } from '../bench-flag';
import { BenchNumber } from '../bench-number';
import { Group, Pair, type GroupProps } from './group';
import { OptionalChoice, OptionalNumber } from './optional-value';

const FAT_SHIFT = { 'low-end': 'the low end', 'high-end': 'the high end' } as const;

export function SlicesGroup({ prescription: p, ...panel }: GroupProps) {
  const { slices } = p;
  if (slices.mode === 'stack') {
    return (
      <Group title="Slices" summary={`${slices.slices} × ${slices.thicknessMm} mm`} {...panel}>
        <Pair>
          <BenchNumber path="slices.slices" schema={stackShape.slices} label="Slices" sliderMax={80} />
          <BenchNumber path="slices.thicknessMm" schema={stackShape.thicknessMm} label="Thick" step={0.5} sliderMin={1} sliderMax={12} />
          <BenchNumber path="slices.gapMm" schema={stackShape.gapMm} label="Gap" step={0.5} sliderMax={12} />
        </Pair>
      </Group>
    );
  }
  return (
    <Group title="Slab" summary={`${slices.partitions} × ${slices.partitionThicknessMm} mm`} {...panel}>
      <Pair>
        <BenchNumber path="slices.partitions" schema={slabShape.partitions} label="Partitions" sliderMin={16} sliderMax={160} />
        <BenchNumber path="slices.partitionThicknessMm" schema={slabShape.partitionThicknessMm} label="Thick" step={0.1} sliderMin={0.5} sliderMax={8} />
        <BenchNumber path="slices.droppedPartitionsPerEnd" schema={slabShape.droppedPartitionsPerEnd} label="Dropped" sliderMax={20} />
      </Pair>
      <BenchFlag path="slices.selective" label="The pulse selects the slab" hint="If not, everything the coil sees is excited." />
      <OptionalNumber path="slices.timeBandwidthProduct" schema={slabShape.timeBandwidthProduct} value={slices.timeBandwidthProduct}
        start={4} label="Time-bandwidth product" unknownHint="A cautious value of the site’s policy stands in." step={0.5} sliderMax={20} />
      <OptionalNumber path="slices.pulseDurationMs" schema={slabShape.pulseDurationMs} value={slices.pulseDurationMs}
        start={2} label="Pulse duration" unknownHint="Fat’s slab shift is not worked out." step={0.1} sliderMax={10} />
      <OptionalChoice path="slices.fatShiftTowards" value={slices.fatShiftTowards} label="Fat’s slab shifts to" options={FAT_SHIFT} unknownLabel="not known: both ends" />
    </Group>
  );
}
