import type { ReactNode } from 'react';
import { Logo } from '@/components/ui/logo';
import { VerdictWords } from '@/components/bench/verdict-words';
import { qrPath } from '@/lib/presentation/qr-path';
import type { PlanView } from '@/lib/schemas/plan';
import { CAUTIONS } from './cautions';
import './plan-sheet.css';
import { ScanCode } from './scan-code';
import { SheetPicture } from './sheet-picture';
import { sheetSequence, type SheetSequence } from './sheet-facts';
import { SheetSizes } from './sheet-sizes';
import { restsOn, SHEET_TITLES, sheetHeading, signatureRows } from './sheet-words';

/** One page for the scan room: reference large, values in the scanner's own form, what they rest on, who signs. */
export function PlanSheet({ plan, link }: { plan: PlanView; link: string }) {
  const heading = sheetHeading(plan);
  const sequences = plan.sequences.map((sequence, i) => sheetSequence(sequence, plan.results[i]!, plan));
  return (
    <article className="plan-sheet mx-auto max-w-4xl border border-line bg-paper p-6 max-sm:p-4">
      <header className="grid grid-cols-[1fr_auto] gap-6 max-sm:grid-cols-1 max-sm:gap-3 border-b border-ink pb-3">
        <div>
          <p className="flex items-center gap-2 text-sm [&>span]:whitespace-nowrap">
            <Logo className="size-5 flex-none" />
            <span className="font-semibold">Plan sheet</span> · {heading.kind}
          </p>
          <h1 className="sheet-reference figures mt-1 text-4xl font-bold">{heading.reference}</h1>
          <p className="sheet-small mt-1 text-sm">
            {heading.version}
          </p>
        </div>
        <div className="sheet-small flex h-24 w-64 flex-col max-sm:w-full print:h-20 justify-between border border-dashed border-ink p-2 text-sm">
          {SHEET_TITLES.label.map((words) => (
            <p key={words}>{words}</p>
          ))}
        </div>
      </header>
      <SequenceTable sequences={sequences} />
      <div className="mt-3 grid gap-5 print:mt-1 sm:grid-cols-[1.15fr_1fr] print:grid-cols-[1.15fr_1fr]">
        <SheetPicture plan={plan} />
        <SheetSizes plan={plan} />
      </div>
      <Block title={SHEET_TITLES.cautions}>
        <ul className="sheet-small list-disc pl-5 text-sm">
          {CAUTIONS.map((caution) => (
            <li key={caution}>{caution}</li>
          ))}
        </ul>
      </Block>
      <SheetSignatures plan={plan} />
      <footer className="sheet-small mt-3 flex items-end justify-between gap-x-6 gap-y-2 border-t max-sm:flex-wrap border-ink pt-2 text-sm print:mt-1 print:pt-1">
        <div>
          <p>
            {SHEET_TITLES.link} <span className="figures font-semibold break-all">{link}</span>
          </p>
          <p className="figures mt-1">{restsOn(plan)}</p>
        </div>
        <ScanCode code={qrPath(link)} className="size-24 flex-none print:size-20" />
      </footer>
    </article>
  );
}

function Block({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="mt-3 print:mt-1">
      <h2 className="text-sm font-semibold">{title}</h2>
      {children}
    </section>
  );
}

function SequenceTable({ sequences }: { sequences: readonly SheetSequence[] }) {
  return (
    <div role="region" aria-label="Settings of each sequence" tabIndex={0} className="overflow-x-auto">
      <table className="mt-3 w-full min-w-[38rem] border-collapse text-left">
        <caption className="sr-only">Sequences, as they are set at the scanner</caption>
        <thead className="sheet-small text-sm">
          <tr className="border-b border-ink align-bottom">
            <th className="w-[34%] py-1 pr-3 font-semibold">Sequence</th>
            <th className="py-1 pr-3 font-semibold">Phase oversampling</th>
            <th className="py-1 pr-3 font-semibold">Slice oversampling</th>
            <th className="py-1 pr-3 font-semibold">Av.</th>
            <th className="py-1 pr-3 font-semibold">Time</th>
            <th className="w-[21%] py-1 font-semibold">Verdict</th>
          </tr>
        </thead>
        <tbody>
          {sequences.map((row) => (
            <tr key={row.id} data-sequence={row.id} className="border-b border-line align-top">
              <th scope="row" className="py-1.5 pr-3 font-semibold">
                {row.name}
                <span className="sheet-small block text-sm font-normal">{row.geometry}</span>
                {row.adopted.map((sentence) => (
                  <span key={sentence} className="sheet-small block text-sm font-normal">
                    Adopted: {sentence}
                  </span>
                ))}
              </th>
              <Setting setting={row.phase} />
              {row.slice ? <Setting setting={row.slice} /> : <td className="py-1.5 pr-3">–</td>}
              <td className="figures py-1.5 pr-3">{row.averages}</td>
              <td className="figures py-1.5 pr-3 whitespace-nowrap print:text-sm">{row.time}</td>
              <td className="py-1.5">
                <VerdictWords verdict={row.verdict} className="sheet-small text-sm" />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Setting({ setting }: { setting: { value: string; note: string } }) {
  return (
    <td className="py-1.5 pr-3">
      <span className="sheet-value figures text-lg font-bold whitespace-nowrap">{setting.value}</span>
      {setting.note && <span className="sheet-small block text-sm">{setting.note}</span>}
    </td>
  );
}

function SheetSignatures({ plan }: { plan: PlanView }) {
  return (
    <section aria-label="Signatures" className="sheet-small mt-4 grid grid-cols-3 gap-6 text-sm max-sm:grid-cols-1 max-sm:gap-3 print:mt-1">
      {signatureRows(plan).map(([title, note]) => (
        <div key={title}>
          <p className="h-8 border-b border-ink" />
          <p className="font-semibold">{title}</p>
          <p>{note}</p>
        </div>
      ))}
    </section>
  );
}
