import { useId, type ReactNode } from 'react';
import { cx } from './class-names';

/** What a control inside a Field must spread onto its focusable element. */
export interface FieldControl {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
  'aria-required': true | undefined;
}

export interface FieldChrome {
  label: ReactNode;
  /** One short line under the control: range, where to find the value. */
  hint?: ReactNode;
  /** What was given and what is allowed. */
  error?: ReactNode;
  /** `row` puts the label left of the value, as on the bench; `stacked` is for forms. */
  layout?: 'stacked' | 'row';
  labelHidden?: boolean;
  optional?: boolean;
  required?: boolean;
  id?: string;
  className?: string;
}

/** Shared by every single-line control. Errors are inverse ink: red and ochre mean fold. */
export const controlClass = cx(
  'w-full rounded border border-line-strong bg-paper text-ink placeholder:text-ink-soft',
  'aria-invalid:rounded-b-none aria-invalid:border-2 aria-invalid:border-ink',
  'disabled:cursor-not-allowed disabled:bg-sunk disabled:text-ink-soft [&[readonly]]:bg-sunk',
);

/** Refusals are written to be joined in one line of an answer; beside a field each is a sentence. */
export function asSentence(text: string): string {
  const plain = text.trim();
  return `${plain.charAt(0).toUpperCase()}${plain.slice(1)}${/[.!?…]$/.test(plain) ? '' : '.'}`;
}

export function FieldError({ id, children }: { id?: string; children: ReactNode }) {
  return (
    <p
      id={id}
      className="flex w-fit max-w-full gap-2 rounded-b bg-ink px-3 py-1.5 text-sm font-semibold text-paper"
    >
      <svg viewBox="0 0 8 16" aria-hidden="true" className="mt-0.5 h-4 w-2 flex-none">
        <path d="M1 2 L7 5 M1 6 L7 9 M1 10 L7 13" stroke="currentColor" strokeWidth="1.5" fill="none" />
      </svg>
      <span>{typeof children === 'string' && children.trim() !== '' ? asSentence(children) : children}</span>
    </p>
  );
}

/** Label, control, hint and error, tied together for assistive technology. */
export function Field({
  label,
  hint,
  error,
  layout = 'stacked',
  labelHidden = false,
  optional = false,
  required = false,
  id,
  className,
  children,
}: FieldChrome & { children: (control: FieldControl) => ReactNode }) {
  const own = useId();
  const controlId = id ?? own;
  const hintId = `${controlId}-hint`;
  const errorId = `${controlId}-error`;
  const describedBy = [error ? errorId : null, hint ? hintId : null].filter(Boolean).join(' ') || undefined;
  const row = layout === 'row';
  return (
    <div className={cx(row ? 'grid grid-cols-[1fr_auto] items-center gap-x-3' : 'block', className)}>
      <label
        htmlFor={controlId}
        className={cx(labelHidden ? 'sr-only' : row ? 'text-sm' : 'mb-1 block text-sm font-semibold')}
      >
        {label}
        {optional && <span className="font-normal text-ink-soft"> · optional</span>}
      </label>
      <div className={row ? 'justify-self-end' : undefined}>
        {children({
          id: controlId,
          'aria-describedby': describedBy,
          'aria-invalid': error ? true : undefined,
          'aria-required': required ? true : undefined,
        })}
      </div>
      <div aria-live="polite" className={row ? 'col-span-2' : undefined}>
        {error && <FieldError id={errorId}>{error}</FieldError>}
      </div>
      {hint && (
        <p id={hintId} className={cx('mt-1 text-sm text-ink-soft', row && 'col-span-2')}>
          {hint}
        </p>
      )}
    </div>
  );
}

/** A group of controls under one legend. */
export function FieldGroup({
  legend,
  hint,
  children,
  className,
}: {
  legend: ReactNode;
  hint?: ReactNode;
  children: ReactNode;
  className?: string;
}) {
  return (
    <fieldset className={className}>
      <legend className="mb-1 text-sm font-semibold">{legend}</legend>
      {hint && <p className="mb-2 text-sm text-ink-soft">{hint}</p>}
      {children}
    </fieldset>
  );
}
