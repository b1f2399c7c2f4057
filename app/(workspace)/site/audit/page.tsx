import type { Metadata } from 'next';
import { AuditFilter } from '@/components/audit/audit-filter';
import { AuditTable } from '@/components/audit/audit-table';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { loadPage } from '@/lib/http/load-page';
import { listAudit } from '@/lib/services/audit/list-audit';

export const metadata: Metadata = { title: 'Audit log' };

export default async function AuditPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const search = await searchParams;
  const { events, filter, next } = await loadPage((context) => listAudit(context, search));
  const { before, ...kept } = filter;
  const older = new URLSearchParams(Object.entries(kept).filter((entry): entry is [string, string] => Boolean(entry[1])));
  const newest = older.toString();
  if (next) older.set('before', next);
  return (
    <PageBody>
      <PageHeader
        title="Audit log"
        lead="Who changed which record and which of its fields. What was in them is not kept here."
        back={{ href: '/site', label: 'Site' }}
      />
      <AuditFilter filter={filter} />
      {events.length === 0 ? (
        <EmptyState title="No entry matches" action={<LinkButton href="/site/audit">Show all entries</LinkButton>} />
      ) : (
        <AuditTable events={events} />
      )}
      <nav aria-label="Pages" className="mt-5 flex flex-wrap gap-3">
        {before && <LinkButton href={newest ? `/site/audit?${newest}` : '/site/audit'}>Newest</LinkButton>}
        {next && <LinkButton href={`/site/audit?${older}`}>Older entries</LinkButton>}
      </nav>
    </PageBody>
  );
}
