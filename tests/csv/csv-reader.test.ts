import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CsvError, CsvReader, detectDelimiter, MAX_FIELD_LENGTH, readNumber, TextPieces, writeRow, type Delimiter } from '@/lib/csv';

const read = (text: string, delimiter: Delimiter = ',') => {
  const reader = new CsvReader(delimiter);
  return [...reader.push(text), ...reader.end()];
};
const fields = (text: string, delimiter: Delimiter = ',') => read(text, delimiter).map((row) => row.fields);

/** Cuts a text at the given places: what comes out must not depend on them. */
function inPieces(text: string, cuts: readonly number[], delimiter: Delimiter) {
  const reader = new CsvReader(delimiter);
  const rows = [];
  let from = 0;
  for (const cut of [...cuts].map((at) => at % (text.length + 1)).sort((a, b) => a - b)) {
    rows.push(...reader.push(text.slice(from, cut)));
    from = Math.max(from, cut);
  }
  return [...rows, ...reader.push(text.slice(from)), ...reader.end()];
}

const field = fc.string({ unit: fc.constantFrom('a', '7', ',', ';', '\t', '"', '\r', '\n', ' ', 'ß', '€', '𝛼'), maxLength: 8 });
const table = fc.array(fc.array(field, { minLength: 1, maxLength: 5 }), { maxLength: 6 });
const delimiter = fc.constantFrom<Delimiter>(',', ';', '\t');

describe('reading CSV', () => {
  it('gives back what was written, however it is cut into pieces', () => {
    fc.assert(
      fc.property(table, delimiter, fc.constantFrom('\n', '\r\n', '\r'), fc.array(fc.nat(200), { maxLength: 6 }), fc.boolean(), (rows, by, end, cuts, last) => {
        const text = rows.map((row) => writeRow(row, by)).join(end) + (last && rows.length > 0 ? end : '');
        expect(inPieces(text, cuts, by).map((row) => row.fields)).toEqual(rows);
      }),
      { seed: 20261, numRuns: 400 },
    );
  });

  it('never fails otherwise than by its own error, whatever it is fed', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 60 }), delimiter, (text, by) => {
        try {
          read(text, by);
        } catch (error) {
          expect(error).toBeInstanceOf(CsvError);
        }
      }),
      { seed: 20262, numRuns: 400 },
    );
  });

  it('names the line a row begins on, across quoted line breaks', () => {
    expect(read('a,b\r\n"x\r\ny",2\r\n\r\nlast,3').map(({ line }) => line)).toEqual([1, 2, 5]);
  });

  it.each([
    ['a "quoted" word,b', [['a "quoted" word', 'b']]],
    ['"a ""b"" c";', [['a "b" c', '']]],
    ['', []],
    ['\n\n', []],
  ])('reads %j', (text, rows) => {
    expect(fields(text, text.includes(';') ? ';' : ',')).toEqual(rows);
  });

  it('refuses what is no table, by line and without quoting it', () => {
    expect(() => read('a,b\n"Adele Miller,2')).toThrow('A quote opened in the row of line 2 is never closed.');
    expect(() => read(`a\n${'x'.repeat(MAX_FIELD_LENGTH + 1)}`)).toThrow('A field in the row of line 2 is longer than');
    expect(() => read('"a" b')).toThrow('Line 1: text follows a closing quote.');
    expect(() => read(','.repeat(400))).toThrow('more than 300 fields');
  });
});

describe('finding the delimiter', () => {
  it.each([
    ['ref,day,kg\nA1,2026-12-01,140\nA2,2026-12-02,150', ','],
    ['ref;day;kg\nA1;2026-12-01;140,5\nA2;2026-12-02;150,0', ';'],
    ['ref\tday, time\nA1\t2026\nA2\t2027', '\t'],
    ['"ref;x","day"\n"A;1","2026"', ','],
    ['one column', ','],
  ])('of %j', (text, expected) => {
    expect(detectDelimiter(text)).toBe(expected);
  });
});

describe('decoding', () => {
  const decode = (bytes: Uint8Array, at: number) => {
    const pieces = new TextPieces();
    return pieces.push(bytes.subarray(0, at)) + pieces.push(bytes.subarray(at)) + pieces.end();
  };

  it('takes UTF-8 with and without its mark, cut anywhere', () => {
    const text = 'Größe;Ünal €\n';
    const plain = new TextEncoder().encode(text);
    const marked = new TextEncoder().encode(`\ufeff${text}`);
    for (let at = 4; at < plain.length; at += 1) {
      expect(decode(plain, at)).toBe(text);
      expect(decode(marked, at)).toBe(text);
    }
  });

  it('takes UTF-16 by its mark, and Windows-1252 where it is no UTF-8', () => {
    expect(decode(new Uint8Array([0xff, 0xfe, 0x41, 0, 0xfc, 0]), 3)).toBe('Aü');
    expect(decode(new Uint8Array([0x47, 0x72, 0xf6, 0xdf, 0x65, 0x3b, 0x31]), 6)).toBe('Größe;1');
  });

  it('refuses what is no text', () => {
    expect(() => decode(new Uint8Array([0x50, 0x4b, 0, 0]), 2)).toThrow('not a text file');
  });
});

describe('reading numbers', () => {
  it.each([
    ['140', 140], ['140.5', 140.5], ['140,5', 140.5], [' 1.234,5 ', 1234.5], ['1,234.5', 1234.5], ['+3', 3], ['1 234,5', 1234.5],
  ])('%j is %d', (text, value) => expect(readNumber(text)).toBe(value));
  it.each(['', 'abc', '12a', '1,2,3', '--4', '1e9', '٣'])('%j is none', (text) => expect(readNumber(text)).toBeUndefined());

  it('reads back a number written with a decimal comma', () => {
    fc.assert(
      fc.property(fc.integer({ min: -99_999_999, max: 99_999_999 }), (tenths) => {
        expect(readNumber((tenths / 10).toFixed(1).replace('.', ','))).toBe(tenths / 10);
      }),
      { seed: 20263 },
    );
  });
});
