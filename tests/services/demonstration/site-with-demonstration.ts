import { createDemonstration } from '@/lib/services/demonstration/create-demonstration';
import { createTestSite } from '@/tests/support/database';
import { activePerson } from '@/tests/support/database/accounts';

/** A site of its own with an educator and a copy of a set piece. */
export async function siteWithDemonstration(setPiece = 'slab-wrap') {
  const site = await createTestSite();
  const educator = await activePerson(site, 'educator');
  const { id } = await createDemonstration({ actor: educator }, { title: 'Wrap, shown', setPiece });
  return { site, educator, context: { actor: educator }, id };
}
