import type { SiteTransaction } from '@/db/client';
import { lockWorkingLeads } from '@/db/queries/app-user/read-people';
import { ServiceError } from '@/lib/domain/errors';

/**
 * Call before a person stops being a lead who can sign in. A site without one could never be set up again by
 * anybody inside it; an invited lead has no password yet and does not count.
 */
export async function keepOneLead(trx: SiteTransaction, siteId: string, leavingId: string, field: string): Promise<void> {
  const leads = await lockWorkingLeads(trx, siteId);
  if (leads.includes(leavingId) && leads.length === 1) {
    const message = 'This is the only lead who can sign in. Make another person a lead first.';
    throw new ServiceError('invalid', { message, fields: { [field]: message } });
  }
}
