import { describe, expect, it } from 'vitest';
import { cosSin, cross, rotateAbout } from '@/lib/physics/geometry/vector';

describe('turning about an axis', () => {
  it.each([-90, -30, -1, -0.01, 0.01, 1, 45, 90, 180, 359, 450])(
    'x about z by %d° is (cos, sin, 0)',
    (degrees) => {
      const [x, y, z] = rotateAbout([1, 0, 0], [0, 0, 1], degrees);
      expect(x).toBeCloseTo(Math.cos((degrees * Math.PI) / 180), 12);
      expect(y).toBeCloseTo(Math.sin((degrees * Math.PI) / 180), 12);
      expect(z).toBe(0);
    },
  );
  it('keeps what lies along the axis and the length of the rest', () => {
    const axis = [2 / 7, 3 / 7, 6 / 7] as const;
    const turned = rotateAbout([2, 3, 6], axis, 77);
    turned.forEach((value, i) => expect(value).toBeCloseTo([2, 3, 6][i]!, 12));
    expect(Math.hypot(...rotateAbout([5, -1, 2], axis, 33))).toBeCloseTo(Math.hypot(5, -1, 2), 12);
  });
  it('quarter turns are exact, about every axis', () => {
    expect([0, 90, 180, 270, 360, -90].map(cosSin)).toEqual([
      [1, 0],
      [0, 1],
      [-1, 0],
      [0, -1],
      [1, 0],
      [0, -1],
    ]);
    expect(cross([1, 0, 0], [0, 1, 0])).toEqual([0, 0, 1]);
    expect(cross([0, 1, 0], [0, 0, 1])).toEqual([1, 0, 0]);
    expect(cross([0, 0, 1], [1, 0, 0])).toEqual([0, 1, 0]);
  });
});
