import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readNumber } from '@/lib/csv';
import {
  dateOrderOf, guessColumns, guessUnit, looksLikeTitles, momentInZone, NO_SETTINGS, readDay, readImportRow, readMoment, readTime, spreadOf,
  toCm, toKg, toMm, type MappedCells,
} from '@/lib/domain/import';

const SCANNER = '11111111-1111-4111-8111-111111111111';
const PROTOCOL = '22222222-2222-4222-8222-222222222222';
const settings = {
  ...NO_SETTINGS,
  columns: { accession: 'Acc', day: 'Day', time: 'Time', scanner: 'Room', protocol: 'Exam' },
  units: { weight: 'lb', girth: 'in', height: 'cm' } as const,
  scanners: { 'room 2': SCANNER }, protocols: { abdomen: PROTOCOL },
};
const cells: MappedCells = { accession: 'HB-2107', day: '01.12.2026', time: '10:40', scanner: ' Room  2', protocol: 'Abdomen' };
const read = (change: MappedCells = {}) =>
  readImportRow(7, { ...cells, ...change }, { settings, mask: 'HB-####', zone: 'Europe/Berlin', slotMinutes: 45, readNumber });

describe('a row of a file', () => {
  it('becomes a booking with sizes in our units', () => {
    expect(read({ weight: '308,6', girth: '51.2', sex: 'F', arms: 'cannot be raised', 'taken-on': '2026-11-20' })).toEqual({
      row: {
        number: 7, accession: 'HB-2107', scheduledAt: '2026-12-01T09:40:00.000Z', slotMinutes: 45, scannerId: SCANNER, protocolId: PROTOCOL,
        readings: [
          { quantity: 'weight-kg', value: 140, source: 'reported', takenOn: '2026-11-20' },
          { quantity: 'girth-cm', value: 130, source: 'reported', takenOn: '2026-11-20' },
          { quantity: 'sex', value: 1, source: 'reported', takenOn: '2026-11-20' },
          { quantity: 'arms-position', value: 2, source: 'reported', takenOn: '2026-11-20' },
        ],
      },
    });
    expect(read({ height: '1720 mm' })).toMatchObject({ row: { readings: [{ quantity: 'height-cm', value: 172 }] } });
  });

  it.each([
    [{ accession: 'Miller' }, /Accession number/], [{ accession: 'HB-21' }, /HB-####/], [{ day: '31.02.2026' }, /Day/],
    [{ time: '25:00' }, /Time/], [{ scanner: 'Elsewhere' }, /Scanner/], [{ protocol: '' }, /Protocol/], [{ weight: 'heavy' }, /Weight/],
    [{ girth: '1300' }, /Girth.*read as in/], [{ slot: '3' }, /5 to 480/], [{ sex: 'x' }, /female or male/], [{ 'taken-on': 'soon', sex: 'f' }, /Day the sizes/],
  ])('is left out for %j', (change, reason) => {
    expect(read(change)).toEqual({ skipped: expect.stringMatching(reason) });
  });

  it('never repeats what stood in it, whatever that is', () => {
    fc.assert(
      fc.property(fc.constantFrom(...(['accession', 'day', 'time', 'slot', 'scanner', 'protocol', 'weight', 'sex', 'arms'] as const)), fc.stringMatching(/^[QXZ]{6,12}$/), (field, text) => {
        expect(JSON.stringify(read({ [field]: text }))).not.toContain(text);
      }),
      { seed: 20264 },
    );
  });
});

describe('units', () => {
  it('come to the same size whichever way it was written', () => {
    fc.assert(
      fc.property(fc.integer({ min: 300, max: 20_000 }), (tenthsMm) => {
        // Half a step of rounding either way: 0.1 mm, 0.1 cm.
        expect(Math.abs(toMm(tenthsMm / 254, 'in') - tenthsMm / 10)).toBeLessThanOrEqual(0.0501);
        expect(Math.abs(toCm(tenthsMm / 10, 'mm') - tenthsMm / 100)).toBeLessThanOrEqual(0.0501);
      }),
      { seed: 20265 },
    );
    // International pound (1959): 0.45359237 kg exactly; from memory.
    expect(toKg(1000, 'lb')).toBe(453.6);
  });

  it.each([
    ['girth', 'Waist (cm)', [], 'cm'], ['girth', 'Waist', [131, 148, 120], 'cm'], ['girth', 'Waist', [1310, 1480], 'mm'], ['girth', 'Waist', [51, 58], 'in'],
    ['weight', 'Weight', [300, 280, 310], 'lb'], ['weight', 'Weight', [140, 152], 'kg'], ['weight', 'Weight in lbs', [140], 'lb'],
    ['height', 'Height', [68, 70], 'in'], ['height', 'Height', [172], 'cm'], ['breadth', 'Breadth', [480], 'mm'], ['depth', 'Depth', [34], 'cm'],
  ] as const)('of %s “%s” %j are guessed as %s', (kind, title, values, unit) => {
    expect(guessUnit(kind, title, values)).toBe(unit);
  });

  it('spread a girth from elsewhere wider', () => {
    expect(spreadOf({ quantity: 'girth-cm', source: 'measured', tapeSite: 'umbilicus' })).toBeGreaterThan(spreadOf({ quantity: 'girth-cm', source: 'measured', tapeSite: 'iliac-crest' }));
  });
});

describe('days and times', () => {
  it('tell their order where they can', () => {
    expect(dateOrderOf(['01/12/2026', '13/12/2026'])).toBe('day-first');
    expect(dateOrderOf(['12/13/2026', '01/02/2026'])).toBe('month-first');
    expect(dateOrderOf(['01/02/2026'])).toBeUndefined();
    expect(dateOrderOf(['13/12/2026', '12/13/2026'])).toBeUndefined();
  });

  it('are read in the usual forms', () => {
    expect(readDay('12/01/2026', 'month-first')).toEqual({ year: 2026, month: 12, day: 1 });
    expect(readDay('20261201', 'day-first')).toEqual({ year: 2026, month: 12, day: 1 });
    expect(readTime('2:05 pm')).toEqual({ hour: 14, minute: 5 });
    expect(readTime('12:00 a.m.')).toEqual({ hour: 0, minute: 0 });
    expect(readMoment('2026-12-01T10:40:00+01:00', 'day-first', 'UTC')).toBe('2026-12-01T09:40:00.000Z');
    expect(readMoment('01.12.2026 10:40', 'day-first', 'Europe/Berlin')).toBe('2026-12-01T09:40:00.000Z');
  });

  it('know the hours that a change of clocks skips', () => {
    // Central European Summer Time began on 29 March 2026 at 02:00 (EU directive 2000/84/EC: last Sunday of March).
    expect(momentInZone({ year: 2026, month: 3, day: 29 }, { hour: 2, minute: 30 }, 'Europe/Berlin')).toBeUndefined();
    expect(momentInZone({ year: 2026, month: 3, day: 29 }, { hour: 3, minute: 0 }, 'Europe/Berlin')).toBe('2026-03-29T01:00:00.000Z');
  });
});

describe('titles of columns', () => {
  it('propose a mapping and leave people alone', () => {
    expect(guessColumns(['Patient name', 'Date of birth', 'Accession no', 'Exam date', 'Time', 'Scanner', 'Protocol', 'Weight (lb)', 'Remarks', 'Patient address'])).toEqual({
      accession: 'Accession no', day: 'Exam date', time: 'Time', scanner: 'Scanner', protocol: 'Protocol', weight: 'Weight (lb)',
    });
    expect(looksLikeTitles(['Accession', 'Date', 'Time'])).toBe(true);
    expect(looksLikeTitles(['HB-2107', '2026-12-01', '10:40'])).toBe(false);
  });
});
