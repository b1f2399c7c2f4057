'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { Notice } from '@/components/ui/notice';
import { useFormAction } from '@/components/ui/use-form-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { type AskPasswordLinkInput, askPasswordLinkSchema } from '@/lib/schemas/session/password';

export function AskLinkForm({ askForLink }: { askForLink: (input: AskPasswordLinkInput) => Promise<ActionResult> }) {
  // No default value: it would wipe what was typed before the script had loaded.
  const form = useForm<AskPasswordLinkInput>({ resolver: zodResolver(askPasswordLinkSchema) });
  const [asked, setAsked] = useState<string | null>(null);
  const { submit, problem } = useFormAction(form, askForLink, (_, { email }) => setAsked(email));

  if (asked !== null) {
    return (
      <Notice tone="done" live title="Look at your mail">
        If {asked} has an account, a link to choose a new password is on its way. It works for one hour.
      </Notice>
    );
  }
  return (
    <Form form={form} onSubmit={submit} label="Ask for a new password" className="space-y-4">
      <FormText name="email" label="E-mail address" type="email" autoComplete="username" spellCheck={false} required />
      <FormProblem problem={problem} />
      <Button
        type="submit"
        variant="primary"
        className="w-full"
        pending={form.formState.isSubmitting}
        pendingLabel="Sending …"
      >
        Mail me a link
      </Button>
    </Form>
  );
}
