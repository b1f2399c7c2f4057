import type { Metadata } from 'next';
import { PlanComparison } from '@/components/plan/plan-comparison';
import { VersionPair } from '@/components/plan/version-pair';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { asVersion } from '@/lib/http/as-version';
import { loadPage } from '@/lib/http/load-page';
import { getPlan } from '@/lib/services/plan/get-plan';

export const metadata: Metadata = { title: 'Versions side by side' };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<{ before?: string; after?: string }>;
}

export default async function PlanVersionsPage({ params, searchParams }: Props) {
  const [{ id }, query] = await Promise.all([params, searchParams]);
  const { newest, before, after } = await loadPage(async (context) => {
    const after = await getPlan(context, { id, version: asVersion(query.after) });
    const version = asVersion(query.before) ?? Math.max(1, after.version - 1);
    return { newest: after.currentVersion, after, before: await getPlan(context, { id, version }) };
  });
  return (
    <PageBody>
      <PageHeader
        title="Versions side by side"
        lead={after.accession ?? 'Plan without a booking'}
        back={{ href: `/plans/${id}`, label: 'Plan' }}
      />
      {newest === 1 ? (
        <EmptyState title="There is one version">Save the plan again on the bench to have something to compare.</EmptyState>
      ) : (
        <>
          <VersionPair planId={id} newest={newest} before={before.version} after={after.version} />
          <PlanComparison before={before} after={after} />
        </>
      )}
    </PageBody>
  );
}
