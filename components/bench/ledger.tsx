'use client';

import type { ReactNode } from 'react';
import { Figure } from '@/components/ui/figure';
import { cx } from '@/components/ui/class-names';
import {
  foldFigure,
  pair,
  scanRangeFigure,
  scanTimeFigure,
  shotsFigure,
  snrFigure,
  voxelFigure,
  type NowTried,
} from '@/lib/presentation/assessment-figures';
import { phaseOversamplingSetting, sliceOversamplingSetting } from '@/lib/presentation/oversampling-form';
import { remedyTitle } from '@/lib/presentation/remedy-words';
import { useActiveResult, useActiveSequence, useBenchState } from './bench-context';

/** Time, shots, SNR, voxel and fold of the active sequence, now and with what is tried; and what to tell the scanner. */
export function Ledger({ children }: { children?: ReactNode }) {
  const { assessment, question } = useActiveResult();
  const sequence = useActiveSequence();
  const trial = useBenchState((state) => state.trial);
  const scanner = useBenchState((state) => state.document.scanner);
  const remedy = trial?.remedy;
  const after = remedy?.assessment;
  const now = question.prescription;
  const next = remedy?.prescription;
  const phase = phaseOversamplingSetting(now, scanner);
  const phaseNext = next && phaseOversamplingSetting(next, scanner);
  const slice = sliceOversamplingSetting(now, scanner);
  const sliceNext = next && sliceOversamplingSetting(next, scanner);
  const adopted = sequence.adopted.at(-1);
  const told = (a: typeof phase, b: typeof slice): string => (b ? `phase ${a.value}, slice ${b.value}` : a.value);
  const range = assessment && scanRangeFigure(after ?? assessment);
  return (
    <section aria-label="Ledger, now and tried" className="flex flex-wrap border-t border-line bg-paper xl:flex-nowrap">
      <Cell name={remedy ? 'Ledger, now → tried' : 'Ledger'} className="lg:w-78 lg:flex-none xl:px-4!">
        <span className="line-clamp-2 font-semibold">
          {remedy ? remedyTitle(remedy) : adopted ? adopted.sentence : 'As planned, nothing tried'}
        </span>
      </Cell>
      {assessment && (
        <>
          <FigureCell name="Scan time" value={pair(scanTimeFigure(assessment, now), after && next && scanTimeFigure(after, next))} note={range} />
          <FigureCell name="Shots" value={pair(shotsFigure(assessment), after && shotsFigure(after))} />
          <FigureCell name="SNR" value={pair('1.00', after && snrFigure(after, assessment))} />
          <FigureCell name="Voxel, mm" value={pair(voxelFigure(assessment), after && voxelFigure(after))} wide />
          <FigureCell name="Fold" value={pair(foldFigure(assessment), after && foldFigure(after))} wide />
          <FigureCell
            name="Scanner takes"
            value={pair(told(phase, slice), phaseNext && told(phaseNext, sliceNext))}
            note={(phaseNext ?? phase).note}
            wide
          />
        </>
      )}
      {children}
    </section>
  );
}

function Cell({ name, children, className }: { name: string; children: ReactNode; className?: string }) {
  return (
    <div className={cx('min-w-0 flex-auto border-line px-4 py-2.5 not-last:border-r xl:px-3', className)}>
      <p className="text-sm whitespace-nowrap text-ink-soft">{name}</p>
      <div className="leading-snug">{children}</div>
    </div>
  );
}

function FigureCell({ name, value, note, wide }: { name: string; value: NowTried; note?: string; wide?: boolean }) {
  const changed = value.tried !== undefined && value.tried !== value.now;
  return (
    <Cell name={name}>
      <Figure value={value.now} tried={changed ? value.tried : undefined} className={cx('font-semibold', wide && 'whitespace-normal!')} />
      {note && <p className="text-sm whitespace-nowrap text-ink-soft">{note}</p>}
    </Cell>
  );
}
