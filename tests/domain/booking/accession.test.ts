import { describe, expect, it } from 'vitest';
import { accessionRefusal, maskRefusal } from '@/lib/domain/booking/accession';

describe('an accession number', () => {
  it.each([
    ['HB-2107', 'HB-####'], ['A1234567', '@#######'], ['MR.2026/0417-3', '*'], ['1234567', '#######'], ['HARBOUR-12', 'HARBOUR-##'],
    ['99999999', '########'],
  ])('%s is taken by the mask %s', (text, mask) => expect(accessionRefusal(text, mask)).toBeUndefined());

  it.each([
    ['HB-21', 'HB-####'], ['hb-2107', 'HB-####'], ['HB-2107 ', 'HB-####'], ['XB-2107', 'HB-####'], ['HB.2107', 'HB-####'],
  ])('%s is refused by the mask %s', (text, mask) => expect(accessionRefusal(text, mask)).toBeDefined());

  it.each(['Miller', 'MILLER^ANNA', 'Miller, Anna 2', 'anna.miller1', 'Ærøskøbing7', 'JANSEN-12'])(
    '%s looks like a name and is not repeated in the message',
    (text) => {
      const refusal = accessionRefusal(text, '*');
      expect(refusal).toMatch(/^This looks like a name\./);
      expect(refusal).not.toContain(text);
    },
  );

  it.each(['1961-04-12', '12.04.1961', '4/12/61', '19610412', '12041961', 'DOB19610412', 'X-1961-4-2'])(
    '%s looks like a date and is not repeated in the message',
    (text) => {
      const refusal = accessionRefusal(text, '*');
      expect(refusal).toMatch(/^This looks like a date\./);
      expect(refusal).not.toContain(text);
    },
  );

  it('a longer number that holds a date is none', () => expect(accessionRefusal('2026041700012', '*')).toBeUndefined());

  it('signs of a mask stand for themselves', () => {
    expect(accessionRefusal('A+1.2', '@+#.#')).toBeUndefined();
    expect(accessionRefusal('AA1x2', '@+#.#')).toBeDefined();
  });

  it('long input against runs is answered at once', () => {
    const started = performance.now();
    accessionRefusal(`${'1'.repeat(63)}!`, '*#*#');
    // Two runs at most: some thousand steps. A second would mean that matching explodes.
    expect(performance.now() - started).toBeLessThan(1000);
  });

  it.each([['', 1], ['****', 1], ['a b', 1], ['HB-####', 0], ['*-*', 0]])('mask “%s”', (mask, refused) => {
    expect(maskRefusal(mask) === undefined).toBe(refused === 0);
  });
});
