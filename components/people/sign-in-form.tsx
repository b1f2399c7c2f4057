'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { type SignInInput, signInSchema } from '@/lib/schemas/session/sign-in';
import { signInWith } from './sign-in';

export function SignInForm() {
  // No default values: they would wipe what a person or the browser filled in before the script had loaded.
  const form = useForm<SignInInput>({ resolver: zodResolver(signInSchema) });
  const [problem, setProblem] = useState<string | null>(null);
  const { isSubmitting, isSubmitSuccessful } = form.formState;

  const submit = async ({ email, password }: SignInInput) => {
    setProblem(null);
    const refused = await signInWith(email, password);
    if (refused) return setProblem(refused);
    // The page is asked for anew: signed in, it leads on to where the person was going.
    window.location.reload();
  };

  return (
    <Form form={form} onSubmit={submit} label="Sign in" className="space-y-4">
      <FormText name="email" label="E-mail address" type="email" autoComplete="username" spellCheck={false} required />
      <FormText name="password" label="Password" type="password" autoComplete="current-password" required />
      <FormProblem problem={problem ? { message: problem } : null} />
      <Button
        type="submit"
        variant="primary"
        className="w-full"
        pending={isSubmitting || (isSubmitSuccessful && !problem)}
        pendingLabel="Signing in …"
      >
        Sign in
      </Button>
    </Form>
  );
}
