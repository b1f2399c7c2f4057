import { randomBytes } from 'node:crypto';
import { inTransaction, type SiteTransaction } from '@/db/client';
import { findBooking, lockBooking } from '@/db/queries/booking/bookings';
import { findKeepClearRequest } from '@/db/queries/keep-clear-request/keep-clear-requests';
import { findPlan, findPlanOfBooking, insertPlan, insertPlanVersion, lockPlan, versionOfKey } from '@/db/queries/plan/plans';
import { findProtocol } from '@/db/queries/protocol/protocols';
import { findScanner } from '@/db/queries/scanner/scanners';
import { findPolicy } from '@/db/queries/site-policy/policies';
import { authorise } from '@/lib/domain/access';
import { DomainError } from '@/lib/domain/case/model';
import { invalidField, ServiceError, staleVersion } from '@/lib/domain/errors';
import { policyForExam } from '@/lib/domain/keep-clear-request/document';
import type { PlanHead } from '@/lib/domain/plan/plan';
import { SHORT_CODE_LENGTH, shortCodeFrom } from '@/lib/domain/plan/short-code';
import { stateAfterSave } from '@/lib/domain/plan/transitions';
import { parseInput } from '@/lib/schemas/parse-input';
import { idempotencyKeySchema, type PlanInput, type PlanView, savePlanBody } from '@/lib/schemas/plan';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { refreshBookingState } from '../booking/refresh-booking-state';
import { readPlannedSetup } from '../booking/read-booking-setup';
import { nowOf, type ServiceContext } from '../context';
import { effectivePolicy } from '../site-policy/effective-policy';
import { assessPlan, type AssessedPlan, isStoredPlan } from './assess-plan';
import { logDifferences } from './log-differences';
import { toPlanView } from './to-plan-view';

/** 29^8 codes a site: a second draw is needed once in a lifetime, a third never. */
const CODE_DRAWS = 3;

/**
 * One booking has one plan at a time: of two people who begin at once, the second meets the first one's plan and is
 * shown it, instead of putting a plan of their own in front of it unseen. After a used plan a new one may follow.
 */
async function refuseSecondPlan(
  trx: SiteTransaction,
  siteId: string,
  { id, bookingId }: { readonly id: string; readonly bookingId: string },
): Promise<void> {
  await lockBooking(trx, siteId, bookingId);
  const first = await findPlanOfBooking(trx, siteId, bookingId);
  if (!first || first.id === id || first.state === 'used') return;
  throw new ServiceError('conflict', {
    message: 'Someone else has made a plan for this booking in the meantime. Nothing was overwritten.',
    details: { currentVersion: first.currentVersion, planId: first.id },
  });
}

/** The plan's row, locked; made first when the bench has just drawn its id. */
async function openPlan(trx: SiteTransaction, context: ServiceContext, id: string, plan: PlanInput): Promise<PlanHead> {
  const { actor } = context;
  const { siteId } = actor;
  const known = await lockPlan(trx, siteId, id);
  if (known) {
    authorise(actor, 'plan.edit', known);
    return known;
  }
  authorise(actor, 'plan.create');
  if (plan.bookingId !== null) {
    const booking = await findBooking(trx, siteId, plan.bookingId);
    if (!booking) throw invalidField('plan.bookingId', 'not a booking of this site; allowed: the id of a booking, or null');
    await refuseSecondPlan(trx, siteId, { id, bookingId: plan.bookingId });
  }
  for (let draw = 0; draw < CODE_DRAWS; draw += 1) {
    const shortCode = shortCodeFrom(randomBytes(SHORT_CODE_LENGTH));
    await insertPlan(trx, { siteId, id, bookingId: plan.bookingId, shortCode, now: nowOf(context) });
    // Either ours, or the same id saved from another tab in the same moment; its lock is waited for.
    const made = await lockPlan(trx, siteId, id);
    if (made) return made.shortCode === shortCode ? { ...made, currentVersion: 0 } : made;
  }
  throw new ServiceError('unavailable');
}

