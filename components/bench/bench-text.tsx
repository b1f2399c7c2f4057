'use client';

import { useId } from 'react';
import { Controller, useFormContext } from 'react-hook-form';
import { controlClass, Field } from '@/components/ui/field';
import { cx } from '@/components/ui/class-names';
import { useBench } from './bench-context';
import { useCommit } from './bench-form';

/** A few words, bound to the form; what the site knows is suggested, anything else can be typed. */
export function BenchText({ path, label, className, suggestions = [] }: { path: string; label: string; className?: string; suggestions?: readonly string[] }) {
  const { control } = useFormContext();
  const { store } = useBench();
  const commit = useCommit();
  const list = useId();
  return (
    <Controller
      control={control}
      name={path}
      render={({ field, fieldState }) => (
        <Field layout="row" label={label} className={className} error={fieldState.error?.message}>
          {(props) => (
            <>
              <input
                type="text"
                {...props}
                name={path}
                autoComplete="off"
                list={suggestions.length > 0 ? list : undefined}
                value={String(field.value ?? '')}
                onChange={(event) => {
                  field.onChange(event.target.value);
                  commit(path, event.target.value, `type ${path}`);
                }}
                onBlur={() => store.dispatch({ type: 'settle' })}
                className={cx(controlClass, 'h-8 min-w-0 px-2 text-sm')}
              />
              {suggestions.length > 0 && (
                <datalist id={list}>
                  {suggestions.map((each) => (
                    <option key={each} value={each} />
                  ))}
                </datalist>
              )}
            </>
          )}
        </Field>
      )}
    />
  );
}
