import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { boxPart, samplePrescription, sampleProblem } from './sample-problem';

const whole = (min: number, max: number) => fc.integer({ min, max });
/** Ends in whole millimetres, at least one apart. */
const range = (min: number, max: number) =>
  fc
    .tuple(whole(min, max - 1), whole(1, 160))
    .map(([from, length]) => [from, Math.min(from + length, max)] as const);

type Range = readonly [number, number];
const meets = ([a, b]: Range, [c, d]: Range) => Math.max(a, c) < Math.min(b, d);

describe('boxes that fold, worked out by hand', () => {
  const F = 200;
  const readout: Range = [-120, 120];
  const displayed: Range = [-F / 2, F / 2];
  const box = fc.record({ x: range(-150, 150), y: range(-420, 420) });

  it('areas, deepest reach, whence and how far', () => {
    let [inside, outside, clean] = [0, 0, 0];
    fc.assert(
      fc.property(
        fc.array(box, { minLength: 1, maxLength: 3 }),
        fc.record({ x: range(-110, 110), y: range(-90, 90) }),
        whole(200, 420),
        (boxes, clear, widthMm) => {
          const problem = sampleProblem(
            boxes.map(({ x, y }, i) => boxPart(`box ${i}`, { xMm: x, yMm: y, zMm: [-50, 50] })),
            samplePrescription({
              fovPhaseMm: F,
              linesAcrossFov: F,
              fovReadoutMm: 240,
              acquiredLines: widthMm,
            }),
            {
              keepClear: {
                axes: [
                  [1, 0, 0],
                  [0, 1, 0],
                  [0, 0, 1],
                ],
                rangesMm: [clear.x, clear.y, [-40, 40]],
              },
            },
          );
          const left = solveFold(problem).leftover(widthMm);

          // Every box moved by every whole number of widths but none.
          const landed = boxes.flatMap(({ x, y }, i) =>
            [-5, -4, -3, -2, -1, 1, 2, 3, 4, 5].map((n) => ({
              i,
              n,
              x,
              y: [y[0] - n * widthMm, y[1] - n * widthMm] as const,
            })),
          );
          const reaching = landed.filter((one) => meets(one.x, clear.x) && meets(one.y, clear.y));
          expect(left.inKeepClear).toBe(reaching.length > 0);
          const seen = landed.filter((one) => meets(one.x, readout) && meets(one.y, displayed));
          if (seen.length === 0) {
            clean++;
            expect(left.outsideKeepClear).toBe(false);
            return;
          }
          // Square millimetres that hold at least one of them.
          const covered = (inX: Range, inY: Range) => {
            let count = 0;
            for (let x = inX[0]; x < inX[1]; x++) {
              const column = seen.filter((one) => one.x[0] <= x && x < one.x[1]);
              if (column.length === 0) continue;
              for (let y = inY[0]; y < inY[1]; y++)
                if (column.some((one) => one.y[0] <= y && y < one.y[1])) count++;
            }
            return count;
          };
          const all = covered(readout, displayed);
          const within = covered(clear.x, clear.y);
          // Rows of a box are all alike, so the sum over rows is exact but for rounding.
          expect(left.displayedAreaMm2).toBeCloseTo(all, 4);
          expect(left.keepClearAreaMm2).toBeCloseTo(within, 4);
          expect(left.displayedShare).toBeCloseTo(all / (F * 240), 9);
          expect(left.keepClearShare).toBeCloseTo(
            within / ((clear.x[1] - clear.x[0]) * (clear.y[1] - clear.y[0])),
            9,
          );
          expect(left.outsideKeepClear).toBe(!left.inKeepClear || all > within);
          if (reaching.length === 0) {
            outside++;
            expect(left).toMatchObject({ depthMm: 0, depthWithMarginMm: 0 });
            expect(left.from).toBeUndefined();
            return;
          }
          inside++;
          // What comes from beyond the high edge enters from the low one, and the other way about.
          const depth = (one: (typeof landed)[number]) =>
            one.n > 0 ? one.y[1] - clear.y[0] : clear.y[1] - one.y[0];
          const most = Math.max(...reaching.map(depth));
          expect(left.depthMm).toBeCloseTo(most, 6);
          expect(left.depthWithMarginMm).toBeCloseTo(most, 6);
          const deepest = reaching.filter((one) => depth(one) === most);
          expect(deepest.map(({ i }) => `box ${i}`)).toContain(left.from!.part);
          const one = deepest.find(({ i, n }) => `box ${i}` === left.from!.part && -n === left.from!.order);
          expect(one).toBeDefined();
          expect(left.from!.side).toBe(one!.n > 0 ? 'posterior' : 'anterior');
          expect(left.from!.distanceMm).toBeCloseTo(Math.abs(one!.n) * widthMm, 6);
          expect(left).toMatchObject({ ghosts: false });
        },
      ),
      { seed: 61, numRuns: 250 },
    );
    // All three happen.
    expect(Math.min(inside, outside, clean)).toBeGreaterThan(10);
  });

  it('a margin reaches as far more, on its own side, and covers no area', () => {
    const given = (marginMm: Partial<Record<'anterior' | 'posterior', number>>) =>
      solveFold(
        sampleProblem(
          [boxPart('trunk', { xMm: [-50, 50], yMm: [-90, 130], zMm: [-50, 50] })],
          samplePrescription({ fovPhaseMm: F, linesAcrossFov: F, fovReadoutMm: 240, acquiredLines: 240 }),
          {
            marginMm: { right: 0, left: 0, anterior: 0, posterior: 0, superior: 0, inferior: 0, ...marginMm },
          },
        ),
      ).leftover(210);
    // 130 lands at −80: 20 mm into the picture from −100, over 100 mm of rows.
    expect(given({})).toMatchObject({
      depthMm: 20,
      depthWithMarginMm: 20,
      displayedAreaMm2: expect.closeTo(2000, 4) as number,
    });
    expect(given({ posterior: 7 })).toMatchObject({
      depthMm: 20,
      depthWithMarginMm: 27,
      displayedAreaMm2: expect.closeTo(2000, 4) as number,
      from: { side: 'posterior', order: -1, distanceMm: 210 },
    });
    expect(given({ anterior: 7 })).toMatchObject({ depthMm: 20, depthWithMarginMm: 20 });
    // −90 would need 20 mm more to come in at the other edge.
    expect(given({ anterior: 45 })).toMatchObject({
      depthMm: 20,
      depthWithMarginMm: 25,
      from: { side: 'anterior', order: 1, distanceMm: 210 },
    });
  });
});
