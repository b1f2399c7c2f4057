import { describe, expect, it } from 'vitest';
import { captureCase, personalSigns } from '@/lib/domain/demonstration/capture';
import { findSetPiece } from '@/lib/domain/demonstration/set-pieces';
import type { Case } from '@/lib/domain/case/model';
import { addScene } from '@/lib/services/demonstration/add-scene';
import { openBench } from '@/lib/services/booking/open-bench';
import { as, equipSite, sizeBooking } from '@/tests/support/equipped-site';
import { createDemonstration } from '@/lib/services/demonstration/create-demonstration';
import { documentOfBooking } from '@/components/bench/state/plan-document';
import { caseOf } from '@/components/bench/state/case-of';

/** Every number found under these keys is on the grid. */
const numbersIn = (value: unknown): number[] =>
  typeof value === 'number' ? [value] : typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : [];

describe('a scene captured from a booking’s bench', () => {
  it('is stored without reference, dates, names or anything finer than 5 mm of the body', async () => {
    const here = await equipSite();
    await sizeBooking(here);
    const view = await openBench(as(here.radiographer), { bookingId: here.booking.id });
    const document = documentOfBooking(view)!;
    const question = caseOf(document, { policy: view.policy.policy, today: '2026-12-01' }, document.sequences[0]!);
    // As the bench would send it if nothing were taken out in the browser: the server is the one to trust.
    const lead = await here.site.person('lead');
    const { id } = await createDemonstration(as(lead), { title: 'From a booking' });
    const scene = findSetPiece('axial-fold')!.scenes()[0]!;
    const captured = { ...scene, controls: [], question };
    await addScene(as(lead), { demonstrationId: id, scene: captured });
    const storedOf = (demonstrationId: string) => here.site.withApp((trx) => trx.selectFrom('scene').selectAll().where('demonstration_id', '=', demonstrationId).execute());
    const [stored] = await storedOf(id);
    // One made with it as its first scene holds the very same.
    const begun = await storedOf((await createDemonstration(as(lead), { title: 'Begun on the bench', scene: captured })).id);
    expect(begun.map(({ data, position }) => ({ data, position }))).toEqual([{ data: stored!.data, position: 0 }]);
    await expect(createDemonstration(as(lead), { title: 'Both', setPiece: 'axial-fold', scene: captured })).rejects.toMatchObject({ code: 'invalid' });
    const text = JSON.stringify(stored);
    const { accession } = view.booking;
    const taken = Object.values(question.patient.extents).flatMap(({ takenOn }) => takenOn ?? []);
    expect(taken.length).toBeGreaterThan(0);
    for (const trace of [accession, here.booking.id, view.scanner.scanner.name, view.protocol.name, question.prescription.name, ...taken, 'takenOn', 'measured', 'localiser', 'label']) {
      expect(text, trace).not.toContain(trace);
    }
    const { patient, keepClear } = (stored!.data as unknown as { question: Case }).question;
    const sizes = [...Object.values(patient.extents).map(({ value }) => value), patient.lateralOffsetMm, patient.isocentreZMm, ...numbersIn(keepClear.area)];
    expect(sizes.filter((size) => size % 5 !== 0)).toEqual([]);
  });

  it('rounds arms, legs and the keep-clear area too, and keeps no outline of a person', () => {
    const { question } = findSetPiece('axial-fold')!.scenes()[0]!;
    const measured: Case = {
      ...question,
      patient: {
        ...question.patient,
        arms: { position: 'down', breadthMm: 93, depthMm: 108, gapMm: 12 },
        legGapMm: 23,
        lateralOffsetMm: -3,
        isocentreZMm: 17,
        parts: [{ name: 'trunk', kind: 'trunk', signalWeight: 1, estimated: false, shape: { type: 'ellipsoid', centreMm: [0, 0, 0], semiAxesMm: [1, 2, 3] } }],
      },
      keepClear: { area: { kind: 'box', label: 'as asked by Dr Example', box: { xMm: [-172, 58], yMm: [-113, 92], zMm: [-61, 62] } }, mustStayDisplayed: { xMm: [-171, 59], yMm: [-1, 1], zMm: [0, 3] }, followsWindow: false },
    };
    const { patient, keepClear } = captureCase(measured);
    expect(patient.arms).toEqual({ position: 'down', breadthMm: 95, depthMm: 110, gapMm: 10 });
    expect([patient.legGapMm, patient.lateralOffsetMm + 0, patient.isocentreZMm, patient.parts]).toEqual([25, -5, 15, undefined]);
    expect(keepClear).toEqual({
      area: { kind: 'box', box: { xMm: [-170, 60], yMm: [-115, 90], zMm: [-60, 60] } },
      mustStayDisplayed: { xMm: [-170, 60], yMm: [-0, 0], zMm: [0, 5] },
      followsWindow: false,
    });
  });
});

describe('a warning before a text is stored', () => {
  it.each([
    ['seen 2026-11-02', 'a date'], ['3.11.26 liver', 'a date'], ['liver, 4 Nov 2026', 'a date'], ['HB-21077', 'a reference number'], ['scan of 4711081', 'a reference number'],
    ['a@b.example', 'an e-mail address'], ['Mrs Example', 'a person’s name'], ['aged 54', 'a birth date or age'],
  ])('%s looks like %s', (text, sign) => expect(personalSigns(text)).toContain(sign));

  it.each(['12.5 % slice oversampling', 'T1 3D gradient echo, TR 4', 'FOV 300 mm', 'W = 1.25 × F', 'Swap 300/256'])('“%s” looks like nobody', (text) =>
    expect(personalSigns(text)).toEqual([]));

  it('knows the reference of the booking it stands on, however it is typed', () => {
    expect(personalSigns('case hb-12 again', 'HB-12')).toEqual(['the reference of this booking']);
  });
});
