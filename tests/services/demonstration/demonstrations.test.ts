import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { describe, expect, it } from 'vitest';
import { inTransaction, resolveToken } from '@/db/client';
import { ROLES } from '@/lib/domain/access';
import { findSetPiece } from '@/lib/domain/demonstration/set-pieces';
import { addScene } from '@/lib/services/demonstration/add-scene';
import { createDemonstration } from '@/lib/services/demonstration/create-demonstration';
import { duplicateDemonstration } from '@/lib/services/demonstration/duplicate-demonstration';
import { exportDemonstration, importDemonstration } from '@/lib/services/demonstration/exchange-demonstration';
import { getDemonstration } from '@/lib/services/demonstration/get-demonstration';
import { listDemonstrations } from '@/lib/services/demonstration/list-demonstrations';
import { putAwayDemonstration } from '@/lib/services/demonstration/put-away-demonstration';
import { saveDemonstration } from '@/lib/services/demonstration/save-demonstration';
import { createShare, listShares, revokeShare } from '@/lib/services/demonstration/share-demonstration';
import { viewSharedDemonstration } from '@/lib/services/demonstration/view-shared-demonstration';
import { hashSecretToken } from '@/lib/services/session/secret-token';
import { createTestSite } from '@/tests/support/database';
import { activePerson, auditActions, outcomeOf } from '@/tests/support/database/accounts';
import { siteWithDemonstration } from './site-with-demonstration';

const DAY = 86_400_000;

