'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Form, FormNumber, FormSelect, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { sessionFormSchema, type SessionForm as Values } from './coordinator-forms';

/** When a scanner is staffed. The service names sessions by number; here the form has one line for all of them. */
export function SessionForm({ scanners, day, add }: {
  scanners: readonly { value: string; label: string }[];
  day: string;
  add: (form: Values) => Promise<ActionResult<{ added: number }>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, { added: number }>({
    schema: sessionFormSchema,
    initial: { scannerId: scanners.length === 1 ? scanners[0]!.value : '', day, from: '08:00', to: '17:00', weeks: 1 },
    version: 0,
    save: async (_version, form) => {
      const result = await add(form);
      if (result.ok || !result.error.fields) return result;
      const fields = Object.fromEntries(Object.entries(result.error.fields).map(([path, text]) => [
        path.startsWith('sessions.') ? (path.endsWith('endsAt') ? 'to' : 'from') : path, text,
      ]));
      return { ok: false, error: { ...result.error, fields } };
    },
    onSaved: ({ added }) => {
      say(added === 1 ? 'The session was added.' : `${added} sessions were added.`);
      state.form.reset(state.form.getValues());
      router.refresh();
    },
  });
  return (
    <Panel title="Add a session">
      <Form form={state.form} onSubmit={state.submit} label="Add a session">
        <div className="grid items-start gap-x-6 gap-y-5 sm:grid-cols-2">
          <FormSelect name="scannerId" label="Scanner" options={scanners} placeholder="Choose a scanner" />
          <FormText name="day" label="Day" type="date" required figures />
          <FormText name="from" label="From" type="time" required figures />
          <FormText name="to" label="To" type="time" required figures />
          <FormNumber name="weeks" schema={sessionFormSchema.shape.weeks} label="Weeks in a row" hint="On the same weekday, 1 to 52" />
        </div>
        <div className="mt-5 space-y-4">
          <FormOutcome state={state} schema={sessionFormSchema} noun="session" />
          <Button type="submit" variant="primary" pending={state.form.formState.isSubmitting} pendingLabel="Adding…">Add this session</Button>
        </div>
      </Form>
    </Panel>
  );
}
