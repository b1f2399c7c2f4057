import { inTransaction } from '@/db/client';
import { findSite, updateSite } from '@/db/queries/site/sites';
import { authorise } from '@/lib/domain/access';
import { changedFields } from '@/lib/domain/document/changed-fields';
import { parseInput } from '@/lib/schemas/parse-input';
import { siteFormSchema, type SiteView } from '@/lib/schemas/site';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';

/** The site's name and the form of its accession numbers; bookings that are there stay as they are. */
export async function editSite(context: ServiceContext, input: unknown): Promise<SiteView> {
  const { actor } = context;
  authorise(actor, 'site.edit');
  const form = parseInput(siteFormSchema, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const before = await findSite(trx, siteId);
    authorise(actor, 'site.edit', before);
    const fields = changedFields({ name: before.name, accessionMask: before.accessionMask }, form);
    if (fields.length > 0) {
      await updateSite(trx, siteId, form);
      await recordAudit(trx, context, { action: 'site.edit', subjectType: 'site', subjectId: siteId, fields });
    }
    return { id: siteId, ...form };
  });
}
