import { writeFileSync } from 'node:fs';
import { extractText, getDocumentProxy } from 'unpdf';
import { describe, expect, it } from 'vitest';
import { paintHandOut } from '@/components/demonstration/pdf/paint-hand-out';
import { dueWork } from '@/db/client';
import { getHandOut, getHandOutFile } from '@/lib/services/demonstration/get-hand-out';
import { makeHandOut } from '@/lib/services/demonstration/make-hand-out';
import { putAwayDemonstration } from '@/lib/services/demonstration/put-away-demonstration';
import { requestHandOut } from '@/lib/services/demonstration/request-hand-out';
import { getDemonstration } from '@/lib/services/demonstration/get-demonstration';
import { saveDemonstration } from '@/lib/services/demonstration/save-demonstration';
import { activePerson, auditActions, outcomeOf } from '@/tests/support/database/accounts';
import { createTestSite } from '@/tests/support/database';
import { siteWithDemonstration } from './site-with-demonstration';

const NOW = new Date('2030-01-01T12:00:00Z');
const seconds = (count: number) => new Date(NOW.getTime() + count * 1000);

async function ready(setPiece = 'half') {
  const made = await siteWithDemonstration(setPiece);
  const { site, context, id } = made;
  const ask = (paper?: 'A4' | 'Letter') => requestHandOut({ ...context, now: NOW }, { demonstrationId: id, ...(paper ? { paper } : {}) });
  const make = (handOutId: string, paint: Parameters<typeof makeHandOut>[1] = paintHandOut, now = NOW) =>
    makeHandOut({ siteId: site.siteId, handOutId }, paint, { now });
  const look = (handOutId: string) => getHandOut(context, { demonstrationId: id, handOutId });
  return { ...made, ask, make, look };
}

const twoPages = async () => ({ bytes: new Uint8Array([1, 2, 3]), pages: 2 });
const fails = async () => {
  throw new Error('disk full');
};

