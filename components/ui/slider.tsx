'use client';

import * as RadixSlider from '@radix-ui/react-slider';
import { useId } from 'react';
import { cx } from './class-names';
import { NumberField, type NumberFieldProps } from './number-field';
import { useMounted } from './use-mounted';

export interface SliderProps {
  /** Named by its twin field's label or by a text of its own. */
  label: string;
  value: number;
  onChange: (value: number) => void;
  /** After the drag or key press ends. */
  onCommit?: (value: number) => void;
  min: number;
  max: number;
  step?: number;
  unit?: string;
  disabled?: boolean;
  className?: string;
}

export function Slider(props: SliderProps) {
  const { label, value, onChange, onCommit, min, max, step = 1, unit, disabled, className } = props;
  const mounted = useMounted();
  if (!mounted) return <div aria-hidden="true" className={cx('h-6', className)} />;
  return (
    <RadixSlider.Root
      value={[Math.min(max, Math.max(min, value))]}
      onValueChange={([next]) => next !== undefined && onChange(next)}
      onValueCommit={([next]) => next !== undefined && onCommit?.(next)}
      min={min}
      max={max}
      step={step}
      disabled={disabled}
      className={cx('relative flex h-6 w-full touch-none items-center select-none', className)}
    >
      <RadixSlider.Track className="relative h-1 w-full grow rounded-full bg-line">
        <RadixSlider.Range className="absolute h-full rounded-full bg-ink-soft" />
      </RadixSlider.Track>
      <RadixSlider.Thumb
        aria-label={label}
        aria-valuetext={`${value}${unit ? ` ${unit}` : ''}`}
        className="block size-4 rounded-full border-2 border-ink bg-paper hover:bg-wash data-disabled:border-line-strong"
      />
    </RadixSlider.Root>
  );
}

export interface NumberSliderProps extends Omit<NumberFieldProps, 'min' | 'max' | 'layout' | 'label'> {
  label: string;
  min: number;
  max: number;
  /** The slider may span less than what can be typed. */
  sliderMin?: number;
  sliderMax?: number;
  onCommit?: (value: number) => void;
}

/** A slider and its typed twin under one label. */
export function NumberSlider({ sliderMin, sliderMax, onCommit, className, ...field }: NumberSliderProps) {
  const own = useId();
  const value = field.value !== null && Number.isFinite(field.value) ? field.value : field.min;
  return (
    <div className={className}>
      <NumberField compact {...field} id={field.id ?? own} layout="row" />
      <Slider
        label={`${field.label}, slider`}
        value={value}
        onChange={field.onChange}
        onCommit={onCommit}
        min={sliderMin ?? field.min}
        max={sliderMax ?? field.max}
        step={field.step}
        unit={field.unit}
        disabled={field.disabled}
      />
    </div>
  );
}
