import { describe, expect, it } from 'vitest';
import { roundAssessment } from '@/lib/physics';
import { detailOf, overlapCount } from '@/lib/physics/assess/detail-of';
import { floorToLineGrid, mostAcquiredLines } from '@/lib/physics/assess/line-grid';
import { partAlong } from '@/lib/physics/assess/part-along';
import { reachAlongZ } from '@/lib/physics/body/coil-reach';
import type { Vec3 } from '@/lib/physics/model/axes';
import type { Case } from '@/lib/physics/model/case';
import type { PartShape, SolidPart } from '@/lib/physics/model/patient';
import {
  accelerated,
  prescriptionOf,
  slabOf,
  typicalCase,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';
import { seededNumbers } from '@/tests/support/seeded-numbers';

const withCoil = (coilElements: string[] | undefined, tissueReachMm = 250): Case =>
  typicalCase({
    patient: { ...typicalCase().patient, isocentreZMm: 40 },
    prescription: typicalPrescription({ coil: 'spine', coilElements }),
    scanner: typicalScanner({
      tissueReachMm,
      coils: [
        {
          name: 'spine',
          elements: [
            { name: 'low', seesFromMm: -300, seesToMm: -60 },
            { name: 'middle', seesFromMm: -90, seesToMm: 70 },
          ],
        },
      ],
    }),
  });

describe('copies of the body on one place of the reduced picture', () => {
  // Body 340 mm A–P, arms up; FOV 300 in 240 lines, so the acquired width is L·1.25 mm.
  const copies = (acquiredLines: number, factor: number): number =>
    overlapCount(
      typicalCase({
        prescription: typicalPrescription({ acquiredLines, acceleration: accelerated(factor) }),
      }),
    );

  it.each([
    [240, 1, 1],
    [240, 2, 2],
    [240, 2.5, 3],
    [240, 4, 4],
    // 340 mm in 680 mm at R 2: exactly one; a line less and two meet.
    [544, 2, 1],
    [543, 2, 2],
    [544, 4, 2],
    [360, 3, 3],
    [408, 3, 2],
  ])('%d lines, R %d: %d', (lines, factor, expected) => {
    expect(copies(lines, factor)).toBe(expected);
  });

  it('takes g from the prescription or the site’s table, and 1 where nothing overlaps', () => {
    const snr = (factorSlice: number, values: Partial<ReturnType<typeof accelerated>> = {}, lines = 240) =>
      detailOf(
        typicalCase({
          prescription: prescriptionOf('gradient-echo-3d', {
            acquiredLines: lines,
            linesAcrossFov: 240,
            slices: slabOf(),
            acceleration: accelerated(2, { factorSlice, referencePartitions: 24, ...values }),
          }),
        }),
      );
    // The reference lines' share is the same, so range over own g = 1 tells g: table 1.0–1.3 for two copies, 1.3–2.6 for four.
    const ratio = (factorSlice: number) => {
      const { snrRange } = snr(factorSlice);
      const own = snr(factorSlice, { geometryFactor: 1 });
      return [snrRange[1] / own.snr, snrRange[0] / own.snr];
    };
    expect(ratio(1)[0]).toBeCloseTo(1, 12);
    expect(ratio(1)[1]).toBeLessThan(0.85);
    expect(ratio(2)[0]).toBeLessThan(0.85);
    const alone = snr(1, {}, 545);
    expect(alone.snrRange[0]).toBe(alone.snrRange[1]);
    expect(snr(1, { geometryFactor: 3 }, 545).snr).toBe(alone.snr);
  });
});

describe('extent of a part along a direction', () => {
  const shapes: readonly PartShape[] = [
    { type: 'ellipsoid', centreMm: [12, -30, 45], semiAxesMm: [70, 110, 40] },
    {
      type: 'elliptic-cylinder',
      along: 'x',
      centreMm: [5, 20, -10],
      semiAxesMm: [60, 90],
      rotationDeg: 25,
      fromMm: -80,
      toMm: 130,
    },
    {
      type: 'elliptic-cylinder',
      along: 'y',
      centreMm: [-25, 3, 14],
      semiAxesMm: [75, 35],
      rotationDeg: -40,
      fromMm: -55,
      toMm: 60,
    },
    { type: 'elliptic-cylinder', along: 'z', centreMm: [8, -9, 500], semiAxesMm: [120, 66], rotationDeg: 70 },
    {
      type: 'outline-prism',
      along: 'y',
      rings: [
        [
          [-40, -10],
          [70, 5],
          [20, 90],
        ],
      ],
      fromMm: -30,
      toMm: 25,
    },
  ];
  const given = withCoil(undefined);

  it('along x and y ends where the site’s reach about the origin ends, unless it says', () => {
    const open: PartShape = {
      type: 'elliptic-cylinder',
      along: 'y',
      centreMm: [0, 0, 0],
      semiAxesMm: [50, 40],
    };
    const part: SolidPart = { name: 'a part', kind: 'other', shape: open, signalWeight: 1, estimated: false };
    expect(partAlong(part, [0, 1, 0], given)).toEqual([-250, 250]);
    expect(partAlong(part, [1, 0, 0], given)).toEqual([-50, 50]);
  });

  /** Points on the surface of a shape, written apart from the engine: what the engine's closed form must enclose. */
  function* surface(shape: PartShape): Generator<Vec3> {
    const order = { x: [0, 1, 2], y: [1, 0, 2], z: [2, 0, 1] } as const;
    for (let i = 0; i < 720; i++) {
      const t = (i * Math.PI) / 360;
      if (shape.type === 'ellipsoid') {
        for (let j = 0; j <= 360; j++) {
          const f = (j * Math.PI) / 360;
          const [a, b, c] = shape.semiAxesMm;
          yield [
            shape.centreMm[0] + a * Math.sin(f) * Math.cos(t),
            shape.centreMm[1] + b * Math.sin(f) * Math.sin(t),
            shape.centreMm[2] + c * Math.cos(f),
          ];
        }
        continue;
      }
      const [axis, first, second] = order[shape.along];
      const reach = shape.along === 'z' ? [40 - 250, 40 + 250] : [-250, 250];
      for (const end of [Math.max(shape.fromMm ?? -1e9, reach[0]!), Math.min(shape.toMm ?? 1e9, reach[1]!)]) {
        const point: [number, number, number] = [0, 0, 0];
        point[axis] = end;
        if (shape.type === 'outline-prism') {
          const [u, v] = shape.rings[0]![i % 3]!;
          point[first] = u;
          point[second] = v;
        } else {
          const [a, b] = shape.semiAxesMm;
          // Right-handed about the cylinder's axis: y turns to z, z to x, x to y.
          const turn = ((shape.along === 'y' ? -1 : 1) * (shape.rotationDeg ?? 0) * Math.PI) / 180;
          const [u, v] = [a * Math.cos(t), b * Math.sin(t)];
          point[first] = shape.centreMm[first] + u * Math.cos(turn) - v * Math.sin(turn);
          point[second] = shape.centreMm[second] + u * Math.sin(turn) + v * Math.cos(turn);
        }
        yield point;
      }
    }
  }

  it.each(shapes.map((shape, i) => ({ shape, i })))('$shape.type $i', ({ shape }) => {
    const part: SolidPart = { name: 'a part', kind: 'other', shape, signalWeight: 1, estimated: false };
    const next = seededNumbers(5);
    for (let k = 0; k < 4; k++) {
      const raw = [next() - 0.5, next() - 0.5, next() - 0.5] as const;
      const length = Math.hypot(...raw);
      const direction = raw.map((value) => value / length) as unknown as Vec3;
      let least = Infinity;
      let most = -Infinity;
      for (const point of surface(shape)) {
        const along = point[0] * direction[0] + point[1] * direction[1] + point[2] * direction[2];
        least = Math.min(least, along);
        most = Math.max(most, along);
      }
      const [low, high] = partAlong(part, direction, given);
      // Half a degree between points: the farthest one is missed by (1 − cos ¼°) of at most 120 mm, twice on an ellipsoid.
      expect(Math.abs(low - least)).toBeLessThan(0.005);
      expect(Math.abs(high - most)).toBeLessThan(0.005);
    }
  });
});

describe('a part’s ends under some of a coil’s elements', () => {
  const part = (along: 'x' | 'z'): SolidPart => ({
    name: 'a part',
    kind: 'other',
    shape: { type: 'elliptic-cylinder', along, centreMm: [0, 0, 0], semiAxesMm: [50, 40] },
    signalWeight: 1,
    estimated: false,
  });
  it('are what they see along z, and the site’s reach along x, which they do not tell', () => {
    // The middle element sees from 90 mm below to 70 mm above the isocentre at 40 mm.
    const given = withCoil(['middle']);
    expect(partAlong(part('z'), [0, 0, 1], given)).toEqual([40 - 90, 40 + 70]);
    expect(partAlong(part('x'), [1, 0, 0], given)).toEqual([-250, 250]);
  });
});

describe('what coil elements see along z', () => {
  it('is the site’s reach without them, and about the isocentre', () => {
    expect(reachAlongZ(withCoil(undefined))).toEqual({ isocentreZMm: 40, tissueReachMm: 250 });
  });
  it.each([
    [['middle'], 250, -90, 70],
    [['low', 'middle'], 250, -250, 70],
    [['low', 'middle'], 50, -50, 50],
    [['low'], 400, -300, -60],
  ] as const)('%j within %d mm: %d to %d from the isocentre', (names, reach, low, high) => {
    const { isocentreZMm, tissueReachMm } = reachAlongZ(withCoil([...names], reach));
    expect(isocentreZMm - tissueReachMm).toBeCloseTo(40 + low, 9);
    expect(isocentreZMm + tissueReachMm).toBeCloseTo(40 + high, 9);
  });
  it('refuses no element, an unknown one, and one that sees nothing', () => {
    expect(() => reachAlongZ(withCoil([]))).toThrow(expect.objectContaining({ code: 'no-coil-element' }));
    expect(() => reachAlongZ(withCoil(['high']))).toThrow(
      expect.objectContaining({ code: 'coil-element-unknown' }),
    );
    expect(() => reachAlongZ(withCoil(['low'], 60))).toThrow(
      expect.objectContaining({ code: 'no-coil-element' }),
    );
  });
});

describe('rounding of presented values', () => {
  it('1 µm, 1 ms, shares 1e-6, areas 0.1 mm², SNR six figures', () => {
    expect(
      roundAssessment({
        aMm: 1.23456,
        tS: 1.23456,
        trMs: 1.23456,
        share: 0.12345678,
        foldMm2: 12.345,
        snr: 123.456789,
        snrRange: [0.1234567891, 1],
        probability: 0.12345678,
        lines: 3,
        far: Infinity,
      }),
    ).toEqual({
      aMm: 1.235,
      tS: 1.235,
      trMs: 1.235,
      share: 0.123457,
      foldMm2: 12.3,
      snr: 123.457,
      snrRange: [0.123457, 1],
      probability: 0.123457,
      lines: 3,
      far: Infinity,
    });
  });
});

describe('the scanner’s grid from above', () => {
  it('finds the largest number of lines it can be set to', () => {
    expect(floorToLineGrid(251.9, 240, { kind: 'even-lines' })).toBe(250);
    expect(floorToLineGrid(252, 240, { kind: 'even-lines' })).toBe(252);
    expect(floorToLineGrid(251.9995, 240, { kind: 'line' })).toBe(251);
    expect(floorToLineGrid(300, 240, { kind: 'percent', percent: 10 })).toBe(288);
    expect(floorToLineGrid(479, 240, { kind: 'doubling' })).toBe(240);
    expect(floorToLineGrid(480 - 1e-12, 240, { kind: 'doubling' })).toBe(480);
    expect(floorToLineGrid(239, 240, { kind: 'line' })).toBeUndefined();
  });
  it('a percentage’s maximum is rounded up to whole lines, never past the scanner’s own', () => {
    const limits = typicalScanner().limits;
    expect(mostAcquiredLines(100, { ...limits, phaseOversamplingMaxPct: 33.3 })).toBe(134);
    expect(mostAcquiredLines(100, { ...limits, phaseOversamplingMaxPct: 100 })).toBe(200);
    expect(mostAcquiredLines(600, { ...limits, phaseOversamplingMaxPct: 100, acquiredLinesMax: 1024 })).toBe(
      1024,
    );
    // 256·1.1 is 281.6 with a rounding error above it: still 282 lines, and 250·1.1 still 275.
    expect(mostAcquiredLines(250, { ...limits, phaseOversamplingMaxPct: 10 })).toBe(275);
  });
});
