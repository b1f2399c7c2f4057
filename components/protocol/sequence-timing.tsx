'use client';

import { FormCheckbox, FormNumber, FormSegmented, FormSelect } from '@/components/ui/form';
import { optionsOf } from '@/components/ui/options';
import { Panel } from '@/components/ui/panel';
import { UNFOLDING_WORDS } from '@/lib/presentation/setup-words';
import { accelerationShape, prescriptionShape as shape } from '@/lib/schemas/case/prescription';
import {
  BREATHING_WORDS,
  breathingSummary,
  familyFields,
  FILL_WORDS,
  savingSummary,
  timingSummary,
} from './sequence-facts';
import { GRID, useSequence, type GroupProps } from './sequence-groups';

export function TimingGroup({ at, refused }: GroupProps) {
  const sequence = useSequence(at);
  const fields = familyFields(sequence.family);
  const keys = [
    'trMs',
    'teMs',
    'flipDeg',
    'averages',
    'bandwidthHzPerPixel',
    'echoTrainLength',
    'echoSpacingMs',
    'shots',
    'volumes',
    'fatDisplacedTowards',
    'sliceTimeMs',
    'preparationMs',
    'segments',
    'breathing',
    'breathsPerTr',
  ];
  const singleShot = sequence.family === 'single-shot-echo-train';
  return (
    <Panel
      level={4}
      title="Timing and breathing"
      collapsible
      defaultOpen={false}
      summary={`${timingSummary(sequence)}, ${breathingSummary(sequence)}`}
      open={refused(keys) || undefined}
    >
      <div className={GRID}>
        <FormNumber
          name={`${at}.trMs`}
          schema={shape.trMs}
          label={singleShot ? 'TR, per slice' : 'TR'}
          step={sequence.trMs < 50 ? 0.1 : 10}
        />
        <FormNumber name={`${at}.teMs`} schema={shape.teMs} label="TE" step={sequence.teMs < 20 ? 0.1 : 1} />
        <FormNumber name={`${at}.flipDeg`} schema={shape.flipDeg} label="Flip angle" />
        <FormNumber name={`${at}.averages`} schema={shape.averages} label="Averages" step={1} />
        <FormNumber
          name={`${at}.bandwidthHzPerPixel`}
          schema={shape.bandwidthHzPerPixel}
          label="Bandwidth per pixel"
          step={10}
        />
        {fields.train && !singleShot && (
          <FormNumber
            name={`${at}.echoTrainLength`}
            schema={shape.echoTrainLength}
            label="Echo train length"
            hint="1 to 1024 echoes"
          />
        )}
        {(fields.train || fields.echoPlanar) && (
          <FormNumber
            name={`${at}.echoSpacingMs`}
            schema={shape.echoSpacingMs}
            label="Echo spacing"
            step={0.1}
          />
        )}
        {fields.echoPlanar && (
          <>
            <FormNumber
              name={`${at}.shots`}
              schema={shape.shots}
              label="Shots"
              hint="1 to 256; 1 is single shot"
            />
            <FormNumber
              name={`${at}.volumes`}
              schema={shape.volumes}
              label="Images acquired"
              hint="Sum over b-values of directions × averages"
            />
            <FormSelect
              name={`${at}.fatDisplacedTowards`}
              label="EPI displaces fat towards"
              hint="Not known: both ends are taken"
              placeholder="not known"
              optional
              options={[
                { value: 'low-end', label: 'the right, front or foot end' },
                { value: 'high-end', label: 'the left, back or head end' },
              ]}
            />
          </>
        )}
        {(fields.interleaved || fields.echoPlanar) && (
          <FormNumber
            name={`${at}.sliceTimeMs`}
            schema={shape.sliceTimeMs}
            label="Time one slice takes inside TR"
            hint="Train, fat suppression, presaturation"
          />
        )}
        {fields.slab && (
          <>
            <FormNumber
              name={`${at}.preparationMs`}
              schema={shape.preparationMs}
              label="Preparation per segment"
            />
            <FormNumber
              name={`${at}.segments`}
              schema={shape.segments}
              label="Segments"
              hint="0 when there is no preparation"
            />
          </>
        )}
      </div>
      <div className="mt-5 flex flex-wrap items-start gap-x-6 gap-y-4">
        <FormSegmented name={`${at}.breathing`} legend="Breathing" options={optionsOf(BREATHING_WORDS)} />
        {sequence.breathing === 'triggered' && (
          <FormNumber
            className="w-40"
            name={`${at}.breathsPerTr`}
            schema={shape.breathsPerTr}
            label="Breaths per TR"
          />
        )}
      </div>
      <FormCheckbox
        className="mt-4"
        name={`${at}.fatSuppressed`}
        label="Fat-suppressed"
        hint="Rim fat still counts as bright unless it was measured."
      />
    </Panel>
  );
}

export function SavingGroup({ at, refused }: GroupProps) {
  const sequence = useSequence(at);
  const { slab } = familyFields(sequence.family);
  return (
    <Panel
      level={4}
      title="Acceleration and partial Fourier"
      collapsible
      defaultOpen={false}
      summary={savingSummary(sequence)}
      open={
        refused(['acceleration', 'partialFourierPhase', 'partialFourierSlice', 'partialFourierFill']) ||
        undefined
      }
    >
      <div className={GRID}>
        <FormNumber
          name={`${at}.acceleration.factorPhase`}
          schema={accelerationShape.factorPhase}
          label="Factor along phase"
          hint="1 to 12; 1 is none"
          step={0.5}
        />
        {slab && (
          <FormNumber
            name={`${at}.acceleration.factorSlice`}
            schema={accelerationShape.factorSlice}
            label="Factor along slice"
            hint="1 to 8; 1 is none"
            step={0.5}
          />
        )}
        <FormNumber
          name={`${at}.acceleration.referenceLines`}
          schema={accelerationShape.referenceLines}
          label="Reference lines inside the scan"
          hint="0 to 256; 0 with its own calibration"
        />
        {slab && (
          <FormNumber
            name={`${at}.acceleration.referencePartitions`}
            schema={accelerationShape.referencePartitions}
            label="Reference partitions"
          />
        )}
        <FormNumber
          name={`${at}.acceleration.calibrationS`}
          schema={accelerationShape.calibrationS}
          label="Calibration scan of its own"
        />
        <FormNumber
          name={`${at}.acceleration.geometryFactor`}
          schema={accelerationShape.geometryFactor}
          label="Geometry factor"
          hint="1 to 20; empty: the policy’s range"
          step={0.1}
        />
        <FormSelect
          name={`${at}.acceleration.unfolding`}
          label="Unfolded"
          hint="Not known: the scanner’s own way is used"
          options={optionsOf(UNFOLDING_WORDS)}
        />
        <FormNumber
          name={`${at}.partialFourierPhase`}
          schema={shape.partialFourierPhase}
          label="Partial Fourier, phase"
          hint="0.51 to 1; 1 is all lines"
          step={0.05}
        />
        {slab && (
          <FormNumber
            name={`${at}.partialFourierSlice`}
            schema={shape.partialFourierSlice}
            label="Partial Fourier, slice"
            hint="0.51 to 1; 1 is all"
            step={0.05}
          />
        )}
        <FormSelect
          name={`${at}.partialFourierFill`}
          label="Missing lines are filled"
          options={optionsOf(FILL_WORDS)}
        />
      </div>
      <FormCheckbox
        className="mt-4"
        name={`${at}.acceleration.referenceInImage`}
        label="Reference lines enter the image"
        hint="They then raise its SNR."
      />
    </Panel>
  );
}
