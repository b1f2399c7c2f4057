import type { SiteTransaction } from '@/db/client';

export interface NewMail {
  readonly id: string;
  readonly messageId: string;
  readonly kind: string;
  /** A person of the site, an address, or whoever a size request is for: that address stays sealed with the request. */
  readonly to: { readonly userId: string } | { readonly address: string } | { readonly sizeRequestId: string };
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
      to_size_request_id: 'sizeRequestId' in mail.to ? mail.to.sizeRequestId : null,
      payload: JSON.stringify(mail.payload),
    })
    .execute();
}
