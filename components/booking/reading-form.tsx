'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Form, FormNumber, FormSelect, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { optionsOf } from '@/components/ui/options';
import { Panel } from '@/components/ui/panel';
import { Select } from '@/components/ui/select';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import { QUANTITIES, QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';
import { SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import type { ActionResult } from '@/lib/schemas/action-result';
import { quantity as quantitySchema, type FieldUnit } from '@/lib/schemas/fields/fields';
import { sizeReadingInput, type RecordReadings } from '@/lib/schemas/size-reading';
import { CODED } from './coded-quantities';

type Values = RecordReadings['readings'][number];

/** A girth is asked for where the tables measured it; everything else says where to look. */
const HINTS: Partial<Record<SizeQuantity, string>> = {
  'girth-cm': 'At the iliac crest, where the tables measured it',
  'breadth-mm': 'Widest, as the patient will lie, arms not counted',
  'depth-mm': 'Greatest height above the table, lying',
  'breath-hold-s': 'Longest the patient managed when tried',
};

const QUANTITY_OPTIONS = QUANTITIES.map((value) => {
  const { label, unit } = QUANTITY_FACTS[value];
  const words = label.replace(/ \(.*\)$/, '');
  return { value, label: unit ? `${words}, ${unit}` : words };
});

function ValueFields({ onCoded }: { onCoded: (value: number) => void }) {
  const name = useWatch<Values, 'quantity'>({ name: 'quantity' });
  const value = useWatch<Values, 'value'>({ name: 'value' });
  const facts = QUANTITY_FACTS[name];
  const unit = (facts.unit || '1') as FieldUnit;
  const coded = CODED[name];
  if (coded) {
    return (
      <Select
        label="Which"
        options={coded}
        value={String(value)}
        onChange={(event) => onCoded(Number(event.target.value))}
      />
    );
  }
  return (
    <>
      <FormNumber
        key={name}
        name="value"
        label="Value"
        schema={quantitySchema({ min: facts.min, max: facts.max, unit, text: facts.label })}
        hint={[`${facts.min} to ${facts.max}`, HINTS[name]].filter(Boolean).join('. ')}
      />
      <FormNumber
        name="spread"
        label="Spread, one standard deviation"
        schema={quantitySchema({ min: 0, max: 500, unit, text: 'Spread' })}
        hint="0 when it was read exactly"
      />
    </>
  );
}

export function ReadingForm({
  today,
  add,
}: {
  today: string;
  add: (readings: Values[]) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const [open, setOpen] = useState(true);
  const saved = useRef<number | null>(null);
  const state = useVersionedForm<Values, unknown>({
    schema: sizeReadingInput,
    initial: { quantity: 'breadth-mm', source: 'measured', spread: 0, takenOn: today },
    version: 0,
    save: async (_version, values) => {
      saved.current = values.value;
      const result = await add([values]);
      if (result.ok || !result.error.fields) return result;
      // The service names its fields in the list it was given.
      const fields = Object.entries(result.error.fields).map(([path, text]) => [
        path.replace(/^readings\.0\.?/, ''),
        text,
      ]);
      return {
        ok: false,
        error: { ...result.error, fields: Object.fromEntries(fields) as Record<string, string> },
      };
    },
    onSaved: () => {
      say('The reading was added. Earlier ones stay.');
      // What was typed while the answer was on its way belongs to the next reading.
      const { value, ...rest } = state.form.getValues();
      state.form.reset({
        ...rest,
        ...(value === saved.current ? { spread: 0, value: undefined } : { value }),
      });
      router.refresh();
    },
  });
  return (
    <Panel title="Add a reading" collapsible open={open} onOpenChange={setOpen}>
      <Form form={state.form} onSubmit={state.submit} label="Add a reading">
        <div className="grid gap-x-6 gap-y-5 sm:grid-cols-2">
          <FormSelect
            name="quantity"
            label="Size"
            options={QUANTITY_OPTIONS}
            onChosen={(name) => {
              const coded = CODED[name as SizeQuantity];
              state.form.resetField('value', { defaultValue: coded ? Number(coded[0]!.value) : undefined });
              state.form.setValue('spread', 0);
            }}
          />
          <FormSelect name="source" label="How it was got" options={optionsOf(SOURCE_WORDS)} />
          <ValueFields onCoded={(value) => state.form.setValue('value', value, { shouldDirty: true })} />
          <FormText name="takenOn" label="Day it was taken" type="date" max={today} required />
        </div>
        <div className="mt-5 space-y-4">
          <FormOutcome state={state} schema={sizeReadingInput} noun="reading" />
          <Button
            type="submit"
            variant="primary"
            pending={state.form.formState.isSubmitting}
            pendingLabel="Adding…"
          >
            Add this reading
          </Button>
        </div>
      </Form>
    </Panel>
  );
}
