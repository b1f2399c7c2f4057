'use client';

import { useEffect, useRef, useState, useSyncExternalStore, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Figure } from '@/components/ui/figure';
import { formatClock, formatClockChange } from '@/lib/presentation/duration';
import { useBench } from '../bench-context';
import { SequenceStrip } from '../sequence-strip';
import { VerdictWords } from '../verdict-words';
import type { SolvedPlan, SolvedSequence } from './solve-all';
import { useSolveAll } from './use-solve-all';

/** How many sequences fold in the keep-clear area by their newest answers. */
function useFolding(): number {
  const { live } = useBench();
  const count = () => Object.values(live.read()).filter(({ assessment }) => assessment?.verdict === 'fold-in-keep-clear').length;
  return useSyncExternalStore(live.subscribe, count, count);
}

/**
 * The strip of sequences, and beside whose bench it is one button for all that fold: what it proposes lies under the
 * strip, with the change in time, before any of it is adopted.
 */
export function SolveAll({ mayEdit, children }: { mayEdit: boolean; children: ReactNode }) {
  const [fault, setFault] = useState<unknown>(null);
  if (fault) throw fault;
  const { solving, stale, start, leave: close, adopt: adoptAll } = useSolveAll(setFault);
  // The pressed button goes with the proposal; whoever works by keyboard stays on the bench.
  const settle = (work: () => void) => () => {
    work();
    document.getElementById('remedies-title')?.focus();
  };
  const [leave, adopt] = [settle(close), settle(adoptAll)];
  return (
    <>
      <SequenceStrip>
        <div className="relative">
          {children}
          {mayEdit && solving.kind === 'idle' && <Start onStart={start} />}
          {solving.kind === 'working' && (
            <p role="status" className="mt-1 text-sm">
              Looking for the cheapest{' '}
              {solving.total > 0 && <span className="figures whitespace-nowrap">{solving.done + 1} of {solving.total}</span>}
              <Button size="sm" className="ml-2" onClick={leave}>
                Stop
              </Button>
            </p>
          )}
        </div>
      </SequenceStrip>
      {solving.kind === 'proposed' && <Proposal plan={solving.plan} stale={stale} onAdopt={adopt} onLeave={leave} onAgain={start} />}
    </>
  );
}

function Start({ onStart }: { onStart: () => void }) {
  const folding = useFolding();
  if (folding === 0) return null;
  return (
    <Button
      size="sm"
      className="min-h-6.5! px-2.5! max-lg:absolute max-lg:-top-0.5 max-lg:right-0 lg:max-xl:mt-2 xl:absolute xl:-top-0.5 xl:right-0"
      aria-description={`${folding === 1 ? 'One sequence folds' : `${folding} sequences fold`} in the keep-clear area.`}
      onClick={onStart}
    >
      Solve all <span className="figures">{folding}</span>
    </Button>
  );
}

const timeOf = ({ before, after }: SolvedSequence) => [before, after].map(({ time }) => formatClock(time?.scanS ?? 0));

function Proposal({ plan, stale, onAdopt, onLeave, onAgain }: {
  plan: SolvedPlan;
  stale: boolean;
  onAdopt: () => void;
  onLeave: () => void;
  onAgain: () => void;
}) {
  const title = useRef<HTMLHeadingElement>(null);
  useEffect(() => title.current?.focus(), []);
  const solved = plan.sequences.filter(({ remedy }) => remedy).length;
  const left = plan.sequences.filter(({ after }) => after.verdict === 'fold-in-keep-clear').length;
  return (
    <section aria-labelledby="solve-all-title" className="border-b border-line bg-wash px-4 py-3" onKeyDown={(event) => event.key === 'Escape' && onLeave()}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h2 id="solve-all-title" ref={title} tabIndex={-1} className="text-base outline-none">
          The cheapest remedy for each
        </h2>
        <p data-total-change={Math.round(plan.afterS - plan.beforeS)}>
          All sequences together: <Figure value={formatClock(plan.beforeS)} tried={formatClock(plan.afterS)} />, {formatClockChange(plan.afterS - plan.beforeS)}
        </p>
      </div>
      <ul className="mt-2 max-h-56 overflow-y-auto">
        {plan.sequences.map((each) => {
          const [now, next] = timeOf(each);
          return (
            <li key={each.id} data-solved={each.id} className="grid gap-x-6 border-t border-line py-1.5 text-sm md:grid-cols-[minmax(0,12rem)_minmax(0,1fr)_8rem_minmax(0,14rem)]">
              <span className="font-semibold">{each.name}</span>
              <span>{each.remedy?.sentence ?? (each.before.verdict === 'fold-in-keep-clear' && each.after.verdict === 'fold-in-keep-clear' ? 'No remedy on this scanner is enough.' : 'Solved by raising the arms.')}</span>
              <Figure value={now} tried={next === now ? undefined : next} />
              <VerdictWords verdict={each.after.verdict} />
            </li>
          );
        })}
      </ul>
      {plan.armsRaised && <p className="mt-2 text-sm">Raises the arms for every sequence: confirm with the patient.</p>}
      {left > 0 && <p className="mt-2 text-sm">{left === 1 ? 'One sequence still folds' : `${left} sequences still fold`} in the keep-clear area: a radiologist decides.</p>}
      <div className="mt-3 flex flex-wrap items-center gap-3">
        {stale ? (
          <>
            <p role="status" className="text-sm">The bench has changed since this was worked out.</p>
            <Button size="sm" variant="primary" onClick={onAgain}>Work it out again</Button>
          </>
        ) : (
          solved > 0 && (
            <Button size="sm" variant="primary" onClick={onAdopt}>
              {solved === 1 ? 'Adopt it' : `Adopt all ${solved}`}
            </Button>
          )
        )}
        <Button size="sm" onClick={onLeave}>Leave the plan as it is</Button>
        {!stale && solved > 0 && <p className="text-sm text-ink-soft">One undo takes all of it back.</p>}
      </div>
    </section>
  );
}
