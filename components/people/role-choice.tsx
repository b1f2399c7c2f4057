'use client';

import { useFormContext } from 'react-hook-form';
import { Checkbox } from '@/components/ui/choice';
import { FieldError, FieldGroup } from '@/components/ui/field';
import { ROLE_DESCRIPTIONS, ROLE_LABELS, ROLES } from '@/lib/domain/access';

/** One person may hold several roles; each says what it is for. */
export function RoleChoice() {
  const { register, getFieldState, formState } = useFormContext<{ roles: string[] }>();
  const error = getFieldState('roles', formState).error?.message;
  return (
    <FieldGroup legend="Roles" hint="One or more.">
      <div className="space-y-1.5">
        {ROLES.map((role) => (
          <Checkbox
            key={role}
            value={role}
            label={ROLE_LABELS[role]}
            hint={ROLE_DESCRIPTIONS[role]}
            {...register('roles')}
          />
        ))}
      </div>
      <div aria-live="polite" className="mt-1">
        {error && <FieldError>{error}</FieldError>}
      </div>
    </FieldGroup>
  );
}