describe('a demonstration', () => {
  it('is a copy of a set piece, in its order, listed and audited', async () => {
    const { site, context, id } = await siteWithDemonstration();
    const { scenes, ...rest } = await getDemonstration(context, { id });
    expect(rest).toEqual({ id, title: 'Wrap, shown', version: 1 });
    expect(scenes.map(({ id: _id, ...document }) => document)).toEqual(findSetPiece('slab-wrap')!.scenes());
    expect(await listDemonstrations(context)).toMatchObject([{ id, title: 'Wrap, shown', scenes: 5, links: 0 }]);
    expect(await auditActions(site, id)).toEqual(['demonstration.edit']);
  });

  it('takes a new order, a copy and a removal in one save; saving the same again changes nothing', async () => {
    const { context, id } = await siteWithDemonstration();
    const { scenes, version } = await getDemonstration(context, { id });
    const copy = { ...scenes[0]!, id: randomUUID(), title: 'A copy' };
    const wanted = [scenes[2]!, copy, scenes[0]!, scenes[4]!].map((scene) => ({ ...scene, controls: [...scene.controls] }));
    expect(await saveDemonstration(context, { id, expectedVersion: version, title: 'Renamed', scenes: wanted })).toEqual({ version: 2 });
    const after = await getDemonstration(context, { id });
    expect(after.title).toBe('Renamed');
    expect(after.scenes).toEqual(wanted);
    expect(await saveDemonstration(context, { id, expectedVersion: 2, title: 'Renamed', scenes: wanted })).toEqual({ version: 2 });
  });

  it('tells the slower of two writers and overwrites nothing', async () => {
    const { context, id } = await siteWithDemonstration();
    await saveDemonstration(context, { id, expectedVersion: 1, title: 'First', scenes: [] });
    const late = saveDemonstration(context, { id, expectedVersion: 1, title: 'Second', scenes: [] });
    await expect(late).rejects.toMatchObject({ code: 'conflict', details: { currentVersion: 2 } });
    expect((await getDemonstration(context, { id })).title).toBe('First');
  });

  it('does not take a scene of another demonstration, and nothing of the save stays', async () => {
    const { context, id } = await siteWithDemonstration();
    const other = await createDemonstration(context, { title: 'Other', setPiece: 'swap' });
    const foreign = (await getDemonstration(context, { id: other.id })).scenes[0]!;
    const taken = saveDemonstration(context, { id, expectedVersion: 1, title: 'Taken', scenes: [{ ...foreign, controls: [...foreign.controls] }] });
    expect(await outcomeOf(taken)).toMatch(/^not-found/);
    expect((await getDemonstration(context, { id })).scenes).toHaveLength(5);
    expect((await getDemonstration(context, { id: other.id })).scenes).toHaveLength(2);
  });

  it('takes a scene from the bench without what could be one person’s', async () => {
    const { context, id } = await siteWithDemonstration();
    const scene = findSetPiece('axial-fold')!.scenes()[0]!;
    const { patient } = scene.question;
    const measured = {
      ...patient,
      extents: { ...patient.extents, anterior: { value: 173.4, source: 'measured' as const, takenOn: '2026-11-02', spread: 3 } },
      heightCm: { value: 171, source: 'measured' as const, takenOn: '2026-11-02', spread: 1 },
      sex: 'female' as const,
    };
    const question = { ...scene.question, patient: measured, scanner: { ...scene.question.scanner, name: 'Room 4' } };
    await addScene(context, { demonstrationId: id, scene: { ...scene, controls: [], question } });
    const stored = (await getDemonstration(context, { id })).scenes.at(-1)!.question;
    expect(stored.patient.extents.anterior).toEqual({ value: 175, source: 'policy-default', spread: 3 });
    const text = JSON.stringify(stored);
    for (const trace of ['2026-11-02', 'Room 4', 'female', '173.4', 'heightCm', 'measured']) expect(text).not.toContain(trace);
  });

  it('is duplicated under new ids, and its links stay its own', async () => {
    const { context, id } = await siteWithDemonstration();
    await createShare(context, { id, days: 7 });
    const copy = await duplicateDemonstration(context, { id });
    const [original, twin] = [await getDemonstration(context, { id }), await getDemonstration(context, { id: copy.id })];
    expect(twin.title).toBe('Wrap, shown (copy)');
    expect(twin.scenes.map(({ id: _id, ...document }) => document)).toEqual(original.scenes.map(({ id: _id, ...document }) => document));
    expect(twin.scenes.filter(({ id: each }) => original.scenes.some((scene) => scene.id === each))).toEqual([]);
    expect(await listShares(context, { id: copy.id })).toEqual([]);
    await saveDemonstration(context, { id, expectedVersion: 1, title: 'x'.repeat(120), scenes: [] });
    const long = await duplicateDemonstration(context, { id });
    expect((await getDemonstration(context, { id: long.id })).title).toHaveLength(120);
  });

  it('put away leaves every list and page, takes its links with it, and comes back without them', async () => {
    const { context, id, site } = await siteWithDemonstration();
    const { secret } = await createShare(context, { id, days: 7 });
    await createShare(context, { id, days: 7 });
    const other = await createDemonstration(context, { title: 'Stays' });
    const kept = await createShare(context, { id: other.id, days: 7 });
    expect(await putAwayDemonstration(context, { id, away: true })).toEqual({ linksEnded: 2 });
    expect(await putAwayDemonstration(context, { id, away: true })).toEqual({ linksEnded: 0 });
    expect((await listDemonstrations(context)).map((line) => line.id)).toEqual([other.id]);
    expect(await listDemonstrations(context, { putAway: true })).toMatchObject([{ id, links: 0 }]);
    const gone = await Promise.all([
      getDemonstration(context, { id }),
      saveDemonstration(context, { id, expectedVersion: 1, title: 'Late', scenes: [] }),
      addScene(context, { demonstrationId: id, scene: { ...findSetPiece('swap')!.scenes()[0]!, controls: [] } }),
      createShare(context, { id, days: 1 }),
      exportDemonstration(context, { id }),
      duplicateDemonstration(context, { id }),
      viewSharedDemonstration({ token: secret }),
    ].map(outcomeOf));
    expect(gone.filter((outcome) => !outcome.startsWith('not-found'))).toEqual([]);
    expect(await viewSharedDemonstration({ token: kept.secret })).toMatchObject({ title: 'Stays' });
    expect(await putAwayDemonstration(context, { id, away: false })).toEqual({ linksEnded: 0 });
    expect((await getDemonstration(context, { id })).scenes).toHaveLength(5);
    expect(await outcomeOf(viewSharedDemonstration({ token: secret }))).toMatch(/^not-found/);
    expect((await listShares(context, { id })).map(({ state }) => state)).toEqual(['revoked', 'revoked']);
    expect((await auditActions(site, id)).filter((action) => action === 'demonstration.edit')).toHaveLength(3);
  });

  it('travels as a file to another site', async () => {
    const { context, id } = await siteWithDemonstration();
    const file = await exportDemonstration(context, { id });
    const elsewhere = await createTestSite();
    const there = { actor: await activePerson(elsewhere, 'educator') };
    const arrived = await importDemonstration(there, { text: JSON.stringify(file) });
    const { scenes } = await getDemonstration(there, { id: arrived.id });
    expect(scenes.map(({ title, note }) => ({ title, note }))).toEqual(file.scenes.map(({ title, note }) => ({ title, note })));
    expect(scenes[0]!.question.prescription).toEqual(file.scenes[0]!.question.prescription);
  });

  it('refuses a file that is none, names what is wrong, and stores nothing', async () => {
    const { context } = await siteWithDemonstration();
    expect(await outcomeOf(importDemonstration(context, { text: 'scenes' }))).toMatch(/^invalid/);
    const half = { format: 'selvedge-demonstration', schemaVersion: 1, title: 'T', scenes: [{ schemaVersion: 1, title: 'S' }] };
    const refused = importDemonstration(context, { text: JSON.stringify(half) });
    await expect(refused).rejects.toMatchObject({ code: 'invalid', fields: { 'scenes.0.view': expect.stringContaining('section, slab, picture') } });
    expect(await listDemonstrations(context)).toHaveLength(1);
  });
});

