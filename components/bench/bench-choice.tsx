'use client';

import { Controller, useFormContext } from 'react-hook-form';
import { Select, type SelectOption } from '@/components/ui/select';
import { useCommit } from './bench-form';

/** One of a few words, bound to the form. */
export function BenchChoice<T extends string>({
  path,
  label,
  options,
  className,
}: {
  path: string;
  label: string;
  options: readonly SelectOption<T>[];
  className?: string;
}) {
  const { control } = useFormContext();
  const commit = useCommit();
  return (
    <Controller
      control={control}
      name={path}
      render={({ field, fieldState }) => (
        <Select
          compact
          layout="row"
          label={label}
          className={className}
          name={path}
          value={String(field.value)}
          options={options}
          error={fieldState.error?.message}
          onChange={(event) => {
            field.onChange(event.target.value);
            commit(path, event.target.value);
          }}
        />
      )}
    />
  );
}

/** Words → options, in the order of the table. */
export function optionsOf<T extends string>(words: Readonly<Record<T, string>>, only?: readonly T[]): SelectOption<T>[] {
  return (only ?? (Object.keys(words) as T[])).map((value) => ({ value, label: words[value] }));
}
