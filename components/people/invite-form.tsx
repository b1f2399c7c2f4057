'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import { Button, LinkButton } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useStatus } from '@/components/ui/status';
import { useFormAction } from '@/components/ui/use-form-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { type InvitePersonInput, invitePersonSchema } from '@/lib/schemas/people/person';
import { RoleChoice } from './role-choice';

export function InviteForm({
  invite,
}: {
  invite: (input: InvitePersonInput) => Promise<ActionResult<{ id: string }>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const form = useForm<InvitePersonInput>({
    resolver: zodResolver(invitePersonSchema),
    // None for the texts: they would wipe what was typed before the script had loaded.
    defaultValues: { roles: [] },
  });
  const { submit, problem } = useFormAction(form, invite, (_, { email }) => {
    say(`Invitation on its way to ${email}.`);
    router.push('/site/people');
  });

  return (
    <Form form={form} onSubmit={submit} label="Invite a person" className="space-y-5">
      <FormText name="displayName" label="Name" autoComplete="off" hint="As colleagues should read it." required />
      <FormText
        name="email"
        label="E-mail address"
        type="email"
        autoComplete="off"
        spellCheck={false}
        hint="The invitation goes here; it is also what the person signs in with."
        required
      />
      <RoleChoice />
      <FormProblem problem={problem} />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Inviting …">
          Send invitation
        </Button>
        <LinkButton href="/site/people">Cancel</LinkButton>
      </div>
    </Form>
  );
}
