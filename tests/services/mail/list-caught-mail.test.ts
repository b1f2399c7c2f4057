import { describe, expect, it } from 'vitest';
import type { CaughtMail } from '@/lib/mail';
import { queueMail } from '@/lib/mail';
import type { Role } from '@/lib/domain/access';
import { listCaughtMail } from '@/lib/services/mail/list-caught-mail';
import { createTestSite, type TestSite } from '@/tests/support/database';

async function queueFor(site: TestSite): Promise<CaughtMail> {
  const { userId } = await site.person('radiographer');
  const messageId = await site.withApp(async (trx) => {
    const id = await queueMail(trx, site.siteId, {
      kind: 'invitation',
      to: { userId },
      payload: { expiresAt: '2030-01-01T00:00:00.000Z' },
    });
    const row = await trx
      .selectFrom('mail_outbox')
      .select('message_id')
      .where('site_id', '=', site.siteId)
      .where('id', '=', id)
      .executeTakeFirstOrThrow();
    return row.message_id;
  });
  return { messageId, receivedAt: '2029-12-01T08:00:00.000Z', to: 'a@b.example', subject: 's', text: 't', html: '', deliveries: 1 };
}

describe('listCaughtMail', () => {
  it('shows a lead the site’s own mails and no other site’s', async () => {
    const [mine, theirs] = [await createTestSite(), await createTestSite()];
    const caught = [await queueFor(theirs), await queueFor(mine)];
    const seen = await listCaughtMail({ actor: await mine.person('lead') }, async () => caught);
    expect(seen.map(({ messageId }) => messageId)).toEqual([caught[1]!.messageId]);
  });

  it.each<Role>(['radiographer', 'coordinator', 'radiologist', 'educator'])('shows a %s nothing', async (role) => {
    const site = await createTestSite();
    const caught = [await queueFor(site)];
    const attempt = listCaughtMail({ actor: await site.person(role) }, async () => caught);
    await expect(attempt).rejects.toMatchObject({ code: 'not-found' });
  });

  it('is not there where mail goes to a real server', async () => {
    const site = await createTestSite();
    const attempt = listCaughtMail({ actor: await site.person('lead') }, async () => null);
    await expect(attempt).rejects.toMatchObject({ code: 'not-found' });
  });
});
