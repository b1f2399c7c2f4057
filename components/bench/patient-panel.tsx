'use client';

import { useDeferredValue } from 'react';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Popover } from '@/components/ui/popover';
import { Select } from '@/components/ui/select';
import { extentsShape, patientSchema, patientShape } from '@/lib/schemas/case/patient';
import type { Side } from '@/lib/physics/model/axes';
import type { ArmPosition, Patient, Reading, ReadingSource } from '@/lib/physics/model/patient';
import { ARM_WORDS, isMeasured, SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import { useBench, useBenchState } from './bench-context';
import { BenchChoice, optionsOf } from './bench-choice';
import { BenchForm, withLeaf } from './bench-form';
import { BenchNumber, PAIR_CLASS } from './bench-number';
import type { BenchState } from './state/bench-state';
import { withSource, withValue } from './state/reading-edit';

const PAIRS: readonly (readonly [Side, Side])[] = [
  ['right', 'left'],
  ['anterior', 'posterior'],
  ['superior', 'inferior'],
];
const SIDE_NAMES: Readonly<Record<Side, string>> = {
  right: 'Right', left: 'Left', anterior: 'Anterior', posterior: 'Posterior', superior: 'Superior', inferior: 'Inferior',
};

const selectPatient = (state: BenchState): Patient => state.document.patient;

/** Sizes as each side of the FOV centre: shoulders, hips and one-sided parts fit the same form. */
export function PatientPanel() {
  const { store, setting } = useBench();
  const patient = useDeferredValue(useBenchState(selectPatient));

  const onEdit = (path: string, value: unknown, step?: string) => {
    const now = store.read().document.patient;
    const [head, key, leaf] = path.split('.');
    const withStep = step === undefined ? {} : { step };
    if (head === 'extents' && leaf === 'value') {
      const side = key as Side;
      const reading = withValue(now.extents[side], value as number, setting.today);
      return store.dispatch({ type: 'edit-extent', side, reading, ...withStep });
    }
    if (key === 'value') {
      const reading = { ...(now[head as 'breathHoldS'] as Reading), value: value as number, source: 'measured' as const, takenOn: setting.today };
      return store.dispatch({ type: 'edit-patient', patch: { [head!]: reading }, ...withStep });
    }
    const after = withLeaf(now, path.split('.'), value);
    store.dispatch({ type: 'edit-patient', patch: { [head!]: after[head as keyof Patient] }, ...withStep });
  };

  return (
    <Panel
      tone="bench"
      collapsible
      title="Patient"
      summary={summaryOf(patient)}
      aside={<HowGot patient={patient} />}
    >
      <BenchForm schema={patientSchema} select={selectPatient} label="Patient" onEdit={onEdit}>
        <div className={PAIR_CLASS}>
          {PAIRS.flat().map((side) => (
            <BenchNumber
              key={side}
              path={`extents.${side}.value`}
              schema={extentsShape[side].shape.value}
              label={SIDE_NAMES[side]}
              sliderMin={side === 'superior' || side === 'inferior' ? 50 : 60}
              sliderMax={side === 'anterior' || side === 'posterior' ? 300 : 400}
              certainty={isMeasured(patient.extents[side].source) ? 'measured' : 'estimated'}
            />
          ))}
          <BenchNumber path="breathHoldS.value" schema={patientShape.breathHoldS.shape.value} label="Hold" sliderMax={40}
            certainty={isMeasured(patient.breathHoldS.source) ? 'measured' : 'estimated'} />
          <BenchNumber path="breathPeriodS.value" schema={patientShape.breathPeriodS.shape.value} label="Breath" step={0.1} sliderMax={10}
            certainty={isMeasured(patient.breathPeriodS.source) ? 'measured' : 'estimated'} />
        </div>
        <BenchChoice<ArmPosition> path="arms.position" label="Arms" options={optionsOf(ARM_WORDS)} className="mt-1" />
        {patient.weightKg && (
          <BenchNumber
            path="weightKg.value"
            schema={patientShape.weightKg.unwrap().shape.value}
            label="Weight"
            sliderMin={30}
            sliderMax={300}
            className="mt-1"
            certainty={isMeasured(patient.weightKg.source) ? 'measured' : 'estimated'}
          />
        )}
      </BenchForm>
    </Panel>
  );
}

function summaryOf({ extents, arms }: Patient): string {
  const across = (a: Side, b: Side) => Math.round(extents[a].value + extents[b].value);
  return `${across('right', 'left')} × ${across('anterior', 'posterior')} mm, arms ${ARM_WORDS[arms.position]}`;
}

/** How each size was got, when, and its spread; all of it can be said otherwise. */
function HowGot({ patient }: { patient: Patient }) {
  const { store, setting } = useBench();
  return (
    <Popover label="How each size was got" trigger={<Button variant="quiet" size="sm">how got</Button>}>
      <p className="mb-2 text-sm text-ink-soft">
        Solid underline: measured. Dotted: estimated. A value changed here counts as measured today.
      </p>
      <ul className="space-y-2">
        {PAIRS.flat().map((side) => {
          const reading = patient.extents[side];
          return (
            <li key={side}>
              <Select<ReadingSource>
                compact
                layout="row"
                label={`${SIDE_NAMES[side]} ${Math.round(reading.value)} ± ${Math.round(reading.spread)} mm`}
                options={optionsOf(SOURCE_WORDS)}
                value={reading.source}
                onChange={(event) =>
                  store.dispatch({
                    type: 'edit-extent',
                    side,
                    reading: withSource(reading, event.target.value as ReadingSource, setting.today),
                  })
                }
              />
              {reading.takenOn && <p className="text-sm text-ink-soft">taken {reading.takenOn}</p>}
            </li>
          );
        })}
      </ul>
    </Popover>
  );
}
