import type { Metadata } from 'next';
import { Speaker } from '@/components/demonstration/present/speaker';
import { NoScenes } from '@/components/demonstration/present/no-scenes';
import { loadPage } from '@/lib/http/load-page';
import { getDemonstration } from '@/lib/services/demonstration/get-demonstration';

export const metadata: Metadata = { title: 'Speaker’s window' };

export default async function SpeakerPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const demonstration = await loadPage((context) => getDemonstration(context, { id }));
  return demonstration.scenes.length > 0 ? <Speaker demonstration={demonstration} /> : <NoScenes />;
}
