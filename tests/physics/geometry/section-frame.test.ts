import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { roundToMicrometre, toMicrometres } from '@/lib/physics/geometry/micrometres';
import {
  keepClearRegion,
  regionCorners,
  regionInside,
  regionOfBox,
  windowRegion,
} from '@/lib/physics/geometry/oriented-region';
import {
  displayedSliceOffsetsMm,
  sectionFrame,
  sliceOffsetsMm,
  toPatient,
  toSection,
} from '@/lib/physics/geometry/section-frame';
import { cosSin, cross, dot, rotateAbout } from '@/lib/physics/geometry/vector';
import { sectionMargin } from '@/lib/physics/fold/section-margin';
import { NO_MARGIN_MM, samplePrescription } from '../fold/sample-problem';
import { runsOf } from '@/tests/support/tally';

const angle = fc.double({ min: -80, max: 80, noNaN: true });
const coordinate = fc.double({ min: -400, max: 400, noNaN: true });
// Products of unit vectors with lengths under a metre: a few units in the last place.
const ROUNDING = 1e-9;

describe('section frame', () => {
  it('untilted planes have exact patient axes, readout the plane’s other axis', () => {
    expect(sectionFrame(samplePrescription())).toMatchObject({
      readout: [1, 0, 0],
      phase: [0, 1, 0],
      slice: [0, 0, 1],
      readoutAxis: 'RL',
      phaseAxis: 'AP',
      sliceAxis: 'SI',
    });
    const coronal = sectionFrame(
      samplePrescription({ plane: 'coronal', phaseAxis: 'SI', centreMm: [10, 20, 30] }),
      5,
    );
    expect(coronal).toMatchObject({
      readout: [1, 0, 0],
      phase: [0, 0, 1],
      slice: [0, 1, 0],
      originMm: [10, 25, 30],
    });
    expect([coronal.centreReadoutMm, coronal.centrePhaseMm, coronal.sliceMm]).toEqual([10, 30, 25]);
    expect(sectionFrame(samplePrescription({ plane: 'sagittal', phaseAxis: 'AP' }))).toMatchObject({
      readout: [0, 0, 1],
      phase: [0, 1, 0],
      slice: [1, 0, 0],
    });
  });

  it('turns right-handed about its own axes', () => {
    // Axial, phase A–P, tilted 30° about readout (x): phase turns from posterior towards superior.
    const tilted = sectionFrame(samplePrescription({ tiltAboutReadoutDeg: 30 }));
    expect(tilted.phase[1]).toBeCloseTo(Math.cos(Math.PI / 6), 12);
    expect(tilted.phase[2]).toBeCloseTo(0.5, 12);
    expect(tilted.slice[1]).toBeCloseTo(-0.5, 12);
    // In the plane by 90°: readout points posterior, phase to the right.
    const turned = sectionFrame(samplePrescription({ inPlaneRotationDeg: 90 }));
    expect(turned.readout).toEqual([0, 1, 0]);
    expect(turned.phase).toEqual([-1, 0, 0]);
  });

  it('refuses a phase axis across the plane, naming it', () => {
    expect(() => sectionFrame(samplePrescription({ phaseAxis: 'SI' }))).toThrow(
      'phaseAxis is SI; allowed: RL or AP',
    );
  });

  const any = fc.record({
    plane: fc.constantFrom('axial' as const, 'coronal' as const, 'sagittal' as const),
    first: fc.boolean(),
    tiltAboutReadoutDeg: angle,
    tiltAboutPhaseDeg: angle,
    inPlaneRotationDeg: angle,
  });
  const planes = { axial: ['RL', 'AP'], coronal: ['RL', 'SI'], sagittal: ['AP', 'SI'] } as const;

  it('is orthonormal, and patient ↔ section is a round trip', () => {
    fc.assert(
      fc.property(any, coordinate, coordinate, coordinate, ({ plane, first, ...tilts }, x, y, z) => {
        const frame = sectionFrame(
          samplePrescription({ plane, phaseAxis: planes[plane][first ? 0 : 1], ...tilts }),
          12,
        );
        const axes = [frame.readout, frame.phase, frame.slice];
        axes.forEach((a, i) =>
          axes.forEach((b, j) => expect(Math.abs(dot(a, b) - (i === j ? 1 : 0))).toBeLessThan(1e-12)),
        );
        const [r, p, s] = toSection(frame, [x, y, z]);
        toPatient(frame, r, p, s).forEach((value, i) =>
          expect(Math.abs(value - [x, y, z][i]!)).toBeLessThan(ROUNDING),
        );
      }),
      { seed: 1, numRuns: runsOf(300) },
    );
  });

  it('swapping phase and readout with their tilts keeps the plane', () => {
    fc.assert(
      fc.property(any, ({ plane, tiltAboutPhaseDeg, tiltAboutReadoutDeg, inPlaneRotationDeg }) => {
        const [a, b] = planes[plane];
        const one = sectionFrame(
          samplePrescription({
            plane,
            phaseAxis: a,
            tiltAboutPhaseDeg,
            tiltAboutReadoutDeg,
            inPlaneRotationDeg,
          }),
        );
        const two = sectionFrame(
          samplePrescription({
            plane,
            phaseAxis: b,
            tiltAboutPhaseDeg: tiltAboutReadoutDeg,
            tiltAboutReadoutDeg: tiltAboutPhaseDeg,
            inPlaneRotationDeg,
          }),
        );
        expect(two.phase).toEqual(one.readout);
        expect(two.readout).toEqual(one.phase);
        expect(two.slice).toEqual(one.slice);
      }),
      { seed: 2, numRuns: runsOf(100) },
    );
  });

  it('rotation is right-handed and exact at right angles', () => {
    expect(rotateAbout([1, 0, 0], [0, 0, 1], 90)).toEqual([0, 1, 0]);
    expect(cross([1, 0, 0], [0, 1, 0])).toEqual([0, 0, 1]);
    expect(cosSin(-90)).toEqual([0, -1]);
    expect(cosSin(540)).toEqual([-1, 0]);
  });

  it('slices of a stack and partitions of a slab lie about the centre', () => {
    expect(
      sliceOffsetsMm(samplePrescription({ slices: { mode: 'stack', slices: 4, thicknessMm: 5, gapMm: 1 } })),
    ).toEqual([-9, -3, 3, 9]);
    const slab = {
      mode: 'slab' as const,
      partitions: 5,
      partitionThicknessMm: 2,
      acquiredPartitions: 6,
      selective: true,
      droppedPartitionsPerEnd: 1,
    };
    expect(sliceOffsetsMm({ slices: slab })).toEqual([-4, -2, 0, 2, 4]);
    expect(displayedSliceOffsetsMm({ slices: slab })).toEqual([-2, 0, 2]);
  });
});

