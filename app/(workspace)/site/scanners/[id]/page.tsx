import type { Metadata } from 'next';
import { ScannerForm } from '@/components/scanner/scanner-form';
import { scannerHistory } from '@/components/scanner/scanner-history';
import { toScannerForm } from '@/components/scanner/to-scanner-form';
import { ArchiveButton } from '@/components/ui/archive-button';
import { ReadOnlyNote } from '@/components/site/read-only-note';
import { Notice } from '@/components/ui/notice';
import { PageBody, PageHeader } from '@/components/ui/page';
import { VersionHistory } from '@/components/ui/version-history';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { asVersion } from '@/lib/http/as-version';
import { recentVersions, trimHistory } from '@/lib/presentation/recent-versions';
import { getScanner } from '@/lib/services/scanner/get-scanner';
import { archiveScannerAction, readScannerForm, restoreScannerAction, saveScanner } from '../actions';

export const metadata: Metadata = { title: 'Scanner' };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<{ version?: string }>;
}

export default async function ScannerPage({ params, searchParams }: Props) {
  const [{ id }, query] = await Promise.all([params, searchParams]);
  const { newest, versions, shown, mayEdit } = await loadPage(async (context) => {
    const newest = await getScanner(context, { id });
    const wanted = asVersion(query.version) ?? newest.version;
    return {
      newest,
      versions: await Promise.all(
        recentVersions(newest.version).map((version) => getScanner(context, { id, version })),
      ),
      shown: await getScanner(context, { id, version: wanted }),
      mayEdit: mayAttempt(context.actor, 'scanner.edit'),
    };
  });
  const old = shown.version !== newest.version;
  const hrefOf = (version: number) =>
    `/site/scanners/${id}${version === newest.version ? '' : `?version=${version}`}`;
  return (
    <PageBody>
      <PageHeader
        title={shown.scanner.name}
        lead={`Version ${shown.version}${newest.archived ? ', out of the lists' : ''}`}
        back={{ href: '/site/scanners', label: 'Scanners' }}
        actions={
          mayEdit && (
            <ArchiveButton
              noun="scanner"
              archived={newest.archived}
              archive={archiveScannerAction.bind(null, id, newest.version)}
              restore={restoreScannerAction.bind(null, id, newest.version)}
            />
          )
        }
      />
      {old && (
        <Notice
          className="mb-5"
          title={`This is version ${shown.version}. The newest is version ${newest.version}.`}
        >
          Plans that rest on it still read it. It cannot be changed.
        </Notice>
      )}
      {!mayEdit && <ReadOnlyNote />}
      <ScannerForm
        key={shown.version}
        stored={toScannerForm(shown)}
        save={saveScanner.bind(null, id)}
        readCurrent={readScannerForm.bind(null, id)}
        mayEdit={mayEdit && !old}
      />
      <h2 className="mt-10 mb-3 text-lg">History</h2>
      <VersionHistory rows={trimHistory(scannerHistory(versions))} current={shown.version} hrefOf={hrefOf} />
    </PageBody>
  );
}
