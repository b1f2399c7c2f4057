import { beforeEach, describe, expect, it } from 'vitest';
import { getBooking } from '@/lib/services/booking/get-booking';
import { openBench } from '@/lib/services/booking/open-bench';
import { getKeepClearRequest } from '@/lib/services/keep-clear-request/get-keep-clear-request';
import { requestKeepClear } from '@/lib/services/keep-clear-request/request-keep-clear';
import { movePlan } from '@/lib/services/plan/move-plan';
import { savePlan } from '@/lib/services/plan/save-plan';
import { as, equipSite, NOW, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

let here: EquippedSite;
beforeEach(async () => {
  here = await equipSite();
});

const WHOLE = { keepClearPreset: 'whole-picture', keepClear: { area: { kind: 'whole-picture' }, followsWindow: false }, note: '' };
const ask = (form: object, actor = here.radiologist, minutes = 0) =>
  requestKeepClear({ actor, now: new Date(NOW.getTime() + minutes * 60_000) }, { bookingId: here.booking.id, ...WHOLE, ...form });
const rows = () => here.site.withApp((trx) => trx.selectFrom('keep_clear_request').select('id').execute());
const bench = () => openBench(as(here.radiographer), { bookingId: here.booking.id });

describe('a keep-clear area asked for by a radiologist', () => {
  it('arrives at the bench under the name of who asked, laid into the patient, and the newest counts', async () => {
    expect(await getKeepClearRequest(as(here.coordinator), { bookingId: here.booking.id })).toBeNull();
    await sizeBooking(here);
    expect((await bench()).requested).toBeUndefined();
    await ask({});
    await ask({ keepClearPreset: 'kidneys', toleratedFoldOutsidePct: 12, note: 'Left renal mass.' }, here.radiologist, 1);
    const { requested, policy } = await bench();
    expect(requested).toMatchObject({
      keepClearPreset: 'kidneys', toleratedFoldOutsidePct: 12, note: 'Left renal mass.', by: here.radiologist.displayName,
      keepClear: { area: { kind: 'box', label: 'Kidneys' } },
    });
    expect(policy.policy.tolerateFoldOutsidePct).toBe(12);
    expect(await rows()).toHaveLength(2);
  });

  it('changes the verdict as booked, which lists show', async () => {
    await sizeBooking(here);
    const before = await getBooking(as(here.radiographer), { id: here.booking.id });
    expect(before.verdict).toBe('fold-in-keep-clear');
    // A box behind everything that folds: 10 mm in the middle of the body.
    const small = { xMm: [-5, 5], yMm: [-5, 5], zMm: [-5, 5] };
    await ask({ keepClearPreset: 'own', keepClear: { area: { kind: 'box', box: small, label: 'Centre' }, followsWindow: false } });
    expect((await getBooking(as(here.radiographer), { id: here.booking.id })).verdict).toBe('fold-outside-keep-clear');
  });

  it('asks for a sign-off when more fold is left beside it than is tolerated', async () => {
    await sizeBooking(here);
    const small = { xMm: [-5, 5], yMm: [-5, 5], zMm: [-5, 5] };
    const form = { keepClearPreset: 'own', keepClear: { area: { kind: 'box', box: small }, followsWindow: false } };
    await ask(form);
    const keepClear = (await bench()).requested!.keepClear;
    const relaxed = await savePlan(as(here.radiographer), planBody(await bench(), { plan: { keepClear: keepClear as never } }));
    expect(relaxed.results.map(({ verdict }) => verdict)).not.toContain('fold-in-keep-clear');
    expect(relaxed.needsSignOff).toBe(false);
    await ask({ ...form, toleratedFoldOutsidePct: 0 }, here.radiologist, 1);
    const moved = await movePlan(as(here.radiographer), { id: relaxed.id, expectedVersion: 1, to: 'for use' });
    expect(moved.needsSignOff).toBe(true);
    await expect(movePlan(as(here.radiographer), { id: relaxed.id, expectedVersion: 1, to: 'used' })).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is refused from others, for another site’s booking, and when it is no area of this body part', async () => {
    const other = await equipSite();
    for (const actor of [here.radiographer, here.coordinator, other.radiologist]) {
      await expect(ask({}, actor)).rejects.toMatchObject({ code: 'not-found' });
    }
    await expect(ask({ keepClearPreset: 'prostate' })).rejects.toMatchObject({ code: 'invalid', fields: { keepClearPreset: expect.stringContaining('liver') } });
    await expect(ask({ toleratedFoldOutsidePct: 101 })).rejects.toMatchObject({ code: 'invalid' });
    await expect(ask({ keepClear: { area: { kind: 'box' }, followsWindow: false } })).rejects.toMatchObject({ code: 'invalid' });
    expect(await rows()).toEqual([]);
  });

  it('is written to the log with the names of its fields and none of its values', async () => {
    await ask({ note: 'Nothing of this in the log.' });
    const events = await here.site.withApp((trx) =>
      trx.selectFrom('audit_event').select(['fields', 'subject_id', 'actor_id']).where('action', '=', 'keep-clear.request').execute(),
    );
    expect(events).toEqual([{ fields: ['keepClear', 'toleratedFoldOutsidePct'], subject_id: here.booking.id, actor_id: here.radiologist.userId }]);
  });
});
