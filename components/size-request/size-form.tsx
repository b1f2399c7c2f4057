'use client';

import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox, RadioGroup, Segmented } from '@/components/ui/choice';
import { Notice } from '@/components/ui/notice';
import { NumberField } from '@/components/ui/number-field';
import type { ErrorView } from '@/lib/domain/errors';
import { findSlips, type GivenSizes, type UnitSystem } from '@/lib/domain/size-request/answer';
import type { ActionResult } from '@/lib/schemas/action-result';
import { sizeAnswerInput, type SizeAnswer, type SizeFormView } from '@/lib/schemas/size-request';
import { DepthLying, TapeAtHipBones } from './tape-drawings';

type Figure = 'weight' | 'heightFeet' | 'height' | 'girth' | 'depth' | 'breathHoldS';
type Figures = Readonly<Record<Figure, number | null>>;
const NOTHING: Figures = { weight: null, heightFeet: null, height: null, girth: null, depth: null, breathHoldS: null };

function Step({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="border-t border-line pt-5">
      <h2 className="text-lg font-semibold">{title}</h2>
      <div className="mt-3 space-y-4">{children}</div>
    </section>
  );
}

/** One page, one column, large targets: it is filled in on a phone with a tape in the other hand. */
export function SizeForm({
  answer,
  onDone,
}: {
  answer: (given: SizeAnswer) => Promise<ActionResult<SizeFormView>>;
  onDone: () => void;
}) {
  const [units, setUnits] = useState<UnitSystem>('metric');
  const [figures, setFigures] = useState(NOTHING);
  const [sex, setSex] = useState<'female' | 'male' | 'none'>('none');
  const [arms, setArms] = useState<'up' | 'cannot-be-raised' | 'none'>('none');
  const [confirmed, setConfirmed] = useState(false);
  const [asked, setAsked] = useState(false);
  const [errors, setErrors] = useState<Readonly<Record<string, string>>>({});
  const [problem, setProblem] = useState<ErrorView | null>(null);
  const [pending, setPending] = useState(false);
  const metric = units === 'metric';

  const field = (name: Figure, label: string, unit: string, optional = false) => (
    <NumberField
      name={name}
      label={label}
      unit={unit}
      optional={optional}
      required={!optional}
      value={figures[name]}
      error={errors[name]}
      onChange={(value) => {
        setFigures({ ...figures, [name]: value });
        setErrors({ ...errors, [name]: '' });
      }}
    />
  );

  const send = async () => {
    setProblem(null);
    const typed = Object.fromEntries(Object.entries(figures).filter(([name, value]) => value !== null && (name !== 'heightFeet' || !metric)));
    const parsed = sizeAnswerInput.safeParse({ ...typed, units, confirmed, ...(sex === 'none' ? {} : { sex }), ...(arms === 'none' ? {} : { arms }) });
    if (!parsed.success) return setErrors(Object.fromEntries(parsed.error.issues.map(({ path, message }) => [String(path[0]), message])));
    const slips = findSlips(parsed.data satisfies GivenSizes).filter(({ refused }) => refused || !confirmed);
    if (slips.length > 0) {
      setAsked(slips.every(({ refused }) => !refused));
      return setErrors(Object.fromEntries(slips.map((slip) => [slip.field, slip.text])));
    }
    setPending(true);
    const result = await answer(parsed.data).catch((): ActionResult<SizeFormView> => ({
      ok: false, error: { code: 'unavailable', message: 'There was no answer. What you typed is still here; please try again shortly.' },
    }));
    setPending(false);
    if (result.ok) return onDone();
    setErrors(result.error.fields ?? {});
    setAsked(result.error.details?.mayConfirm === true);
    if (!result.error.fields) setProblem(result.error);
  };

  return (
    <form
      noValidate
      aria-label="Your measurements"
      method="post"
      className="mt-6 space-y-6"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <Segmented<UnitSystem>
        legend="I measure in"
        value={units}
        options={[{ value: 'metric', label: 'cm and kg' }, { value: 'imperial', label: 'feet, inches, lb' }]}
        onChange={(value) => {
          setUnits(value);
          setFigures({ ...NOTHING, breathHoldS: figures.breathHoldS });
          setErrors({});
        }}
      />
      <Step title="Weight and height">
        {field('weight', 'Weight', metric ? 'kg' : 'lb')}
        {metric ? field('height', 'Height', 'cm') : (
          <div className="flex gap-4">
            {field('heightFeet', 'Height', 'ft')}
            {field('height', 'and', 'in')}
          </div>
        )}
      </Step>
      <Step title="Round the body">
        <div className="flex flex-wrap gap-4">
          <TapeAtHipBones />
          <p className="min-w-48 flex-1">
            Feel for the top of your hip bones at the sides. Lay the tape round there, level all the way, over thin clothes or skin. Breathe out
            gently and read it. If the tape is too short, join two.
          </p>
        </div>
        {field('girth', 'All the way round', metric ? 'cm' : 'in')}
      </Step>
      <Step title="Front to back, if someone can help">
        <div className="flex flex-wrap gap-4">
          <DepthLying />
          <p className="min-w-48 flex-1">
            Lie flat on your back on something firm. Someone holds a book level on the highest point of your belly and measures from what you lie on
            up to the book.
          </p>
        </div>
        {field('depth', 'Up to the book', metric ? 'cm' : 'in', true)}
      </Step>
      <Step title="Three things that help, if you like">
        <RadioGroup
          legend="Which table of body shapes comes closer for you?"
          value={sex}
          options={[{ value: 'female', label: 'Women’s' }, { value: 'male', label: 'Men’s' }, { value: 'none', label: 'I would rather not say' }]}
          onChange={setSex}
        />
        <RadioGroup
          legend="Could you lie with both arms above your head for half an hour?"
          value={arms}
          options={[{ value: 'up', label: 'Yes' }, { value: 'cannot-be-raised', label: 'No' }, { value: 'none', label: 'I do not know' }]}
          onChange={setArms}
        />
        {field('breathHoldS', 'How long can you hold your breath without strain?', 's', true)}
      </Step>
      {asked && <Checkbox label="I looked again: these are right" checked={confirmed} onChange={(event) => setConfirmed(event.target.checked)} />}
      {problem && <Notice tone="error" live title={problem.message} />}
      <div aria-live="polite">
        {Object.values(errors).some(Boolean) && <p className="mb-3">One or more answers are marked above; please look at them once more.</p>}
      </div>
      <Button type="submit" variant="primary" className="min-h-12 w-full" pending={pending} pendingLabel="Sending …">
        Send the measurements
      </Button>
      <p className="text-sm text-ink-soft">They are kept with your request number only, and seen by the people who plan your scan.</p>
    </form>
  );
}
