'use client';

import { NumberField } from '@/components/ui/number-field';

/** Wide enough for a thumb in a glove. */
const BUTTON = 'flex size-14 flex-none items-center justify-center rounded border border-line-strong bg-paper text-2xl hover:bg-sunk';

/** One size with a button on either side and a field between them: by thumb, typed, or by arrow keys. */
export function Stepper({ label, hint, value, certainty, stepMm, min, max, onEdit, onSettle }: {
  label: string;
  hint: string;
  value: number;
  certainty: 'measured' | 'estimated';
  stepMm: number;
  min: number;
  max: number;
  onEdit: (value: number) => void;
  onSettle: () => void;
}) {
  const step = (by: number) => {
    onEdit(Math.min(max, Math.max(min, Math.round(value + by))));
    onSettle();
  };
  return (
    <div role="group" aria-label={label} className="flex items-end gap-2">
      <button type="button" className={BUTTON} aria-label={`${label}, ${stepMm} mm less`} disabled={value <= min} onClick={() => step(-stepMm)}>
        −
      </button>
      <div className="min-w-0">
        <NumberField
          label={label}
          hint={hint}
          unit="mm"
          value={value}
          min={min}
          max={max}
          certainty={certainty}
          onChange={(next) => next !== null && Number.isFinite(next) && next >= min && next <= max && onEdit(next)}
          onBlur={onSettle}
        />
      </div>
      <button type="button" className={BUTTON} aria-label={`${label}, ${stepMm} mm more`} disabled={value >= max} onClick={() => step(stepMm)}>
        +
      </button>
    </div>
  );
}
