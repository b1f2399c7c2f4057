import type { SiteTransaction } from '@/db/client';
import { findPlan } from '@/db/queries/plan/plans';
import type { SheetContent } from '@/db/queries/plan-sheet/plan-sheets';
import type { Paper, SheetRecord } from '@/lib/domain/plan/sheet';
import { environment } from '@/lib/env';
import type { PlanView } from '@/lib/schemas/plan';
import type { SheetView } from '@/lib/schemas/plan-sheet';
import { readPlannedSetup } from '../booking/read-booking-setup';
import { inputHash } from '../check/input-hash';
import { toPlanView } from '../plan/to-plan-view';

export interface SheetSource {
  readonly plan: PlanView;
  /** Short address printed on the sheet: opens this version, which says when it is not the newest. */
  readonly link: string;
}

export function sheetLink(plan: Pick<PlanView, 'shortCode' | 'version'>): string {
  return `${environment().publicUrl}/p/${plan.shortCode}?v=${plan.version}`;
}

/** What a sheet says, now. */
export async function readSheetSource(
  trx: SiteTransaction,
  where: { readonly siteId: string; readonly planId: string; readonly version?: number },
): Promise<SheetSource | null> {
  const plan = await findPlan(trx, where.siteId, where.planId, where.version);
  if (!plan) return null;
  const view = toPlanView(plan, await readPlannedSetup(trx, plan));
  return { plan: view, link: sheetLink(view) };
}

/** That a newer version exists is not printed, so it makes no other sheet. */
export function contentOf(siteId: string, { plan, link }: SheetSource, paper: Paper): SheetContent {
  const { currentVersion: _current, newerVersionExists: _newer, ...printed } = plan;
  return { siteId, planId: plan.id, planVersion: plan.version, paper, contentHash: inputHash({ printed, link }) };
}

export function toSheetView({ id, planId, planVersion, paper, state, attempts, sizeBytes }: SheetRecord): SheetView {
  return { id, planId, planVersion, paper, state, attempts, ...(sizeBytes === null ? {} : { sizeBytes }) };
}
