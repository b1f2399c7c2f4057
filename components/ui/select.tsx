'use client';

import type { ReactNode, Ref, SelectHTMLAttributes } from 'react';
import { cx } from './class-names';
import { controlClass, Field, type FieldChrome } from './field';

export interface SelectOption<T extends string = string> {
  value: T;
  label: string;
  disabled?: boolean;
}

export interface SelectProps<T extends string = string>
  extends
    FieldChrome,
    Omit<SelectHTMLAttributes<HTMLSelectElement>, 'id' | 'className' | 'required' | 'size'> {
  options: readonly SelectOption<T>[];
  /** Shown first with an empty value, when nothing is chosen yet. */
  placeholder?: string;
  compact?: boolean;
  ref?: Ref<HTMLSelectElement>;
  children?: ReactNode;
}

/** The platform's own list: it works with every keyboard, screen reader and tablet. */
export function Select<T extends string = string>(props: SelectProps<T>) {
  const {
    label,
    hint,
    error,
    layout,
    labelHidden,
    optional,
    required,
    id,
    className,
    options,
    placeholder,
    compact,
    ref,
    ...select
  } = props;
  return (
    <Field {...{ label, hint, error, layout, labelHidden, optional, required, id, className }}>
      {(control) => (
        <span className="relative block">
          <select
            {...select}
            {...control}
            ref={ref}
            className={cx(
              controlClass,
              'appearance-none truncate',
              compact ? 'h-8 pr-7 pl-2 text-sm' : 'h-10 pr-9 pl-3',
            )}
          >
            {placeholder !== undefined && <option value="">{placeholder}</option>}
            {options.map((option) => (
              <option key={option.value} value={option.value} disabled={option.disabled}>
                {option.label}
              </option>
            ))}
          </select>
          <svg
            viewBox="0 0 12 12"
            aria-hidden="true"
            className={cx(
              'pointer-events-none absolute top-1/2 size-3 -translate-y-1/2 text-ink-soft',
              compact ? 'right-2' : 'right-3',
            )}
          >
            <path d="M2 4.5 6 8.5 10 4.5" fill="none" stroke="currentColor" strokeWidth="1.5" />
          </svg>
        </span>
      )}
    </Field>
  );
}
