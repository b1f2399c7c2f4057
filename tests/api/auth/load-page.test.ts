import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { loadPage } from '@/lib/http/load-page';
import { getBooking } from '@/lib/services/booking/get-booking';
import { openBench } from '@/lib/services/booking/open-bench';
import { getPlan } from '@/lib/services/plan/get-plan';
import { getScanner } from '@/lib/services/scanner/get-scanner';
import { equipSite, type EquippedSite } from '@/tests/support/equipped-site';

const session = vi.hoisted(() => ({ actor: null as unknown }));
vi.mock('@/lib/auth/current-actor', () => ({ requireActor: async () => session.actor }));
vi.mock('next/navigation', () => ({
  notFound: () => {
    throw new Error('our own 404');
  },
}));

let here: EquippedSite;
beforeAll(async () => {
  here = await equipSite();
  session.actor = here.lead;
});

describe('a page about one record', () => {
  const pages: [string, (id: string) => Promise<unknown>][] = [
    ['a plan', (id) => loadPage((context) => getPlan(context, { id }))],
    ['a booking', (id) => loadPage((context) => getBooking(context, { id }))],
    ['the bench', (bookingId) => loadPage((context) => openBench(context, { bookingId }))],
    ['a scanner', (id) => loadPage((context) => getScanner(context, { id }))],
  ];

  it.each(pages)('of %s is our own 404 for ids that are none, unknown, or another site’s', async (_, open) => {
    const elsewhere = await equipSite();
    for (const id of ['abc', '%00', '\u0000', "' or 1=1", '../..', randomUUID(), elsewhere.booking.id, elsewhere.scanner.id]) {
      await expect(open(id), id).rejects.toThrow('our own 404');
    }
  });

  it('is shown for an id of its own, and a fault of ours stays one', async () => {
    expect(await loadPage((context) => getBooking(context, { id: here.booking.id }))).toMatchObject({ id: here.booking.id });
    expect(await loadPage((context) => getScanner(context, { id: here.scanner.id }))).toMatchObject({ id: here.scanner.id });
    await expect(loadPage(async () => Promise.reject(new TypeError('a fault')))).rejects.toThrow('a fault');
  });
});