describe('a hand-out', () => {
  it.each([
    ['A4', 842, 595, 'slab-wrap', '24 of 48', 'partitions hold it'],
    ['Letter', 792, 612, 'half', '280', 'Ask the room'],
  ] as const)('is a %s page a scene in landscape, with its figures and without notes', async (paper, width, height, piece, figure, note) => {
    const { ask, make, context, id, educator } = await ready(piece);
    const asked = await ask(paper);
    expect(await make(asked.id)).toBe('made');
    const bytes = await getHandOutFile(context, { demonstrationId: id, handOutId: asked.id });
    if (process.env.SELVEDGE_KEEP_HAND_OUT) writeFileSync(`${process.env.SELVEDGE_KEEP_HAND_OUT}-${paper}.pdf`, bytes);
    const document = await getDocumentProxy(new Uint8Array(bytes));
    const { text, totalPages } = await extractText(document);
    const [, , pageWidth, pageHeight] = (await document.getPage(1)).view;
    // Points, rounded: the sizes of the two papers.
    expect([Math.round(pageWidth!), Math.round(pageHeight!)]).toEqual([width, height]);
    const { scenes } = await getDemonstration(context, { id });
    expect(totalPages).toBe(scenes.length);
    const all = text.map((page) => page.replace(/\s+/g, ' '));
    scenes.forEach(({ title }, i) => expect(all[i]).toContain(title));
    expect(all[0]).toContain(figure);
    expect(all[0]).toContain('Fold in the keep-clear area');
    for (const absent of [note, educator.displayName]) expect(all.join()).not.toContain(absent);
  });

  it('is made once for one content, and again when a scene has changed', async () => {
    const { ask, make, look, context, id, site } = await ready();
    const first = await ask();
    expect(await ask()).toEqual(first);
    await make(first.id, twoPages);
    expect(await ask()).toMatchObject({ id: first.id, state: 'done', sizeBytes: 3 });
    expect((await ask('Letter')).id).not.toBe(first.id);
    const { scenes, version } = await getDemonstration(context, { id });
    await saveDemonstration(context, { id, expectedVersion: version, title: 'Other words', scenes: [...scenes] });
    const second = await ask();
    expect(second).toMatchObject({ state: 'queued' });
    expect(second.id).not.toBe(first.id);
    expect(await look(first.id)).toMatchObject({ state: 'done' });
    expect((await auditActions(site, id)).filter((action) => action === 'demonstration.render')).toHaveLength(3);
  });

  it('asked for before a change is given up rather than printed as it no longer is', async () => {
    const { ask, make, look, context, id } = await ready();
    const asked = await ask();
    const { scenes, version } = await getDemonstration(context, { id });
    await saveDemonstration(context, { id, expectedVersion: version, title: 'Shown', scenes: scenes.slice(1) });
    expect(await make(asked.id, twoPages)).toBe('given up');
    expect(await look(asked.id)).toMatchObject({ state: 'failed' });
    expect(await outcomeOf(getHandOutFile(context, { demonstrationId: id, handOutId: asked.id }))).toMatch(/^not-found/);
  });

  it('is tried again later when painting fails, found by the sweep, then given up, and can be asked for afresh', async () => {
    const { ask, make, look, id, context } = await ready();
    const asked = await requestHandOut(context, { demonstrationId: id });
    const due = async () => (await dueWork('hand-out', 1000)).some((work) => work.id === asked.id);
    expect(await due()).toBe(true);
    expect(await make(asked.id, fails)).toBe('put back');
    expect(await look(asked.id)).toMatchObject({ state: 'queued', attempts: 1 });
    expect(await make(asked.id, twoPages, NOW)).toBe('nothing to do');
    for (const [at, outcome] of [[6, 'put back'], [60, 'put back'], [600, 'given up']] as const) expect(await make(asked.id, fails, seconds(at))).toBe(outcome);
    expect(await due()).toBe(false);
    expect(await ask()).toMatchObject({ id: asked.id, state: 'queued', attempts: 0 });
    expect(await make(asked.id, twoPages, seconds(601))).toBe('made');
  });

  it('with a page too many, or too large, is refused and not stored; two workers make it once', async () => {
    const { ask, make } = await ready();
    const asked = await ask();
    expect(await make(asked.id, async () => ({ bytes: new Uint8Array(3), pages: 3 }))).toBe('given up');
    await ask();
    expect(await make(asked.id, async () => ({ bytes: new Uint8Array(8_388_609), pages: 2 }))).toBe('given up');
    await ask();
    expect((await Promise.all([make(asked.id, twoPages), make(asked.id, twoPages)])).sort()).toEqual(['made', 'nothing to do']);
  });

  it('is asked for by those who build, read by their site, and gone with a demonstration put away', async () => {
    const { ask, make, site, context, id } = await ready();
    const asked = await ask();
    await make(asked.id, twoPages);
    const where = { demonstrationId: id, handOutId: asked.id };
    const radiographer = { actor: await activePerson(site, 'radiographer') };
    const stranger = { actor: await activePerson(await createTestSite(), 'educator') };
    expect(await outcomeOf(requestHandOut(radiographer, { demonstrationId: id }))).toMatch(/^not-found/);
    expect(await getHandOut(radiographer, where)).toMatchObject({ state: 'done' });
    const outcomes = await Promise.all([requestHandOut(stranger, { demonstrationId: id }), getHandOut(stranger, where), getHandOutFile(stranger, where)].map(outcomeOf));
    for (const outcome of outcomes) expect(outcome).toMatch(/^not-found/);
    await expect(requestHandOut(context, { demonstrationId: id, paper: 'A3' as never })).rejects.toMatchObject({ code: 'invalid' });
    await putAwayDemonstration(context, { id, away: true });
    expect(await outcomeOf(getHandOutFile(context, where))).toMatch(/^not-found/);
  });

  it('of nothing is refused in words', async () => {
    const { context, id, ask } = await ready();
    await saveDemonstration(context, { id, expectedVersion: 1, title: 'Empty', scenes: [] });
    await expect(ask()).rejects.toMatchObject({ code: 'invalid', message: expect.stringContaining('needs one at least') });
  });
});
