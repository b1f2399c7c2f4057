import { randomUUID } from 'node:crypto';
import { beforeEach, describe, expect, it } from 'vitest';
import type { PlanView } from '@/lib/schemas/plan';
import { getBooking } from '@/lib/services/booking/get-booking';
import { openBench } from '@/lib/services/booking/open-bench';
import { listOutcomes } from '@/lib/services/outcome/list-outcomes';
import { recordOutcome } from '@/lib/services/outcome/record-outcome';
import { getPlan } from '@/lib/services/plan/get-plan';
import { movePlan } from '@/lib/services/plan/move-plan';
import { savePlan } from '@/lib/services/plan/save-plan';
import { signOffPlan } from '@/lib/services/plan/sign-off-plan';
import { phaseSettingNumber } from '@/lib/presentation/oversampling-used';
import { as, equipSite, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

let here: EquippedSite;
let plan: PlanView;
beforeEach(async () => {
  here = await equipSite();
  await sizeBooking(here);
  const bench = await openBench(as(here.radiographer), { bookingId: here.booking.id });
  plan = await savePlan(as(here.radiographer), planBody(bench));
});

const sequences = (change: Record<number, number> = {}) =>
  plan.sequences.map(({ id, prescription }, index) => ({ id, phase: change[index] ?? phaseSettingNumber(prescription, plan.scanner).value }));
const record = (form: object = {}, id: string = randomUUID(), actor = here.radiographer) =>
  recordOutcome(as(actor), {
    planId: plan.id, id, expectedVersion: 1, wrap: 'none', sequences: sequences(), minutes: 4.5, repeated: false, note: '', ...form,
  });
const stateNow = async () => (await getPlan(as(here.radiographer), { id: plan.id })).state;
const signed = async () => {
  await movePlan(as(here.radiographer), { id: plan.id, expectedVersion: 1, to: 'for use' });
  await signOffPlan(as(here.radiologist), { id: plan.id, expectedVersion: 1, decision: 'signed off' });
};
const stored = () => here.site.withApp((trx) => trx.selectFrom('outcome').select('id').execute());

describe('the outcome of a plan', () => {
  it('left as it was filled in stores the planned lines, makes the plan used, and the booking shows it', async () => {
    await signed();
    const outcome = await record();
    expect(outcome).toMatchObject({ wrap: 'none', minutes: 4.5, repeated: false, planVersion: 1, by: here.radiographer.displayName });
    expect(outcome.sequences.map(({ acquiredLines }) => acquiredLines)).toEqual(plan.sequences.map(({ prescription }) => prescription.acquiredLines));
    expect(await stateNow()).toBe('used');
    expect((await getBooking(as(here.coordinator), { id: here.booking.id })).planState).toBe('used');
    expect((await listOutcomes(as(here.radiologist), { planId: plan.id })).outcomes).toEqual([outcome]);
  });

  it('a setting that was changed is kept as the lines the scanner makes of it', async () => {
    await signed();
    const { prescription } = plan.sequences[0]!;
    // 12.5 % of the lines across the FOV, rounded up to the scanner's step of one line.
    const outcome = await record({ sequences: sequences({ 0: 12.5 }) });
    expect(outcome.sequences[0]!.acquiredLines).toBe(Math.ceil(prescription.linesAcrossFov * 1.125));
  });

  it('sent twice is one; a correction stands beside the first', async () => {
    await signed();
    const id = randomUUID();
    const first = await record({}, id);
    expect(await record({}, id)).toEqual(first);
    expect(await stored()).toHaveLength(1);
    await record({ wrap: 'inside', repeated: true });
    const { outcomes } = await listOutcomes(as(here.radiographer), { planId: plan.id });
    expect(outcomes.map(({ wrap }) => wrap).sort()).toEqual(['inside', 'none']);
    expect(await stateNow()).toBe('used');
  });

  it('waits for the sign-off that the plan needs, and nothing is half stored', async () => {
    await movePlan(as(here.radiographer), { id: plan.id, expectedVersion: 1, to: 'for use' });
    await expect(record()).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('sign this plan off') });
    expect(await stored()).toEqual([]);
    expect(await stateNow()).toBe('for use');
  });

  it('is refused from those who may not, from another site, and with values that cannot be', async () => {
    await signed();
    const other = await equipSite();
    for (const actor of [here.coordinator, here.radiologist, other.radiographer]) {
      await expect(record({}, randomUUID(), actor)).rejects.toMatchObject({ code: 'not-found' });
    }
    for (const form of [
      { wrap: 'some' }, { minutes: -1 }, { sequences: [] }, { sequences: [{ id: 'unknown', phase: 0 }] }, { sequences: sequences({ 0: -3 }) },
    ]) {
      await expect(record(form)).rejects.toMatchObject({ code: 'invalid' });
    }
    expect(await stored()).toEqual([]);
    expect(await stateNow()).toBe('signed off');
  });

  it('is written to the log with names of fields only', async () => {
    await signed();
    const { id } = await record({ note: 'Some wrap at the arms.' });
    const events = await here.site.withApp((trx) =>
      trx.selectFrom('audit_event').select(['action', 'subject_id', 'fields']).where('action', 'in', ['outcome.record', 'plan.use']).orderBy('action').execute(),
    );
    expect(events).toEqual([
      { action: 'outcome.record', subject_id: id, fields: ['wrap', 'sequences', 'minutes', 'repeated', 'note'] },
      { action: 'plan.use', subject_id: plan.id, fields: ['state'] },
    ]);
  });
});
