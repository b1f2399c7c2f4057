'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { TextInput } from '@/components/ui/text-input';
import { useFormAction } from '@/components/ui/use-form-action';
import { PASSWORD_MIN } from '@/lib/domain/people/password-rule';
import type { ActionResult } from '@/lib/schemas/action-result';
import { type ChangePasswordInput, changePasswordSchema } from '@/lib/schemas/session/password';
import { signInWith } from './sign-in';

export function ChangePasswordForm({
  email,
  changePassword,
}: {
  email: string;
  changePassword: (input: ChangePasswordInput) => Promise<ActionResult<{ email: string }>>;
}) {
  const router = useRouter();
  const form = useForm<ChangePasswordInput>({ resolver: zodResolver(changePasswordSchema) });
  const [done, setDone] = useState(false);
  const { submit, problem } = useFormAction(form, changePassword, async (data, values) => {
    setDone(true);
    // Every session has ended, this one too: begin a new one with the new password.
    await signInWith(data.email, values.newPassword);
    form.reset();
    setDone(false);
    router.replace('/account?changed=1');
    router.refresh();
  });

  return (
    <Form form={form} onSubmit={submit} label="Change your password" className="max-w-md space-y-4">
      <TextInput label="E-mail address" type="email" autoComplete="username" value={email} readOnly />
      <FormText name="currentPassword" label="Present password" type="password" autoComplete="current-password" required />
      <FormText
        name="newPassword"
        label="New password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${PASSWORD_MIN} characters. Three or four words in a row are easy to keep.`}
        required
      />
      <FormText name="repeatPassword" label="The same again" type="password" autoComplete="new-password" required />
      <p className="text-sm text-ink-soft">Every other device is signed out with it.</p>
      <FormProblem problem={problem} />
      <Button
        type="submit"
        variant="primary"
        pending={form.formState.isSubmitting || done}
        pendingLabel="Changing the password …"
      >
        Change password
      </Button>
    </Form>
  );
}
