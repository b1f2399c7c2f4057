'use client';

import { useRouter } from 'next/navigation';
import { Button, LinkButton } from '@/components/ui/button';
import { Form } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm, type Versioned } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { scannerFormSchema, type ScannerForm as Values } from '@/lib/schemas/scanner';
import { NEW_SCANNER } from './scanner-defaults';
import { CoilsGroup } from './coils-group';
import { LimitsGroup, OpeningGroup, OwnerGroup, SamplingGroup, UnfoldingGroup } from './scanner-groups';

export interface ScannerFormProps {
  /** Absent: a new scanner. */
  stored?: Versioned<Values>;
  save: (expectedVersion: number, values: Values) => Promise<ActionResult<{ id: string; version: number }>>;
  readCurrent?: () => Promise<ActionResult<Versioned<Values>>>;
  mayEdit: boolean;
}

export function ScannerForm({ stored, save, readCurrent, mayEdit }: ScannerFormProps) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, { id: string; version: number }>({
    schema: scannerFormSchema,
    initial: stored?.form ?? NEW_SCANNER,
    version: stored?.version ?? 0,
    save,
    readCurrent,
    onSaved: ({ version }) => {
      say(
        !stored
          ? 'The scanner was added.'
          : version === state.version
            ? 'Nothing had changed.'
            : `Saved as version ${version}.`,
      );
      router.push('/site/scanners');
      router.refresh();
    },
  });
  const saving = state.form.formState.isSubmitting;
  return (
    <Form
      form={state.form}
      onSubmit={state.submit}
      readOnly={!mayEdit}
      label={stored ? 'Edit scanner' : 'Add a scanner'}
    >
      <div className="space-y-5">
        <OpeningGroup />
        <SamplingGroup />
        <UnfoldingGroup />
        <LimitsGroup />
        <CoilsGroup />
        <OwnerGroup />
      </div>
      <div className="mt-5 space-y-4">
        <FormOutcome state={state} schema={scannerFormSchema} noun="scanner" />
        {mayEdit && !state.stale && (
          <div className="flex flex-wrap gap-3">
            <Button type="submit" variant="primary" pending={saving} pendingLabel="Saving…">
              {stored ? `Save as version ${state.version + 1}` : 'Add this scanner'}
            </Button>
            <LinkButton href="/site/scanners" variant="quiet">
              Leave without saving
            </LinkButton>
          </div>
        )}
      </div>
    </Form>
  );
}
