'use client';

import { useRouter } from 'next/navigation';
import { Button, LinkButton } from '@/components/ui/button';
import { Form, FormNumber, FormSelect, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import type { ActionResult } from '@/lib/schemas/action-result';
import { bookingFormSchema, type BookingForm as Values } from './booking-form-schema';

interface Choice {
  readonly value: string;
  readonly label: string;
}

export function BookingForm({
  scanners,
  protocols,
  mask,
  day,
  add,
}: {
  scanners: readonly Choice[];
  protocols: readonly Choice[];
  mask: string;
  day: string;
  add: (values: Values) => Promise<ActionResult<{ id: string; accession: string }>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const state = useVersionedForm<Values, { id: string; accession: string }>({
    schema: bookingFormSchema,
    initial: {
      accession: '',
      day,
      time: '',
      slotMinutes: 30,
      scannerId: scanners.length === 1 ? scanners[0]!.value : '',
      protocolId: protocols.length === 1 ? protocols[0]!.value : '',
    },
    version: 0,
    save: (_version, values) => add(values),
    onSaved: ({ id, accession }) => {
      say(`${accession} was added. Enter the sizes next.`);
      router.push(`/bookings/${id}#sizes`);
    },
  });
  return (
    <Form form={state.form} onSubmit={state.submit} label="Add a booking">
      <Panel title="The booking">
        <div className="grid gap-x-6 gap-y-5 sm:grid-cols-2">
          <FormText
            name="accession"
            label="Accession number"
            figures
            required
            autoComplete="off"
            spellCheck={false}
            hint={`Exactly as the worklist shows it, in the form ${mask}. Never a name or a date.`}
            className="sm:col-span-2"
          />
          <FormText name="day" label="Day" type="date" required />
          <FormText name="time" label="Start of the slot" type="time" required />
          <FormNumber name="slotMinutes" schema={bookingFormSchema.shape.slotMinutes} step={5} />
          <span className="hidden sm:block" />
          <FormSelect name="scannerId" label="Scanner" options={scanners} placeholder="Choose a scanner" />
          <FormSelect
            name="protocolId"
            label="Protocol"
            options={protocols}
            placeholder="Choose a protocol"
          />
        </div>
      </Panel>
      <div className="mt-5 space-y-4">
        <FormOutcome state={state} schema={bookingFormSchema} noun="booking" />
        <div className="flex flex-wrap gap-3">
          <Button
            type="submit"
            variant="primary"
            pending={state.form.formState.isSubmitting}
            pendingLabel="Adding…"
          >
            Add this booking
          </Button>
          <LinkButton href="/bookings" variant="quiet">
            Leave without adding
          </LinkButton>
        </div>
      </div>
    </Form>
  );
}
