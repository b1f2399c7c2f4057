'use client';

import type { ReactNode } from 'react';
import { Panel } from '@/components/ui/panel';
import { accelerationShape, prescriptionShape, slabShape, stackShape } from '@/lib/schemas/case/prescription';
import { acquiredLinesFor, acquiredPartitionsFor, axesOfPlane } from '@/lib/domain/case/lines';
import type { PatientAxis } from '@/lib/physics/model/axes';
import type { Plane, Prescription, SequenceFamily, Unfolding } from '@/lib/physics/model/prescription';
import { AXIS_WORDS, FAMILY_WORDS, PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import { formatEchoTime } from '@/lib/presentation/duration';
import { phaseOversamplingSetting, sliceOversamplingSetting } from '@/lib/presentation/oversampling-form';
import { formatPercent } from '@/lib/presentation/percent';
import { useBench, useBenchState } from './bench-context';
import { BenchChoice, optionsOf } from './bench-choice';
import { BenchNumber, PAIR_CLASS, PlainNumber } from './bench-number';
import {
  percentPhaseFov,
  percentSampling,
  requestedOversamplingPct,
  requestedSliceOversamplingPct,
  withPercentPhaseFov,
  withPercentSampling,
} from './state/prescription-edit';

export interface GroupProps {
  readonly prescription: Prescription;
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
}

function Group({ title, summary, children, open, onOpenChange }: Omit<GroupProps, 'prescription'> & { title: string; summary: string; children: ReactNode }) {
  return (
    <Panel tone="bench" level={3} collapsible title={title} summary={summary} open={open} onOpenChange={onOpenChange} className="bench-group">
      {children}
    </Panel>
  );
}

const Pair = ({ children }: { children: ReactNode }) => <div className={PAIR_CLASS}>{children}</div>;

function usePatch() {
  const { store } = useBench();
  return (patch: Partial<Prescription>, step: string) => store.dispatch({ type: 'edit-prescription', patch, step });
}

const usable = (value: number | null): value is number => value !== null && Number.isFinite(value);

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

export function WindowGroup({ prescription: p, ...panel }: GroupProps) {
  const patch = usePatch();
  const limits = useBenchState((state) => state.document.scanner.limits);
  const fov = { sliderMin: limits.fovMinMm, sliderMax: limits.fovMaxMm };
  const readout = axesOfPlane(p.plane).find((axis) => axis !== p.phaseAxis) ?? 'RL';
  const phaseAxes = Object.fromEntries(axesOfPlane(p.plane).map((axis) => [axis, AXIS_WORDS[axis]])) as Record<PatientAxis, string>;
  return (
    <Group
      title="Window"
      summary={`${Math.round(p.fovPhaseMm)} × ${Math.round(p.fovReadoutMm)} mm, ${AXIS_WORDS[p.phaseAxis]}`}
      {...panel}
    >
      <Pair>
        <BenchNumber path="fovPhaseMm" schema={prescriptionShape.fovPhaseMm} label={`FOV ${AXIS_WORDS[p.phaseAxis]}`} {...fov} />
        <BenchNumber path="fovReadoutMm" schema={prescriptionShape.fovReadoutMm} label={`FOV ${AXIS_WORDS[readout]}`} {...fov} />
        <BenchNumber path="linesAcrossFov" schema={prescriptionShape.linesAcrossFov} label="Lines" sliderMin={64} sliderMax={512} />
        <BenchNumber path="readoutMatrix" schema={prescriptionShape.readoutMatrix} label="Matrix" sliderMin={64} sliderMax={512} />
      </Pair>
      <PlainNumber
        label="Percent Phase Field of View" name="percentPhaseFov" unit="%" min={10} max={200}
        sliderMax={110} value={Math.round(percentPhaseFov(p) * 10) / 10} step={1}
        onEdit={(value, key) => usable(value) && value >= 10 && value <= 200 && patch(withPercentPhaseFov(p, value), key)}
      />
      <PlainNumber
        label="Percent Sampling" name="percentSampling" unit="%" min={10} max={200}
        sliderMin={40} sliderMax={120} value={Math.round(percentSampling(p) * 10) / 10} step={1}
        onEdit={(value, key) => usable(value) && value >= 10 && value <= 200 && patch(withPercentSampling(p, value), key)}
      />
      <div className="mt-1 space-y-1.5">
        <BenchChoice<PatientAxis> path="phaseAxis" label="Phase direction" options={optionsOf(phaseAxes)} />
        <BenchChoice<Plane> path="plane" label="Plane" options={optionsOf(PLANE_WORDS)} />
      </div>
      <p className="mt-2 text-sm text-ink-soft">Centre from the origin, mm</p>
      <div className="grid grid-cols-3 gap-x-3 [&_input]:w-[3.5ch] [&_label+div]:-ml-2 [&_span[aria-hidden]]:hidden">
        {(['L', 'P', 'S'] as const).map((letter, i) => (
          <BenchNumber key={letter} path={`centreMm.${i}`} schema={prescriptionShape.centreMm.def.items[i as 0]} label={letter} sliderMin={-200} sliderMax={200} />
        ))}
      </div>
      <Pair>
        <BenchNumber path="inPlaneRotationDeg" schema={prescriptionShape.inPlaneRotationDeg} label="Rotation" />
        <BenchNumber path="tiltAboutReadoutDeg" schema={prescriptionShape.tiltAboutReadoutDeg} label="Tilt" />
      </Pair>
    </Group>
  );
}

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
        {slices.timeBandwidthProduct !== undefined && (
          <BenchNumber path="slices.timeBandwidthProduct" schema={slabShape.timeBandwidthProduct} label="Pulse TBW" step={0.5} sliderMin={1} sliderMax={20} />
        )}
        {slices.pulseDurationMs !== undefined && (
          <BenchNumber path="slices.pulseDurationMs" schema={slabShape.pulseDurationMs} label="Pulse" step={0.1} sliderMax={10} />
        )}
      </Pair>
    </Group>
  );
}

