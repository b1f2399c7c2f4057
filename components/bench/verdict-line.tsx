'use client';

import { cx } from '@/components/ui/class-names';
import { Popover } from '@/components/ui/popover';
import type { Assessment } from '@/lib/physics/model/assessment';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import { useActiveResult, useBenchState } from './bench-context';
import { VERDICT_COLOUR } from './verdict-words';

/** The verdict of the active sequence in full words, with the reason and the number. */
export function VerdictLine({ className }: { className?: string }) {
  const { assessment, refusal } = useActiveResult();
  const tried = useBenchState((state) => state.trial?.remedy.assessment);
  const [first, ...more] = assessment?.reasons ?? [];
  return (
    <div className={cx('px-5 py-2', className)}>
      <div aria-live="polite" aria-atomic="true">
        <p className="text-lg leading-snug lg:min-h-[2lh]">
          {assessment && (
            <>
              <strong className={cx('font-bold', VERDICT_COLOUR[assessment.verdict])} data-verdict={assessment.verdict}>
                {VERDICT_WORDS[assessment.verdict]}
              </strong>
              {first && `: ${first.text}`}
            </>
          )}
          {refusal && <strong className="font-bold">A value needs another look: {refusal}</strong>}
        </p>
      </div>
      <div className="flex items-start justify-between gap-4 text-sm text-ink-soft">
        <p aria-live="polite" className={cx('min-w-0', !tried && 'max-sm:hidden')}>
          {tried ? (
            <span className="text-indigo">
              With what is tried: <strong>{VERDICT_WORDS[tried.verdict]}</strong>. Esc goes back.
            </span>
          ) : (
            more.map(({ text }) => text).join(' ')
          )}
        </p>
        {assessment && assessment.assumptions.length > 0 && <Assumptions assumptions={assessment.assumptions} />}
      </div>
    </div>
  );
}

/** What was taken for what nobody entered; how many is always to be seen. */
function Assumptions({ assumptions }: { assumptions: Assessment['assumptions'] }) {
  const count = assumptions.length === 1 ? '1 assumption' : `${assumptions.length} assumptions`;
  return (
    <Popover
      align="end"
      label="Assumptions"
      trigger={
        <button type="button" className="flex-none border-b border-dotted border-ink-soft whitespace-nowrap hover:text-ink">
          {count}
        </button>
      }
    >
      <ul className="max-h-80 w-96 max-w-full list-disc space-y-1 overflow-y-auto pl-5 text-sm">
        {assumptions.map(({ field, used, text }) => (
          // Two sides whose sizes were got in different ways are two assumptions about one field.
          <li key={`${field} ${used}`}>{text}</li>
        ))}
      </ul>
    </Popover>
  );
}
