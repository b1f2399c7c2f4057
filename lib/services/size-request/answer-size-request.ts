import { inTransaction, resolveToken } from '@/db/client';
import { findSizeRequest, lockSizeRequest, settleSizeRequest } from '@/db/queries/size-request/size-requests';
import { insertSizeReadings } from '@/db/queries/size-reading/size-readings';
import { findSite } from '@/db/queries/site/sites';
import { authorise, linkActor, NOBODY_ID } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { findSlips, toReadings } from '@/lib/domain/size-request/answer';
import { localDay } from '@/lib/domain/site/local-day';
import { parseInput } from '@/lib/schemas/parse-input';
import { sizeAnswerInput, type SizeFormView } from '@/lib/schemas/size-request';
import { recordAudit } from '../audit/record-audit';
import { refreshBookingState } from '../booking/refresh-booking-state';
import { hashSecretToken } from '../session/secret-token';
import { type Claim, readClaim, writeClaim } from './request-link';

/** Unknown, answered, cancelled, expired: all the same to whoever holds a link. */
const ENDED = () => new ServiceError('gone', { message: 'This link has been answered, taken back, or is too old. If you still want to send measurements, ask the place that wrote to you for a new one.' });

export interface OpenedForm {
  readonly view: SizeFormView;
  readonly claim: string;
}

async function readForm({ siteId, requestId }: Claim, now: Date): Promise<SizeFormView> {
  return inTransaction(siteId, async (trx) => {
    const request = await findSizeRequest(trx, siteId, requestId);
    const site = await findSite(trx, siteId);
    if (!request || !site || request.status !== 'open' || request.expiresAt <= now) throw ENDED();
    return { siteName: site.name, expiresAt: request.expiresAt.toISOString() };
  });
}

/** Exchanges a link for a claim. It uses nothing up: a mail scanner that opens links takes nothing away. */
export async function openSizeRequest(input: { readonly token: string }, now: Date = new Date()): Promise<OpenedForm> {
  const match = await resolveToken('size-request', hashSecretToken(String(input.token).slice(0, 200)));
  if (!match) throw ENDED();
  const claim = { siteId: match.siteId, requestId: match.id };
  return { view: await readForm(claim, now), claim: writeClaim(claim, now) };
}

/** The form again, for a page that was reloaded. */
export async function reopenSizeRequest(claim: string | undefined, now: Date = new Date()): Promise<SizeFormView> {
  const read = readClaim(claim, now);
  if (!read) throw ENDED();
  return readForm(read, now);
}

/**
 * Takes an answer: readings that are reported, the request settled and its address erased, the booking's state with
 * them. What looks like a slip is sent back once and taken when it is confirmed; what cannot be is refused.
 */
export async function answerSizeRequest(claim: string | undefined, input: unknown, now: Date = new Date()): Promise<SizeFormView> {
  const read = readClaim(claim, now);
  if (!read) throw ENDED();
  const { confirmed, ...given } = parseInput(sizeAnswerInput, input);
  const slips = findSlips(given).filter(({ refused }) => refused || !confirmed);
  if (slips.length > 0) {
    throw new ServiceError('invalid', {
      message: 'Please look at these once more.',
      fields: Object.fromEntries(slips.map(({ field, text }) => [field, text])),
      details: { mayConfirm: slips.every(({ refused }) => !refused) },
    });
  }
  const { siteId, requestId } = read;
  const actor = linkActor(siteId, requestId);
  await inTransaction(siteId, async (trx) => {
    const request = await lockSizeRequest(trx, siteId, requestId);
    if (!request || request.expiresAt <= now || !(await settleSizeRequest(trx, siteId, requestId, 'answered', now))) throw ENDED();
    authorise(actor, 'size-request.answer', request);
    const takenOn = localDay(now);
    const readings = toReadings(given).map((reading) => ({ ...reading, takenOn }));
    await insertSizeReadings(trx, siteId, request.bookingId, readings, { by: NOBODY_ID, at: now });
    await recordAudit(trx, { actor }, {
      action: 'size-request.answer', subjectType: 'size-request', subjectId: requestId, fields: readings.map(({ quantity }) => quantity),
    });
    await refreshBookingState(trx, { siteId, bookingId: request.bookingId, now });
  });
  return inTransaction(siteId, async (trx) => ({ siteName: (await findSite(trx, siteId))?.name ?? '', expiresAt: now.toISOString() }));
}
