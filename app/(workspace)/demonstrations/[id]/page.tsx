import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { Builder } from '@/components/demonstration/builder/builder';
import { SharePanel } from '@/components/demonstration/share/share-panel';
import { buttonClass, LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { getDemonstration } from '@/lib/services/demonstration/get-demonstration';
import { listShares } from '@/lib/services/demonstration/share-demonstration';
import { createShareAction, revokeShareAction, saveDemonstrationAction } from '../actions';

export const metadata: Metadata = { title: 'Build a demonstration' };

export default async function DemonstrationPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const loaded = await loadPage(async (context) => {
    const demonstration = await getDemonstration(context, { id });
    if (!mayAttempt(context.actor, 'demonstration.edit')) return { demonstration, shares: null };
    return { demonstration, shares: await listShares(context, { id }) };
  });
  if (!loaded.shares) redirect(`/demonstrations/${id}/present`);
  const { demonstration, shares } = loaded;
  return (
    <PageBody wide>
      <PageHeader
        title="Build a demonstration"
        back={{ href: '/demonstrations', label: 'Demonstrations' }}
        actions={
          demonstration.scenes.length > 0 && (
            <>
              <a href={`/demonstrations/${id}/download`} download className={buttonClass()}>Download scenes (JSON)</a>
              <LinkButton href={`/demonstrations/${id}/present`} variant="primary" prefetch={false}>Present</LinkButton>
            </>
          )
        }
      />
      <Builder demonstration={demonstration} save={saveDemonstrationAction}>
        <SharePanel id={id} shares={shares} actions={{ createShare: createShareAction, revokeShare: revokeShareAction }} />
      </Builder>
    </PageBody>
  );
}
