'use client';

import { Button } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import { Figure } from '@/components/ui/figure';
import { useStatus } from '@/components/ui/status';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Remedy } from '@/lib/physics/model/remedy';
import { foldFigure, scanTimeFigure, voxelChange } from '@/lib/presentation/assessment-figures';
import { costBreakdown, formatCost } from '@/lib/presentation/cost-words';
import { formatSignedPercent } from '@/lib/presentation/percent';
import { remedyChange, remedyTitle } from '@/lib/presentation/remedy-words';
import { useBench } from './bench-context';
import { CostBar } from './cost-bar';
import { isPresentRemedy, useToggleTrial } from './use-toggle-trial';
import { VerdictWords } from './verdict-words';

export interface RemedyCardProps {
  readonly remedy: Remedy;
  readonly now: Assessment;
  /** What the remedy changes. */
  readonly present: Prescription;
  readonly tried: boolean;
  /** Tenths of a point that fill the bar. */
  readonly scale: number;
  /** Pointed at, here or in the comparison: the other one shows it too. */
  readonly linked?: boolean;
  readonly onLink?: (key: string | null) => void;
}

export function RemedyCard({ remedy, now, present, tried, scale, linked = false, onLink }: RemedyCardProps) {
  const { store, live } = useBench();
  const { say } = useStatus();
  const toggleTrial = useToggleTrial();
  const title = remedyTitle(remedy);
  const after = remedy.assessment;
  const voxel = voxelChange(now, after);
  const adopt = () => {
    if (!isPresentRemedy(live, store.read().activeId, remedy)) return;
    store.dispatch({ type: 'adopt', remedy });
    say(`Adopted: ${title}. Undo takes it back.`);
    // The pressed button goes with its card; whoever works by keyboard stays in this column.
    document.getElementById('remedies-title')?.focus();
  };
  return (
    <li
      data-remedy={remedy.key}
      onPointerEnter={() => onLink?.(remedy.key)}
      onPointerLeave={() => onLink?.(null)}
      onFocus={() => onLink?.(remedy.key)}
      onBlur={() => onLink?.(null)}
      className={cx(
        'relative border-b border-line px-4 py-3',
        tried && 'bg-wash shadow-[inset_3px_0_0_var(--indigo)]',
        linked && !tried && 'shadow-[inset_3px_0_0_var(--line-strong)]',
      )}
    >
      <div className="flex items-baseline justify-between gap-4">
        <h3 className="min-w-0">
          <button
            type="button"
            aria-pressed={tried}
            aria-describedby={`cost-${remedy.key}`}
            onClick={() => toggleTrial(remedy)}
            className="text-left font-semibold after:absolute after:inset-0"
          >
            {title}
          </button>
        </h3>
        <span id={`cost-${remedy.key}`} className="figures font-semibold">
          <span className="sr-only">costs </span>
          {formatCost(remedy.costTenths)}
          <span className="sr-only"> points</span>
        </span>
      </div>
      <p className="figures text-sm text-ink-soft">{remedyChange(present, remedy)}</p>
      <dl className="mt-1.5 grid grid-cols-[1.35fr_0.8fr_1.25fr] gap-x-3 text-sm">
        <Cell name="time" now={scanTimeFigure(now, present)} then={scanTimeFigure(after, remedy.prescription)} />
        <Cell name="SNR" now={now.detail && after.detail ? formatSignedPercent(now.detail.snr, after.detail.snr) : '—'} />
        <Cell name="voxel" now={voxel?.now ?? 'same'} then={voxel?.tried} />
      </dl>
      {after.verdict !== 'no-fold-expected' && (
        <p className="mt-1 flex flex-wrap gap-x-2 text-sm">
          <VerdictWords verdict={after.verdict} />
          <span className="figures text-ink-soft">{foldFigure(after)}</span>
        </p>
      )}
      {remedy.sideEffects.length > 0 && <p className="mt-1 text-sm text-ink-soft">{remedy.sideEffects.map((effect) => effect.replace(/\.?$/, '.')).join(' ')}</p>}
      <CostBar terms={remedy.terms} scale={scale} className="mt-2" />
      <div className="mt-2 flex items-center justify-between gap-3">
        <Button
          size="sm"
          variant={tried ? 'primary' : 'quiet'}
          aria-label={`Adopt: ${title}`}
          onClick={adopt}
          className={cx('relative', !tried && '-ml-3')}
        >
          Adopt
        </Button>
        <p className="min-w-0 text-right text-sm text-ink-soft">{costBreakdown(remedy.terms)}</p>
      </div>
    </li>
  );
}

/** Now → then, or one word when nothing changes. */
function Cell({ name, now, then }: { name: string; now: string; then?: string }) {
  const unchanged = then === undefined || then === now;
  return (
    <div className="min-w-0">
      <dt className="text-ink-soft">{name}</dt>
      <dd>{unchanged ? <Figure value={now} /> : <Figure value={now} tried={then} className="max-w-full whitespace-normal" />}</dd>
    </div>
  );
}
