import type { Metadata } from 'next';
import { ProtocolForm } from '@/components/protocol/protocol-form';
import { protocolHistory, toProtocolForm } from '@/components/protocol/to-protocol-form';
import { ArchiveButton } from '@/components/ui/archive-button';
import { ReadOnlyNote } from '@/components/site/read-only-note';
import { Notice } from '@/components/ui/notice';
import { PageBody, PageHeader } from '@/components/ui/page';
import { VersionHistory } from '@/components/ui/version-history';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { asVersion } from '@/lib/http/as-version';
import { recentVersions, trimHistory } from '@/lib/presentation/recent-versions';
import { getProtocol } from '@/lib/services/protocol/get-protocol';
import { archiveProtocolAction, readProtocolForm, restoreProtocolAction, saveProtocol } from '../actions';

export const metadata: Metadata = { title: 'Protocol' };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<{ version?: string }>;
}

export default async function ProtocolPage({ params, searchParams }: Props) {
  const [{ id }, query] = await Promise.all([params, searchParams]);
  const { newest, versions, shown, mayEdit } = await loadPage(async (context) => {
    const newest = await getProtocol(context, { id });
    const wanted = asVersion(query.version) ?? newest.version;
    return {
      newest,
      versions: await Promise.all(
        recentVersions(newest.version).map((version) => getProtocol(context, { id, version })),
      ),
      shown: await getProtocol(context, { id, version: wanted }),
      mayEdit: mayAttempt(context.actor, 'protocol.edit'),
    };
  });
  const old = shown.version !== newest.version;
  const hrefOf = (version: number) =>
    `/site/protocols/${id}${version === newest.version ? '' : `?version=${version}`}`;
  return (
    <PageBody>
      <PageHeader
        title={shown.name}
        lead={`Version ${shown.version}${newest.archived ? ', out of the lists' : ''}`}
        back={{ href: '/site/protocols', label: 'Protocols' }}
        actions={
          mayEdit && (
            <ArchiveButton
              noun="protocol"
              archived={newest.archived}
              archive={archiveProtocolAction.bind(null, id, newest.version)}
              restore={restoreProtocolAction.bind(null, id, newest.version)}
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
      <ProtocolForm
        key={shown.version}
        stored={toProtocolForm(shown)}
        save={saveProtocol.bind(null, id)}
        readCurrent={readProtocolForm.bind(null, id)}
        mayEdit={mayEdit && !old}
      />
      <h2 className="mt-10 mb-3 text-lg">History</h2>
      <VersionHistory rows={trimHistory(protocolHistory(versions))} current={shown.version} hrefOf={hrefOf} />
    </PageBody>
  );
}
