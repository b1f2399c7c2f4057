import type { Metadata } from 'next';
import { FirstSteps, SiteIndex } from '@/components/site/site-index';
import { siteEntries } from '@/components/site/site-entries';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { countUndelivered } from '@/lib/services/mail/list-mail';
import { listProtocols } from '@/lib/services/protocol/list-protocols';
import { listScanners } from '@/lib/services/scanner/list-scanners';
import { getPolicy } from '@/lib/services/site-policy/get-policy';
import { getSite } from '@/lib/services/site/get-site';

export const metadata: Metadata = { title: 'Site' };

export default async function SitePage() {
  const { actor, site, scanners, protocols, policy, undelivered } = await loadPage(async (context) => ({
    actor: context.actor,
    site: await getSite(context),
    scanners: await listScanners(context),
    protocols: await listProtocols(context),
    policy: await getPolicy(context),
    undelivered: await countUndelivered(context),
  }));
  const set = scanners.length > 0 && protocols.length > 0;
  return (
    <PageBody narrow>
      <PageHeader title={site.name} lead="What every verdict of this site rests on." />
      {!set && mayAttempt(actor, 'scanner.edit') && (
        <FirstSteps hasScanner={scanners.length > 0} hasProtocol={protocols.length > 0} />
      )}
      <SiteIndex
        entries={siteEntries(actor, {
          scanners: scanners.length,
          protocols: protocols.length,
          policyVersion: policy.version,
          undelivered,
        })}
      />
    </PageBody>
  );
}
