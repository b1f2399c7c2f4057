'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import * as z from 'zod';
import { Button } from '@/components/ui/button';
import { Form, FormTextArea } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useFormAction } from '@/components/ui/use-form-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { signOffInput } from '@/lib/schemas/plan';

const schema = z.object({ decision: signOffInput.shape.decision, reason: signOffInput.shape.reason });
type Values = z.output<typeof schema>;

/** A radiologist's decision on exactly the version on the screen. */
export function SignOffForm({ version, why, decide }: {
  version: number;
  why: string | undefined;
  decide: (values: Values) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const form = useForm<Values, unknown, Values>({
    resolver: zodResolver(schema) as never,
    defaultValues: { decision: 'signed off', reason: '' },
  });
  const { submit, problem } = useFormAction(form, decide, () => router.refresh());
  const pending = form.formState.isSubmitting;
  const decision = form.getValues('decision');
  return (
    <section aria-labelledby="sign-off-title" className="mt-6 border-y border-line bg-paper px-4 py-4">
      <h2 id="sign-off-title" className="mb-1 text-lg">Your decision on version {version}</h2>
      <p className="mb-3 max-w-prose text-ink-soft">
        {why ? `Asked for because ${why}.` : 'Not needed by site policy; it may be given all the same.'} The planner is told by mail when
        it is sent back, those who scan when it is signed off.
      </p>
      <Form form={form} onSubmit={submit} label="Sign-off" className="max-w-prose space-y-4">
        <FormTextArea name="reason" label="Reason" rows={2} hint="Needed to send it back: what should change. Stored with your name." optional />
        <FormProblem problem={problem} />
        <div className="flex flex-wrap gap-3">
          <Button
            type="submit"
            variant="primary"
            pending={pending && decision === 'signed off'}
            pendingLabel="Signing off"
            onClick={() => form.setValue('decision', 'signed off')}
          >
            Sign off version {version}
          </Button>
          <Button
            type="submit"
            pending={pending && decision === 'sent back'}
            pendingLabel="Sending back"
            onClick={() => form.setValue('decision', 'sent back')}
          >
            Send back with this reason
          </Button>
        </div>
      </Form>
    </section>
  );
}
