import { inTransaction, type SiteTransaction } from '@/db/client';
import { findBooking, lockBooking } from '@/db/queries/booking/bookings';
import { insertSizeRequest, listSizeRequests, lockSizeRequest, noteSizeRequestSent, settleSizeRequest } from '@/db/queries/size-request/size-requests';
import { authorise } from '@/lib/domain/access';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import { maskAddress, REQUEST_DAYS } from '@/lib/domain/size-request/size-request';
import { queueMail } from '@/lib/mail';
import { parseInput } from '@/lib/schemas/parse-input';
import { askSizeInput, sendSizeRequestInput } from '@/lib/schemas/size-request';
import { randomUUID } from 'node:crypto';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { hashSecretToken } from '../session/secret-token';
import { requestLink, requestSecret } from './request-link';
import { sealAddress } from './sealed-address';

export interface AskedSize {
  readonly id: string;
  /** To hand over by other means. */
  readonly link: string;
}

const expiryFrom = (now: Date) => new Date(now.getTime() + REQUEST_DAYS * 86_400_000);

async function mail(trx: SiteTransaction, siteId: string, request: { id: string; address?: string; reminder: boolean; now: Date }): Promise<void> {
  const { id, address, now, reminder } = request;
  const expiresAt = expiryFrom(now);
  await noteSizeRequestSent(trx, siteId, id, {
    at: now, expiresAt, ...(address ? { address: { sealed: sealAddress(id, address), masked: maskAddress(address) } } : {}),
  });
  await queueMail(trx, siteId, { kind: 'size-request', to: { sizeRequestId: id }, payload: { expiresAt: expiresAt.toISOString(), reminder } });
}

/** Asks for sizes by a link. With an address it is mailed; the audit log names neither. A booking has one open request. */
export async function askSize(context: ServiceContext, input: unknown): Promise<AskedSize> {
  const { actor } = context;
  const { bookingId, address } = parseInput(askSizeInput, input);
  const { siteId } = actor;
  const now = nowOf(context);
  return inTransaction(siteId, async (trx) => {
    await lockBooking(trx, siteId, bookingId);
    const booking = await findBooking(trx, siteId, bookingId);
    authorise(actor, 'size-request.send', booking && { siteId: booking.siteId, id: booking.id });
    const open = (await listSizeRequests(trx, siteId, bookingId)).find(({ status }) => status === 'open');
    if (open && open.expiresAt > now) throw new ServiceError('conflict', { message: 'This booking has an open size request already. Send that one again, or cancel it.' });
    if (open) await settleSizeRequest(trx, siteId, open.id, 'expired', now);
    const id = randomUUID();
    await insertSizeRequest(trx, {
      siteId, id, bookingId, tokenHash: hashSecretToken(requestSecret(id)), expiresAt: expiryFrom(now), askedBy: authorOf(actor), askedAt: now,
    });
    if (address) await mail(trx, siteId, { id, address, reminder: false, now });
    await recordAudit(trx, context, { action: 'size-request.send', subjectType: 'size-request', subjectId: id, fields: [address ? 'mailed' : 'link'] });
    return { id, link: requestLink(id) };
  });
}

/** Mails an open request again, to the same address or to another. The link stays the same and lasts longer. */
export async function sendSizeRequest(context: ServiceContext, input: unknown): Promise<AskedSize> {
  const { actor } = context;
  const { id, address } = parseInput(sendSizeRequestInput, input);
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const request = await lockSizeRequest(trx, siteId, id);
    authorise(actor, 'size-request.send', request);
    if (request.status !== 'open') throw new ServiceError('conflict', { message: `This size request is ${request.status}.` });
    if (!address && request.addressSealed === '') throw invalidField('address', 'nothing given; allowed: the address to send to');
    await mail(trx, siteId, { id, reminder: request.sentCount > 0 && !address, now: nowOf(context), ...(address ? { address } : {}) });
    await recordAudit(trx, context, { action: 'size-request.send', subjectType: 'size-request', subjectId: id, fields: [address ? 'mailed' : 'reminded'] });
    return { id, link: requestLink(id) };
  });
}

/** The link of an open request once more, for copying. */
export async function copySizeRequestLink(context: ServiceContext, input: { readonly id: string }): Promise<AskedSize> {
  const { actor } = context;
  return inTransaction(actor.siteId, async (trx) => {
    const request = await lockSizeRequest(trx, actor.siteId, input.id);
    authorise(actor, 'size-request.send', request);
    if (request.status !== 'open') throw new ServiceError('conflict', { message: `This size request is ${request.status}.` });
    await recordAudit(trx, context, { action: 'size-request.send', subjectType: 'size-request', subjectId: request.id, fields: ['link'] });
    return { id: request.id, link: requestLink(request.id) };
  });
}
