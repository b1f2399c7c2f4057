'use client';

import { useMemo, type ReactNode } from 'react';
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
import { geometryCase } from '@/lib/physics/assess/assess';
import { detailOf } from '@/lib/physics/assess/detail-of';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { Prescription } from '@/lib/physics/model/prescription';
import { answerTo } from './live/results';
import type { ProtocolPrescriptions } from './prescription-panel';
import { useActiveResult, useActiveSequence, useBenchState } from './bench-context';

/** Time, shots, SNR, voxel and fold of the active sequence, now and with what is tried; and what to tell the scanner. */
export function Ledger({ protocol, children }: { protocol: ProtocolPrescriptions; children?: ReactNode }) {
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
  const base = protocol[sequence.id];
  // What was adopted keeps showing what it gained: both figures are measured against the protocol's own prescription.
  const planned = useMemo(() => (base ? detailOr(question, base) : undefined), [question, base]);
  const reference = planned ?? assessment?.detail;
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
          <FigureCell
            name="SNR"
            value={pair(snrFigure(assessment, { detail: reference }), after && snrFigure(after, { detail: reference }))}
            note={planned ? 'of protocol' : 'of now'}
          />
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

/** Voxel and SNR of the protocol's prescription for this patient on this scanner; absent where the engine refuses a value. */
function detailOr(question: Case, prescription: Prescription): Assessment['detail'] {
  return answerTo((asked) => ({ detail: detailOf(geometryCase(asked)) }) as Assessment, { ...question, prescription }).assessment?.detail;
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
