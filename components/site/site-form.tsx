'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { siteFormSchema, type SiteForm as Values } from '@/lib/schemas/site';

export function SiteForm({
  stored,
  save,
  mayEdit,
}: {
  stored: Values;
  save: (values: Values) => Promise<ActionResult<Values>>;
  mayEdit: boolean;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, Values>({
    schema: siteFormSchema,
    initial: stored,
    version: 0,
    save: (_version, values) => save(values),
    onSaved: (saved) => {
      state.form.reset({ name: saved.name, accessionMask: saved.accessionMask });
      say('Saved.');
      router.refresh();
    },
  });
  return (
    <Form form={state.form} onSubmit={state.submit} readOnly={!mayEdit} label="Name and numbers">
      <div>
        <Panel title="This site">
          <div className="space-y-5">
            <FormText name="name" label="Name of the site" required />
            <FormText
              name="accessionMask"
              label="Form of the accession numbers"
              figures
              required
              hint="# a digit, @ a letter, ? either, * any run; all else stands for itself, as in HB-####. Bookings that are there stay as they are."
            />
          </div>
        </Panel>
      </div>
      <div className="mt-5 space-y-4">
        <FormOutcome state={state} schema={siteFormSchema} noun="form" />
        {mayEdit && (
          <Button
            type="submit"
            variant="primary"
            pending={state.form.formState.isSubmitting}
            pendingLabel="Saving…"
          >
            Save
          </Button>
        )}
      </div>
    </Form>
  );
}
