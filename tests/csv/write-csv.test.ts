import { describe, expect, it } from 'vitest';
import { csvCell, writeCsv } from '@/lib/csv/write-csv';

describe('a cell of a download', () => {
  it.each([
    ['=1+1', "'=1+1"], ['+1', "'+1"], ['-1', "'-1"], ['@sum', "'@sum"], ['\tx', '"\'\tx"'], ['plain', 'plain'], ['a,b', '"a,b"'], ['a;b', '"a;b"'],
    ['say "x"', '"say ""x"""'], ['two\nlines', '"two\nlines"'], [-3, '-3'], [' padded ', '" padded "'],
  ])('%j is written %j', (value, written) => {
    expect(csvCell(value)).toBe(written);
  });

  it('lines end as RFC 4180 says, after a byte-order mark', () => {
    expect(writeCsv(['a', 'b'], [['1', 2]])).toBe('\ufeffa,b\r\n1,2\r\n');
  });
});
