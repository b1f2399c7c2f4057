import fc from 'fast-check';
import { asSentence } from '@/components/ui/field';
import { describe, expect, it } from 'vitest';
import { formatPlain, numberProblem, parseNumber, stepNumber } from '@/components/ui/parse-number';

describe('reading a typed number', () => {
  it.each([
    ['300', 300],
    [' 12,5 ', 12.5],
    ['12.5', 12.5],
    ['.5', 0.5],
    ['7,', 7],
    ['\u221220', -20],
    ['1\u202f200', 1200],
    ['300 mm', 300],
    ['300mm', 300],
    ['', null],
    ['mm', null],
  ])('%j is %s', (text, expected) => {
    expect(parseNumber(text, 'mm')).toBe(expected);
  });

  it.each(['abc', '1,234.5', '1.2.3', '12 5', '1e3', 'Infinity', '--3', '0x10', '12cm'])(
    '%j is not a number',
    (text) => {
      expect(parseNumber(text, 'mm')).toBeNaN();
    },
  );

  it('reads back what it writes, with comma or point', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -9_999_999, max: 9_999_999 }),
        fc.integer({ min: 0, max: 6 }),
        (whole, places) => {
          const value = whole / 10 ** places;
          const text = formatPlain(value);
          // Six decimals are kept and 7-digit integers have at most six places here, so nothing is lost.
          expect(parseNumber(text)).toBe(value === 0 ? 0 : value);
          expect(parseNumber(text.replace('.', ','))).toBe(value === 0 ? 0 : value);
        },
      ),
      { seed: 20_261_201 },
    );
  });
});

describe('stepping', () => {
  it('holds the limits and leaves no binary dust', () => {
    expect(stepNumber(0.1, 0.2)).toBe(0.3);
    expect(stepNumber(299, 10, 0, 300)).toBe(300);
    expect(stepNumber(1, -10, 0, 300)).toBe(0);
    expect(stepNumber(null, 1, 5)).toBe(5);
    expect(stepNumber(Number.NaN, 1)).toBe(0);
  });
});

describe('what is wrong with a number', () => {
  it('names what was given and what is allowed', () => {
    expect(numberProblem('1200', 1200, { min: 100, max: 600, unit: 'mm' })).toBe(
      '1200 is too large; allowed: 100 to 600 mm',
    );
    expect(numberProblem('12 5', Number.NaN, { min: 0 })).toBe('“12 5” is not a number; allowed: 0 or more');
    expect(numberProblem('2.5', 2.5, { min: 1, max: 8, whole: true })).toBe(
      '2.5 is not a whole number; allowed: 1 to 8',
    );
    expect(numberProblem('', null, { min: 1 })).toBe('nothing given; allowed: 1 or more');
    expect(numberProblem('', null, { min: 1, optional: true })).toBeUndefined();
    expect(numberProblem('300', 300, { min: 100, max: 600 })).toBeUndefined();
  });
});

describe('a refusal beside its field', () => {
  it.each([
    ['nothing given; allowed: text of 1 to 60 characters', 'Nothing given; allowed: text of 1 to 60 characters.'],
    ['nothing given; allowed: 1 or more', 'Nothing given; allowed: 1 or more.'],
    ['“x” given; allowed: a number, 1 to 8 T', '“x” given; allowed: a number, 1 to 8 T.'],
    ['Take one out first.', 'Take one out first.'],
  ])('%s', (written, read) => {
    expect(asSentence(written)).toBe(read);
  });
});
