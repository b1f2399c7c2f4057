import type { Metadata } from 'next';
import { PresenterWindow } from '@/components/demonstration/present/presenter-window';
import { NoScenes } from '@/components/demonstration/present/no-scenes';
import { loadPage } from '@/lib/http/load-page';
import { getDemonstration } from '@/lib/services/demonstration/get-demonstration';

export const metadata: Metadata = { title: 'Presenter’s window' };

export default async function PresenterPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const demonstration = await loadPage((context) => getDemonstration(context, { id }));
  return demonstration.scenes.length > 0 ? <PresenterWindow demonstration={demonstration} /> : <NoScenes />;
}
