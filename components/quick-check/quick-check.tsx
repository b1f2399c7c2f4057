'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { Form, FormNumber, FormSelect } from '@/components/ui/form';
import { QUICK_PRESETS, QUICK_SEQUENCES, quickCheckForm, type QuickCheckForm } from '@/lib/schemas/case/quick-check';
import { answerQuickCheck } from './answer-quick-check';
import { QuickAnswer } from './quick-answer';

const START: QuickCheckForm = { extentMm: 340, fovMm: 300, oversamplingPct: 0, sequence: 'echo-train' };
const { extentMm, fovMm, oversamplingPct } = quickCheckForm.shape;

/** Four fields and an answer, without a booking. Nothing typed leaves the browser. Untitled where the page's own heading says it. */
export function QuickCheck({ titled = true }: { titled?: boolean }) {
  const form = useForm<QuickCheckForm, unknown, QuickCheckForm>({
    resolver: zodResolver(quickCheckForm) as never,
    defaultValues: START,
    mode: 'onChange',
  });
  const values = useWatch({ control: form.control });
  const answer = useMemo(() => answerQuickCheck(values), [values]);
  return (
    <section aria-label="Quick check" className="overflow-hidden rounded-md border border-line bg-paper">
      <div className="border-b border-line px-5 py-4">
        {titled && <h2 className="mb-1 text-xl">Quick check</h2>}
        <p className="text-ink-soft">Four fields, no booking. Nothing you type leaves this page.</p>
        <Form form={form} onSubmit={() => {}} label="Quick check" className="mt-4 grid gap-x-6 gap-y-4 sm:grid-cols-2">
          <FormNumber name="extentMm" schema={extentMm} label="Patient along phase, edge to edge" />
          <FormNumber name="fovMm" schema={fovMm} label="FOV along phase" />
          <FormNumber name="oversamplingPct" schema={oversamplingPct} label="Phase oversampling at present" />
          <FormSelect name="sequence" label="Sequence" options={QUICK_SEQUENCES.map((value) => ({ value, label: QUICK_PRESETS[value].label }))} />
        </Form>
      </div>
      <QuickAnswer answer={answer} />
    </section>
  );
}
