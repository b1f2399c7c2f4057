import type { SiteTransaction } from '@/db/client';

export interface NewMail {
  readonly id: string;
  readonly messageId: string;
  readonly kind: string;
  /** A person of the site, or an address typed for someone without an account. */
  readonly to: { readonly userId: string } | { readonly address: string };
  readonly payload: { readonly schemaVersion: number } & Record<string, unknown>;
}

export async function insertMail(trx: SiteTransaction, siteId: string, mail: NewMail): Promise<void> {
  await trx
    .insertInto('mail_outbox')
    .values({
      site_id: siteId,
      id: mail.id,
      message_id: mail.messageId,
      kind: mail.kind,
      to_user_id: 'userId' in mail.to ? mail.to.userId : null,
      to_address: 'address' in mail.to ? mail.to.address : null,
      payload: JSON.stringify(mail.payload),
    })
    .execute();
}
