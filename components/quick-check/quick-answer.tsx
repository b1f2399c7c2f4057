'use client';

import { VERDICT_COLOUR, VERDICT_MARKS } from '@/components/bench/verdict-words';
import { cx } from '@/components/ui/class-names';
import { Figure } from '@/components/ui/figure';
import { Mark } from '@/components/ui/marks';
import { formatClock } from '@/lib/presentation/duration';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import type { QuickAnswer as Answer } from './answer-quick-check';
import { assumedValues } from './assumed-values';
import { useQuickRanking } from './use-quick-ranking';

type Answered = Extract<Answer, { kind: 'answered' }>;

/** Verdict, the smallest oversampling that is enough, the cheapest remedy, and all that was assumed, dotted. */
export function QuickAnswer({ answer }: { answer: Answer }) {
  const answered = answer.kind === 'answered' ? answer : undefined;
  const ranking = useQuickRanking(answered?.question);
  return (
    <div className="px-5 py-4">
      <div aria-live="polite" className="min-h-24">
        {answer.kind === 'incomplete' && <p className="text-ink-soft">The answer follows as soon as every field is allowed.</p>}
        {answer.kind === 'refused' && <p>These values do not go together: {answer.words}</p>}
        {answered && <Verdict {...answered} />}
        {answered && ranking?.remedies[0] && (
          <p className="mt-2">
            Cheapest remedy: {ranking.remedies[0].sentence}{' '}
            <Figure
              value={formatClock(answered.assessment.time?.scanS ?? 0)}
              tried={formatClock(ranking.remedies[0].assessment.time?.scanS ?? 0)}
            />
          </p>
        )}
      </div>
      {answered && <Assumed {...answered} />}
    </div>
  );
}

function Verdict({ assessment }: Answered) {
  const { verdict, reasons } = assessment;
  const [first, ...more] = reasons;
  return (
    <>
      <p className="flex items-start gap-2.5 text-lg">
        <Mark kind={VERDICT_MARKS[verdict]} className={cx('mt-1.5', VERDICT_COLOUR[verdict])} />
        <span>
          <strong className={cx('font-bold', VERDICT_COLOUR[verdict])} data-verdict={verdict}>{VERDICT_WORDS[verdict]}</strong>
          {first && `: ${first.text}`}
        </span>
      </p>
      {more.map(({ code, text }) => (
        <p key={code} className="mt-2">{text}</p>
      ))}
    </>
  );
}

function Assumed({ question, assessment }: Answered) {
  return (
    <details open className="mt-3 border-t border-line pt-3 text-sm">
      <summary className="font-semibold">Assumed, because nobody said otherwise</summary>
      <dl className="mt-2 grid gap-x-6 gap-y-1.5 sm:grid-cols-2">
        {assumedValues(question).map(({ name, value }) => (
          <div key={name} data-assumed={name} className="border-b border-dotted border-line-strong pb-1">
            <dt className="text-ink-soft">{name}</dt>
            <dd>{value}</dd>
          </div>
        ))}
      </dl>
      {assessment.assumptions.length > 0 && (
        <ul className="mt-3 space-y-1">
          {assessment.assumptions.map(({ field, text }) => (
            <li key={field} className="border-b border-dotted border-line-strong pb-1">{text}</li>
          ))}
        </ul>
      )}
      <p className="mt-3 text-ink-soft">A planning estimate. Trained staff and local policy decide.</p>
    </details>
  );
}
