'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { FieldGroup } from '@/components/ui/field';
import { FormCheckbox, FormNumber, FormSelect, FormText, FormTextArea } from '@/components/ui/form';
import { optionsOf } from '@/components/ui/options';
import { Panel } from '@/components/ui/panel';
import { schemaAt } from '@/components/ui/schema-facts';
import {
  LINE_STEP_WORDS,
  OVERSAMPLING_FORM_WORDS,
  SLICE_OVERSAMPLING_FORM_WORDS,
  UNFOLDING_WORDS,
} from '@/lib/presentation/setup-words';
import type { OversamplingForm } from '@/lib/physics/model/scanner';
import { scannerLimitsShape, scannerShape } from '@/lib/schemas/case/scanner';
import { scannerFormSchema, type ScannerForm } from '@/lib/schemas/scanner';

const GRID = 'grid gap-x-6 gap-y-5 sm:grid-cols-2 lg:grid-cols-3';

export function OpeningGroup() {
  return (
    <Panel title="The scanner and its opening">
      <div className={GRID}>
        <FormText name="scanner.name" label="Name" hint="As your team says it" required />
        <FormNumber name="scanner.fieldStrengthT" schema={scannerShape.fieldStrengthT} step={0.1} />
        <FormNumber name="scanner.boreDiameterMm" schema={scannerShape.boreDiameterMm} />
        <FormNumber
          name="scanner.tableBelowCentreMm"
          schema={scannerShape.tableBelowCentreMm}
          label="Table below the opening’s centre"
          hint="0 to 500, measured with the pad compressed"
        />
        <FormNumber
          name="scanner.anteriorCoilMm"
          schema={scannerShape.anteriorCoilMm}
          label="Room the front coil takes"
          hint="0 to 150, above the patient"
        />
        <FormNumber
          name="scanner.limits.tableLimitKg"
          schema={scannerLimitsShape.tableLimitKg}
          hint="50 to 500, from the table’s own label"
        />
      </div>
    </Panel>
  );
}

/** A doubling switch and the doubling step are one thing: choosing either sets both. */
export function SamplingGroup() {
  const { setValue, getValues } = useFormContext<ScannerForm>();
  const kind = useWatch<ScannerForm, 'scanner.lineStep.kind'>({ name: 'scanner.lineStep.kind' });
  const percentSchema = schemaAt(scannerFormSchema, ['scanner', 'lineStep', 'percent'])!;

  const followStep = (step: string) => {
    const form = getValues('scanner.oversamplingForm');
    setValue(
      'scanner.lineStep',
      (step === 'percent' ? { kind: 'percent', percent: 10 } : { kind: step }) as never,
      {
        shouldDirty: true,
      },
    );
    if (step === 'doubling' && !form.startsWith('doubling'))
      setValue('scanner.oversamplingForm', 'doubling-switch');
    if (step !== 'doubling' && form.startsWith('doubling')) setValue('scanner.oversamplingForm', 'percent');
  };
  const followForm = (form: string) => {
    const doubling = (form as OversamplingForm).startsWith('doubling');
    if (doubling !== (getValues('scanner.lineStep.kind') === 'doubling')) {
      setValue('scanner.lineStep', { kind: doubling ? 'doubling' : 'line' }, { shouldDirty: true });
    }
  };

  return (
    <Panel title="How it takes oversampling">
      <div className={GRID}>
        <FormSelect
          name="scanner.oversamplingForm"
          label="Phase oversampling is set as"
          hint="The plan sheet prints it this way"
          options={optionsOf(OVERSAMPLING_FORM_WORDS)}
          onChosen={followForm}
        />
        <FormSelect
          name="scanner.lineStep.kind"
          label="Acquired lines go in"
          hint="What is asked for is rounded up to this"
          options={optionsOf(LINE_STEP_WORDS)}
          onChosen={followStep}
        />
        {kind === 'percent' && (
          <FormNumber name="scanner.lineStep.percent" schema={percentSchema} label="Size of one step" />
        )}
        <FormSelect
          name="scanner.sliceOversamplingForm"
          label="Slice oversampling is set as"
          options={optionsOf(SLICE_OVERSAMPLING_FORM_WORDS)}
        />
        <FormNumber
          name="scanner.partitionStep"
          schema={scannerShape.partitionStep}
          label="Partitions are added by"
          hint="1 to 64 at a time"
        />
      </div>
      <FormCheckbox
        className="mt-4"
        name="scanner.phaseFovMayExceedReadoutFov"
        label="The phase FOV may exceed the readout FOV"
        hint="If not, a swap of the phase direction has to enlarge the readout FOV."
      />
    </Panel>
  );
}

