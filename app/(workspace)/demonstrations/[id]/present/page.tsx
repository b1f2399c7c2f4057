import type { Metadata } from 'next';
import { Presentation } from '@/components/demonstration/present/presentation';
import { NoScenes } from '@/components/demonstration/present/no-scenes';
import { loadPage } from '@/lib/http/load-page';
import { getDemonstration } from '@/lib/services/demonstration/get-demonstration';

export const metadata: Metadata = { title: 'Present' };

export default async function PresentPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const demonstration = await loadPage((context) => getDemonstration(context, { id }));
  return demonstration.scenes.length > 0 ? <Presentation demonstration={demonstration} /> : <NoScenes />;
}
