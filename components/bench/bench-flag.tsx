'use client';

import { Controller, useFormContext } from 'react-hook-form';
import { Checkbox } from '@/components/ui/choice';
import { useCommit } from './bench-form';

/** Yes or no, bound to the form. */
export function BenchFlag({ path, label, hint }: { path: string; label: string; hint?: string }) {
  const { control } = useFormContext();
  const commit = useCommit();
  return (
    <Controller
      control={control}
      name={path}
      render={({ field, fieldState }) => (
        <Checkbox
          className="mt-1.5 text-sm"
          label={label}
          hint={hint}
          name={path}
          checked={field.value === true}
          error={fieldState.error?.message}
          onChange={(event) => {
            field.onChange(event.target.checked);
            commit(path, event.target.checked);
          }}
        />
      )}
    />
  );
}
