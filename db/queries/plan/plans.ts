import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import {
  readPlanDocument, readPlanResult, type PlanDocument, type PlanResultDocument,
} from '@/lib/domain/plan/document';
import type { SignOffDecision } from '@/lib/domain/plan/plan';
import type { PlanHead, PlanRecord } from '@/lib/domain/plan/plan';
import type { PlanState } from '@/lib/domain/plan/states';

export interface NewestVersion {
  readonly planId: string;
  readonly state: PlanState;
  readonly version: number;
  readonly savedBy: string;
  readonly savedAt: Date;
}

function versions(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('plan as p')
    .innerJoin('plan_version as v', (join) => join.onRef('v.site_id', '=', 'p.site_id').onRef('v.plan_id', '=', 'p.id'))
    .leftJoin('booking as b', (join) => join.onRef('b.site_id', '=', 'p.site_id').onRef('b.id', '=', 'p.booking_id'))
    .leftJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'v.site_id').onRef('u.id', '=', 'v.created_by'))
    .leftJoinLateral(
      (from) =>
        from
          .selectFrom('sign_off as o')
          .innerJoin('app_user as d', (join) => join.onRef('d.site_id', '=', 'o.site_id').onRef('d.id', '=', 'o.signed_by'))
          .select(['o.decision', 'o.reason', 'o.signed_at', 'd.display_name'])
          .whereRef('o.site_id', '=', 'v.site_id')
          .whereRef('o.plan_id', '=', 'v.plan_id')
          .whereRef('o.plan_version', '=', 'v.version')
          .orderBy('o.signed_at', 'desc')
          .limit(1)
          .as('s'),
      (join) => join.onTrue(),
    )
    .leftJoinLateral(
      (from) =>
        from
          .selectFrom('keep_clear_request as k')
          .select(sql<number | null>`(k.data ->> 'toleratedFoldOutsidePct')::float8`.as('tolerated_pct'))
          .whereRef('k.site_id', '=', 'p.site_id')
          .whereRef('k.booking_id', '=', 'p.booking_id')
          .orderBy('k.requested_at', 'desc')
          .orderBy('k.id')
          .limit(1)
          .as('r'),
      (join) => join.onTrue(),
    )
    .select([
      'p.site_id', 'p.id', 'p.booking_id', 'p.state', 'p.current_version', 'p.short_code', 'b.accession',
      'v.version', 'v.data', 'v.result', 'v.engine_version', 'v.policy_version', 'v.input_hash', 'v.note', 'v.created_at', 'v.created_by',
      'u.display_name as saved_by', 's.decision', 's.reason', 's.signed_at', 's.display_name as signed_by', 'r.tolerated_pct',
    ])
    .where('p.site_id', '=', siteId);
}

type PlanRow = Awaited<ReturnType<ReturnType<typeof versions>['execute']>>[number];

function toPlan(row: PlanRow): PlanRecord {
  return {
    siteId: row.site_id,
    id: row.id,
    bookingId: row.booking_id,
    accession: row.accession,
    state: row.state as PlanState,
    currentVersion: row.current_version,
    shortCode: row.short_code,
    version: row.version,
    document: readPlanDocument(row.data),
    result: readPlanResult(row.result),
    engineVersion: row.engine_version,
    policyVersion: row.policy_version,
    inputHash: row.input_hash,
    note: row.note,
    savedAt: row.created_at,
    savedBy: row.saved_by ?? '',
    savedById: row.created_by,
    toleratedFoldOutsidePct: row.tolerated_pct,
    signOff:
      row.decision !== null && row.signed_at !== null
        ? { decision: row.decision as SignOffDecision, reason: row.reason ?? '', at: row.signed_at, by: row.signed_by ?? '' }
        : null,
  };
}

/** One version of a plan, the newest unless said otherwise. */
export async function findPlan(trx: SiteTransaction, siteId: string, id: string, version?: number): Promise<PlanRecord | null> {
  const query = versions(trx, siteId).where('p.id', '=', id);
  const row = await (version === undefined
    ? query.whereRef('v.version', '=', 'p.current_version')
    : query.where('v.version', '=', version)
  ).executeTakeFirst();
  return row ? toPlan(row) : null;
}

export async function findPlanByShortCode(trx: SiteTransaction, siteId: string, code: string, version?: number): Promise<PlanRecord | null> {
  const query = versions(trx, siteId).where('p.short_code', '=', code);
  const row = await (version === undefined
    ? query.whereRef('v.version', '=', 'p.current_version')
    : query.where('v.version', '=', version)
  ).executeTakeFirst();
  return row ? toPlan(row) : null;
}

/** The newest plan of a booking in its newest version. */
export async function findPlanOfBooking(trx: SiteTransaction, siteId: string, bookingId: string): Promise<PlanRecord | null> {
  const row = await versions(trx, siteId)
    .where('p.booking_id', '=', bookingId)
    .whereRef('v.version', '=', 'p.current_version')
    .orderBy('p.created_at', 'desc')
    .orderBy('p.id')
    .limit(1)
    .executeTakeFirst();
  return row ? toPlan(row) : null;
}