describe('who may', () => {
  it.each(ROLES)('%s', async (role) => {
    const { site, id } = await siteWithDemonstration();
    const actor = await activePerson(site, role);
    const teaches = role === 'educator' || role === 'lead';
    expect(await getDemonstration({ actor }, { id })).toMatchObject({ id });
    const changes = await outcomeOf(saveDemonstration({ actor }, { id, expectedVersion: 1, title: 'X', scenes: [] }));
    const makes = await outcomeOf(createDemonstration({ actor }, { title: 'Y' }));
    const shares = await outcomeOf(createShare({ actor }, { id, days: 1 }));
    const copies = await outcomeOf(duplicateDemonstration({ actor }, { id }));
    const ends = await outcomeOf(putAwayDemonstration({ actor }, { id, away: true }));
    for (const outcome of [changes, makes, shares, copies, ends]) {
      if (teaches) expect(outcome).not.toMatch(/^not-found/);
      else expect(outcome).toMatch(/^not-found/);
    }
  });

  it('is nobody of another site', async () => {
    const { id } = await siteWithDemonstration();
    const stranger = { actor: await activePerson(await createTestSite(), 'educator') };
    expect(await outcomeOf(getDemonstration(stranger, { id }))).toMatch(/^not-found/);
    expect(await outcomeOf(createShare(stranger, { id, days: 1 }))).toMatch(/^not-found/);
    expect(await outcomeOf(listShares(stranger, { id }))).toMatch(/^not-found/);
    expect(await outcomeOf(putAwayDemonstration(stranger, { id, away: true }))).toMatch(/^not-found/);
    expect(await outcomeOf(duplicateDemonstration(stranger, { id }))).toMatch(/^not-found/);
  });
});