/** The server's answer with today's scanner and policy. */
async function assessToday(trx: SiteTransaction, siteId: string, plan: PlanInput): Promise<AssessedPlan> {
  const scanner = await findScanner(trx, siteId, plan.scannerId);
  if (!scanner) throw invalidField('plan.scannerId', 'not a scanner of this site; allowed: one of the site’s scanners');
  if (plan.protocolId !== null && !(await findProtocol(trx, siteId, plan.protocolId, plan.protocolVersion))) {
    throw invalidField('plan.protocolId', 'not a protocol of this site in that version; allowed: one it has, or null');
  }
  const policy = effectivePolicy(await findPolicy(trx, siteId));
  const request = plan.bookingId === null ? null : await findKeepClearRequest(trx, siteId, plan.bookingId);
  try {
    return assessPlan(plan, {
      scannerVersion: scanner.version,
      scanner: scanner.document.scanner,
      policyVersion: policy.version,
      policy: policyForExam(policy.policy, request?.document.toleratedFoldOutsidePct),
    });
  } catch (error) {
    if (error instanceof DomainError) throw invalidField(`plan.${error.argument}`, error.message);
    throw error;
  }
}

/** A version as it is shown. A key that is sent again must bring the plan it made: another one would be lost unsaid. */
async function viewOf(trx: SiteTransaction, siteId: string, id: string, version: number, sentAgain?: PlanInput): Promise<PlanView> {
  const plan = await findPlan(trx, siteId, id, version);
  if (!plan) throw new ServiceError('not-found');
  if (sentAgain && !isStoredPlan(sentAgain, plan)) {
    throw invalidField('Idempotency-Key', 'a key that saved another plan given; allowed: the same plan again, or a new key');
  }
  return toPlanView(plan, await readPlannedSetup(trx, plan));
}

interface SavePlan {
  readonly id: string;
  /** The same key again returns the version it made and saves nothing twice. */
  readonly idempotencyKey: unknown;
  readonly body: unknown;
}

/**
 * Saves a whole plan as its next version. The server works every sequence out again with today's scanner and policy;
 * its answer is what is stored, and where the bench had another one this is logged and shown.
 */
export async function savePlan(context: ServiceContext, input: SavePlan): Promise<PlanView> {
  const { actor } = context;
  authorise(actor, 'plan.edit');
  const { expectedVersion, plan } = parseInput(savePlanBody, input.body);
  const idempotencyKey = parseInput(idempotencyKeySchema, input.idempotencyKey);
  const { siteId } = actor;
  const now = nowOf(context);
  return inTransaction(siteId, async (trx) => {
    const head = await openPlan(trx, context, input.id, plan);
    const repeated = await versionOfKey(trx, siteId, head.id, idempotencyKey);
    if (repeated !== null) return viewOf(trx, siteId, head.id, repeated, plan);
    if (head.currentVersion !== expectedVersion) throw staleVersion(head.currentVersion);
    if (head.state === 'used') throw new ServiceError('conflict', { message: 'A used plan stays as it was used. Make a new plan instead.' });
    if (head.bookingId !== plan.bookingId) throw invalidField('plan.bookingId', 'another booking than the plan was made for; allowed: the same');
    const assessed = await assessToday(trx, siteId, plan);
    const version = expectedVersion + 1;
    const next = { siteId, planId: head.id, version, ...assessed, idempotencyKey, note: plan.note, createdBy: authorOf(actor), now };
    await insertPlanVersion(trx, next, stateAfterSave(head.state));
    await recordAudit(trx, context, {
      action: version === 1 ? 'plan.create' : 'plan.edit', subjectType: 'plan', subjectId: head.id, fields: ['version'],
    });
    logDifferences(head.id, version, assessed);
    if (head.bookingId !== null) await refreshBookingState(trx, { siteId, bookingId: head.bookingId, now });
    return viewOf(trx, siteId, head.id, version);
  });
}
