import { beforeEach, describe, expect, it } from 'vitest';
import { writeMail } from '@/lib/mail';
import { openBench } from '@/lib/services/booking/open-bench';
import { mailLink } from '@/lib/services/mail/mail-link';
import { movePlan } from '@/lib/services/plan/move-plan';
import { savePlan } from '@/lib/services/plan/save-plan';
import { signOffPlan } from '@/lib/services/plan/sign-off-plan';
import { as, equipSite, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

let here: EquippedSite;
beforeEach(async () => {
  here = await equipSite();
  // People who have set a password: nobody else reads mail about plans.
  await here.site.withApp((trx) => trx.updateTable('app_user').set({ password_hash: 'set' }).where('site_id', '=', here.site.siteId).execute());
});

const mails = () =>
  here.site.withApp((trx) => trx.selectFrom('mail_outbox').select(['id', 'kind', 'to_user_id', 'payload', 'message_id']).orderBy('kind').execute());

async function planned(breadthMm: number, depthMm: number) {
  await sizeBooking(here, breadthMm, depthMm);
  const bench = await openBench(as(here.radiographer), { bookingId: here.booking.id });
  return savePlan(as(here.radiographer), planBody(bench));
}

describe('mail about a plan', () => {
  it('asks radiologists for the sign-off, and tells those who scan once it is given', async () => {
    const { id } = await planned(480, 340);
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    expect((await mails()).map(({ kind, to_user_id }) => [kind, to_user_id])).toEqual([['sign-off-asked', here.radiologist.userId]]);
    await signOffPlan(as(here.radiologist), { id, expectedVersion: 1, decision: 'signed off' });
    const told = (await mails()).filter(({ kind }) => kind === 'plan-for-use').map(({ to_user_id }) => to_user_id);
    expect(told.sort()).toEqual([here.lead.userId, here.radiographer.userId].sort());
  });

  it('goes straight to those who scan when no sign-off is needed, but not to who put it for use', async () => {
    const { id, needsSignOff } = await planned(300, 200);
    expect(needsSignOff).toBe(false);
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    expect((await mails()).map(({ kind, to_user_id }) => [kind, to_user_id])).toEqual([['plan-for-use', here.lead.userId]]);
  });

  it('tells the planner that the plan came back, without the reason', async () => {
    const { id } = await planned(480, 340);
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    await signOffPlan(as(here.radiologist), { id, expectedVersion: 1, decision: 'sent back', reason: 'Girth 1480 mm is too large for this.' });
    const back = (await mails()).filter(({ kind }) => kind === 'plan-sent-back');
    expect(back.map(({ to_user_id }) => to_user_id)).toEqual([here.radiographer.userId]);
    expect(JSON.stringify(back)).not.toContain('1480');
  });

  it('carries the reference and a link to the plan, and no size', async () => {
    const { id } = await planned(481, 343);
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    const [mail] = await mails();
    expect(mail!.payload).toEqual({ schemaVersion: 1, planId: id, planVersion: 1, reference: 'AB-1234' });
    const { subject, text, html } = writeMail(mail!.kind, mail!.payload, 'Harbour', mailLink(mail!));
    expect(subject).toBe('Sign-off asked: AB-1234, version 1');
    expect(text).toContain(`/plans/${id}`);
    for (const size of ['481', '343', '240', '171']) expect(`${subject}${text}${html}`.replaceAll(id, '')).not.toContain(size);
  });

  it('is not queued when the step is refused', async () => {
    const { id } = await planned(480, 340);
    await expect(movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'used' })).rejects.toMatchObject({ code: 'conflict' });
    await expect(movePlan(as(here.radiographer), { id, expectedVersion: 7, to: 'for use' })).rejects.toMatchObject({ code: 'conflict' });
    expect(await mails()).toEqual([]);
  });
});
