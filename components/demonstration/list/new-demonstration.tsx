'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useFormAction } from '@/components/ui/use-form-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { type CreateDemonstrationInput, type NewDemonstrationForm, newDemonstrationForm } from '@/lib/schemas/demonstration';

export type CreateAction = (input: CreateDemonstrationInput) => Promise<ActionResult<{ id: string }>>;

/** An empty demonstration under a title of one's own. */
export function NewDemonstration({ create }: { create: CreateAction }) {
  const router = useRouter();
  // No default for the title: it would wipe what was typed before the script had loaded.
  const form = useForm<NewDemonstrationForm>({ resolver: zodResolver(newDemonstrationForm) });
  const { submit, problem } = useFormAction(form, create, ({ id }) => router.push(`/demonstrations/${id}`));
  return (
    <Form form={form} onSubmit={submit} label="Make a demonstration" className="flex flex-wrap items-end gap-3">
      <FormText name="title" label="Title" autoComplete="off" required />
      <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Making it …">Begin empty</Button>
      <FormProblem problem={problem} />
    </Form>
  );
}
