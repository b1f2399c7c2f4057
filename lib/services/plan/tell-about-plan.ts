import type { SiteTransaction } from '@/db/client';
import type { Actor } from '@/lib/domain/access';
import type { PlanRecord } from '@/lib/domain/plan/plan';
import { queueMail } from '@/lib/mail';
import { thoseWhoMay } from '../mail/those-who-may';

type News = 'sign-off-asked' | 'plan-for-use' | 'plan-sent-back';

async function readersOf(news: News, trx: SiteTransaction, actor: Actor, plan: PlanRecord): Promise<string[]> {
  switch (news) {
    case 'sign-off-asked':
      return thoseWhoMay(trx, actor, 'plan.sign-off');
    case 'plan-for-use':
      return thoseWhoMay(trx, actor, 'plan.use');
    case 'plan-sent-back':
      return plan.savedById === actor.userId ? [] : [plan.savedById];
  }
}

/** Queues the mails that a step of a plan's life asks for, in the transaction of the step. They carry no sizes. */
export async function tellAboutPlan(trx: SiteTransaction, actor: Actor, plan: PlanRecord, news: News): Promise<void> {
  for (const userId of await readersOf(news, trx, actor, plan)) {
    await queueMail(trx, actor.siteId, {
      kind: news,
      to: { userId },
      payload: { planId: plan.id, planVersion: plan.version, reference: plan.accession ?? '' },
    });
  }
}
