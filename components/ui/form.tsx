'use client';

import { createContext, useContext, type ReactNode } from 'react';
import {
  Controller,
  FormProvider,
  useFormContext,
  type FieldValues,
  type UseFormReturn,
} from 'react-hook-form';
import type * as z from 'zod';
import { Checkbox, Segmented, Switch, type RadioOption } from './choice';
import { FieldError } from './field';
import { NumberField, type NumberFieldProps } from './number-field';
import { numberFacts, type NumberFacts } from './schema-facts';
import { Select, type SelectOption } from './select';
import { TextArea, TextInput, type TextInputProps } from './text-input';

const ReadOnly = createContext(false);

/** True where the form may be read but not changed; rolled-up groups still open. */
export const useReadOnly = (): boolean => useContext(ReadOnly);

/**
 * Fields bound to React Hook Form by name. The browser's own validation is off: the schema speaks, beside the
 * control, and what was typed stays.
 */
export function Form<T extends FieldValues>({
  form,
  onSubmit,
  children,
  label,
  readOnly = false,
  className,
}: {
  form: UseFormReturn<T, unknown, T>;
  onSubmit: (values: T) => Promise<void> | void;
  children: ReactNode;
  label: string;
  readOnly?: boolean;
  className?: string;
}) {
  return (
    <FormProvider {...form}>
      <ReadOnly value={readOnly}>
        <form
          noValidate
          aria-label={label}
          // Asked for even before the script has run, so that nothing typed ends up in an address.
          method="post"
          onSubmit={(event) => void form.handleSubmit(onSubmit)(event)}
          className={className}
        >
          {children}
        </form>
      </ReadOnly>
    </FormProvider>
  );
}

interface Bound {
  name: string;
  hint?: ReactNode;
  className?: string;
}

export interface FormNumberProps
  extends
    Bound,
    Pick<NumberFieldProps, 'step' | 'layout' | 'compact' | 'disabled' | 'labelHidden' | 'placeholder'> {
  /** Judges the value; gives unit, limits and, unless `label` is given, the words. */
  schema: z.ZodType;
  label?: ReactNode;
  /** Said under the control; the allowed range unless something else is given, nothing with null. */
  hint?: ReactNode;
  /** Stored with the other sign: a distance to the right is kept as a negative position. */
  negated?: boolean;
}

/** 0 − v and not −v: a negative zero would compare as a change. */
const flip = (value: number) => 0 - value;

function negatedFacts(facts: NumberFacts): NumberFacts {
  return {
    ...facts,
    min: facts.max === undefined ? undefined : flip(facts.max),
    max: facts.min === undefined ? undefined : flip(facts.min),
  };
}

export function FormNumber({ name, schema, label, hint, negated = false, ...rest }: FormNumberProps) {
  const facts = negated ? negatedFacts(numberFacts(schema)) : numberFacts(schema);
  const { control } = useFormContext();
  const readOnly = useReadOnly();
  const range =
    facts.min !== undefined && facts.max !== undefined ? `${facts.min} to ${facts.max}` : undefined;
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <NumberField
          {...rest}
          ref={field.ref}
          disabled={rest.disabled || readOnly}
          name={name}
          label={label ?? facts.text}
          unit={facts.unit}
          min={facts.min}
          max={facts.max}
          whole={facts.whole}
          optional={facts.optional}
          required={!facts.optional}
          hint={hint === undefined ? range : hint}
          error={fieldState.error?.message}
          value={shownValue(field.value as number | null | undefined, negated)}
          onChange={(value) =>
            field.onChange(shownValue(value, negated) ?? (facts.optional ? undefined : null))
          }
          onBlur={field.onBlur}
        />
      )}
    />
  );
}

function shownValue(value: number | null | undefined, negated: boolean): number | null {
  return value === null || value === undefined ? null : negated ? flip(value) : value;
}

/** The message of something that is not one control, such as a pair or a list. */
export function FormMessage({ name }: { name: string }) {
  const { getFieldState, formState } = useFormContext();
  const error = getFieldState(name, formState).error as
    { message?: string; root?: { message?: string } } | undefined;
  const message = error?.root?.message ?? error?.message;
  return <div aria-live="polite">{typeof message === 'string' && <FieldError>{message}</FieldError>}</div>;
}

export interface FormTextProps extends Bound, Omit<TextInputProps, 'name' | 'error' | 'hint' | 'className'> {}

export function FormText({ name, ...rest }: FormTextProps) {
  const { register, getFieldState, formState } = useFormContext();
  const readOnly = useReadOnly();
  return (
    <TextInput
      {...rest}
      {...register(name)}
      disabled={rest.disabled || readOnly}
      error={getFieldState(name, formState).error?.message}
    />
  );
}

export function FormTextArea({
  name,
  label,
  hint,
  rows,
  optional,
  className,
}: Bound & { label: ReactNode; rows?: number; optional?: boolean }) {
  const { register, getFieldState, formState } = useFormContext();
  const error = getFieldState(name, formState).error?.message;
  const readOnly = useReadOnly();
  return (
    <TextArea
      {...{ label, hint, rows, optional, className, error }}
      {...register(name)}
      disabled={readOnly}
    />
  );
}

export interface FormSelectProps extends Bound {
  label: ReactNode;
  options: readonly SelectOption[];
  placeholder?: string;
  labelHidden?: boolean;
  disabled?: boolean;
  /** Choosing the placeholder leaves the value out. */
  optional?: boolean;
  /** After the value is in the form: other fields that must follow. */
  onChosen?: (value: string) => void;
}

export function FormSelect({ name, onChosen, ...rest }: FormSelectProps) {
  const { control } = useFormContext();
  const readOnly = useReadOnly();
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <Select
          {...rest}
          disabled={rest.disabled || readOnly}
          ref={field.ref}
          name={name}
          value={(field.value as string | undefined) ?? ''}
          onBlur={field.onBlur}
          onChange={(event) => {
            field.onChange(event.target.value === '' && rest.optional ? undefined : event.target.value);
            onChosen?.(event.target.value);
          }}
          error={fieldState.error?.message}
        />
      )}
    />
  );
}

export function FormSegmented<T extends string>({
  name,
  legend,
  options,
  hint,
  onChosen,
  className,
}: Bound & { legend: ReactNode; options: readonly RadioOption<T>[]; onChosen?: (value: T) => void }) {
  const { control } = useFormContext();
  const readOnly = useReadOnly();
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <Segmented<T>
          legend={legend}
          disabled={readOnly}
          options={options}
          hint={hint}
          className={className}
          value={field.value as T}
          error={fieldState.error?.message}
          onChange={(value) => {
            field.onChange(value);
            onChosen?.(value);
          }}
        />
      )}
    />
  );
}

export function FormCheckbox({
  name,
  label,
  hint,
  className,
  as = 'checkbox',
}: Bound & { label: ReactNode; as?: 'checkbox' | 'switch' }) {
  const { register, getFieldState, formState } = useFormContext();
  const readOnly = useReadOnly();
  const Control = as === 'switch' ? Switch : Checkbox;
  return (
    <Control
      {...{ label, hint, className }}
      error={getFieldState(name, formState).error?.message}
      {...register(name)}
      disabled={readOnly}
    />
  );
}
