'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/choice';
import {
  useReadOnly,
  FormCheckbox,
  FormMessage,
  FormNumber,
  FormSelect,
  FormText,
} from '@/components/ui/form';
import { Panel } from '@/components/ui/panel';
import { schemaAt } from '@/components/ui/schema-facts';
import { keepClearOfPreset, keepClearPresetsFor } from '@/lib/domain/protocol/keep-clear-presets';
import type { BodyRegion } from '@/lib/physics/model/patient';
import { patientBoxSchema } from '@/lib/schemas/case/keep-clear';
import type { ProtocolForm } from '@/lib/schemas/protocol';

/** Edges as distances from the origin; the record keeps positions, so right, front and feet change sign. */
const EDGES = [
  { axis: 'xMm', end: 0, label: 'To the right' },
  { axis: 'xMm', end: 1, label: 'To the left' },
  { axis: 'yMm', end: 0, label: 'To the front' },
  { axis: 'yMm', end: 1, label: 'To the back' },
  { axis: 'zMm', end: 1, label: 'To the head' },
  { axis: 'zMm', end: 0, label: 'To the feet' },
] as const;

// An organ does not grow with the fat around it: for a body of any size this large the preset's own edges count.
const ANY_LARGE_BODY = {
  right: 1000,
  left: 1000,
  anterior: 1000,
  posterior: 1000,
  superior: 1000,
  inferior: 1000,
};

type KeepClearForm = ProtocolForm['keepClear'];
type BoxForm = NonNullable<KeepClearForm['mustStayDisplayed']>;

function presetBox(key: string): BoxForm | undefined {
  const area = keepClearOfPreset(key, ANY_LARGE_BODY)?.area;
  return area?.kind === 'box' ? (structuredClone(area.box) as BoxForm) : undefined;
}

const START_BOX: BoxForm = { xMm: [-100, 100], yMm: [-100, 100], zMm: [-100, 100] };

function BoxFields({ name }: { name: string }) {
  return (
    <>
      <div className="grid grid-cols-2 gap-x-6 gap-y-4 sm:grid-cols-3 lg:grid-cols-6">
        {EDGES.map(({ axis, end, label }) => (
          <FormNumber
            key={label}
            name={`${name}.${axis}.${end}`}
            schema={schemaAt(patientBoxSchema, [axis, String(end)])!}
            label={label}
            hint={null}
            negated={end === 0}
          />
        ))}
      </div>
      <FormMessage name={`${name}.xMm`} />
      <FormMessage name={`${name}.yMm`} />
      <FormMessage name={`${name}.zMm`} />
    </>
  );
}

export function KeepClearGroup() {
  const { setValue, getValues } = useFormContext<ProtocolForm>();
  const region = useWatch<ProtocolForm, 'region'>({ name: 'region' });
  const kind = useWatch<ProtocolForm, 'keepClear.area.kind'>({ name: 'keepClear.area.kind' });
  const displayed = useWatch<ProtocolForm, 'keepClear.mustStayDisplayed'>({
    name: 'keepClear.mustStayDisplayed',
  });
  const readOnly = useReadOnly();
  const presets = keepClearPresetsFor(region as BodyRegion);

  const follow = (key: string) => {
    if (key === 'whole-picture')
      return setValue('keepClear.area', { kind: 'whole-picture' }, { shouldDirty: true });
    const area = getValues('keepClear.area');
    const box = presetBox(key) ?? (area.kind === 'box' ? area.box : START_BOX);
    const label = presets.find((preset) => preset.key === key)?.label;
    setValue('keepClear.area', label ? { kind: 'box', box, label } : { kind: 'box', box }, {
      shouldDirty: true,
    });
  };

  return (
    <Panel title="Keep-clear area">
      <p className="mb-4 max-w-prose text-ink-soft">
        What must stay free of fold, fixed in the patient. Distances in mm from the point the sizes are taken
        from; a negative one lies beyond it, on the other side.
      </p>
      <div className="grid gap-x-6 gap-y-5 sm:grid-cols-3">
        <FormSelect
          name="keepClearPreset"
          label="Starts from"
          options={[
            ...presets.map((preset) => ({ value: preset.key, label: preset.label })),
            { value: 'own', label: 'A box of your own' },
          ]}
          onChosen={follow}
        />
        {kind === 'box' && <FormText name="keepClear.area.label" label="Said beside the box" optional />}
      </div>
      {kind === 'box' && (
        <div className="mt-5">
          <BoxFields name="keepClear.area.box" />
        </div>
      )}
      <div className="mt-5 space-y-2">
        <Checkbox
          label="More anatomy must stay displayed than the area itself"
          disabled={readOnly}
          checked={displayed !== undefined}
          onChange={(event) =>
            setValue(
              'keepClear.mustStayDisplayed',
              event.target.checked ? structuredClone(START_BOX) : undefined,
              {
                shouldDirty: true,
              },
            )
          }
        />
        {displayed && <BoxFields name="keepClear.mustStayDisplayed" />}
        <FormCheckbox
          name="keepClear.followsWindow"
          label="The area follows the window when it is recentred"
          hint="Only while what must stay displayed stays inside."
        />
      </div>
    </Panel>
  );
}
