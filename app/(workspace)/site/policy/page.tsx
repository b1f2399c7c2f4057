import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { PolicyForm } from '@/components/site-policy/policy-form';
import { policyHistory, toPolicyForm } from '@/components/site-policy/to-policy-form';
import { ReadOnlyNote } from '@/components/site/read-only-note';
import { Notice } from '@/components/ui/notice';
import { PageBody, PageHeader } from '@/components/ui/page';
import { VersionHistory } from '@/components/ui/version-history';
import { mayAttempt } from '@/lib/domain/access';
import { asVersion } from '@/lib/http/as-version';
import { loadPage } from '@/lib/http/load-page';
import { recentVersions, trimHistory } from '@/lib/presentation/recent-versions';
import { getPolicy } from '@/lib/services/site-policy/get-policy';
import { readPolicyForm, savePolicy } from './actions';

export const metadata: Metadata = { title: 'Policy' };

export default async function PolicyPage({ searchParams }: { searchParams: Promise<{ version?: string }> }) {
  const wanted = asVersion((await searchParams).version);
  const { newest, versions, shown, mayEdit } = await loadPage(async (context) => {
    const newest = await getPolicy(context);
    const numbers = newest.version === 0 ? [] : recentVersions(newest.version);
    return {
      newest,
      versions: await Promise.all(numbers.map((version) => getPolicy(context, { version }))),
      shown: wanted === undefined ? newest : await getPolicy(context, { version: wanted }),
      mayEdit: mayAttempt(context.actor, 'policy.edit'),
    };
  });
  if (wanted !== undefined && shown.version !== wanted) notFound();
  const old = shown.version !== newest.version;
  return (
    <PageBody>
      <PageHeader
        title="Site policy"
        lead={
          shown.version === 0
            ? 'The standard every site starts from. Saving makes it your own.'
            : `Version ${shown.version}. Margins, limits and weights that every verdict and every ranking rests on.`
        }
        back={{ href: '/site', label: 'Site' }}
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
      <PolicyForm
        key={shown.version}
        stored={toPolicyForm(shown)}
        save={savePolicy}
        readCurrent={readPolicyForm}
        mayEdit={mayEdit && !old}
      />
      {versions.length > 0 && (
        <>
          <h2 className="mt-10 mb-3 text-lg">History</h2>
          <VersionHistory
            rows={trimHistory(policyHistory(versions))}
            current={shown.version}
            hrefOf={(version) =>
              version === newest.version ? '/site/policy' : `/site/policy?version=${version}`
            }
          />
        </>
      )}
    </PageBody>
  );
}
