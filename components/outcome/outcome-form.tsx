'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Controller, useForm } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/choice';
import { Form, FormCheckbox, FormMessage, FormNumber, FormSegmented, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { NumberField } from '@/components/ui/number-field';
import { useStatus } from '@/components/ui/status';
import { useFormAction } from '@/components/ui/use-form-action';
import { WRAP_CHOICES } from '@/lib/presentation/outcome-words';
import { phaseSettingNumber, sliceSettingNumber, type SettingNumber } from '@/lib/presentation/oversampling-used';
import type { ActionResult } from '@/lib/schemas/action-result';
import { outcomeForm, type OutcomeForm as Values } from '@/lib/schemas/outcome';
import type { PlanView } from '@/lib/schemas/plan';

/** Everything is filled in as planned, so that the usual outcome takes two presses: what was seen, and record. */
function plannedValues(plan: PlanView): Partial<Values> {
  const scanS = plan.results.reduce((sum, { time }) => sum + (time?.scanS ?? 0), 0);
  return {
    sequences: plan.sequences.map(({ id, prescription }) => {
      const slice = sliceSettingNumber(prescription, plan.scanner);
      return { id, phase: phaseSettingNumber(prescription, plan.scanner).value, ...(slice ? { slice: slice.value } : {}) };
    }),
    minutes: Math.round(scanS / 6) / 10,
    repeated: false,
    note: '',
  };
}

function SettingField({ name, label, setting }: { name: string; label: string; setting: SettingNumber }) {
  return (
    <Controller
      name={name}
      render={({ field, fieldState }) =>
        setting.kind === 'switch' ? (
          <Checkbox label={`${label}: doubling on`} checked={field.value === 1} onChange={(event) => field.onChange(event.target.checked ? 1 : 0)} />
        ) : (
          <NumberField
            compact
            layout="row"
            name={name}
            label={label}
            unit={setting.unit}
            min={setting.min}
            max={setting.max}
            value={field.value as number}
            error={fieldState.error?.message}
            onChange={(value) => field.onChange(value)}
            onBlur={field.onBlur}
          />
        )
      }
    />
  );
}

/** What came of the plan at the scanner. Nothing here is changed afterwards; a correction is another outcome. */
export function OutcomeForm({ plan, record }: {
  plan: PlanView;
  record: (id: string, values: Values) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  // Drawn once for what is being typed: the same outcome sent twice is one.
  const [id, setId] = useState(() => crypto.randomUUID());
  const form = useForm<Values, unknown, Values>({
    resolver: zodResolver(outcomeForm) as never,
    defaultValues: plannedValues(plan) as never,
  });
  const { submit, problem } = useFormAction(form, (values) => record(id, values), () => {
    say('The outcome was recorded. The plan is used.');
    setId(crypto.randomUUID());
    form.reset(plannedValues(plan) as never);
    router.refresh();
  });
  return (
    <Form form={form} onSubmit={submit} label="Outcome" className="space-y-4">
      <FormSegmented name="wrap" legend="Wrap in the pictures" options={WRAP_CHOICES} />
      <fieldset>
        <legend className="mb-1 text-sm font-semibold">Oversampling used, as set at the scanner</legend>
        <div className="grid gap-x-8 gap-y-1 sm:grid-cols-2">
          {plan.sequences.map(({ id: sequence, prescription }, index) => {
            const slice = sliceSettingNumber(prescription, plan.scanner);
            return (
              <div key={sequence} className="border-b border-line py-1">
                <SettingField
                  name={`sequences.${index}.phase`}
                  label={slice ? `${prescription.name}, phase` : prescription.name}
                  setting={phaseSettingNumber(prescription, plan.scanner)}
                />
                {slice && <SettingField name={`sequences.${index}.slice`} label={`${prescription.name}, slice`} setting={slice} />}
              </div>
            );
          })}
        </div>
        <FormMessage name="sequences" />
      </fieldset>
      <div className="flex flex-wrap items-start gap-x-8 gap-y-4">
        <FormNumber name="minutes" label="Scan time, all sequences" schema={outcomeForm.shape.minutes} hint="As planned unless you change it" className="w-56" />
        <FormCheckbox name="repeated" label="Something was scanned again because of fold" className="sm:mt-6" />
      </div>
      <FormText name="note" label="Note" hint="What is worth knowing next time. No names." optional />
      <FormProblem problem={problem} />
      <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Recording">
        {plan.state === 'used' ? 'Record a correction' : 'Record the outcome; the plan becomes used'}
      </Button>
    </Form>
  );
}
