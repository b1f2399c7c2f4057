import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { QUEUES } from '@/lib/jobs';
import { getBooking } from '@/lib/services/booking/get-booking';
import { openBench } from '@/lib/services/booking/open-bench';
import { refreshBookings } from '@/lib/services/booking/refresh-bookings';
import { savePlan } from '@/lib/services/plan/save-plan';
import { editPolicy } from '@/lib/services/site-policy/edit-policy';
import { editProtocol } from '@/lib/services/protocol/edit-protocol';
import { editScanner } from '@/lib/services/scanner/edit-scanner';
import { as, equipSite, NOW, policyForm, scannerForm, sequences, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { ownerDatabase } from '@/tests/support/database';
import { planBody } from '@/tests/support/plan-body';

/** Jobs of a site that wait to be done, as the worker will read them. */
async function waiting({ site }: EquippedSite) {
  const { rows } = await sql<{ data: unknown }>`
    select data from pgboss.job where name = 'refresh-bookings' and state = 'created' and data ->> 'siteId' = ${site.siteId}
    order by created_on`.execute(ownerDatabase());
  return rows.map(({ data }) => QUEUES['refresh-bookings'].parse(data));
}

const wide = () => sequences().map((sequence) => ({ ...sequence, fovPhaseMm: 480, fovReadoutMm: 500 }));
const protocolForm = ({ protocol }: EquippedSite) => ({
  name: protocol.name, region: protocol.region, keepClearPreset: protocol.keepClearPreset, keepClear: protocol.keepClear, sequences: wide(),
});

describe('what lists show of a booking', () => {
  it('is worked out again after its protocol, its scanner or the policy changed, and shown as stale until then', async () => {
    const here = await equipSite();
    await sizeBooking(here);
    const { siteId } = here.site;
    const read = () => getBooking(as(here.radiographer), { id: here.booking.id });
    expect(await read()).toMatchObject({ verdict: 'fold-in-keep-clear', stale: true });
    expect(await refreshBookings({ siteId }, NOW)).toBe(1);
    expect(await read()).toMatchObject({ verdict: 'fold-in-keep-clear', stale: false, result: 'size-needed' });
    expect(await refreshBookings({ siteId }, NOW)).toBe(0);

    await editProtocol(as(here.lead), { id: here.protocol.id, expectedVersion: 1, form: protocolForm(here) });
    expect(await read()).toMatchObject({ verdict: 'fold-in-keep-clear', stale: true });
    expect(await refreshBookings({ siteId }, NOW)).toBe(1);
    expect(await read()).toMatchObject({ verdict: 'no-fold-expected', stale: false });

    await editScanner(as(here.lead), { id: here.scanner.id, expectedVersion: 1, form: scannerForm({ boreDiameterMm: 650 }) });
    expect(await refreshBookings({ siteId }, NOW)).toBe(1);
    await editPolicy(as(here.lead), { expectedVersion: 0, form: { ...policyForm(), sureAt: 0.9 } });
    expect(await refreshBookings({ siteId }, NOW)).toBe(1);
    const jobs = await waiting(here);
    expect(jobs.length).toBeGreaterThanOrEqual(5);
    for (const job of jobs) expect(job).toEqual({ siteId });
  });

  it('stays with the plan once there is one, and a change of the set-up leaves the past as it was', async () => {
    const here = await equipSite();
    await sizeBooking(here);
    const { siteId } = here.site;
    await refreshBookings({ siteId }, NOW);
    const june = { ...as(here.lead), now: new Date('2026-06-01T00:00:00Z') };
    await editPolicy(june, { expectedVersion: 0, form: { ...policyForm(), sureAt: 0.9 } });
    expect(await refreshBookings({ siteId }, june.now)).toBe(0);
    const bench = await openBench(as(here.radiographer), { bookingId: here.booking.id });
    await savePlan(as(here.radiographer), planBody(bench));
    const planned = await getBooking(as(here.radiographer), { id: here.booking.id });
    await refreshBookings({ siteId }, NOW);
    expect(await getBooking(as(here.radiographer), { id: here.booking.id })).toMatchObject({ verdict: planned.verdict, planState: 'draft' });
  });

  it('is checked for this site alone', async () => {
    const [here, other] = [await equipSite(), await equipSite()];
    await sizeBooking(other);
    const before = await getBooking(as(other.radiographer), { id: other.booking.id });
    expect(await refreshBookings({ siteId: here.site.siteId }, NOW)).toBe(1);
    expect(await getBooking(as(other.radiographer), { id: other.booking.id })).toEqual(before);
  });
});
