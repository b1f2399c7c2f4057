'use client';

import { useState, type KeyboardEvent, type Ref } from 'react';
import { cx } from './class-names';
import { Field, type FieldChrome } from './field';
import { formatPlain, numberProblem, parseNumber, stepNumber } from './parse-number';

export interface NumberFieldProps extends FieldChrome {
  /** null: empty. NaN: what is typed is not a number (the text stays as typed). */
  value: number | null;
  onChange: (value: number | null) => void;
  onBlur?: () => void;
  unit?: string;
  min?: number;
  max?: number;
  /** One press of an arrow key; ten with Shift or Page keys. */
  step?: number;
  whole?: boolean;
  disabled?: boolean;
  readOnly?: boolean;
  name?: string;
  placeholder?: string;
  /** Dotted edge for an estimate, solid for a measurement, dashed for an uncertain place. */
  certainty?: 'estimated' | 'measured' | 'uncertain';
  /** Underlined figure of fixed width, as on the bench, instead of a boxed control. */
  compact?: boolean;
  ref?: Ref<HTMLInputElement>;
}

const EDGE = { estimated: 'border-dotted', measured: 'border-solid', uncertain: 'border-dashed' } as const;

/** A number that can be typed (decimal comma or point) and stepped. What was typed is never replaced by a guess. */
export function NumberField(props: NumberFieldProps) {
  const { label, hint, error, layout, labelHidden, optional, required, id, className } = props;
  const { value, onChange, onBlur, unit, min, max, step = 1, whole, compact, certainty = 'measured' } = props;
  const [text, setText] = useState(() => formatPlain(value));
  const [known, setKnown] = useState(value);
  const [touched, setTouched] = useState(false);

  // A value set from outside (slider, remedy, stored record) replaces the text; our own echo does not.
  if (!Object.is(known, value)) {
    setKnown(value);
    setTouched(false);
    if (!Number.isNaN(value)) setText(formatPlain(value));
  }

  const take = (typed: string, next: number | null) => {
    setText(typed);
    setKnown(next);
    onChange(next);
  };

  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    const tenfold = event.shiftKey || event.key.startsWith('Page');
    const up = event.key === 'ArrowUp' || event.key === 'PageUp';
    const down = event.key === 'ArrowDown' || event.key === 'PageDown';
    if ((!up && !down) || props.disabled || props.readOnly) return;
    event.preventDefault();
    const next = stepNumber(parseNumber(text, unit), (up ? 1 : -1) * step * (tenfold ? 10 : 1), min, max);
    take(formatPlain(next), next);
  };

  const own =
    touched || error
      ? numberProblem(text, parseNumber(text, unit), { min, max, whole, unit, optional })
      : undefined;
  const shown = own ?? error;
  const finite = value !== null && Number.isFinite(value) ? value : undefined;
  return (
    <Field {...{ label, hint, layout, labelHidden, optional, required, id, className }} error={shown}>
      {(control) => (
        <span
          className={cx(
            'flex items-baseline gap-1.5 text-ink',
            compact ? 'border-b px-1' : 'h-10 max-w-52 items-center rounded border bg-paper px-3',
            shown ? 'rounded-b-none border-2 border-ink' : compact ? 'border-ink' : 'border-line-strong',
            EDGE[certainty],
            (props.disabled || props.readOnly) && 'bg-sunk text-ink-soft',
            'focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-indigo',
          )}
        >
          <input
            {...control}
            ref={props.ref}
            type="text"
            inputMode={min !== undefined && min >= 0 ? 'decimal' : 'text'}
            role="spinbutton"
            aria-valuenow={finite}
            aria-valuemin={min}
            aria-valuemax={max}
            aria-valuetext={
              finite === undefined ? undefined : `${formatPlain(finite)}${unit ? ` ${unit}` : ''}`
            }
            autoComplete="off"
            spellCheck={false}
            name={props.name}
            placeholder={props.placeholder}
            disabled={props.disabled}
            readOnly={props.readOnly}
            value={text}
            onChange={(event) => take(event.target.value, parseNumber(event.target.value, unit))}
            onKeyDown={onKeyDown}
            onBlur={() => {
              setTouched(true);
              onBlur?.();
            }}
            className={cx(
              'figures min-w-0 bg-transparent text-right outline-none placeholder:text-ink-soft',
              compact ? 'w-[5ch] py-0.5' : 'w-full',
            )}
          />
          {unit && (
            <span aria-hidden="true" className="flex-none text-sm text-ink-soft">
              {unit}
            </span>
          )}
        </span>
      )}
    </Field>
  );
}
