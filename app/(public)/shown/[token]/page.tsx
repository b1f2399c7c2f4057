import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { SharedShow } from '@/components/demonstration/share/shared-show';
import { ServiceError } from '@/lib/domain/errors';
import { viewSharedDemonstration } from '@/lib/services/demonstration/view-shared-demonstration';

// The address is the key: it goes to nobody who is linked from here.
export const metadata: Metadata = { title: 'Demonstration', referrer: 'no-referrer' };

export default async function SharedDemonstrationPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const shown = await viewSharedDemonstration({ token }).catch((error: unknown) => {
    if (error instanceof ServiceError && error.code === 'not-found') notFound();
    throw error;
  });
  return <SharedShow {...shown} />;
}
