'use client';

import { cx } from '@/components/ui/class-names';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import { useActiveResult, useBenchState } from './bench-context';
import { CertaintyControl } from './certainty/certainty-control';
import { VERDICT_COLOUR } from './verdict-words';

/** The verdict of the active sequence in full words, with the reason, the number, and how sure it is. */
export function VerdictLine({ className }: { className?: string }) {
  const { assessment, refusal } = useActiveResult();
  const tried = useBenchState((state) => state.trial?.remedy.assessment);
  const [first, ...more] = assessment?.reasons ?? [];
  return (
    <div className={cx('px-5 py-3', className)}>
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
      <div className="flex items-start justify-between gap-6 text-sm text-ink-soft">
        <p aria-live="polite" className={cx(!tried && 'max-sm:hidden')}>
          {tried ? (
            <span className="text-indigo">
              With what is tried: <strong>{VERDICT_WORDS[tried.verdict]}</strong>. Esc goes back.
            </span>
          ) : (
            more.map(({ text }) => text).join(' ')
          )}
        </p>
        <div className="flex-none">
          <CertaintyControl />
        </div>
      </div>
      {assessment && assessment.assumptions.length > 0 && (
        <details className="text-sm text-ink-soft max-lg:hidden">
          <summary>{assessment.assumptions.length === 1 ? '1 assumption' : `${assessment.assumptions.length} assumptions`}</summary>
          <ul className="mt-1 list-disc pl-5">
            {assessment.assumptions.map(({ field, used, text }) => (
              // Two sides whose sizes were got in different ways are two assumptions about one field.
              <li key={`${field} ${used}`}>{text}</li>
            ))}
          </ul>
        </details>
      )}
    </div>
  );
}
