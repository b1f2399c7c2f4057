import { writeFileSync } from 'node:fs';
import { extractText, getDocumentProxy } from 'unpdf';
import { beforeEach, describe, expect, it } from 'vitest';
import { CAUTIONS } from '@/components/plan/cautions';
import { countPages, paintSheet } from '@/components/plan/pdf/paint-sheet';
import { dueWork } from '@/db/client';
import type { BenchView } from '@/lib/schemas/booking';
import type { PlanView } from '@/lib/schemas/plan';
import { openBench } from '@/lib/services/booking/open-bench';
import { getSheet, getSheetFile } from '@/lib/services/plan-sheet/get-sheet';
import { makeSheet } from '@/lib/services/plan-sheet/make-sheet';
import { requestSheet } from '@/lib/services/plan-sheet/request-sheet';
import { movePlan } from '@/lib/services/plan/move-plan';
import { savePlan } from '@/lib/services/plan/save-plan';
import { as, equipSite, NOW, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

let here: EquippedSite;
let bench: BenchView;
let plan: PlanView;
beforeEach(async () => {
  here = await equipSite();
  await sizeBooking(here);
  bench = await openBench(as(here.radiographer), { bookingId: here.booking.id });
  plan = await savePlan(as(here.radiographer), planBody(bench));
});

const ask = (paper?: string, actor = here.radiographer) => requestSheet(as(actor), { planId: plan.id, ...(paper ? { paper } : {}) });
const make = (sheetId: string, paint: Parameters<typeof makeSheet>[1] = paintSheet, now = NOW) =>
  makeSheet({ siteId: here.site.siteId, sheetId }, paint, { now });
const where = (sheetId: string) => ({ planId: plan.id, sheetId });
const seconds = (count: number) => new Date(NOW.getTime() + count * 1000);
const onePage = async () => ({ bytes: new Uint8Array([1, 2, 3]), pages: 1 });
const fails = async () => {
  throw new Error('disk full');
};

async function read(bytes: Uint8Array) {
  const document = await getDocumentProxy(new Uint8Array(bytes));
  const { text, totalPages } = await extractText(document, { mergePages: true });
  const [, , width, height] = (await document.getPage(1)).view;
  return { text: text.replace(/\s+/g, ' '), totalPages, width, height };
}

describe('a plan sheet as PDF', () => {
  it.each([['A4', 595, 842], ['Letter', 612, 792]] as const)('is one %s page that says what the sheet says', async (paper, width, height) => {
    const { id } = await ask(paper);
    expect(await make(id)).toBe('made');
    const { bytes } = await getSheetFile(as(here.coordinator), where(id));
    if (process.env.SELVEDGE_KEEP_SHEET) writeFileSync(`${process.env.SELVEDGE_KEEP_SHEET}-${paper}.pdf`, bytes);
    const page = await read(bytes);
    expect(page.totalPages).toBe(1);
    expect(countPages(bytes)).toBe(1);
    // Points, rounded: the sizes of the two papers.
    expect([Math.round(page.width!), Math.round(page.height!)]).toEqual([width, height]);
    for (const words of [
      'AB-1234', 'Version 1, draft', plan.scanner.name, 'First', 'Second', '0 %', 'Fold in the keep-clear area',
      `/p/${plan.shortCode}?v=1`, plan.inputHash.slice(0, 12), 'patient label here', 'checked by', here.radiographer.displayName,
      'Right', '240 ± 2 mm', 'measured', 'Liver', 'Used at the scanner by', ...CAUTIONS.map((caution) => caution.slice(0, 40)),
    ]) {
      expect(page.text).toContain(words);
    }
  });

  it('stays one page for a long protocol: twelve sequences with a remedy each', async () => {
    const [first] = bench.protocol.sequences;
    const adopted = [{ key: 'k', sentence: 'Phase oversampling 25 %, 300 lines, with one average fewer, so that nothing lands on the liver.', costTenths: 1 }];
    const sequences = Array.from({ length: 12 }, (_, i) => ({ id: `s${i}`, prescription: { ...first!.prescription, name: `Sequence ${i + 1}` }, adopted }));
    const long = await savePlan(as(here.radiographer), planBody(bench, { id: plan.id, expectedVersion: 1, plan: { sequences: sequences as never } }));
    const { bytes, pages } = await paintSheet({ plan: long, link: 'https://selvedge.example/p/ABCDEFGH?v=2' }, 'Letter');
    expect(pages).toBe(1);
    expect((await read(bytes)).text).toContain('Sequence 12');
  });

  it('is made once for one content, and again when the plan has moved on', async () => {
    const first = await ask();
    expect(await ask()).toEqual(first);
    await make(first.id, onePage);
    expect(await ask()).toMatchObject({ id: first.id, state: 'done', sizeBytes: 3 });
    expect((await ask('Letter')).id).not.toBe(first.id);
    await movePlan(as(here.radiographer), { id: plan.id, expectedVersion: 1, to: 'for use' });
    const second = await ask();
    expect(second).toMatchObject({ state: 'queued' });
    expect(second.id).not.toBe(first.id);
    expect(await make(first.id, onePage)).toBe('nothing to do');
  });

  it('asked for before the plan moved on is given up rather than printed under the wrong state', async () => {
    const { id } = await ask();
    await movePlan(as(here.radiographer), { id: plan.id, expectedVersion: 1, to: 'for use' });
    expect(await make(id, onePage)).toBe('given up');
    expect(await getSheet(as(here.radiographer), where(id))).toMatchObject({ state: 'failed' });
    await expect(getSheetFile(as(here.radiographer), where(id))).rejects.toMatchObject({ code: 'not-found' });
  });

  it('is tried again later when painting fails, found by the sweep, then given up, and can be asked for afresh', async () => {
    const { id } = await ask();
    const due = async () => (await dueWork('plan-sheet', 1000)).some((work) => work.id === id);
    expect(await due()).toBe(true);
    expect(await make(id, fails)).toBe('put back');
    expect(await getSheet(as(here.radiographer), where(id))).toMatchObject({ state: 'queued', attempts: 1 });
    expect(await make(id, onePage, NOW)).toBe('nothing to do');
    expect(await make(id, fails, seconds(6))).toBe('put back');
    expect(await make(id, fails, seconds(60))).toBe('put back');
    expect(await make(id, fails, seconds(600))).toBe('given up');
    expect(await due()).toBe(false);
    expect(await ask()).toMatchObject({ id, state: 'queued', attempts: 0 });
    expect(await make(id, onePage, seconds(601))).toBe('made');
  });

  it('of two pages, or too large, is refused and not stored', async () => {
    const { id } = await ask();
    expect(await make(id, async () => ({ bytes: new Uint8Array(3), pages: 2 }))).toBe('given up');
    await ask();
    expect(await make(id, async () => ({ bytes: new Uint8Array(1_048_577), pages: 1 }))).toBe('given up');
    const row = await here.site.withApp((trx) => trx.selectFrom('plan_sheet').select(['bytes', 'last_error']).where('id', '=', id).executeTakeFirstOrThrow());
    expect(row).toEqual({ bytes: null, last_error: 'The sheet takes 1048577 bytes; allowed: 1048576.' });
  });

  it('two workers at once make it once', async () => {
    const { id } = await ask();
    let painted = 0;
    const counting = async () => {
      painted += 1;
      return onePage();
    };
    const results = await Promise.all([make(id, counting), make(id, counting)]);
    expect(results.sort()).toEqual(['made', 'nothing to do']);
    expect(painted).toBe(1);
  });

  it('is neither asked for nor read from another site, under another plan, or by who reads no plans', async () => {
    const other = await equipSite();
    const educator = await here.site.person('educator');
    const { id } = await ask();
    await make(id, onePage);
    for (const actor of [other.radiographer, educator]) {
      await expect(requestSheet(as(actor), { planId: plan.id })).rejects.toMatchObject({ code: 'not-found' });
      await expect(getSheet(as(actor), where(id))).rejects.toMatchObject({ code: 'not-found' });
      await expect(getSheetFile(as(actor), where(id))).rejects.toMatchObject({ code: 'not-found' });
    }
    await expect(getSheetFile(as(here.radiographer), { planId: here.booking.id, sheetId: id })).rejects.toMatchObject({ code: 'not-found' });
    await expect(ask('A3')).rejects.toMatchObject({ code: 'invalid' });
  });
});
