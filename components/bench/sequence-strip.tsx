'use client';

import { memo, type ReactNode } from 'react';
import { cx } from '@/components/ui/class-names';
import { formatClock, formatHold } from '@/lib/presentation/duration';
import { PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import type { TimeResult } from '@/lib/physics/model/assessment';
import type { Prescription } from '@/lib/physics/model/prescription';
import { useBench, useBenchState, useResult } from './bench-context';
import { sequenceById } from './state/bench-document';
import { VerdictWords } from './verdict-words';

/** The whole protocol at a glance: mark, verdict and time of each sequence; choosing one puts it on the bench. */
export function SequenceStrip({ children }: { children: ReactNode }) {
  // One string: the strip itself changes only when sequences come or go.
  const ids = useBenchState((state) => state.document.sequences.map(({ id }) => id).join('\n')).split('\n');
  return (
    <div className="border-b border-line bg-paper lg:grid lg:grid-cols-[12.5rem_minmax(0,1fr)] xl:grid-cols-[19.5rem_minmax(0,1fr)]">
      <div className="border-line px-4 py-3 max-lg:border-b lg:border-r">{children}</div>
      <ul
        aria-label="Sequences"
        className="flex overflow-x-auto overscroll-x-contain max-sm:flex-col max-sm:overflow-visible"
      >
        {ids.map((id) => (
          <SequenceTab key={id} id={id} />
        ))}
      </ul>
    </div>
  );
}

export function timeWords(prescription: Prescription, time: TimeResult | undefined): string {
  const plane = PLANE_WORDS[prescription.plane];
  if (!time) return plane;
  if (prescription.breathing === 'breath-hold') {
    const holds = time.breathHolds > 1 ? `${time.breathHolds} holds of ` : '';
    return `${plane} · ${holds}${formatHold(time.longestHoldS)}${holds ? '' : ' hold'}`;
  }
  return `${plane} · ${formatClock(time.scanS)}${prescription.breathing === 'triggered' ? ' triggered' : ''}`;
}

const SequenceTab = memo(function SequenceTab({ id }: { id: string }) {
  const { store } = useBench();
  const prescription = useBenchState((state) => sequenceById(state.document, id).prescription);
  const active = useBenchState((state) => state.activeId === id);
  const { assessment, refusal } = useResult(id);
  return (
    <li
      className={cx(
        'min-w-36 flex-1 border-line max-sm:min-w-0 max-sm:border-b sm:not-last:border-r',
        active && 'bg-cloth shadow-[inset_0_-3px_0_var(--ink)] max-sm:shadow-[inset_3px_0_0_var(--ink)]',
      )}
    >
      <button
        type="button"
        aria-pressed={active}
        data-sequence={id}
        onClick={() => store.dispatch({ type: 'choose-sequence', id })}
        className="flex h-full w-full flex-col items-start gap-0.5 px-4 py-3 text-left max-xl:px-3 max-sm:grid max-sm:grid-cols-[1fr_auto] max-sm:items-baseline max-sm:gap-x-3 max-sm:px-4 max-sm:py-2"
      >
        <span className="font-semibold">{prescription.name}</span>
        <span className="text-sm text-ink-soft">{timeWords(prescription, assessment?.time)}</span>
        <span className="mt-1 text-sm max-sm:col-span-2 max-sm:mt-0">
          {assessment ? (
            <VerdictWords verdict={assessment.verdict} />
          ) : (
            <span className="text-ink-soft">{refusal ? 'A value needs another look' : 'Working it out'}</span>
          )}
        </span>
      </button>
    </li>
  );
});
