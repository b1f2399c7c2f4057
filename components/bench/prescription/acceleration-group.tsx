'use client';

import { accelerationShape, prescriptionShape } from '@/lib/schemas/case/prescription';
import type { Unfolding } from '@/lib/physics/model/prescription';
import { formatPercent } from '@/lib/presentation/percent';
import { BenchChoice, optionsOf } from '../bench-choice';
import { BenchFlag } from '../bench-flag';
import { BenchNumber } from '../bench-number';
import { Group, Pair, type GroupProps } from './group';
import { OptionalNumber } from './optional-value';

const UNFOLDING_WORDS: Readonly<Record<Unfolding, string>> = {
  'k-space-self-calibrating': 'in k-space',
  'image-domain-grid-ends': 'image, ends at width',
  'image-domain-beyond': 'image, beyond width',
  unknown: 'not known',
};

const FILL_OPTIONS = optionsOf({ conjugate: 'by symmetry (conjugate)', 'zero-filled': 'filled with zeros' });

export function AccelerationGroup({ prescription: p, ...panel }: GroupProps) {
  const { acceleration: a } = p;
  const accelerated = a.factorPhase * a.factorSlice > 1;
  const slab = p.slices.mode === 'slab';
  const fourier = p.partialFourierPhase < 1 ? `, partial Fourier ${formatPercent(p.partialFourierPhase * 100)}` : '';
  return (
    <Group title="Acceleration" summary={`${accelerated ? `${a.factorPhase}${slab ? ` × ${a.factorSlice}` : ''}` : 'off'}${fourier}`} {...panel}>
      <Pair>
        <BenchNumber path="acceleration.factorPhase" schema={accelerationShape.factorPhase} label="R phase" step={0.5} sliderMax={4} />
        {slab && <BenchNumber path="acceleration.factorSlice" schema={accelerationShape.factorSlice} label="R slice" step={0.5} sliderMax={4} />}
        <BenchNumber path="acceleration.referenceLines" schema={accelerationShape.referenceLines} label="Ref. lines" sliderMax={64} />
        {slab && <BenchNumber path="acceleration.referencePartitions" schema={accelerationShape.referencePartitions} label="Ref. part." sliderMax={64} />}
        <BenchNumber path="acceleration.calibrationS" schema={accelerationShape.calibrationS} label="Calib." sliderMax={60} />
        <BenchNumber path="partialFourierPhase" schema={prescriptionShape.partialFourierPhase} label="P. Fourier" step={0.005} />
        {slab && <BenchNumber path="partialFourierSlice" schema={prescriptionShape.partialFourierSlice} label="P. F. slice" step={0.005} />}
      </Pair>
      <BenchChoice<Unfolding> path="acceleration.unfolding" label="Unfolds" options={optionsOf(UNFOLDING_WORDS)} className="mt-1" />
      <BenchFlag path="acceleration.referenceInImage" label="Reference lines enter the image" />
      <OptionalNumber path="acceleration.geometryFactor" schema={accelerationShape.geometryFactor} value={a.geometryFactor}
        start={1.2} label="Geometry factor" unknownHint="The range of the site’s policy stands in." step={0.05} sliderMax={4} />
      <BenchChoice path="partialFourierFill" label="Missing lines" options={FILL_OPTIONS} className="mt-1" />
    </Group>
  );
}
