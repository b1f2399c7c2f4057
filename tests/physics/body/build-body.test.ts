import { describe, expect, it } from 'vitest';
import { buildBody } from '@/lib/physics/body/build-body';
import { partSolids } from '@/lib/physics/body/part-solids';
import { presaturatedWeight } from '@/lib/physics/body/presaturated-weight';
import { outlineTrapezoids } from '@/lib/physics/body/outline-trapezoids';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import type { BodyRegion, Patient, Reading, SolidPart } from '@/lib/physics/model/patient';
import { SIDES, type Side } from '@/lib/physics/model/axes';
import { bandRings } from '@/lib/physics/section/band-outline';
import { cutSolid, solidInSection } from '@/lib/physics/section/convex-solid';
import { samplePrescription } from '../fold/sample-problem';

const measured = (value: number): Reading => ({ value, source: 'measured', spread: 0 });

export function samplePatient(
  region: BodyRegion,
  extents: Partial<Record<Side, number | Reading>> = {},
  changes: Partial<Patient> = {},
): Patient {
  const sizes: Record<Side, number> = {
    right: 240,
    left: 240,
    anterior: 170,
    posterior: 170,
    superior: 120,
    inferior: 120,
  };
  return {
    region,
    extents: Object.fromEntries(
      SIDES.map((side) => {
        const given = extents[side] ?? sizes[side];
        return [side, typeof given === 'number' ? measured(given) : given];
      }),
    ) as Record<Side, Reading>,
    arms: { position: 'down', breadthMm: 100, depthMm: 110, gapMm: 15 },
    breathHoldS: measured(15),
    breathPeriodS: measured(4),
    position: 'head-first-supine',
    lateralOffsetMm: 0,
    isocentreZMm: 0,
    ...changes,
  };
}

/** [low, high] of a body along x, y and z, by its outlines in axial and sagittal sections. */
function extentOf(parts: readonly SolidPart[], pick: (part: SolidPart) => boolean = () => true) {
  const range = (plane: 'axial' | 'sagittal' | 'coronal', slices: readonly number[], index: 0 | 1) => {
    const values = slices.flatMap((s) => {
      const frame = sectionFrame(
        samplePrescription({ plane, phaseAxis: plane === 'axial' ? 'AP' : 'SI' }),
        s,
      );
      const solids = partSolids(
        parts.filter(pick),
        { isocentreZMm: 0, tissueReachMm: 400 },
        { bands: [], b1Scale: 1, t1Ms: [1] },
        -1,
      );
      return solids.flatMap(({ solid }) =>
        bandRings(cutSolid(solidInSection(solid, frame), s))
          .flat()
          .map((point) => point[index]),
      );
    });
    return values.length ? ([Math.min(...values), Math.max(...values)] as const) : undefined;
  };
  const steps = Array.from({ length: 159 }, (_, i) => (i - 79) * 5 + 0.01);
  return { x: range('axial', steps, 0), y: range('axial', steps, 1), z: range('coronal', steps, 1) };
}

