'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { surgeryFormSchema, type SurgeryForm as Values } from './coordinator-forms';

/** Surgery that changes the body's size: sizes from before that day count no more. */
export function SurgeryForm({ surgeryOn, today, save }: { surgeryOn: string; today: string; save: (form: Values) => Promise<ActionResult<unknown>> }) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, unknown>({
    schema: surgeryFormSchema,
    initial: { surgeryOn },
    version: 0,
    save: (_version, form) => save(form),
    onSaved: () => {
      say('The day was saved. The booking is being checked again.');
      state.form.reset(state.form.getValues());
      router.refresh();
    },
  });
  return (
    <Panel title="Bariatric surgery" collapsible defaultOpen={surgeryOn !== ''} summary="None known">
      <Form form={state.form} onSubmit={state.submit} label="Bariatric surgery" className="space-y-4">
        <FormText name="surgeryOn" label="Day of the surgery" type="date" max={today} optional figures hint="Sizes from before that day count no more. Empty: none known." />
        <FormOutcome state={state} schema={surgeryFormSchema} noun="day" />
        <Button type="submit" pending={state.form.formState.isSubmitting} pendingLabel="Saving…">Save this day</Button>
      </Form>
    </Panel>
  );
}
