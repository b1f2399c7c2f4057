'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { Button, LinkButton } from '@/components/ui/button';
import { Checkbox, RadioGroup } from '@/components/ui/choice';
import { FieldError, FieldGroup } from '@/components/ui/field';
import { Form, FormText } from '@/components/ui/form';
import { FormProblem } from '@/components/ui/form-problem';
import { useFormAction } from '@/components/ui/use-form-action';
import { SCOPE_DESCRIPTIONS, SCOPES } from '@/lib/domain/access';
import type { ActionResult } from '@/lib/schemas/action-result';
import { type CreateApiTokenInput, createApiTokenSchema, TOKEN_DAYS_CHOICES } from '@/lib/schemas/api-token/api-token';
import { NewToken } from './new-token';

export interface CreatedToken {
  readonly secret: string;
  readonly expiresOn: string;
}

export function CreateTokenForm({
  create,
}: {
  create: (input: CreateApiTokenInput) => Promise<ActionResult<CreatedToken>>;
}) {
  const form = useForm<CreateApiTokenInput>({
    resolver: zodResolver(createApiTokenSchema),
    // None for the name: it would wipe what was typed before the script had loaded.
    defaultValues: { scopes: [], days: 90 },
  });
  const days = useWatch({ control: form.control, name: 'days' });
  const [created, setCreated] = useState<(CreatedToken & { name: string }) | null>(null);
  const { submit, problem } = useFormAction(form, create, (data, { name }) => setCreated({ ...data, name }));
  if (created) return <NewToken token={created} />;

  const scopeError = form.formState.errors.scopes?.message;
  return (
    <Form form={form} onSubmit={submit} label="Make an API token" className="space-y-5">
      <FormText name="name" label="Name" autoComplete="off" hint="Which system will hold it, such as “booking system”." required />
      <FieldGroup legend="What it may do" hint="Nothing else will work with it.">
        <div className="space-y-1.5">
          {SCOPES.map((scope) => (
            <Checkbox
              key={scope}
              value={scope}
              label={<span className="figures">{scope}</span>}
              hint={SCOPE_DESCRIPTIONS[scope]}
              {...form.register('scopes')}
            />
          ))}
        </div>
        <div aria-live="polite" className="mt-1">
          {scopeError && <FieldError>{scopeError}</FieldError>}
        </div>
      </FieldGroup>
      <RadioGroup
        legend="Works for"
        name="days"
        value={String(days)}
        onChange={(chosen) => form.setValue('days', Number(chosen))}
        options={TOKEN_DAYS_CHOICES.map((choice) => ({ value: String(choice), label: `${choice} days` }))}
        error={form.formState.errors.days?.message}
      />
      <FormProblem problem={problem} />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" variant="primary" pending={form.formState.isSubmitting} pendingLabel="Making the token …">
          Make the token
        </Button>
        <LinkButton href="/site/tokens">Cancel</LinkButton>
      </div>
    </Form>
  );
}
