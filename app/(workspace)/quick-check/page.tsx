import type { Metadata } from 'next';
import { QuickCheck } from '@/components/quick-check/quick-check';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';

export const metadata: Metadata = { title: 'Quick check' };

/** Needs no data of the site: the workspace's layout asks for sign-in, and nothing typed is sent. */
export default function QuickCheckPage() {
  return (
    <PageBody narrow>
      <PageHeader
        title="Quick check"
        lead="What folds, from four values. For a patient with a booking, plan on the bench."
        actions={<LinkButton href="/bench">Open the bench without a booking</LinkButton>}
      />
      <QuickCheck titled={false} />
    </PageBody>
  );
}