describe('bodies from the size record', () => {
  it('abdomen: trunk between the one-sided extents, centred at ((L − R)/2, (P − A)/2)', () => {
    const [trunk] = buildBody(
      samplePatient('abdomen', { right: 200, left: 260, anterior: 180, posterior: 140 }),
    );
    expect(trunk).toMatchObject({
      name: 'trunk',
      estimated: false,
      shape: { type: 'elliptic-cylinder', along: 'z', centreMm: [30, -20, 0], semiAxesMm: [230, 160] },
    });
  });

  it('arms lie at the side unless up; an arm that cannot be raised is down', () => {
    const names = (position: Patient['arms']['position']) =>
      buildBody(
        samplePatient('pelvis', {}, { arms: { position, breadthMm: 100, depthMm: 110, gapMm: 15 } }),
      ).map((one) => one.name);
    expect(names('up')).toEqual(['trunk']);
    expect(names('down')).toEqual(['trunk', 'right arm', 'left arm']);
    expect(names('cannot-be-raised')).toEqual(['trunk', 'right arm', 'left arm']);
    const left = buildBody(samplePatient('abdomen')).find((one) => one.name === 'left arm')!;
    // From 240 + 15 to 240 + 15 + 100.
    expect(left).toMatchObject({ estimated: true, shape: { centreMm: [305, 0, 0], semiAxesMm: [50, 55] } });
  });

  it.each(['abdomen', 'pelvis', 'chest', 'shoulder', 'hip', 'breast'] as const)(
    '%s: trunk, breasts and shoulders fill the measured breadth and depth, no more',
    (region) => {
      const parts = buildBody(samplePatient(region, { right: 90, left: 400, anterior: 150, posterior: 120 }));
      const body = extentOf(parts, (one) => ['trunk', 'breast', 'leg'].includes(one.kind));
      // Outlines are drawn at 5 mm sections, and their ends fall short by under 0.3 mm.
      expect(body.x![0]).toBeCloseTo(-90, -0.5);
      expect(body.x![1]).toBeCloseTo(400, -0.5);
      expect(body.y![0]).toBeCloseTo(-150, -0.5);
      expect(body.y![1]).toBeCloseTo(120, -0.5);
      for (const [value, edge] of [
        [body.x![0], -90],
        [-body.x![1], -400],
        [body.y![0], -150],
        [-body.y![1], -120],
      ] as const) {
        expect(value).toBeGreaterThanOrEqual(edge - 0.001);
      }
    },
  );

  it('head: fills crown to chin and the profile to the nose tip; neck and shoulders follow below', () => {
    const parts = buildBody(
      samplePatient('head', {
        right: 78,
        left: 78,
        anterior: 110,
        posterior: 95,
        superior: 110,
        inferior: 120,
      }),
    );
    expect(parts.map((one) => one.name)).toEqual(['head', 'nose', 'neck', 'shoulders']);
    const head = extentOf(parts, (one) => one.kind === 'head' || one.kind === 'nose');
    expect(head.y![0]).toBeCloseTo(-110, 0);
    expect(head.y![1]).toBeCloseTo(95, 0);
    expect(head.z![0]).toBeCloseTo(-120, 0);
    expect(head.z![1]).toBeCloseTo(110, 0);
    const shoulders = extentOf(parts, (one) => one.name === 'shoulders');
    expect(shoulders.z![1]).toBeCloseTo(-180, 0);
    expect(parts.find((one) => one.name === 'shoulders')!.estimated).toBe(true);
  });

  it('head: weight and height size the shoulders; raised arms lie beside it', () => {
    const small = buildBody(
      samplePatient('head', {}, { weightKg: measured(50), heightCm: measured(155), sex: 'female' }),
    );
    const large = buildBody(
      samplePatient('head', {}, { weightKg: measured(130), heightCm: measured(185), sex: 'male' }),
    );
    const half = (parts: readonly SolidPart[]) => {
      const { shape } = parts.find((one) => one.name === 'shoulders')!;
      return shape.type === 'elliptic-cylinder' ? shape.semiAxesMm[0] : 0;
    };
    expect(half(large)).toBeGreaterThan(half(small) + 30);
    const up = buildBody(
      samplePatient('head', {}, { arms: { position: 'up', breadthMm: 90, depthMm: 90, gapMm: 10 } }),
    );
    expect(up.filter((one) => one.kind === 'arm')).toHaveLength(2);
  });

  it('a policy default along z ends nothing: the head is then a cylinder, the chest goes on', () => {
    const unknown: Reading = { value: 250, source: 'policy-default', spread: 0 };
    const ends = { superior: unknown, inferior: unknown };
    expect(buildBody(samplePatient('head', ends)).map((one) => one.shape.type)).toEqual([
      'elliptic-cylinder',
    ]);
    expect(buildBody(samplePatient('chest', ends)).map((one) => one.name)).toEqual([
      'trunk',
      'right arm',
      'left arm',
    ]);
    expect(buildBody(samplePatient('chest')).map((one) => one.name)).toEqual([
      'trunk',
      'neck',
      'head',
      'right arm',
      'left arm',
    ]);
  });

  it('shoulder: sections shrink towards the shoulder top', () => {
    const parts = buildBody(samplePatient('shoulder', { superior: 60 }));
    const breadthAt = (z: number) => {
      const frame = sectionFrame(samplePrescription(), z);
      const solids = partSolids(
        parts.filter((one) => one.kind === 'trunk'),
        { isocentreZMm: 0, tissueReachMm: 400 },
        { bands: [], b1Scale: 1, t1Ms: [1] },
        -1,
      );
      const r = solids.flatMap(({ solid }) =>
        bandRings(cutSolid(solidInSection(solid, frame), z))
          .flat()
          .map((point) => point[0]),
      );
      return r.length ? Math.max(...r) - Math.min(...r) : 0;
    };
    // Ellipsoid, 100 mm high: full breadth at z = -40, √(1 − 0.8²) of it 80 mm higher.
    expect(breadthAt(-39.99)).toBeCloseTo(480, 0);
    expect(breadthAt(40)).toBeCloseTo(480 * 0.6, 0);
    expect(breadthAt(61)).toBe(0);
  });

  it('hip: two legs below the pelvis', () => {
    const parts = buildBody(samplePatient('hip', { inferior: 90 }));
    expect(parts.filter((one) => one.kind === 'leg').map((one) => one.name)).toEqual([
      'right leg',
      'left leg',
    ]);
    expect(extentOf(parts, (one) => one.name === 'trunk').z![0]).toBeCloseTo(-90, 0);
    expect(extentOf(parts, (one) => one.kind === 'leg').z![1]).toBeCloseTo(-90, 0);
  });

  it('knee: the other leg lies on the inner side, or on either when the side is not known', () => {
    const size = { right: 65, left: 65, anterior: 70, posterior: 70 };
    const centres = (changes: Partial<Patient>) =>
      buildBody(samplePatient('knee', size, changes)).map(({ shape }) =>
        shape.type === 'elliptic-cylinder' ? shape.centreMm[0] : NaN,
      );
    expect(centres({ pairedSide: 'right' })).toEqual([0, 150]);
    expect(centres({ pairedSide: 'left', legGapMm: 50 })).toEqual([0, -180]);
    expect(centres({})).toEqual([0, -150, 150]);
  });

  it('parts that are given are the whole body', () => {
    const parts: SolidPart[] = [];
    expect(buildBody(samplePatient('abdomen', {}, { parts }))).toBe(parts);
  });

  it('refuses what is no body, naming it', () => {
    expect(() => buildBody(samplePatient('abdomen', { right: -1 }))).toThrow('extents.right is -1');
    expect(() => buildBody(samplePatient('abdomen', { right: Number.NaN }))).toThrow('extents.right is NaN');
    expect(() => buildBody(samplePatient('abdomen', { right: 0, left: 0 }))).toThrow(
      'extents.right + extents.left is 0',
    );
    expect(() => buildBody(samplePatient('abdomen', { anterior: 0, posterior: 0 }))).toThrow('> 0 mm');
    const arms = { position: 'down', breadthMm: 100, depthMm: 100, gapMm: -1 } as const;
    expect(() => buildBody(samplePatient('abdomen', {}, { arms }))).toThrow('arms.gapMm is -1');
  });
});

