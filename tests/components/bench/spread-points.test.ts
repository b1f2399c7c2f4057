import fc from 'fast-check';
import { expect, it } from 'vitest';
import { spreadPoints, TARGET_PX } from '@/components/bench/spread-points';

it('keeps targets a target’s width apart, moves them to the right only, and none that had its room', () => {
  const pixel = fc.double({ min: 0, max: 120, noNaN: true });
  fc.assert(
    fc.property(fc.array(fc.tuple(pixel, pixel), { maxLength: 12 }), (points) => {
      const spread = spreadPoints(points);
      spread.forEach(([x, y], i) => {
        expect(y).toBe(points[i]![1]);
        expect(x).toBeGreaterThanOrEqual(points[i]![0]);
        // Pixels that round to the same place on any screen.
        for (const [ox, oy] of spread.slice(0, i)) expect(Math.hypot(ox - x, oy - y)).toBeGreaterThan(TARGET_PX - 1e-5);
      });
    }),
    { seed: 20261201, numRuns: 200 },
  );
  const apart = [[0, 0], [TARGET_PX, 0], [0, TARGET_PX]] as const;
  expect(spreadPoints(apart)).toEqual(apart);
});
