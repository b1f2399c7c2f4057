'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useFieldArray } from 'react-hook-form';
import { Button, LinkButton } from '@/components/ui/button';
import { Form, FormMessage, FormSelect, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { PlusIcon } from '@/components/ui/icons';
import { optionsOf } from '@/components/ui/options';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm, type Versioned } from '@/components/ui/use-versioned-form';
import { REGION_WORDS } from '@/lib/presentation/anatomy-words';
import type { ActionResult } from '@/lib/schemas/action-result';
import { protocolFormSchema, type ProtocolForm as Values } from '@/lib/schemas/protocol';
import { KeepClearGroup } from './keep-clear-group';
import { NEW_PROTOCOL, newSequence } from './sequence-defaults';
import { SequencePanel } from './sequence-panel';

const MOST_SEQUENCES = 20;

export interface ProtocolFormProps {
  /** Absent: a new protocol. */
  stored?: Versioned<Values>;
  save: (expectedVersion: number, values: Values) => Promise<ActionResult<{ id: string; version: number }>>;
  readCurrent?: () => Promise<ActionResult<Versioned<Values>>>;
  mayEdit: boolean;
}

export function ProtocolForm({ stored, save, readCurrent, mayEdit }: ProtocolFormProps) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, { id: string; version: number }>({
    schema: protocolFormSchema,
    initial: stored?.form ?? NEW_PROTOCOL,
    version: stored?.version ?? 0,
    save,
    readCurrent,
    onSaved: ({ version }) => {
      say(
        !stored
          ? 'The protocol was added.'
          : version === state.version
            ? 'Nothing had changed.'
            : `Saved as version ${version}.`,
      );
      router.push('/site/protocols');
      router.refresh();
    },
  });
  const { fields, append, insert, remove, move } = useFieldArray({
    control: state.form.control,
    name: 'sequences',
  });
  // What was just added is open; what was stored is one line each.
  const [opened, setOpened] = useState<string | null>(null);
  const startsOpen = (id: string, index: number) =>
    !stored || fields.length === 1 || index.toString() === opened || id === opened;

  return (
    <Form
      form={state.form}
      onSubmit={state.submit}
      readOnly={!mayEdit}
      label={stored ? 'Edit protocol' : 'Add a protocol'}
    >
      <div className="space-y-5">
        <Panel title="The protocol">
          <div className="grid gap-x-6 gap-y-5 sm:grid-cols-3">
            <FormText name="name" label="Name" className="sm:col-span-2" required />
            <FormSelect
              name="region"
              label="Body part"
              options={optionsOf(REGION_WORDS)}
              onChosen={() => {
                state.form.setValue('keepClearPreset', 'whole-picture');
                state.form.setValue('keepClear.area', { kind: 'whole-picture' });
              }}
            />
          </div>
        </Panel>
        <KeepClearGroup />
        <section aria-labelledby="sequences-title" className="space-y-3">
          <h2 id="sequences-title" className="text-lg">
            Sequences, in the order they are run
          </h2>
          {fields.map((field, index) => (
            <SequencePanel
              key={field.id}
              index={index}
              count={fields.length}
              startsOpen={startsOpen(field.id, index)}
              onMove={(by) => move(index, index + by)}
              onRemove={() => remove(index)}
              onRepeat={() => {
                const copy = structuredClone(state.form.getValues(`sequences.${index}`));
                setOpened(String(index + 1));
                insert(index + 1, { ...copy, name: '' });
              }}
            />
          ))}
          <FormMessage name="sequences" />
          {mayEdit && fields.length < MOST_SEQUENCES && (
            <Button
              onClick={() => {
                setOpened(String(fields.length));
                append(newSequence());
              }}
            >
              <PlusIcon /> Add a sequence
            </Button>
          )}
        </section>
      </div>
      <div className="mt-5 space-y-4">
        <FormOutcome state={state} schema={protocolFormSchema} noun="protocol" />
        {mayEdit && !state.stale && (
          <div className="flex flex-wrap gap-3">
            <Button
              type="submit"
              variant="primary"
              pending={state.form.formState.isSubmitting}
              pendingLabel="Saving…"
            >
              {stored ? `Save as version ${state.version + 1}` : 'Add this protocol'}
            </Button>
            <LinkButton href="/site/protocols" variant="quiet">
              Leave without saving
            </LinkButton>
          </div>
        )}
      </div>
    </Form>
  );
}
