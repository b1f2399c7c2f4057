import type { SiteTransaction } from '@/db/client';

/** Message-IDs of the site's newest mails. */
export async function listMessageIds(trx: SiteTransaction, siteId: string, limit: number): Promise<string[]> {
  const rows = await trx
    .selectFrom('mail_outbox')
    .select('message_id')
    .where('site_id', '=', siteId)
    .orderBy('created_at', 'desc')
    .orderBy('id', 'desc')
    .limit(limit)
    .execute();
  return rows.map((row) => row.message_id);
}