export function UnfoldingGroup() {
  return (
    <Panel title="Accelerated scans and breathing">
      <div className={GRID}>
        <FormSelect
          name="scanner.unfolding"
          label="Accelerated scans are unfolded"
          options={optionsOf(UNFOLDING_WORDS)}
          className="sm:col-span-2 lg:col-span-1"
        />
        <FormNumber
          name="scanner.tissueReachMm"
          schema={scannerShape.tissueReachMm}
          label="Tissue is seen along the bore"
          hint="50 to 1000, either side of the isocentre"
        />
        <FormNumber
          name="scanner.respiratoryWindow"
          schema={scannerShape.respiratoryWindow}
          label="Share of a breath for a triggered scan"
          hint="0.05 to 1"
          step={0.05}
        />
      </div>
      <details className="mt-4 max-w-prose">
        <summary className="text-link">Not known? A ten-minute check with a phantom</summary>
        <ol className="mt-2 list-decimal space-y-1 pl-6 text-ink-soft">
          <li>
            Unfolding: one accelerated scan with the FOV smaller than the phantom along phase. A ghost in the
            centre of the picture means the grid ends at the acquired width; no ghost means it does not.
          </li>
          <li>
            Slab pulse: one 3D scan at 0 % slice oversampling of a phantom longer than the slab. Count the
            contaminated partitions at each end; the wider they reach, the smaller the time-bandwidth product
            of the pulse.
          </li>
        </ol>
      </details>
    </Panel>
  );
}

const LIMITS = [
  'fovMinMm',
  'fovMaxMm',
  'matrixMax',
  'acquiredLinesMax',
  'phaseOversamplingMaxPct',
  'sliceOversamplingMaxPct',
  'accelerationPhaseMax',
  'accelerationSliceMax',
  'partialFourierMin',
  'averagesMax',
  'echoTrainMax',
] as const;
const FINE: Partial<Record<(typeof LIMITS)[number], number>> = {
  accelerationPhaseMax: 0.5,
  accelerationSliceMax: 0.5,
  partialFourierMin: 0.05,
};

export function LimitsGroup() {
  return (
    <Panel title="Hard limits">
      <p className="mb-4 max-w-prose text-ink-soft">
        A remedy beyond one of these moves to “not possible here” with the reason. Filled-in figures of a new
        scanner are common ones, not yours: check each against the scanner.
      </p>
      <div className={GRID}>
        {LIMITS.map((key) => (
          <FormNumber
            key={key}
            name={`scanner.limits.${key}`}
            schema={scannerLimitsShape[key]}
            step={FINE[key]}
          />
        ))}
      </div>
      <FieldGroup
        className="mt-6"
        legend="Usable imaging volume"
        hint="Tissue beyond it is mapped wrongly before it folds: it counts, and no millimetre figure is given for it."
      >
        <div className={GRID}>
          {['right–left', 'up–down', 'along the bore'].map((words, at) => (
            <FormNumber
              key={words}
              name={`scanner.limits.usableFovMm.${at}`}
              schema={schemaAt(scannerFormSchema, ['scanner', 'limits', 'usableFovMm', String(at)])!}
              label={`Usable, ${words}`}
            />
          ))}
        </div>
      </FieldGroup>
    </Panel>
  );
}

export function OwnerGroup() {
  return (
    <Panel title="Who answers for these figures">
      <div className={GRID}>
        <FormText name="limitsOwner" label="Owner of the limits" optional hint="A person or a role" />
        <FormText name="limitsCheckedOn" label="Last checked on" type="date" optional />
      </div>
      <FormTextArea className="mt-5" name="note" label="Note for the team" optional rows={2} />
    </Panel>
  );
}
