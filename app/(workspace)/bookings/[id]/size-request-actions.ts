'use server';

import { revalidatePath } from 'next/cache';
import { runAction } from '@/lib/http/run-action';
import { askSize, copySizeRequestLink, sendSizeRequest } from '@/lib/services/size-request/ask-size';
import { cancelSizeRequest } from '@/lib/services/size-request/end-size-request';

const shown = (bookingId: string) => revalidatePath(`/bookings/${bookingId}`);

export async function askSizeAction(bookingId: string, address?: string) {
  return runAction('ask for sizes', async (context) => {
    const asked = await askSize(context, { bookingId, ...(address ? { address } : {}) });
    shown(bookingId);
    return asked;
  });
}

export async function sendRequestAction(bookingId: string, id: string, address?: string) {
  return runAction('send a size request again', async (context) => {
    const sent = await sendSizeRequest(context, { id, ...(address ? { address } : {}) });
    shown(bookingId);
    return sent;
  });
}

export async function copyLinkAction(id: string) {
  return runAction('show the link of a size request', (context) => copySizeRequestLink(context, { id }));
}

export async function cancelRequestAction(bookingId: string, id: string) {
  return runAction('cancel a size request', async (context) => {
    await cancelSizeRequest(context, { id });
    shown(bookingId);
    return { id };
  });
}
