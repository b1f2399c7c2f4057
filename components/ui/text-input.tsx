'use client';

import type { InputHTMLAttributes, Ref, TextareaHTMLAttributes } from 'react';
import { cx } from './class-names';
import { controlClass, Field, type FieldChrome } from './field';

export interface TextInputProps
  extends FieldChrome, Omit<InputHTMLAttributes<HTMLInputElement>, 'id' | 'className' | 'required'> {
  ref?: Ref<HTMLInputElement>;
  /** Accession numbers and tokens read better in the figures face. */
  figures?: boolean;
}

export function TextInput(props: TextInputProps) {
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
    figures,
    ref,
    ...input
  } = props;
  return (
    <Field {...{ label, hint, error, layout, labelHidden, optional, required, id, className }}>
      {(control) => (
        <input
          type="text"
          {...input}
          {...control}
          ref={ref}
          className={cx(controlClass, 'h-10 px-3', figures && 'figures')}
        />
      )}
    </Field>
  );
}

export interface TextAreaProps
  extends FieldChrome, Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id' | 'className' | 'required'> {
  ref?: Ref<HTMLTextAreaElement>;
}

export function TextArea(props: TextAreaProps) {
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
    ref,
    rows = 3,
    ...input
  } = props;
  return (
    <Field {...{ label, hint, error, layout, labelHidden, optional, required, id, className }}>
      {(control) => (
        <textarea {...input} {...control} ref={ref} rows={rows} className={cx(controlClass, 'px-3 py-2')} />
      )}
    </Field>
  );
}
