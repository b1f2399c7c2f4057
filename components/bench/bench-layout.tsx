'use client';

import type { ReactNode } from 'react';
import type { BenchProps } from './bench';
import { KeepClearPanel } from './keep-clear-panel';
import { Ledger } from './ledger';
import { PatientPanel } from './patient-panel';
import { PictureColumn } from './picture-column';
import { PrescriptionPanel } from './prescription-panel';
import { RemediesPanel } from './remedies-panel';
import { SaveCell } from './saving/save-cell';
import { SaveNotices } from './saving/save-notices';
import { usePlanSaving } from './saving/use-plan-saving';
import { SolveAll } from './solve-all/solve-all-panel';
import { VerdictLine } from './verdict-line';

/**
 * Wide: three columns that scroll by themselves between strip and ledger. Tablet: remedies go below. Phone: one
 * column, with the verdict stuck to the top and what decides before what is filled in.
 */
export function BenchLayout(props: Omit<BenchProps, 'children'> & { children: ReactNode }) {
  const plan = usePlanSaving(props.plan, props.basis, props.userId);
  return (
    <div className="flex flex-col xl:h-[calc(100dvh-3.5rem-1px)] xl:min-h-[40rem]">
      <SolveAll mayEdit={props.mayEdit}>{props.children}</SolveAll>
      <SaveNotices plan={plan} />
      <div className="flex min-h-0 flex-1 flex-col lg:grid lg:grid-cols-[19.5rem_minmax(0,1fr)] lg:max-xl:grid-rows-[auto_1fr] xl:grid-cols-[19.5rem_minmax(0,1fr)_23.25rem]">
        <VerdictLine className="sticky top-0 z-20 border-b border-line bg-cloth lg:hidden" />
        <div className="flex min-h-0 min-w-0 flex-col lg:order-2 xl:overflow-y-auto">
          <PictureColumn />
        </div>
        <div className="flex min-h-0 flex-col border-line bg-paper max-xl:border-t lg:order-3 xl:border-l">
          <RemediesPanel />
        </div>
        <div className="relative min-h-0 border-line max-lg:border-t lg:order-1 lg:border-r lg:max-xl:row-span-2 xl:overflow-y-auto">
          <PatientPanel />
          <PrescriptionPanel source={props.protocolLabel} protocol={props.protocolPrescriptions} />
          <KeepClearPanel preset={props.keepClearPreset} asked={props.keepClearAsked} />
        </div>
      </div>
      <Ledger protocol={props.protocolPrescriptions}>{props.mayEdit && <SaveCell plan={plan} />}</Ledger>
    </div>
  );
}
