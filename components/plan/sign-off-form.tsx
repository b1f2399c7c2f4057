'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import * as z from 'zod';
import { Button } from '@/components/ui/button';
import { Form, FormSegmented, FormTextArea } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useFormAction } from '@/components/ui/use-form-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { signOffInput } from '@/lib/schemas/plan';

const schema = z.object({ decision: signOffInput.shape.decision, reason: signOffInput.shape.reason });
type Values = z.output<typeof schema>;

/** A radiologist's decision on the version on the screen. */
export function SignOffForm({ decide }: { decide: (values: Values) => Promise<ActionResult<unknown>> }) {
  const router = useRouter();
  const form = useForm<Values, unknown, Values>({
    resolver: zodResolver(schema) as never,
    defaultValues: { decision: 'signed off', reason: '' },
  });
  const { submit, problem } = useFormAction(form, decide, () => router.refresh());
  return (
    <section aria-labelledby="sign-off-title" className="mt-8 max-w-prose">
      <h2 id="sign-off-title" className="mb-3 text-lg">Sign-off</h2>
      <Form form={form} onSubmit={submit} label="Sign-off" className="space-y-4">
        <FormSegmented
          name="decision"
          legend="Decision"
          options={[
            { value: 'signed off', label: 'Sign off' },
            { value: 'sent back', label: 'Send back' },
          ]}
        />
        <FormTextArea name="reason" label="Reason" hint="Needed when the plan is sent back." optional />
        <FormProblem problem={problem} />
        <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Saving">
          Record the decision
        </Button>
      </Form>
    </section>
  );
}
