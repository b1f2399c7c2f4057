import { describe, expect, it } from 'vitest';
import { KEEP_CLEAR_PRESETS, keepClearOfPreset, keepClearPresetsFor } from '@/lib/domain/protocol/keep-clear-presets';
import { keepClearSchema } from '@/lib/schemas/case';

const body = (half: number) => ({ right: half, left: half, anterior: half, posterior: half, superior: half, inferior: half });
const widthOf = (key: string, half: number): number => {
  const { area } = keepClearOfPreset(key, body(half))!;
  return area.kind === 'box' ? area.box.xMm[1] - area.box.xMm[0] : Infinity;
};

describe('keep-clear presets', () => {
  it('every one makes an area the forms accept, for small bodies and large', () => {
    for (const { key } of KEEP_CLEAR_PRESETS) {
      for (const half of [60, 150, 320]) {
        expect(keepClearSchema.safeParse(keepClearOfPreset(key, body(half))).success, `${key} ${half}`).toBe(true);
      }
    }
  });
  it('an organ grows with the body only so far', () => {
    expect(widthOf('liver', 120)).toBeLessThan(widthOf('liver', 200));
    expect(widthOf('liver', 300)).toBe(widthOf('liver', 500));
  });
  it('a region offers its own, whole picture first; an unknown key is none', () => {
    expect(keepClearPresetsFor('abdomen').map(({ key }) => key)).toEqual(['whole-picture', 'liver', 'pancreas', 'kidneys', 'bowel']);
    expect(keepClearPresetsFor('knee').map(({ key }) => key)).toEqual(['whole-picture']);
    expect(keepClearOfPreset('own', body(200))).toBeUndefined();
  });
});