describe('a shared link', () => {
  it('shows the scenes without notes or names, counts its openings, and is stored as a hash only', async () => {
    const { site, context, id, educator } = await siteWithDemonstration();
    const { scenes, version } = await getDemonstration(context, { id });
    const named = scenes.map((scene) => ({
      ...scene,
      controls: [...scene.controls],
      question: { ...scene.question, scanner: { ...scene.question.scanner, name: 'Room 4' }, prescription: { ...scene.question.prescription, name: 'Protocol of ours' } },
    }));
    await saveDemonstration(context, { id, expectedVersion: version, title: 'Wrap, shown', scenes: named });
    const { secret } = await createShare(context, { id, days: 7 });
    expect(secret).toMatch(/^[\w-]{43}$/);
    const shown = await viewSharedDemonstration({ token: secret });
    await viewSharedDemonstration({ token: secret });
    expect(shown.scenes).toHaveLength(5);
    const sent = JSON.stringify(shown);
    const stored = (await getDemonstration(context, { id })).scenes;
    const { site_name } = await site.withApp((trx) => trx.selectFrom('site').select('name as site_name').executeTakeFirstOrThrow());
    const traces = ['"note"', 'siteId', site.siteId, site_name, educator.userId, educator.displayName, id, 'Room 4', 'Protocol of ours', 'coils', 'label'];
    for (const trace of [...traces, ...stored.flatMap((scene) => [scene.id, scene.note.slice(0, 30)])]) expect(sent, trace).not.toContain(trace);
    // Nothing that looks like the id of any row.
    expect(sent).not.toMatch(/[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-/);
    expect(await listShares(context, { id })).toMatchObject([{ state: 'works', openings: 2 }]);
    const dump = await site.withApp((trx) => sql`select to_jsonb(t)::text from demonstration_share t`.execute(trx));
    expect(JSON.stringify(dump.rows)).not.toContain(secret);
  });

  it('is unknown once revoked, while its neighbour goes on', async () => {
    const { context, id, site } = await siteWithDemonstration();
    const [one, two] = [await createShare(context, { id, days: 7 }), await createShare(context, { id, days: 7 })];
    await revokeShare(context, { id: one.id });
    await revokeShare(context, { id: one.id });
    expect(await outcomeOf(viewSharedDemonstration({ token: one.secret }))).toMatch(/^not-found/);
    expect(await viewSharedDemonstration({ token: two.secret })).toMatchObject({ title: 'Wrap, shown' });
    expect((await auditActions(site, id)).filter((action) => action === 'demonstration.share')).toHaveLength(3);
  });

  it('says the same of expired, unknown and malformed links', async () => {
    const { context, id } = await siteWithDemonstration();
    const { secret, expiresAt } = await createShare(context, { id, days: 1 });
    const old = await createShare({ ...context, now: new Date(Date.now() - 2 * DAY) }, { id, days: 1 });
    const answers = await Promise.all([
      outcomeOf(viewSharedDemonstration({ token: secret }, expiresAt)),
      outcomeOf(viewSharedDemonstration({ token: old.secret })),
      outcomeOf(viewSharedDemonstration({ token: 'A'.repeat(43) })),
      outcomeOf(viewSharedDemonstration({ token: '../x' })),
    ]);
    expect(answers[0]).toMatch(/^not-found/);
    expect(new Set(answers).size).toBe(1);
    expect((await listShares(context, { id })).map(({ openings }) => openings)).toEqual([0, 0]);
  });

  it('opens through the gate under its own kind alone', async () => {
    const { context, id, site } = await siteWithDemonstration();
    const { secret, id: shareId } = await createShare(context, { id, days: 1 });
    const hash = hashSecretToken(secret);
    expect(await resolveToken('demonstration-share', hash)).toMatchObject({ siteId: site.siteId, id: shareId });
    expect(await resolveToken('api', hash)).toBeNull();
    expect(await resolveToken('size-request', hash)).toBeNull();
    const other = await createTestSite();
    const seen = await inTransaction(other.siteId, (trx) => trx.selectFrom('scene').select('id').execute());
    expect(seen).toEqual([]);
  });

  it.each([0, 367, 1.5])('is not made for %s days', async (days) => {
    const { context, id } = await siteWithDemonstration();
    expect(await outcomeOf(createShare(context, { id, days }))).toMatch(/^invalid.*1 to 366 days/);
  });
});