const FAMILY_OPTIONS = optionsOf<SequenceFamily>(FAMILY_WORDS);
const BREATHING = { free: 'free', 'breath-hold': 'breath-hold', triggered: 'triggered' } as const;

export function TimingGroup({ prescription: p, ...panel }: GroupProps) {
  const train = p.echoTrainLength > 1;
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
        {train && <BenchNumber path="echoTrainLength" schema={prescriptionShape.echoTrainLength} label="Train" sliderMax={256} />}
        {(train || planar) && <BenchNumber path="echoSpacingMs" schema={prescriptionShape.echoSpacingMs} label="Spacing" step={0.1} sliderMax={20} />}
        {planar && <BenchNumber path="shots" schema={prescriptionShape.shots} label="Shots" sliderMax={16} />}
        {planar && <BenchNumber path="volumes" schema={prescriptionShape.volumes} label="Volumes" sliderMax={200} />}
        {p.breathing === 'triggered' && <BenchNumber path="breathsPerTr" schema={prescriptionShape.breathsPerTr} label="Breaths" />}
      </Pair>
    </Group>
  );
}

const UNFOLDING_WORDS: Readonly<Record<Unfolding, string>> = {
  'k-space-self-calibrating': 'in k-space',
  'image-domain-grid-ends': 'image, ends at width',
  'image-domain-beyond': 'image, beyond width',
  unknown: 'not known',
};

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
        <BenchNumber path="acceleration.calibrationS" schema={accelerationShape.calibrationS} label="Calib." sliderMax={60} />
        <BenchNumber path="partialFourierPhase" schema={prescriptionShape.partialFourierPhase} label="P. Fourier" step={0.005} />
        {slab && <BenchNumber path="partialFourierSlice" schema={prescriptionShape.partialFourierSlice} label="P. F. slice" step={0.005} />}
      </Pair>
      <BenchChoice<Unfolding> path="acceleration.unfolding" label="Unfolds" options={optionsOf(UNFOLDING_WORDS)} className="mt-1" />
    </Group>
  );
}
