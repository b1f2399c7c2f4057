'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useStatus } from '@/components/ui/status';
import { useFormAction } from '@/components/ui/use-form-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { type EditPersonInput, editPersonSchema } from '@/lib/schemas/people/person';
import { RoleChoice } from './role-choice';

export function PersonForm({
  person,
  edit,
}: {
  person: EditPersonInput;
  edit: (input: EditPersonInput) => Promise<ActionResult<{ version: number }>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const form = useForm<EditPersonInput>({ resolver: zodResolver(editPersonSchema), defaultValues: person });
  const { submit, problem } = useFormAction(form, edit, ({ version }, values) => {
    form.reset({ ...values, version });
    say(`Saved. ${values.displayName}’s roles count from the next click on.`);
    router.refresh();
  });

  return (
    <Form form={form} onSubmit={submit} label="Name and roles" className="space-y-5">
      <FormText name="displayName" label="Name" autoComplete="off" required />
      <RoleChoice />
      <FormProblem problem={problem} />
      {problem?.code === 'conflict' && (
        <Button onClick={() => window.location.reload()}>Show what is stored now (drops what you typed)</Button>
      )}
      <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Saving …">
        Save name and roles
      </Button>
    </Form>
  );
}
