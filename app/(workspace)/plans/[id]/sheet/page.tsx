import type { Metadata } from 'next';
import { headers } from 'next/headers';
import { NewerVersion } from '@/components/plan/newer-version';
import { PlanSheet } from '@/components/plan/plan-sheet';
import { SheetPdf } from '@/components/plan/sheet-pdf';
import { PrintButton } from '@/components/plan/print-button';
import { LinkButton } from '@/components/ui/button';
import { asVersion } from '@/lib/http/as-version';
import { loadPage } from '@/lib/http/load-page';
import { benchOfPlan } from '@/lib/presentation/bench-of-plan';
import { paperOf } from '@/lib/presentation/paper';
import { sheetLink } from '@/lib/services/plan-sheet/sheet-content';
import { getPlan } from '@/lib/services/plan/get-plan';

export const metadata: Metadata = { title: 'Plan sheet' };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<{ version?: string }>;
}

export default async function PlanSheetPage({ params, searchParams }: Props) {
  const [{ id }, query] = await Promise.all([params, searchParams]);
  const plan = await loadPage((context) => getPlan(context, { id, version: asVersion(query.version) }));
  return (
    <div className="mx-auto max-w-5xl px-4 py-6 print:p-0">
      <NewerVersion plan={plan} href={`/plans/${id}/sheet`} />
      <div className="mb-4 flex flex-wrap gap-3 print:hidden">
        <PrintButton />
        <SheetPdf planId={id} version={plan.version} paper={paperOf((await headers()).get('accept-language'))} />
        <LinkButton href={benchOfPlan(plan)}>Back to the bench</LinkButton>
        <LinkButton href={`/plans/${id}`}>Plan</LinkButton>
      </div>
      <PlanSheet plan={plan} link={sheetLink(plan)} />
    </div>
  );
}
