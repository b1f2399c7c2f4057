'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import * as z from 'zod';
import { KeepClearGroup } from '@/components/protocol/keep-clear-group';
import { Button } from '@/components/ui/button';
import { Form, FormNumber, FormTextArea } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useStatus } from '@/components/ui/status';
import { useFormAction } from '@/components/ui/use-form-action';
import type { BodyRegion } from '@/lib/physics/model/patient';
import type { ActionResult } from '@/lib/schemas/action-result';
import { REGIONS } from '@/lib/schemas/case/patient';
import { keepClearRequestForm, type KeepClearRequestForm, type KeepClearRequestView } from '@/lib/schemas/keep-clear-request';

/** The body part says which presets are offered; it is the booking's and not sent. */
const schema = keepClearRequestForm.extend({ region: z.enum(REGIONS) });
type Values = z.output<typeof schema>;

/** Sets what must stay free of fold in this exam. Earlier requests stay in the record; the newest counts. */
export function KeepClearRequestForm({ region, requested, ask }: {
  region: BodyRegion;
  requested: KeepClearRequestView | null;
  ask: (form: KeepClearRequestForm) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const form = useForm<Values, unknown, Values>({
    resolver: zodResolver(schema) as never,
    defaultValues: {
      region,
      keepClearPreset: requested?.keepClearPreset ?? 'whole-picture',
      keepClear: structuredClone(requested?.keepClear ?? { area: { kind: 'whole-picture' }, followsWindow: false }) as never,
      toleratedFoldOutsidePct: requested?.toleratedFoldOutsidePct,
      note: requested?.note ?? '',
    },
  });
  const { submit, problem } = useFormAction(form, ({ region: _region, ...values }) => ask(values), () => {
    say('The keep-clear area was asked for. It is on the bench of this booking.');
    router.refresh();
  });
  return (
    <Form form={form} onSubmit={submit} label="Keep-clear area asked for" className="space-y-5">
      <KeepClearGroup />
      <div className="grid gap-x-6 gap-y-5 sm:grid-cols-2">
        <FormNumber
          name="toleratedFoldOutsidePct"
          label="Tolerated fold beside the area"
          schema={keepClearRequestForm.shape.toleratedFoldOutsidePct}
          hint="Share of the displayed picture. Left empty: site policy says. More than this needs your sign-off."
        />
        <FormTextArea name="note" label="What the exam is about" rows={2} hint="For whoever plans it. No names, no dates of birth." optional />
      </div>
      <FormProblem problem={problem} />
      <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Asking">
        Ask for this keep-clear area
      </Button>
    </Form>
  );
}
