import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fromPixels, toPixels, type Fit } from '@/components/schematic/scene/scene';
import { MOST_ZOOM, panBy, pinchBy, WHOLE_PICTURE, zoomBy, zoomedFit } from '@/components/bench/zoom/zoom';

const SIZE = { widthPx: 800, heightPx: 500 };
const WHOLE: Fit = { scale: 1.3, x: 410, y: 240 };
/** Pixels; sums of a few products, so far below what a screen shows. */
const NEAR = 9;

describe('zoom and pan of a picture', () => {
  it('the whole picture is its own fit', () => {
    expect(zoomedFit(WHOLE, WHOLE_PICTURE, SIZE)).toEqual(WHOLE);
  });

  it('keeps under the pointer what lies under it', () => {
    const pixel = fc.tuple(fc.double({ min: 0, max: 800, noNaN: true }), fc.double({ min: 0, max: 500, noNaN: true }));
    fc.assert(
      fc.property(pixel, fc.double({ min: 1, max: 3, noNaN: true }), fc.double({ min: 1, max: 2, noNaN: true }), (at, first, then) => {
        const before = zoomBy(WHOLE_PICTURE, first, SIZE, at);
        const after = zoomBy(before, then, SIZE, at);
        const under = fromPixels(zoomedFit(WHOLE, before, SIZE), at);
        const [x, y] = toPixels(zoomedFit(WHOLE, after, SIZE), under);
        expect(x).toBeCloseTo(at[0], NEAR);
        expect(y).toBeCloseTo(at[1], NEAR);
      }),
      { seed: 20260302, numRuns: 200 },
    );
  });

  it('stops at eight times and at the whole picture, which cannot be moved', () => {
    expect(zoomBy(WHOLE_PICTURE, 100, SIZE).factor).toBe(MOST_ZOOM);
    expect(zoomBy(zoomBy(WHOLE_PICTURE, 4, SIZE, [700, 20]), 0.01, SIZE)).toEqual(WHOLE_PICTURE);
    expect(panBy(WHOLE_PICTURE, [50, -30], SIZE)).toEqual(WHOLE_PICTURE);
  });

  it('is moved to its own edge, not further', () => {
    const twice = zoomBy(WHOLE_PICTURE, 2, SIZE);
    expect(panBy(twice, [-60, 25], SIZE).movedPx).toEqual([-60, 25]);
    expect(panBy(twice, [5000, -5000], SIZE).movedPx).toEqual([400, -250]);
  });

  it('keeps under both fingers what lies under them while they part and move', () => {
    const from = [[300, 250], [420, 210]] as const;
    const to = [[250, 260], [520, 170]] as const;
    const before = zoomBy(WHOLE_PICTURE, 2, SIZE);
    const after = pinchBy(before, from, to, SIZE);
    // Both pairs lie in one direction: the picture is not turned.
    expect((to[1][1] - to[0][1]) / (to[1][0] - to[0][0])).toBeCloseTo((from[1][1] - from[0][1]) / (from[1][0] - from[0][0]), NEAR);
    from.forEach((at, i) => {
      const [x, y] = toPixels(zoomedFit(WHOLE, after, SIZE), fromPixels(zoomedFit(WHOLE, before, SIZE), at));
      expect(x).toBeCloseTo(to[i]![0], NEAR);
      expect(y).toBeCloseTo(to[i]![1], NEAR);
    });
  });

  it('a pinch together ends at the whole picture, and two fingers on one spot ask for nothing impossible', () => {
    const before = zoomBy(WHOLE_PICTURE, 3, SIZE, [100, 400]);
    expect(pinchBy(before, [[100, 100], [700, 400]], [[380, 240], [390, 245]], SIZE)).toEqual(WHOLE_PICTURE);
    const { factor } = pinchBy(before, [[50, 50], [50, 50]], [[50, 50], [50, 50]], SIZE);
    expect(factor).toBe(before.factor);
  });
});
