'use client';

import { useActiveResult, useBench, useBenchState, useResult } from '@/components/bench/bench-context';
import { presentRanking } from '@/components/bench/live/results';
import { timeWords } from '@/components/bench/sequence-strip';
import { sequenceById } from '@/components/bench/state/bench-document';
import { VerdictWords } from '@/components/bench/verdict-words';
import { Button } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import { Figure } from '@/components/ui/figure';
import { formatClock } from '@/lib/presentation/duration';

/** Every sequence with its verdict; the chosen one with the cheapest remedy and one press to adopt it. */
export function SequenceVerdicts() {
  const ids = useBenchState((state) => state.document.sequences.map(({ id }) => id).join('\n')).split('\n');
  return (
    <section aria-label="Sequences" className="border-line max-md:border-b md:border-r">
      <ul>
        {ids.map((id) => <SequenceRow key={id} id={id} />)}
      </ul>
    </section>
  );
}

function SequenceRow({ id }: { id: string }) {
  const { store } = useBench();
  const prescription = useBenchState((state) => sequenceById(state.document, id).prescription);
  const active = useBenchState((state) => state.activeId === id);
  const { assessment, refusal } = useResult(id);
  return (
    <li className={cx('border-b border-line', active && 'bg-paper')}>
      <button
        type="button"
        aria-pressed={active}
        data-sequence={id}
        onClick={() => store.dispatch({ type: 'choose-sequence', id })}
        className={cx('flex min-h-16 w-full flex-col items-start gap-0.5 px-4 py-2.5 text-left', active && 'shadow-[inset_4px_0_0_var(--ink)]')}
      >
        <span className="flex w-full flex-wrap items-baseline justify-between gap-x-4">
          <span className="font-semibold">{prescription.name}</span>
          <span className="text-sm text-ink-soft">{timeWords(prescription, assessment?.time)}</span>
        </span>
        {assessment ? (
          <span data-verdict={assessment.verdict}><VerdictWords verdict={assessment.verdict} /></span>
        ) : (
          <span className="text-ink-soft">{refusal ?? 'Working it out'}</span>
        )}
      </button>
      {active && <Cheapest />}
    </li>
  );
}

function Cheapest() {
  const { store } = useBench();
  const result = useActiveResult();
  const { assessment } = result;
  if (!assessment) return null;
  const reason = assessment.reasons[0]?.text;
  const ranking = presentRanking(result);
  const remedy = ranking?.remedies[0];
  const before = assessment.time?.scanS;
  const after = remedy?.assessment.time?.scanS;
  return (
    <div className="px-4 pb-4" aria-live="polite">
      {reason && <p className="mb-2">{reason}</p>}
      {assessment.verdict === 'no-fold-expected' ? null : !ranking ? (
        <p className="text-ink-soft">Working out the remedies.</p>
      ) : !remedy ? (
        <p>No single change or pair of changes is enough on this scanner.</p>
      ) : (
        <>
          <p className="font-semibold">{remedy.sentence}</p>
          {before !== undefined && after !== undefined && (
            <p className="text-sm">
              Scan time <Figure value={formatClock(before)} tried={formatClock(after)} />
            </p>
          )}
          {remedy.sideEffects.map((words) => <p key={words} className="text-sm text-ink-soft">{words}</p>)}
          <Button variant="primary" className="mt-3 min-h-14 w-full text-lg" onClick={() => store.dispatch({ type: 'adopt', remedy })}>
            Adopt
          </Button>
        </>
      )}
    </div>
  );
}
