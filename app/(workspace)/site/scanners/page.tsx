import type { Metadata } from 'next';
import { ScannerTable } from '@/components/scanner/scanner-table';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { listScanners } from '@/lib/services/scanner/list-scanners';

export const metadata: Metadata = { title: 'Scanners' };

export default async function ScannersPage() {
  const { scanners, mayEdit } = await loadPage(async (context) => ({
    scanners: await listScanners(context, { includeArchived: true }),
    mayEdit: mayAttempt(context.actor, 'scanner.edit'),
  }));
  return (
    <PageBody>
      <PageHeader
        title="Scanners"
        lead="Openings, tables, limits and the form each takes oversampling in."
        back={{ href: '/site', label: 'Site' }}
        actions={
          mayEdit && (
            <LinkButton href="/site/scanners/new" variant="primary">
              Add a scanner
            </LinkButton>
          )
        }
      />
      <ScannerTable scanners={scanners} mayEdit={mayEdit} />
    </PageBody>
  );
}
