'use client';

import { useId, useState } from 'react';
import { controlClass } from '@/components/ui/field';
import { cx } from '@/components/ui/class-names';
import { applies, CONTROLS, type ChoiceControl, type NumberControl } from '@/lib/domain/demonstration/controls';
import type { ControlId } from '@/lib/domain/demonstration/scene';
import type { Case } from '@/lib/physics/model/case';

interface Bound<C> {
  readonly control: C;
  readonly question: Case;
  readonly onChange: (question: Case) => void;
}

/** What may be moved in a scene, each by a slider with its typed twin or from a short list. */
export function SceneControls({
  ids,
  question,
  onChange,
  className,
}: {
  ids: readonly ControlId[];
  question: Case;
  onChange: (question: Case) => void;
  className?: string;
}) {
  const shown = ids.filter((id) => applies(id, question));
  if (shown.length === 0) return null;
  return (
    <div role="group" aria-label="Controls of this scene" className={cx('grid gap-x-6 gap-y-3 sm:grid-cols-2', className)}>
      {shown.map((id) => {
        const control = CONTROLS[id];
        return control.kind === 'number' ? (
          <NumberLine key={id} control={control} question={question} onChange={onChange} />
        ) : (
          <ChoiceLine key={id} control={control} question={question} onChange={onChange} />
        );
      })}
    </div>
  );
}

function NumberLine({ control, question, onChange }: Bound<NumberControl>) {
  const id = useId();
  const { label, unit, min, max, step, read, write } = control;
  const value = read(question);
  // What is being typed stands until it is a value that is allowed; nothing typed is put right behind one's back.
  const [typed, setTyped] = useState<string | null>(null);
  const given = typed === null ? value : Number(typed.replace(',', '.'));
  const wrong = typed !== null && !(typed.trim() !== '' && given >= min && given <= max);
  const set = (next: number) => next >= min && next <= max && onChange(write(question, next));
  return (
    <div>
      <div className="flex items-center justify-between gap-3">
        <label htmlFor={id} className="text-sm">{label}</label>
        <span className="flex items-center gap-1.5">
          <input
            id={id}
            type="text"
            inputMode="decimal"
            autoComplete="off"
            value={typed ?? String(value)}
            aria-invalid={wrong || undefined}
            aria-describedby={wrong ? `${id}-wrong` : undefined}
            onChange={(event) => {
              setTyped(event.target.value);
              const next = Number(event.target.value.replace(',', '.'));
              if (event.target.value.trim() !== '' && Number.isFinite(next)) set(next);
            }}
            onBlur={() => !wrong && setTyped(null)}
            className={cx(controlClass, 'figures h-8 !w-20 px-2 text-right')}
          />
          <span className="w-7 text-sm text-ink-soft">{unit}</span>
        </span>
      </div>
      <input
        type="range"
        min={min}
        max={max}
        step={step}
        value={Math.min(max, Math.max(min, value))}
        aria-label={`${label}, slider`}
        onChange={(event) => {
          setTyped(null);
          set(Number(event.target.value));
        }}
        className="block w-full accent-indigo"
      />
      {wrong && (
        <p id={`${id}-wrong`} role="alert" className="bg-ink px-2 py-1 text-sm font-semibold text-paper">
          {typed.trim() === '' ? 'nothing' : `“${typed}”`} given; allowed: {min} to {max} {unit}
        </p>
      )}
    </div>
  );
}

function ChoiceLine({ control, question, onChange }: Bound<ChoiceControl>) {
  const name = useId();
  const { label, options, read, write } = control;
  const chosen = read(question);
  return (
    <fieldset>
      <legend className="text-sm">{label}</legend>
      <div className="mt-1 flex flex-wrap gap-2">
        {options(question).map(({ value, label: word }) => (
          <label key={value} className="flex min-h-8 items-center gap-2 rounded border border-line-strong bg-paper px-3 has-checked:border-indigo has-checked:bg-wash has-focus-visible:outline-2 has-focus-visible:outline-indigo">
            <input type="radio" name={name} value={value} checked={chosen === value} onChange={() => onChange(write(question, value))} className="accent-indigo" />
            {word}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
