import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findSlips, toReadings, type GivenSizes } from '@/lib/domain/size-request/answer';
import { maskAddress } from '@/lib/domain/size-request/size-request';

const given: GivenSizes = { units: 'metric', weight: 140, height: 172, girth: 132, depth: 34, sex: 'female', arms: 'up' };
const slips = (change: Partial<GivenSizes>) => findSlips({ ...given, ...change });

describe('slips of pen and tape', () => {
  it('are not seen in sizes that agree', () => expect(slips({})).toEqual([]));

  it.each([
    [{ girth: 1320 }, 'girth', /1320 looks like millimetres: did you mean 132 cm/, true],
    [{ height: 1.72 }, 'height', /1.72 looks like metres: did you mean 172 cm/, true],
    [{ depth: 340 }, 'depth', /millimetres: did you mean 34 cm/, true],
    [{ girth: 60, depth: 34 }, 'girth', /at least twice/, true],
    [{ weight: 1 }, 'weight', /again/, true],
    [{ weight: 30 }, 'weight', /unusual/, false],
  ] as const)('are asked about: %j', (change, field, text, refused) => {
    const found = slips(change);
    expect(found.find((slip) => slip.field === field)).toMatchObject({ refused, text: expect.stringMatching(text) });
  });

  it('never stop a body of 90 to 300 kg whose girth fits its depth', () => {
    fc.assert(
      fc.property(fc.integer({ min: 90, max: 230 }), fc.integer({ min: 150, max: 195 }), fc.integer({ min: 90, max: 190 }), (weight, height, girth) => {
        expect(slips({ weight, height, girth, depth: Math.floor(girth / 4) }).filter(({ refused }) => refused)).toEqual([]);
      }),
      { seed: 20267 },
    );
  });
});

describe('readings of an answer', () => {
  it('are the same whichever units were chosen, but for the rounding of a tenth', () => {
    const metric = toReadings(given);
    const imperial = toReadings({ ...given, units: 'imperial', weight: 308.6, heightFeet: 5, height: 7.7, girth: 52, depth: 13.4 });
    expect(imperial.map(({ quantity }) => quantity)).toEqual(metric.map(({ quantity }) => quantity));
    // 52 in is 132.1 cm, 13.4 in is 340.4 mm, 5 ft 7.7 in is 172.0 cm: within half a step of the inch figures given.
    metric.forEach((reading, index) => expect(Math.abs(reading.value - imperial[index]!.value)).toBeLessThanOrEqual(0.41));
    expect(metric.every(({ source }) => source === 'reported')).toBe(true);
    expect(metric.find(({ quantity }) => quantity === 'girth-cm')).toMatchObject({ tapeSite: 'iliac-crest' });
  });
});

it('an address is masked beyond use', () => {
  expect(maskAddress('grethe.quarrington@mail.example')).toBe('g…@m….example');
});
