import { redirect } from 'next/navigation';
import { asVersion } from '@/lib/http/as-version';
import { loadPage } from '@/lib/http/load-page';
import { getPlanByShortCode } from '@/lib/services/plan/get-plan';

interface Props {
  params: Promise<{ code: string }>;
  searchParams: Promise<{ v?: string }>;
}

/** The short link of a printed sheet: opens the version that was printed, which says when it is not the newest. */
export default async function ShortLinkPage({ params, searchParams }: Props) {
  const [{ code }, { v }] = await Promise.all([params, searchParams]);
  const version = asVersion(v);
  const plan = await loadPage((context) => getPlanByShortCode(context, { code, version }));
  redirect(`/plans/${plan.id}/sheet${version === undefined ? '' : `?version=${version}`}`);
}
