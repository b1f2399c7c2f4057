import { Mark, type MarkKind } from '@/components/ui/marks';
import { cx } from '@/components/ui/class-names';
import type { Verdict } from '@/lib/physics/model/assessment';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';

export const VERDICT_MARKS: Readonly<Record<Verdict, MarkKind>> = {
  'no-fold-expected': 'flat',
  'fold-outside-keep-clear': 'outward',
  'fold-in-keep-clear': 'inward',
  'cannot-be-scanned': 'torn',
  'not-modelled': 'unworked',
};

/** Red is fold in the keep-clear area and nothing else; ochre is fold elsewhere. */
export const VERDICT_COLOUR: Readonly<Record<Verdict, string>> = {
  'no-fold-expected': 'text-ink',
  'fold-outside-keep-clear': 'text-ochre',
  'fold-in-keep-clear': 'text-thread',
  'cannot-be-scanned': 'text-ink',
  'not-modelled': 'text-ink',
};

/** Mark, full words and colour: any one of the three is enough. */
export function VerdictWords({ verdict, className }: { verdict: Verdict; className?: string }) {
  return (
    <span className={cx('flex items-start gap-1.5 font-medium', VERDICT_COLOUR[verdict], className)}>
      <Mark kind={VERDICT_MARKS[verdict]} className="mt-px" />
      <span>{VERDICT_WORDS[verdict]}</span>
    </span>
  );
}