describe('regions fixed in the patient', () => {
  const box = { xMm: [-50, 60], yMm: [-40, 40], zMm: [-20, 20] } as const;

  it('a whole picture is the window it was asked for, slices with their thickness', () => {
    const prescription = samplePrescription({
      centreMm: [10, -5, 40],
      slices: { mode: 'stack', slices: 3, thicknessMm: 6, gapMm: 1 },
    });
    const region = keepClearRegion({ area: { kind: 'whole-picture' }, followsWindow: false }, prescription);
    expect(region.rangesMm).toEqual([
      [-230, 250],
      [-155, 145],
      [30, 50],
    ]);
    expect(regionCorners(region)).toHaveLength(8);
  });

  it('inside counts touching, compared to a micrometre', () => {
    const window = windowRegion(
      samplePrescription({
        fovReadoutMm: 120,
        fovPhaseMm: 80,
        slices: { mode: 'stack', slices: 1, thicknessMm: 40, gapMm: 0 },
      }),
    );
    expect(regionInside(regionOfBox(box), window)).toBe(true);
    expect(regionInside(regionOfBox({ ...box, yMm: [-40, 40.0004] }), window)).toBe(true);
    expect(regionInside(regionOfBox({ ...box, yMm: [-40, 40.002] }), window)).toBe(false);
    expect(regionInside(regionOfBox({ ...box, zMm: [-21, 20] }), window)).toBe(false);
  });

  it('an empty box is refused, naming the range', () => {
    expect(() => regionOfBox({ ...box, yMm: [5, 5] })).toThrow('yMm is 5 to 5 mm; allowed: low < high');
  });
});

describe('micrometres', () => {
  it('round half up, and put exact half micrometres on one side', () => {
    expect(toMicrometres(1.2345)).toBe(1235);
    expect(toMicrometres(1.2344999)).toBe(1234);
    // 4 lines of 300/256 mm: 4.6875 mm in whole and in parts.
    expect(toMicrometres((4 * 300) / 256)).toBe(toMicrometres(4.6875 - 1e-12));
    expect(roundToMicrometre(-0.00049)).toBe(0);
  });
});

describe('margins along section axes', () => {
  const marginMm = {
    ...NO_MARGIN_MM,
    anterior: 10,
    posterior: 3,
    right: 5,
    left: 6,
    superior: 8,
    inferior: 9,
  };

  it('are the two sides of each axis in an untilted plane', () => {
    expect(sectionMargin(sectionFrame(samplePrescription()), marginMm)).toEqual({
      readout: [5, 6],
      phase: [10, 3],
      slice: [9, 8],
    });
  });

  it('are the reach of the per-side box in a tilted one', () => {
    const { phase } = sectionMargin(sectionFrame(samplePrescription({ tiltAboutReadoutDeg: 30 })), marginMm);
    // Phase = posterior·cos 30° + superior·sin 30°.
    expect(phase[1]).toBeCloseTo(3 * Math.cos(Math.PI / 6) + 8 * 0.5, 12);
    expect(phase[0]).toBeCloseTo(10 * Math.cos(Math.PI / 6) + 9 * 0.5, 12);
  });

  it('are refused below 0', () => {
    expect(() => sectionMargin(sectionFrame(samplePrescription()), { ...marginMm, left: -1 })).toThrow(
      'marginMm.left is -1',
    );
  });
});
