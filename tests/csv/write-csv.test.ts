import { describe, expect, it } from 'vitest';
import { csvCell, writeCsv } from '@/lib/csv/write-csv';

describe('a cell of a download', () => {
  it.each([
    ['=1+1', "'=1+1"], ['+1', "'+1"], ['-1', "'-1"], ['@sum', "'@sum"], ['\tx', '"\'\tx"'], ['plain', 'plain'], ['a,b', '"a,b"'], ['a;b', '"a;b"'],
    ['say "x"', '"say ""x"""'], ['two\nlines', '"two\nlines"'], [-3, '-3'], [' padded ', '" padded "'],
  ])('%j is written %j', (value, written) => {
    expect(csvCell(value)).toBe(written);
  });

  it.each([
    ['x;=1+1', `"x;'=1+1"`], ['x\t@sum', `"x\t'@sum"`], ['x\r\n+1', `"x\r\n'+1"`], ['x;"=1"', `"x;'""=1"""`], ['=1;-2;+3', `"'=1;'-2;'+3"`],
  ])('%j, split by a spreadsheet set to semicolons or tabs, runs nowhere: %j', (value, written) => {
    expect(csvCell(value)).toBe(written);
  });

  it.each(['a;b', 'a; b = c', 'x\ty', 'one\ntwo', 'T1 = 4', 'liver - both', 'a@b', 'x; "y"'])('%j is the same text when read', (text) => {
    expect(csvCell(text).replace(/^"(.*)"$/s, '$1').replaceAll('""', '"')).toBe(text);
  });

  it('lines end as RFC 4180 says, after a byte-order mark', () => {
    expect(writeCsv(['a', 'b'], [['1', 2]])).toBe('\ufeffa,b\r\n1,2\r\n');
  });
});
