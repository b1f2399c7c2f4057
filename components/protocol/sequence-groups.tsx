'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { FormCheckbox, FormNumber, FormSegmented, FormSelect, FormText } from '@/components/ui/form';
import { optionsOf } from '@/components/ui/options';
import { Panel } from '@/components/ui/panel';
import { axesOfPlane } from '@/lib/domain/case/lines';
import type { Plane, SequenceFamily } from '@/lib/physics/model/prescription';
import { AXIS_NAMES, AXIS_WORDS, FAMILY_WORDS, PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import { TRAJECTORY_WORDS } from '@/lib/presentation/setup-words';
import { prescriptionShape, slabShape, stackShape } from '@/lib/schemas/case/prescription';
import { vec3Schema } from '@/lib/schemas/case/patient';
import { schemaAt } from '@/components/ui/schema-facts';
import { asFamily, type SequenceForm } from './sequence-defaults';
import { acquiredSummary, familyFields, kindSummary, slicesSummary, windowSummary } from './sequence-facts';

export const GRID = 'grid gap-x-6 gap-y-5 sm:grid-cols-2 lg:grid-cols-4';

/** Every group is told where its sequence lives in the form: "sequences.2". */
export interface GroupProps {
  at: string;
  /** Kept open while one of its fields is refused. */
  refused: (keys: readonly string[]) => boolean;
}

export function useSequence(at: string): SequenceForm {
  return useWatch({ name: at }) as SequenceForm;
}

export function KindGroup({ at, refused }: GroupProps) {
  const { setValue, getValues } = useFormContext();
  const sequence = useSequence(at);
  const axes = axesOfPlane(sequence.plane);
  const keys = ['name', 'family', 'plane', 'phaseAxis', 'trajectory', 'coil'];
  return (
    <Panel
      level={4}
      title="What it is"
      collapsible
      summary={kindSummary(sequence)}
      open={refused(keys) || undefined}
    >
      <div className={GRID}>
        <FormText name={`${at}.name`} label="Name" hint="As the worklist or the team says it" required />
        <FormSelect
          name={`${at}.family`}
          label="Sequence family"
          options={optionsOf(FAMILY_WORDS)}
          hint="Sets which fields are asked for"
          onChosen={(family) =>
            setValue(at, asFamily(getValues(at) as SequenceForm, family as SequenceFamily), {
              shouldDirty: true,
            })
          }
        />
        <FormSelect
          name={`${at}.trajectory`}
          label="k-space is sampled"
          options={optionsOf(TRAJECTORY_WORDS)}
          hint={sequence.trajectory === 'cartesian' ? undefined : 'Answered “Not modelled”'}
        />
        <FormText name={`${at}.coil`} label="Receive coil" required />
        <FormSegmented<Plane>
          name={`${at}.plane`}
          legend="Plane"
          options={optionsOf(PLANE_WORDS)}
          className="sm:col-span-2"
          onChosen={(plane) => {
            const allowed = axesOfPlane(plane);
            if (!allowed.includes(getValues(`${at}.phaseAxis`))) setValue(`${at}.phaseAxis`, allowed[1]);
          }}
        />
        <FormSegmented
          name={`${at}.phaseAxis`}
          legend="Phase direction"
          className="sm:col-span-2"
          options={axes.map((axis) => ({
            value: axis,
            label: (
              <>
                {AXIS_WORDS[axis]}
                <span className="sr-only"> ({AXIS_NAMES[axis]})</span>
              </>
            ),
          }))}
        />
      </div>
    </Panel>
  );
}

export function WindowGroup({ at, refused }: GroupProps) {
  const sequence = useSequence(at);
  const shape = prescriptionShape;
  const keys = [
    'fovPhaseMm',
    'fovReadoutMm',
    'linesAcrossFov',
    'readoutMatrix',
    'acquiredLines',
    'centreMm',
    'tiltAboutReadoutDeg',
    'tiltAboutPhaseDeg',
    'inPlaneRotationDeg',
  ];
  const centre = vec3Schema('FOV centre');
  return (
    <Panel
      level={4}
      title="Window and lines"
      collapsible
      summary={windowSummary(sequence)}
      open={refused(keys) || undefined}
    >
      <div className={GRID}>
        <FormNumber name={`${at}.fovPhaseMm`} schema={shape.fovPhaseMm} label="FOV, phase" />
        <FormNumber name={`${at}.fovReadoutMm`} schema={shape.fovReadoutMm} label="FOV, readout" />
        <FormNumber
          name={`${at}.linesAcrossFov`}
          schema={shape.linesAcrossFov}
          label="Lines across the phase FOV"
        />
        <FormNumber name={`${at}.readoutMatrix`} schema={shape.readoutMatrix} label="Matrix, readout" />
        <FormNumber
          name={`${at}.acquiredLines`}
          schema={shape.acquiredLines}
          label="Lines acquired"
          hint={acquiredSummary(sequence) ?? 'At least the lines across the FOV; more is phase oversampling'}
        />
        {['to the left', 'to the back', 'to the head'].map((words, index) => (
          <FormNumber
            key={words}
            name={`${at}.centreMm.${index}`}
            schema={schemaAt(centre, [String(index)])!}
            label={`FOV centre ${words}`}
            hint="Offset from the size record’s origin"
          />
        ))}
        <FormNumber
          name={`${at}.tiltAboutReadoutDeg`}
          schema={shape.tiltAboutReadoutDeg}
          label="Tilt about readout"
        />
        <FormNumber
          name={`${at}.tiltAboutPhaseDeg`}
          schema={shape.tiltAboutPhaseDeg}
          label="Tilt about phase"
        />
        <FormNumber
          name={`${at}.inPlaneRotationDeg`}
          schema={shape.inPlaneRotationDeg}
          label="Rotation in the plane"
        />
      </div>
    </Panel>
  );
}

export function SlicesGroup({ at, refused }: GroupProps) {
  const sequence = useSequence(at);
  const slab = familyFields(sequence.family).slab;
  return (
    <Panel
      level={4}
      title={slab ? 'Slab' : 'Slices'}
      collapsible
      defaultOpen={false}
      summary={slicesSummary(sequence)}
      open={refused(['slices']) || undefined}
    >
      {slab ? (
        <>
          <div className={GRID}>
            <FormNumber
              name={`${at}.slices.partitions`}
              schema={slabShape.partitions}
              label="Partitions in the slab"
            />
            <FormNumber
              name={`${at}.slices.partitionThicknessMm`}
              schema={slabShape.partitionThicknessMm}
              label="Partition thickness, acquired"
              step={0.1}
            />
            <FormNumber
              name={`${at}.slices.acquiredPartitions`}
              schema={slabShape.acquiredPartitions}
              label="Partitions acquired"
              hint="At least those in the slab; more is slice oversampling"
            />
            <FormNumber
              name={`${at}.slices.droppedPartitionsPerEnd`}
              schema={slabShape.droppedPartitionsPerEnd}
              label="End partitions given up each end"
            />
            <FormNumber
              name={`${at}.slices.timeBandwidthProduct`}
              schema={slabShape.timeBandwidthProduct}
              label="Time-bandwidth product of the pulse"
              hint="1 to 40; empty: not known, the policy’s cautious value"
              step={0.5}
            />
            <FormNumber
              name={`${at}.slices.pulseDurationMs`}
              schema={slabShape.pulseDurationMs}
              label="Duration of the slab pulse"
              hint="0.05 to 30; empty: fat’s slab shift is not worked out"
              step={0.1}
            />
            <FormSelect
              name={`${at}.slices.fatShiftTowards`}
              label="Fat’s slab is shifted towards"
              hint="Not known: both ends are taken"
              placeholder="not known"
              optional
              options={[
                { value: 'low-end', label: 'the right, front or foot end' },
                { value: 'high-end', label: 'the left, back or head end' },
              ]}
            />
          </div>
          <FormCheckbox
            className="mt-4"
            name={`${at}.slices.selective`}
            label="The pulse selects the slab"
            hint="If not, everything the coil sees is excited."
          />
        </>
      ) : (
        <div className={GRID}>
          <FormNumber name={`${at}.slices.slices`} schema={stackShape.slices} />
          <FormNumber name={`${at}.slices.thicknessMm`} schema={stackShape.thicknessMm} step={0.5} />
          <FormNumber name={`${at}.slices.gapMm`} schema={stackShape.gapMm} step={0.1} />
        </div>
      )}
    </Panel>
  );
}
