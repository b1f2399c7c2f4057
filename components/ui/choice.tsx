'use client';

import { useId, type InputHTMLAttributes, type ReactNode, type Ref } from 'react';
import { cx } from './class-names';
import { FieldError } from './field';

interface ChoiceProps extends Omit<InputHTMLAttributes<HTMLInputElement>, 'type' | 'className'> {
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  className?: string;
  ref?: Ref<HTMLInputElement>;
}

/** Native input under a drawn box: nothing here needs a style attribute, and forms post it as it is. */
export function Checkbox({ label, hint, error, className, ref, ...input }: ChoiceProps) {
  const id = useId();
  return (
    <div className={className}>
      <label className="flex items-start gap-3 py-1">
        <span className="relative flex h-[1lh] w-5 flex-none items-center">
          <input
            {...input}
            ref={ref}
            type="checkbox"
            aria-describedby={hint || error ? `${id}-note` : undefined}
            aria-invalid={error ? true : undefined}
            className="peer size-5 appearance-none rounded-sm border border-line-strong bg-paper checked:border-indigo checked:bg-indigo disabled:bg-sunk"
          />
          <svg
            viewBox="0 0 20 20"
            aria-hidden="true"
            className="pointer-events-none absolute inset-x-0 hidden size-5 text-on-indigo peer-checked:block"
          >
            <path d="M4.5 10.5 8.5 14.5 15.5 6" fill="none" stroke="currentColor" strokeWidth="2" />
          </svg>
        </span>
        <span>{label}</span>
      </label>
      {(hint || error) && (
        <div id={`${id}-note`} className="pl-8">
          {hint && <p className="text-sm text-ink-soft">{hint}</p>}
          {error && <FieldError>{error}</FieldError>}
        </div>
      )}
    </div>
  );
}

/** On or off, at once. */
export function Switch({ label, hint, className, ref, ...input }: ChoiceProps) {
  const id = useId();
  return (
    <div className={className}>
      <label className="flex items-center justify-between gap-3 py-1">
        <span>{label}</span>
        <span className="relative inline-flex flex-none">
          <input
            {...input}
            ref={ref}
            type="checkbox"
            role="switch"
            aria-describedby={hint ? `${id}-note` : undefined}
            className="peer h-6 w-10 appearance-none rounded-full border border-line-strong bg-sunk checked:border-indigo checked:bg-indigo"
          />
          <span
            aria-hidden="true"
            className="pointer-events-none absolute top-1 left-1 size-4 rounded-full border border-line-strong bg-paper transition-transform peer-checked:translate-x-4 peer-checked:border-paper"
          />
        </span>
      </label>
      {hint && (
        <p id={`${id}-note`} className="text-sm text-ink-soft">
          {hint}
        </p>
      )}
    </div>
  );
}

export interface RadioOption<T extends string> {
  value: T;
  label: ReactNode;
  hint?: ReactNode;
  disabled?: boolean;
}

interface RadioGroupProps<T extends string> {
  legend: ReactNode;
  legendHidden?: boolean;
  name?: string;
  value: T;
  onChange: (value: T) => void;
  options: readonly RadioOption<T>[];
  hint?: ReactNode;
  error?: ReactNode;
  disabled?: boolean;
  className?: string;
}

export function RadioGroup<T extends string>(props: RadioGroupProps<T>) {
  const own = useId();
  const {
    legend,
    legendHidden,
    name = own,
    value,
    onChange,
    options,
    hint,
    error,
    disabled,
    className,
  } = props;
  return (
    <fieldset
      className={className}
      disabled={disabled}
      aria-describedby={hint || error ? `${own}-note` : undefined}
    >
      <legend className={legendHidden ? 'sr-only' : 'mb-1 text-sm font-semibold'}>{legend}</legend>
      {options.map((option) => (
        <label key={option.value} className="flex items-start gap-3 py-1">
          <input
            type="radio"
            name={name}
            value={option.value}
            checked={option.value === value}
            disabled={option.disabled}
            onChange={() => onChange(option.value)}
            className="my-[calc((1lh-1.25rem)/2)] size-5 flex-none appearance-none rounded-full border border-line-strong bg-paper checked:border-6 checked:border-indigo"
          />
          <span>
            {option.label}
            {option.hint && <span className="block text-sm text-ink-soft">{option.hint}</span>}
          </span>
        </label>
      ))}
      <div id={`${own}-note`}>
        {hint && <p className="text-sm text-ink-soft">{hint}</p>}
        {error && <FieldError>{error}</FieldError>}
      </div>
    </fieldset>
  );
}

/** A few exclusive choices in one row: native radios, so arrow keys and forms work by themselves. */
export function Segmented<T extends string>(props: RadioGroupProps<T> & { size?: 'md' | 'sm' }) {
  const own = useId();
  const {
    legend,
    legendHidden,
    name = own,
    value,
    onChange,
    options,
    hint,
    error,
    disabled,
    size = 'md',
  } = props;
  return (
    <fieldset className={props.className} disabled={disabled}>
      <legend className={legendHidden ? 'sr-only' : 'mb-1 text-sm font-semibold'}>{legend}</legend>
      <div className="inline-flex flex-wrap rounded border border-line-strong bg-paper p-0.5">
        {options.map((option) => (
          <label
            key={option.value}
            className={cx(
              'relative flex items-center rounded-sm font-medium whitespace-nowrap text-ink',
              'hover:bg-sunk has-checked:bg-ink has-checked:text-paper',
              'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-indigo',
              'has-disabled:opacity-60',
              size === 'sm' ? 'min-h-7 px-2.5 text-sm' : 'min-h-8.5 px-3',
            )}
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              disabled={option.disabled}
              onChange={() => onChange(option.value)}
              className="absolute inset-0 size-full appearance-none opacity-0"
            />
            {option.label}
          </label>
        ))}
      </div>
      {hint && <p className="mt-1 text-sm text-ink-soft">{hint}</p>}
      {error && <FieldError>{error}</FieldError>}
    </fieldset>
  );
}
