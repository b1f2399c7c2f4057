'use client';

import { memo, useRef } from 'react';
import { Controller, useFormContext } from 'react-hook-form';
import type * as z from 'zod';
import { cx } from '@/components/ui/class-names';
import { numberFacts } from '@/components/ui/schema-facts';
import { NumberField } from '@/components/ui/number-field';
import { Slider } from '@/components/ui/slider';
import { useBench } from './bench-context';
import { useCommit } from './bench-form';

/** Spread of a step key: one drag of a slider, or one run of typing in a field, is one undo. */
let gestures = 0;

/** Two numbers side by side in a bench column: the figures take what four digits and a point need. */
export const PAIR_CLASS =
  'grid grid-cols-2 gap-x-4 [&_input]:w-[4ch] [&_[data-field]>div]:gap-x-1 [&_label+div>span]:gap-1 [&_label+div>span]:px-0.5';

/** Counts whose label is their unit: "Partitions 48". */
const SAID_BY_LABEL: readonly string[] = ['lines', 'partitions'];

interface Shown {
  readonly label: string;
  readonly className?: string;
  /** The slider may span less than what can be typed. */
  readonly sliderMin?: number;
  readonly sliderMax?: number;
  readonly step?: number;
  readonly certainty?: 'measured' | 'estimated' | 'uncertain';
  readonly hint?: string;
}

export interface PlainNumberProps extends Shown {
  readonly value: number;
  readonly unit?: string;
  readonly min: number;
  readonly max: number;
  readonly whole?: boolean;
  readonly error?: string;
  readonly name?: string;
  /** NaN and null never arrive here as edits: they stay in the field with what is wrong. */
  readonly onEdit: (value: number | null, step: string) => void;
}

/** Slider and typed field for one number, in the bench's narrow columns. */
export function PlainNumber(props: PlainNumberProps) {
  const { store } = useBench();
  const gesture = useRef(0);
  const { label, value, unit, min, max, step = 1, whole, error, name, className, certainty, hint } = props;
  const stepKey = () => `${name ?? label} ${gesture.current}`;
  const settle = () => {
    gesture.current = gestures += 1;
    store.dispatch({ type: 'settle' });
  };
  const finite = Number.isFinite(value) ? value : min;
  return (
    <div className={cx('min-w-0', className)} data-field={name}>
      <NumberField
        compact
        layout="row"
        {...{ label, value, unit, min, max, step, whole, error, name, certainty, hint }}
        onChange={(next) => props.onEdit(next, stepKey())}
        onBlur={settle}
      />
      <Slider
        label={`${label}, slider`}
        value={finite}
        onChange={(next) => props.onEdit(next, stepKey())}
        onCommit={settle}
        min={props.sliderMin ?? min}
        max={Math.max(props.sliderMin ?? min, props.sliderMax ?? max)}
        step={step}
        unit={unit}
        className="-mt-0.5"
      />
    </div>
  );
}

export interface BenchNumberProps extends Shown {
  /** Path inside the form; the schema at it judges the value. */
  readonly path: string;
  readonly schema: z.ZodType;
}

/** The same, bound to the form by name and judged by the schema that the route uses; its own field renders it, not the form. */
export const BenchNumber = memo(function BenchNumber({ path, schema, step, ...shown }: BenchNumberProps) {
  const facts = numberFacts(schema);
  const { control } = useFormContext();
  const commit = useCommit();
  return (
    <Controller
      control={control}
      name={path}
      render={({ field, fieldState }) => (
        <PlainNumber
          {...shown}
          name={path}
          value={(field.value as number | undefined) ?? Number.NaN}
          unit={facts.unit !== undefined && SAID_BY_LABEL.includes(facts.unit) ? undefined : facts.unit}
          min={facts.min ?? 0}
          max={facts.max ?? 1000}
          whole={facts.whole}
          step={step ?? 1}
          error={fieldState.error?.message}
          onEdit={(value, stepKey) => {
            field.onChange(value);
            commit(path, value, stepKey);
          }}
        />
      )}
    />
  );
});