/** Which version of a booking's plan is the newest, and who saved it when: little enough to be asked again and again. */
export async function findNewestVersion(trx: SiteTransaction, siteId: string, bookingId: string): Promise<NewestVersion | null> {
  const row = await trx
    .selectFrom('plan as p')
    .innerJoin('plan_version as v', (join) =>
      join.onRef('v.site_id', '=', 'p.site_id').onRef('v.plan_id', '=', 'p.id').onRef('v.version', '=', 'p.current_version'))
    .leftJoin('app_user as u', (join) => join.onRef('u.site_id', '=', 'v.site_id').onRef('u.id', '=', 'v.created_by'))
    .select(['p.id', 'p.state', 'v.version', 'v.created_at', 'u.display_name'])
    .where('p.site_id', '=', siteId)
    .where('p.booking_id', '=', bookingId)
    .orderBy('p.created_at', 'desc')
    .orderBy('p.id')
    .limit(1)
    .executeTakeFirst();
  if (!row) return null;
  return { planId: row.id, state: row.state as PlanState, version: row.version, savedBy: row.display_name ?? '', savedAt: row.created_at };
}

/** The plan's own row, locked: two saves of one plan then follow each other instead of racing. */
export async function lockPlan(trx: SiteTransaction, siteId: string, id: string): Promise<PlanHead | null> {
  const row = await trx
    .selectFrom('plan')
    .select(['site_id', 'id', 'booking_id', 'state', 'current_version', 'short_code'])
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .forUpdate()
    .executeTakeFirst();
  if (!row) return null;
  return {
    siteId: row.site_id,
    id: row.id,
    bookingId: row.booking_id,
    state: row.state as PlanState,
    currentVersion: row.current_version,
    shortCode: row.short_code,
  };
}

/** The version an idempotency key has made already. */
export async function versionOfKey(trx: SiteTransaction, siteId: string, planId: string, key: string): Promise<number | null> {
  const row = await trx
    .selectFrom('plan_version')
    .select('version')
    .where('site_id', '=', siteId)
    .where('plan_id', '=', planId)
    .where('idempotency_key', '=', key)
    .executeTakeFirst();
  return row?.version ?? null;
}

/** @returns false when the id or the code is there already */
export async function insertPlan(
  trx: SiteTransaction,
  plan: { readonly siteId: string; readonly id: string; readonly bookingId: string | null; readonly shortCode: string; readonly now: Date },
): Promise<boolean> {
  const added = await trx
    .insertInto('plan')
    .values({
      site_id: plan.siteId,
      id: plan.id,
      booking_id: plan.bookingId,
      short_code: plan.shortCode,
      created_at: plan.now,
    })
    .onConflict((conflict) => conflict.doNothing())
    .executeTakeFirst();
  return added.numInsertedOrUpdatedRows === 1n;
}

export interface NewPlanVersion {
  readonly siteId: string;
  readonly planId: string;
  readonly version: number;
  readonly document: PlanDocument;
  readonly result: PlanResultDocument;
  readonly engineVersion: string;
  readonly inputHash: string;
  readonly idempotencyKey: string;
  readonly note: string;
  readonly createdBy: string;
  readonly now: Date;
}

export async function insertPlanVersion(trx: SiteTransaction, next: NewPlanVersion, state: PlanState): Promise<void> {
  await trx
    .insertInto('plan_version')
    .values({
      site_id: next.siteId,
      plan_id: next.planId,
      version: next.version,
      data: JSON.stringify(next.document),
      result: JSON.stringify(next.result),
      engine_version: next.engineVersion,
      policy_version: next.document.policyVersion,
      input_hash: next.inputHash,
      idempotency_key: next.idempotencyKey,
      note: next.note,
      created_by: next.createdBy,
      created_at: next.now,
    })
    .execute();
  await trx
    .updateTable('plan')
    .set({ current_version: next.version, state })
    .where('site_id', '=', next.siteId)
    .where('id', '=', next.planId)
    .execute();
}

export async function setPlanState(trx: SiteTransaction, siteId: string, id: string, state: PlanState): Promise<void> {
  await trx.updateTable('plan').set({ state }).where('site_id', '=', siteId).where('id', '=', id).execute();
}

export async function insertSignOff(
  trx: SiteTransaction,
  signOff: {
    readonly siteId: string;
    readonly planId: string;
    readonly planVersion: number;
    readonly decision: SignOffDecision;
    readonly reason: string;
    readonly signedBy: string;
    readonly now: Date;
  },
): Promise<void> {
  await trx
    .insertInto('sign_off')
    .values({
      site_id: signOff.siteId,
      plan_id: signOff.planId,
      plan_version: signOff.planVersion,
      decision: signOff.decision,
      reason: signOff.reason,
      signed_by: signOff.signedBy,
      signed_at: signOff.now,
    })
    .execute();
}
