'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import Link from 'next/link';
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
import { type SetPasswordInput, setPasswordSchema } from '@/lib/schemas/session/password';
import { signInWith } from './sign-in';

export function SetPasswordForm({
  token,
  email,
  setPassword,
}: {
  token: string;
  email: string;
  setPassword: (input: SetPasswordInput) => Promise<ActionResult<{ email: string }>>;
}) {
  const router = useRouter();
  const form = useForm<SetPasswordInput>({
    resolver: zodResolver(setPasswordSchema),
    defaultValues: { token, newPassword: '', repeatPassword: '' },
  });
  const [done, setDone] = useState(false);
  const { submit, problem } = useFormAction(form, setPassword, async (data, values) => {
    setDone(true);
    // The link is used up: it need not stay in the browser's history.
    window.history.replaceState(null, '', '/set-password');
    await signInWith(data.email, values.newPassword);
    // Signed in, the page leads on; if that failed, the person signs in there with the new password.
    router.replace('/sign-in');
  });

  return (
    <Form form={form} onSubmit={submit} label="Choose a password" className="space-y-4">
      {/* Shown, so that a password manager stores the new password under the right name. */}
      <TextInput label="E-mail address" type="email" autoComplete="username" value={email} readOnly />
      <FormText
        name="newPassword"
        label="New password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${PASSWORD_MIN} characters. Three or four words in a row are easy to keep.`}
        required
      />
      <FormText name="repeatPassword" label="The same again" type="password" autoComplete="new-password" required />
      <FormProblem problem={problem} />
      {problem?.code === 'gone' && (
        <Link href="/sign-in/new-password" className="text-link">
          Ask for a new link
        </Link>
      )}
      <Button
        type="submit"
        variant="primary"
        className="w-full"
        pending={form.formState.isSubmitting || done}
        pendingLabel="Setting the password …"
      >
        Set password and sign in
      </Button>
    </Form>
  );
}
