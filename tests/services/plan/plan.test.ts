import { beforeEach, describe, expect, it, vi } from 'vitest';
import { rankRemedies } from '@/lib/physics';
import type { BenchView } from '@/lib/schemas/booking';
import type { PlanView } from '@/lib/schemas/plan';
import { getBooking } from '@/lib/services/booking/get-booking';
import { openBench } from '@/lib/services/booking/open-bench';
import { getPlan, getPlanByShortCode } from '@/lib/services/plan/get-plan';
import { getNewestVersion } from '@/lib/services/plan/get-newest-version';
import { movePlan } from '@/lib/services/plan/move-plan';
import { savePlan } from '@/lib/services/plan/save-plan';
import { signOffPlan } from '@/lib/services/plan/sign-off-plan';
import { editPolicy } from '@/lib/services/site-policy/edit-policy';
import { as, equipSite, policyForm, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

let here: EquippedSite;
let bench: BenchView;
beforeEach(async () => {
  here = await equipSite();
  await sizeBooking(here);
  bench = await openBench(as(here.radiographer), { bookingId: here.booking.id });
});

const versions = (id: string) =>
  here.site.withApp((trx) => trx.selectFrom('plan_version').select(['version', 'input_hash']).where('plan_id', '=', id).orderBy('version').execute());

/** The bench's sequences with the first remedy of the first one adopted. */
function remedied() {
  return bench.protocol.sequences.map(({ id, prescription }, index) => {
    if (index > 0) return { id, prescription, adopted: [] };
    const question = {
      patient: bench.sizeRecord.patient!, prescription, keepClear: bench.protocol.keepClear,
      scanner: bench.scanner.scanner, policy: bench.policy.policy,
    };
    const { key, sentence, costTenths, prescription: after } = rankRemedies(question).remedies[0]!;
    return { id, prescription: after, adopted: [{ key, sentence, costTenths }] };
  });
}

describe('the newest version of a booking’s plan', () => {
  const ask = (actor = here.radiologist) => getNewestVersion(as(actor), { bookingId: here.booking.id });

  it('is told with who saved it, before and after each save, and to nobody of another site', async () => {
    expect(await ask()).toEqual({ newest: null });
    const request = planBody(bench);
    const first = await savePlan(as(here.radiographer), request);
    expect(await ask()).toEqual({
      newest: { planId: first.id, state: 'draft', version: 1, savedBy: first.savedBy, savedAt: first.savedAt },
    });
    const again = planBody(bench, { expectedVersion: 1 });
    await savePlan(as(here.lead), { ...again, id: first.id });
    expect(await ask(here.coordinator)).toMatchObject({ newest: { planId: first.id, version: 2 } });
    const elsewhere = await equipSite();
    await expect(getNewestVersion(as(elsewhere.radiographer), { bookingId: here.booking.id })).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('saving a plan', () => {
  it('stores what was sent with the server’s own answer, and the booking shows it', async () => {
    const request = planBody(bench, { plan: { sequences: remedied() as never, note: 'Cushion on the left.' } });
    const saved = await savePlan(as(here.radiographer), request);
    expect(saved).toMatchObject({ version: 1, state: 'draft', accession: 'AB-1234', note: 'Cushion on the left.', differences: [], newerVersionExists: false });
    expect(saved.results.map(({ verdict }) => verdict)).not.toContain('fold-in-keep-clear');
    expect(saved.sequences[0]!.adopted[0]!.sentence).toMatch(/\w/);
    expect(saved.inputHash).toMatch(/^[0-9a-f]{64}$/);
    expect(await getPlan(as(here.radiologist), { id: saved.id })).toEqual(saved);
    expect(await getBooking(as(here.coordinator), { id: here.booking.id })).toMatchObject({
      planId: saved.id, planShortCode: saved.shortCode, planState: 'draft', verdict: saved.results.map(({ verdict }) => verdict).find((v) => v !== 'no-fold-expected') ?? 'no-fold-expected',
    });
  });

  it('the same key twice is one version, even at once', async () => {
    const request = planBody(bench);
    const [a, b] = await Promise.all([savePlan(as(here.radiographer), request), savePlan(as(here.radiographer), request)]);
    expect(a).toEqual(b);
    expect(await savePlan(as(here.radiographer), request)).toEqual(a);
    expect(await versions(request.id)).toHaveLength(1);
  });

  it('a key that is sent again with another plan is refused, and with the same plan answered, whatever is newest by then', async () => {
    const key = 'one-key-for-two';
    const first = planBody(bench, { key });
    const saved = await savePlan(as(here.radiographer), first);
    for (const plan of [{ note: 'another note' }, { patient: { ...bench.sizeRecord.patient!, breathHoldS: { value: 3, source: 'measured' as const, spread: 1 } } as never }]) {
      const other = planBody(bench, { id: first.id, key, plan });
      await expect(savePlan(as(here.radiographer), other)).rejects.toMatchObject({ code: 'invalid', fields: { 'Idempotency-Key': expect.stringContaining('a new key') } });
    }
    // A new policy and a later version in between change nothing about the first answer.
    await editPolicy(as(here.lead), { expectedVersion: 0, form: { ...policyForm(), presaturationB1Scale: 0.9 } });
    await savePlan(as(here.lead), planBody(bench, { id: first.id, expectedVersion: 1, plan: { note: 'later' } }));
    expect(await savePlan(as(here.radiographer), first)).toMatchObject({ version: 1, note: saved.note, inputHash: saved.inputHash });
    expect(await versions(first.id)).toHaveLength(2);
  });

  it('the second of two people is told the present version and nothing is overwritten', async () => {
    const first = planBody(bench);
    await savePlan(as(here.radiographer), first);
    const change = (note: string) => planBody(bench, { id: first.id, expectedVersion: 1, plan: { note } });
    const outcomes = await Promise.allSettled([savePlan(as(here.radiographer), change('mine')), savePlan(as(here.lead), change('yours'))]);
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    const lost = outcomes.find((outcome) => outcome.status === 'rejected')!;
    expect((lost as PromiseRejectedResult).reason).toMatchObject({ code: 'conflict', details: { currentVersion: 2 } });
    expect(await versions(first.id)).toHaveLength(2);
  });

  it('two people who both begin a plan for one booking: the second meets the first one’s plan, and nothing is hidden', async () => {
    const outcomes = await Promise.allSettled([savePlan(as(here.radiographer), planBody(bench)), savePlan(as(here.lead), planBody(bench))]);
    const saved = outcomes.find((outcome) => outcome.status === 'fulfilled')!;
    const lost = outcomes.find((outcome) => outcome.status === 'rejected')!;
    const first = (saved as PromiseFulfilledResult<PlanView>).value;
    expect((lost as PromiseRejectedResult).reason).toMatchObject({ code: 'conflict', details: { currentVersion: 1, planId: first.id } });
    const plans = await here.site.withApp((trx) => trx.selectFrom('plan').select('id').execute());
    expect(plans).toEqual([{ id: first.id }]);
    // Saved on top of it, theirs becomes its second version.
    const second = await savePlan(as(here.lead), planBody(bench, { id: first.id, expectedVersion: 1, plan: { note: 'theirs' } }));
    expect(second).toMatchObject({ id: first.id, version: 2 });
  });

  it('after a used plan a booking may have a new one', async () => {
    const { id } = await savePlan(as(here.radiographer), planBody(bench));
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    await signOffPlan(as(here.radiologist), { id, expectedVersion: 1, decision: 'signed off' });
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'used' });
    const later = { actor: here.radiographer, now: new Date('2026-05-04T10:00:00Z') };
    const next = await savePlan(later, planBody(bench));
    expect(next).toMatchObject({ version: 1, state: 'draft' });
    expect((await openBench(as(here.radiographer), { bookingId: here.booking.id })).plan?.id).toBe(next.id);
  });

  it('equal questions have one hash, others another', async () => {
    const first = planBody(bench);
    await savePlan(as(here.radiographer), first);
    await savePlan(as(here.radiographer), planBody(bench, { id: first.id, expectedVersion: 1, plan: { note: 'only the note' } }));
    await savePlan(as(here.radiographer), planBody(bench, { id: first.id, expectedVersion: 2, plan: { sequences: remedied() as never } }));
    const [a, b, c] = (await versions(first.id)).map(({ input_hash }) => input_hash);
    expect(b).toBe(a);
    expect(c).not.toBe(a);
  });

  it('where the bench had another answer the server’s is stored, and the difference is logged and shown', async () => {
    const log = vi.spyOn(console, 'warn').mockImplementation(() => {});
    const [first] = bench.protocol.sequences;
    const sequences = [{ id: first!.id, prescription: first!.prescription, adopted: [], seen: { verdict: 'no-fold-expected', scanS: 1 } }];
    const saved = await savePlan(as(here.radiographer), planBody(bench, { plan: { sequences: sequences as never, policyVersion: 4 } }));
    expect(saved.results[0]!.verdict).toBe('fold-in-keep-clear');
    expect(saved.differences.map(({ field }) => field)).toEqual(['policy', 'verdict', 'scanS']);
    expect(JSON.parse(String(log.mock.calls[0]![0]))).toMatchObject({ event: 'plan-differs', planId: saved.id });
    log.mockRestore();
  });

  it('refuses what is not of this site, and stores nothing', async () => {
    const other = await equipSite();
    const tries = [
      planBody(bench, { plan: { scannerId: other.scanner.id } }),
      planBody(bench, { plan: { bookingId: other.booking.id } }),
      planBody(bench, { plan: { protocolId: other.protocol.id } }),
      planBody(bench, { plan: { sequences: [] } }),
      { ...planBody(bench), idempotencyKey: 'short' },
    ];
    for (const request of tries) {
      await expect(savePlan(as(here.radiographer), request)).rejects.toMatchObject({ code: 'invalid' });
      expect(await versions(request.id)).toEqual([]);
    }
    await expect(savePlan(as(here.coordinator), planBody(bench))).rejects.toMatchObject({ code: 'not-found' });
  });

  it('another site cannot read or take over a plan by its id', async () => {
    const other = await equipSite();
    const mine = await savePlan(as(here.radiographer), planBody(bench));
    await expect(getPlan(as(other.radiographer), { id: mine.id })).rejects.toMatchObject({ code: 'not-found' });
    await expect(getPlanByShortCode(as(other.radiographer), { code: mine.shortCode })).rejects.toMatchObject({ code: 'not-found' });
    await sizeBooking(other);
    const theirs = await openBench(as(other.radiographer), { bookingId: other.booking.id });
    const saved = await savePlan(as(other.radiographer), planBody(theirs, { id: mine.id }));
    expect(saved.version).toBe(1);
    expect(await getPlan(as(here.radiographer), { id: mine.id })).toEqual(mine);
  });
});

describe('the short link', () => {
  it('finds the plan as typed by hand and says when a newer version exists', async () => {
    const first = planBody(bench);
    const { shortCode } = await savePlan(as(here.radiographer), first);
    await savePlan(as(here.radiographer), planBody(bench, { id: first.id, expectedVersion: 1, plan: { note: 'second' } }));
    const typed = `${shortCode.slice(0, 4)}-${shortCode.slice(4)}`.toLowerCase();
    expect(await getPlanByShortCode(as(here.coordinator), { code: typed, version: 1 })).toMatchObject({ version: 1, currentVersion: 2, newerVersionExists: true });
    expect(await getPlanByShortCode(as(here.coordinator), { code: typed })).toMatchObject({ version: 2, newerVersionExists: false });
    await expect(getPlanByShortCode(as(here.coordinator), { code: 'nonsense!' })).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('the life of a plan', () => {
  it('with fold left in the keep-clear area: for use, signed off by a radiologist, used, and then fixed', async () => {
    const { id } = await savePlan(as(here.radiographer), planBody(bench));
    const move = (to: string, expectedVersion = 1) => movePlan(as(here.radiographer), { id, expectedVersion, to });
    expect(await move('for use')).toMatchObject({ state: 'for use', needsSignOff: true });
    await expect(move('used')).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('sign this plan off') });
    await expect(signOffPlan(as(here.lead), { id, expectedVersion: 1, decision: 'signed off' })).rejects.toMatchObject({ code: 'not-found' });
    const signed = await signOffPlan(as(here.radiologist), { id, expectedVersion: 1, decision: 'signed off', reason: 'Subcutaneous only.' });
    expect(signed).toMatchObject({ state: 'signed off', signOff: { decision: 'signed off', reason: 'Subcutaneous only.', by: here.radiologist.displayName } });
    expect((await getBooking(as(here.radiographer), { id: here.booking.id })).planState).toBe('signed off');
    expect((await move('used')).state).toBe('used');
    await expect(savePlan(as(here.radiographer), planBody(bench, { id, expectedVersion: 1 }))).rejects.toMatchObject({ code: 'conflict' });
    await expect(move('draft')).rejects.toMatchObject({ code: 'conflict' });
  });

  it('sent back with a reason it is a draft again; a new version drops what was agreed', async () => {
    const { id } = await savePlan(as(here.radiographer), planBody(bench));
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    await expect(signOffPlan(as(here.radiologist), { id, expectedVersion: 1, decision: 'sent back' })).rejects.toMatchObject({ fields: { reason: expect.any(String) } });
    expect(await signOffPlan(as(here.radiologist), { id, expectedVersion: 1, decision: 'sent back', reason: 'Oversample.' })).toMatchObject({ state: 'draft' });
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    const next = await savePlan(as(here.radiographer), planBody(bench, { id, expectedVersion: 1, plan: { sequences: remedied() as never } }));
    expect(next).toMatchObject({ version: 2, state: 'draft' });
    expect(next).not.toHaveProperty('signOff');
    await expect(movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' })).rejects.toMatchObject({ code: 'conflict', details: { currentVersion: 2 } });
  });

  it('without such fold no sign-off is needed, until the policy asks for one always', async () => {
    const { id } = await savePlan(as(here.radiographer), planBody(bench, { plan: { sequences: remedied() as never } }));
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    await editPolicy(as(here.lead), { expectedVersion: 0, form: { ...policyForm(), signOffAlways: true } });
    await expect(movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'used' })).rejects.toMatchObject({ code: 'conflict' });
    await editPolicy(as(here.lead), { expectedVersion: 1, form: policyForm() });
    expect((await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'used' })).state).toBe('used');
  });

  it('every step is in the audit log, with names of fields and never a value', async () => {
    const { id } = await savePlan(as(here.radiographer), planBody(bench, { plan: { note: 'secret words' } }));
    await movePlan(as(here.radiographer), { id, expectedVersion: 1, to: 'for use' });
    const events = await here.site.withApp((trx) => trx.selectFrom('audit_event').selectAll().where('subject_id', '=', id).orderBy('at').execute());
    // One transaction, one moment: by name, then.
    expect(events.map(({ action, fields }) => [action, fields]).sort()).toEqual([
      ['plan.ask-sign-off', []], ['plan.create', ['version']], ['plan.release', ['state']],
    ]);
    expect(JSON.stringify(events)).not.toContain('secret');
  });
});
