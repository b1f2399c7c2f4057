import type { Metadata } from 'next';
import { SiteForm } from '@/components/site/site-form';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { getSite } from '@/lib/services/site/get-site';
import { saveSite } from './actions';

export const metadata: Metadata = { title: 'Name and numbers' };

export default async function SiteDetailsPage() {
  const { site, mayEdit } = await loadPage(async (context) => ({
    site: await getSite(context),
    mayEdit: mayAttempt(context.actor, 'site.edit'),
  }));
  return (
    <PageBody narrow>
      <PageHeader
        title="Name and numbers"
        lead="What the site is called, and the form its accession numbers have."
        back={{ href: '/site', label: 'Site' }}
      />
      <SiteForm
        stored={{ name: site.name, accessionMask: site.accessionMask }}
        save={saveSite}
        mayEdit={mayEdit}
      />
    </PageBody>
  );
}