describe('presaturated tissue', () => {
  it('keeps 0.03 at 90°, 0.20 at 80°, 0.36 at 70° (fat T1 300 ms, 10 ms later), never nothing', () => {
    // Two decimals are what is stated.
    expect(presaturatedWeight(90, 1, 10, 300)).toBeCloseTo(0.03, 2);
    expect(presaturatedWeight(80, 1, 10, 300)).toBeCloseTo(0.2, 2);
    expect(presaturatedWeight(70, 1, 10, 300)).toBeCloseTo(0.36, 2);
    expect(presaturatedWeight(90, 70 / 90, 10, 300)).toBeCloseTo(0.36, 2);
    expect(presaturatedWeight(0, 1, 10, 300)).toBe(1);
    expect(presaturatedWeight(180, 1, 0, 300)).toBe(1);
    expect(() => presaturatedWeight(90, 1, 10, 0)).toThrow('t1Ms is 0');
    expect(() => presaturatedWeight(90, 1, -1, 300)).toThrow('delayMs is -1');
  });
});

describe('outlines', () => {
  const area = (rings: Parameters<typeof outlineTrapezoids>[0]) =>
    outlineTrapezoids(rings).reduce((sum, { u0, u1, lower, upper }) => {
      const u = (u0 + u1) / 2;
      return sum + (u1 - u0) * (upper[0] + upper[1] * u - lower[0] - lower[1] * u);
    }, 0);
  const square = (half: number, x = 0): [number, number][] => [
    [x - half, -half],
    [x + half, -half],
    [x + half, half],
    [x - half, half],
  ];

  it('follow the even-odd rule: holes, islands in holes, crossings', () => {
    expect(area([square(10)])).toBeCloseTo(400, 9);
    expect(area([square(10), square(5)])).toBeCloseTo(300, 9);
    expect(area([square(10), square(5), square(2)])).toBeCloseTo(316, 9);
    expect(area([square(10), square(10, 10)])).toBeCloseTo(400, 9);
    expect(area([square(10), square(10)])).toBe(0);
    // A bow tie: two triangles of 10 × 10 / 2 each, whatever the direction of travel.
    expect(
      area([
        [
          [0, 0],
          [10, 10],
          [10, 0],
          [0, 10],
        ],
      ]),
    ).toBeCloseTo(50, 9);
    // Concave.
    expect(
      area([
        [
          [0, 0],
          [10, 0],
          [10, 10],
          [5, 2],
          [0, 10],
        ],
      ]),
    ).toBeCloseTo(60, 9);
  });

  it('are refused when they are no outlines', () => {
    expect(() =>
      outlineTrapezoids([
        [
          [0, 0],
          [1, 1],
        ],
      ]),
    ).toThrow('rings[0] is 2 points; allowed: at least 3 points');
    expect(() =>
      outlineTrapezoids([
        [
          [0, 0],
          [1, 1],
          [Number.NaN, 2],
        ],
      ]),
    ).toThrow('rings[0][2]');
  });
});
