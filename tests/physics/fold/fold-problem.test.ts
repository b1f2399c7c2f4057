import { describe, expect, it } from 'vitest';
import { growInReadout } from '@/lib/physics/fold/displacement';
import { foldProblem, usableVolume } from '@/lib/physics/fold/fold-problem';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { straight, valueAt } from '@/lib/physics/section/curve';
import type { RowBand } from '@/lib/physics/section/row-band';
import {
  extentsOf,
  prescriptionOf,
  slabOf,
  typicalCase,
  typicalPatient,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';
import { boxPart, ellipsePart, NO_MARGIN_MM, samplePrescription, sampleProblem } from './sample-problem';

describe('where the scanner maps rightly', () => {
  const volume = (position: 'head-first-supine' | 'head-first-prone') =>
    usableVolume(
      typicalCase({
        patient: typicalPatient({
          position,
          lateralOffsetMm: 12,
          isocentreZMm: -30,
          extents: extentsOf({ anterior: 150, posterior: 180 }),
        }),
        scanner: typicalScanner({ tableBelowCentreMm: 160, limits: { usableFovMm: [520, 500, 450] } }),
      }),
    );
  it('is the usable FOV about the isocentre, from the back on the table', () => {
    // The back at y = 180 lies 160 mm below the centre, so the centre is at y = 20; the mid-line 12 mm to the left of it.
    expect(volume('head-first-supine')).toEqual({ centreMm: [-12, 20, -30], halfMm: [260, 250, 225] });
  });
  it('from the front when prone', () => {
    // The front at y = −150 lies 160 mm below the centre, which is behind it: at y = 10.
    expect(volume('head-first-prone').centreMm).toEqual([-12, 10, -30]);
  });
});

describe('how far a geometry class may be oversampled', () => {
  const of = (linesAcrossFov: number, phasePct: number, slicePct: number, acquiredLinesMax = 1024) =>
    foldProblem(
      typicalCase({
        prescription: prescriptionOf('gradient-echo-3d', {
          linesAcrossFov,
          acquiredLines: linesAcrossFov,
          slices: slabOf({ partitions: 50, acquiredPartitions: 50 }),
        }),
        scanner: typicalScanner({
          limits: { phaseOversamplingMaxPct: phasePct, sliceOversamplingMaxPct: slicePct, acquiredLinesMax },
        }),
      }),
    );
  it('whole lines and partitions, up to the percentage or the scanner’s own maximum', () => {
    expect(of(250, 10, 10)).toMatchObject({ acquiredLinesMax: 275, acquiredPartitionsMax: 55 });
    expect(of(100, 80, 100)).toMatchObject({ acquiredLinesMax: 180, acquiredPartitionsMax: 100 });
    expect(of(600, 100, 0)).toMatchObject({ acquiredLinesMax: 1024, acquiredPartitionsMax: 50 });
    expect(foldProblem(typicalCase({ prescription: typicalPrescription() })).acquiredPartitionsMax).toBe(1);
  });
});

describe('a keep-clear section grown along readout', () => {
  const heights = (bands: readonly RowBand[], r: number): readonly [number, number] | undefined => {
    const band = bands.find(({ r0, r1 }) => r >= r0 && r <= r1);
    return band && [valueAt(band.lower, r), valueAt(band.upper, r)];
  };
  it.each([
    ['lower edge slopes', straight(-20, 0.5), straight(40)],
    ['upper edge slopes', straight(-40), straight(20, -0.5)],
    ['both slope', straight(-30, 0.2), straight(30, 0.4)],
    ['neither slopes', straight(-30), straight(30)],
  ] as const)('holds what the area holds when it moves: %s', (_, lower, upper) => {
    const area: RowBand = { r0: -30, r1: 50, lower, upper };
    const grown = growInReadout([area], [6, 9]);
    for (let r = -38.5; r < 55; r += 3) {
      // Tissue may come from 6 mm lower or 9 mm higher: rows from r − 6 to r + 9 count.
      const rows = Array.from({ length: 61 }, (_unused, i) => r - 6 + (15 * i) / 60).filter(
        (row) => row >= -30 && row <= 50,
      );
      const [low, high] = heights(grown, r)!;
      expect(low).toBeCloseTo(Math.min(...rows.map((row) => valueAt(lower, row))), 0.4);
      expect(high).toBeCloseTo(Math.max(...rows.map((row) => valueAt(upper, row))), 0.4);
    }
    expect([Math.min(...grown.map(({ r0 }) => r0)), Math.max(...grown.map(({ r1 }) => r1))]).toEqual([
      -39, 56,
    ]);
  });
});

describe('the width that covers the body', () => {
  const cover = (
    posterior: number,
    anterior: number,
    centreY: number,
    margin: Partial<typeof NO_MARGIN_MM> = {},
  ): number =>
    solveFold(
      sampleProblem(
        [boxPart('trunk', { xMm: [-150, 150], yMm: [-anterior, posterior], zMm: [-250, 250] })],
        samplePrescription({ centreMm: [0, centreY, 0] }),
        { marginMm: { ...NO_MARGIN_MM, ...margin } },
      ),
    ).requirement().coverBodyMm;
  it('is twice the farther side from the FOV centre, its margin added, and never less than the FOV', () => {
    expect(cover(170, 160, 0)).toBeCloseTo(340, 9);
    expect(cover(170, 160, 20)).toBeCloseTo(360, 9);
    expect(cover(170, 160, -20)).toBeCloseTo(380, 9);
    expect(cover(170, 160, 0, { posterior: 7, anterior: 3 })).toBeCloseTo(354, 9);
    expect(cover(160, 170, 0, { posterior: 3, anterior: 9 })).toBeCloseTo(358, 9);
    expect(cover(160, 170, 0, { posterior: 25, anterior: 9 })).toBeCloseTo(370, 9);
    expect(cover(100, 90, 0)).toBe(300);
  });
  it('asks only about rows that the picture shows', () => {
    // An ellipse of half-depth 200 and half-breadth 150, in rows from x 10 to 110 and from −110 to −10: deepest at 10.
    for (const centreX of [60, -60, 0]) {
      const given = sampleProblem(
        [ellipsePart('trunk', [0, 0], [150, 200])],
        samplePrescription({ centreMm: [centreX, 0, 0], fovReadoutMm: 100 }),
      );
      const deepest = centreX === 0 ? 200 : 200 * Math.sqrt(1 - (10 / 150) ** 2);
      expect(solveFold(given).requirement().coverBodyMm).toBeCloseTo(2 * deepest, 6);
    }
  });
});
