'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Form } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm, type Versioned } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { policyFormSchema, type PolicyForm as Values } from '@/lib/schemas/site-policy';
import { CertaintyGroup, MarginGroup, ModelGroup, WeightGroup } from './policy-groups';

export interface PolicyFormProps {
  stored: Versioned<Values>;
  save: (expectedVersion: number, values: Values) => Promise<ActionResult<{ version: number }>>;
  readCurrent: () => Promise<ActionResult<Versioned<Values>>>;
  mayEdit: boolean;
}

export function PolicyForm({ stored, save, readCurrent, mayEdit }: PolicyFormProps) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, { version: number }>({
    schema: policyFormSchema,
    initial: stored.form,
    version: stored.version,
    save,
    readCurrent,
    onSaved: ({ version }) => {
      say(version === state.version ? 'Nothing had changed.' : `The policy is now version ${version}.`);
      router.push('/site');
      router.refresh();
    },
  });
  return (
    <Form form={state.form} onSubmit={state.submit} readOnly={!mayEdit} label="Site policy">
      <div className="space-y-5">
        <MarginGroup />
        <CertaintyGroup />
        <ModelGroup />
        <WeightGroup />
      </div>
      <div className="mt-5 space-y-4">
        <FormOutcome state={state} schema={policyFormSchema} noun="policy" />
        {mayEdit && !state.stale && (
          <Button
            type="submit"
            variant="primary"
            pending={state.form.formState.isSubmitting}
            pendingLabel="Saving…"
          >
            Save as version {state.version + 1}
          </Button>
        )}
      </div>
    </Form>
  );
}
