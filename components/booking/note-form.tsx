'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Form, FormTextArea } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { noteFormSchema, type NoteForm as Values } from './coordinator-forms';

/** A few lines that stay as they are written: a note, a question to a lead, a lead's decision. */
export function NoteForm({ label, button, pending, done, variant = 'secondary', save }: {
  label: string;
  button: string;
  pending: string;
  done: string;
  variant?: 'primary' | 'secondary';
  save: (form: Values) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, unknown>({
    schema: noteFormSchema,
    initial: { note: '' },
    version: 0,
    save: (_version, form) => save(form),
    onSaved: () => {
      say(done);
      state.form.reset({ note: '' });
      router.refresh();
    },
  });
  return (
    <Form form={state.form} onSubmit={state.submit} label={label} className="space-y-3">
      <FormTextArea name="note" label={label} hint="No name, no date of birth. It stays as it is written." rows={2} />
      <FormOutcome state={state} schema={noteFormSchema} noun="text" />
      <Button type="submit" variant={variant} pending={state.form.formState.isSubmitting} pendingLabel={pending}>{button}</Button>
    </Form>
  );
}
