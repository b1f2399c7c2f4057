import { describe, expect, it } from 'vitest';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import { usableVolume } from '@/lib/physics/fold/fold-problem';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { foldProblem } from '@/lib/physics/fold/fold-problem';
import type { Case } from '@/lib/physics/model/case';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Patient, Reading, SolidPart } from '@/lib/physics/model/patient';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Scanner } from '@/lib/physics/model/scanner';
import { drawSection } from '@/lib/physics/section/draw-section';
import type { SectionRing } from '@/lib/physics/section/section-drawing';
import { NO_MARGIN_MM, samplePrescription } from '../fold/sample-problem';

const reading = (value: number): Reading => ({ value, source: 'measured', spread: 0 });

const scanner: Scanner = {
  name: 'scanner',
  fieldStrengthT: 1.5,
  boreDiameterMm: 700,
  tableBelowCentreMm: 170,
  anteriorCoilMm: 30,
  lineStep: { kind: 'line' },
  oversamplingForm: 'percent',
  sliceOversamplingForm: 'percent',
  partitionStep: 1,
  phaseFovMayExceedReadoutFov: false,
  unfolding: 'unknown',
  tissueReachMm: 250,
  respiratoryWindow: 0.4,
  limits: {
    fovMinMm: 80,
    fovMaxMm: 500,
    usableFovMm: [500, 500, 450],
    matrixMax: 1024,
    acquiredLinesMax: 1024,
    phaseOversamplingMaxPct: 200,
    sliceOversamplingMaxPct: 100,
    accelerationPhaseMax: 4,
    accelerationSliceMax: 3,
    partialFourierMin: 0.6,
    averagesMax: 8,
    echoTrainMax: 256,
    tableLimitKg: 220,
  },
};

function sampleCase(changes: {
  prescription?: Partial<Prescription>;
  patient?: Partial<Patient>;
  keepClear?: KeepClear;
  parts?: readonly SolidPart[];
}): Case {
  return {
    patient: {
      region: 'abdomen',
      extents: {
        right: reading(240),
        left: reading(240),
        anterior: reading(170),
        posterior: reading(170),
        superior: reading(0),
        inferior: reading(0),
      },
      arms: { position: 'up', breadthMm: 100, depthMm: 100, gapMm: 10 },
      breathHoldS: reading(15),
      breathPeriodS: reading(4),
      position: 'head-first-supine',
      lateralOffsetMm: 0,
      isocentreZMm: 0,
      ...(changes.parts && { parts: changes.parts }),
      ...changes.patient,
    },
    prescription: samplePrescription(changes.prescription),
    keepClear: changes.keepClear ?? { area: { kind: 'whole-picture' }, followsWindow: false },
    scanner,
    policy: { ...DEFAULT_POLICY, marginMm: NO_MARGIN_MM },
  };
}

/** Shoelace area, mm². */
const ringArea = (ring: SectionRing) =>
  Math.abs(
    ring.reduce(
      (sum, [r, p], i) => sum + r * ring[(i + 1) % ring.length]![1] - ring[(i + 1) % ring.length]![0] * p,
      0,
    ),
  ) / 2;
const area = (rings: readonly SectionRing[]) => rings.reduce((sum, ring) => sum + ringArea(ring), 0);
const phases = (rings: readonly SectionRing[]) => rings.flat().map(([, p]) => p);

describe('a section as outlines', () => {
  const drawing = drawSection(sampleCase({}));

  it('shows the window, the acquired edges and the body where they are', () => {
    expect(drawing.displayedPhaseMm).toEqual([-150, 150]);
    expect(drawing.displayedReadoutMm).toEqual([-240, 240]);
    expect(drawing.acquiredPhaseMm).toEqual([-150, 150]);
    expect(drawing.tissue.map((one) => one.name)).toEqual(['tissue/trunk']);
    // A polygon of 64 chords: its area falls short by under 0.2 %.
    expect(area(drawing.tissue[0]!.rings) / (Math.PI * 240 * 170)).toBeCloseTo(1, 2);
  });

  it('moves each outlying piece by one acquired width to the opposite side, never mirrored', () => {
    expect(drawing.pieces.map((piece) => piece.name).sort()).toEqual(['piece/trunk/-1', 'piece/trunk/1']);
    const back = drawing.pieces.find((piece) => piece.order === -1)!;
    expect(back).toMatchObject({
      side: 'posterior',
      distanceMm: 300,
      sliceOrder: 0,
      estimated: false,
      placeUncertain: false,
    });
    expect(Math.max(...phases(back.source))).toBeCloseTo(170, 6);
    expect(Math.min(...phases(back.source))).toBeCloseTo(150, 6);
    back.landed.forEach((ring, i) =>
      ring.forEach(([r, p], k) => {
        expect(r).toBeCloseTo(back.source[i]![k]![0], 9);
        expect(p).toBeCloseTo(back.source[i]![k]![1] - 300, 9);
      }),
    );
    expect(area(back.inKeepClear)).toBeCloseTo(area(back.landed), 6);
  });

  it('agrees with the solver on areas and on when nothing lands', () => {
    const given = sampleCase({});
    const solved = solveFold(foldProblem(given));
    const total = drawing.pieces.reduce((sum, piece) => sum + area(piece.landed), 0);
    // Chords against arcs again.
    expect(total / solved.leftover(256).displayedAreaMm2).toBeCloseTo(1, 2);
    expect(drawSection(given, { acquiredLines: 274 }).pieces).toEqual([]);
    expect(drawSection(given, { acquiredLines: 273 }).pieces).toHaveLength(2);
  });

  it('cuts keep-clear and must-stay-displayed boxes, and grows the first by the margin', () => {
    const box = { xMm: [-100, 50], yMm: [-140, 95], zMm: [-10, 10] } as const;
    const given = sampleCase({
      keepClear: { area: { kind: 'box', box }, mustStayDisplayed: box, followsWindow: false },
    });
    const withMargin = drawSection({
      ...given,
      policy: { ...given.policy, marginMm: { ...NO_MARGIN_MM, anterior: 10, posterior: 3, right: 5 } },
    });
    expect(ringArea(withMargin.keepClear)).toBeCloseTo(150 * 235, 6);
    expect(ringArea(withMargin.mustStayDisplayed)).toBeCloseTo(150 * 235, 6);
    // Tissue moving 10 mm forwards reaches the area from 10 mm behind it, and so on.
    expect(ringArea(withMargin.keepClearWithMargin)).toBeCloseTo((150 + 5) * (235 + 13), 6);
    expect(Math.max(...withMargin.keepClearWithMargin.map(([, p]) => p))).toBe(105);
    expect(drawSection(given, { sliceOffsetMm: 30 }).keepClear).toEqual([]);
  });

  it('says when tissue lies where the scanner maps it wrongly', () => {
    const narrow = {
      ...sampleCase({}),
      scanner: { ...scanner, limits: { ...scanner.limits, usableFovMm: [400, 400, 400] as const } },
    };
    const uncertain = drawSection(narrow);
    expect(uncertain.tissue[0]!.placeUncertain).toBe(true);
    expect(drawing.tissue[0]!.placeUncertain).toBe(false);
    expect(solveFold(foldProblem(narrow)).leftover(256).placeUncertain).toBe(false);
    const wide = {
      ...narrow,
      prescription: { ...narrow.prescription, phaseAxis: 'RL' as const, fovPhaseMm: 400, fovReadoutMm: 300 },
    };
    expect(solveFold(foldProblem(wide)).leftover(256).placeUncertain).toBe(true);
    expect(drawSection(wide).pieces.every((piece) => piece.placeUncertain)).toBe(true);
  });

  it('tells apart what of a piece lies beyond the usable FOV, and moves both alike', () => {
    const usableFovMm = [440, 440, 400] as const;
    const wide = {
      ...sampleCase({ prescription: { phaseAxis: 'RL', fovPhaseMm: 400, fovReadoutMm: 300 } }),
      scanner: { ...scanner, limits: { ...scanner.limits, usableFovMm } },
    };
    const drawn = drawSection(wide);
    const { centreMm, halfMm } = usableVolume(wide);
    // Axial: readout is y, phase is x.
    const reach = ([r, p]: readonly [number, number]): number =>
      Math.hypot((p - centreMm[0]) / halfMm[0], (r - centreMm[1]) / halfMm[1]);
    const tolerance = 1e-3; // 0.2 mm of 220: the usable ellipse is cut by chords
    expect(drawn.pieces.length).toBe(2);
    for (const { source, landed, byPlace, distanceMm } of drawn.pieces) {
      const { certain, uncertain } = byPlace!;
      expect(area(certain.source)).toBeGreaterThan(100);
      expect(area(uncertain.source)).toBeGreaterThan(100);
      for (const point of certain.source.flat()) expect(reach(point)).toBeLessThan(1 + tolerance);
      for (const point of uncertain.source.flat()) expect(reach(point)).toBeGreaterThan(1 - tolerance);
      // Polygons of 32 points an arc, cut elsewhere: 0.5 % of a piece.
      const whole = area(source);
      expect(Math.abs(area(certain.source) + area(uncertain.source) - whole)).toBeLessThan(0.005 * whole);
      expect(area(certain.landed) + area(uncertain.landed)).toBeCloseTo(
        area(certain.source) + area(uncertain.source),
        6,
      );
      expect(area(landed)).toBeCloseTo(whole, 6);
      expect(Math.abs(uncertain.landed[0]![0]![1] - uncertain.source[0]![0]![1])).toBeCloseTo(distanceMm, 9);
    }
    const [trunk] = drawn.tissue;
    expect(area(trunk!.withinUsable!) + area(trunk!.beyondUsable!)).toBeGreaterThan(0.995 * area(trunk!.rings));
    expect(drawing.pieces.every((piece) => piece.byPlace === undefined)).toBe(true);
  });

  it('draws centre ghosts of image-domain unfolding at full size, and no plain piece', () => {
    const acceleration = {
      ...samplePrescription().acceleration,
      factorPhase: 2,
      unfolding: 'image-domain-grid-ends' as const,
    };
    const ghosted = drawSection(sampleCase({ prescription: { acceleration } }), { acquiredLines: 280 });
    expect(ghosted.pieces).toEqual([]);
    const ghost = ghosted.ghosts.find((one) => one.name === 'ghost/trunk/high/1/0')!;
    // W = 328.125: tissue from 164.06 to 170 is seen again half a width away, just past the centre.
    expect(ghost).toMatchObject({ side: 'posterior', multiple: 1, distanceMm: 328.125 / 2 });
    expect(Math.min(...phases(ghost.landed))).toBeCloseTo(0, 6);
    expect(Math.max(...phases(ghost.landed))).toBeCloseTo(170 - 164.0625, 6);
    expect(
      drawSection(sampleCase({ prescription: { acceleration } }), { acquiredLines: 291 }).ghosts,
    ).toEqual([]);
  });

  it('draws what comes along a slab in the section it lands in', () => {
    const slices = {
      mode: 'slab' as const,
      partitions: 50,
      partitionThicknessMm: 4,
      acquiredPartitions: 50,
      selective: true,
      droppedPartitionsPerEnd: 0,
    };
    const given = sampleCase({ prescription: { slices } });
    const slabWeight = (offset: number) => (Math.abs(offset) < 130 ? 1 : 0);
    const edge = drawSection(given, { sliceOffsetMm: -98, acquiredLines: 400, slabWeight });
    const piece = edge.pieces.find((one) => one.name === 'piece/trunk/0/1')!;
    expect(piece).toMatchObject({ side: 'superior', order: 0, sliceOrder: 1, distanceMm: 200 });
    expect(drawSection(given, { sliceOffsetMm: 0, acquiredLines: 400, slabWeight }).pieces).toEqual([]);
    expect(
      drawSection(given, { sliceOffsetMm: -98, acquiredLines: 400, acquiredPartitions: 60, slabWeight })
        .pieces,
    ).toEqual([]);
  });

  it('draws ghosts at the product of both unfolded directions', () => {
    const slices = {
      mode: 'slab' as const,
      partitions: 40,
      partitionThicknessMm: 4,
      acquiredPartitions: 60,
      selective: true,
      droppedPartitionsPerEnd: 0,
    };
    const acceleration = {
      ...samplePrescription().acceleration,
      factorPhase: 2,
      factorSlice: 2,
      unfolding: 'image-domain-grid-ends' as const,
    };
    const given = sampleCase({ prescription: { slices, acceleration } });
    // W_z 240 covers the excited 160: tissue 120 mm away along the slab leaves ghosts too, in this partition's window.
    const end = drawSection(given, { sliceOffsetMm: -70, acquiredLines: 280 });
    const names = end.ghosts.map((ghost) => ghost.name).sort();
    expect(names).toContain('ghost/trunk/high/1/0');
    expect(names).toContain('ghost/trunk/high/1/1');
    expect(names.some((name) => name.endsWith('/-1'))).toBe(false);
    expect(end.ghosts.find((ghost) => ghost.name === 'ghost/trunk/high/1/1')).toMatchObject({
      sliceMultiple: 1,
      multiple: 1,
    });
    const middle = drawSection(given, { sliceOffsetMm: 0, acquiredLines: 280 });
    expect(middle.ghosts.every((ghost) => ghost.sliceMultiple === 0)).toBe(true);
    expect(drawSection(given, { sliceOffsetMm: -70, acquiredLines: 291 }).ghosts).toEqual([]);
  });

  it('keeps an uploaded outline whole, holes included, without the seams of its pieces', () => {
    const ring = (half: number) =>
      [
        [-half, -half],
        [half, -half],
        [half, half],
        [-half, half],
      ] as const;
    const parts: SolidPart[] = [
      {
        name: 'phantom',
        kind: 'other',
        signalWeight: 1,
        estimated: false,
        shape: { type: 'outline-prism', along: 'z', rings: [ring(100), ring(40)], fromMm: -50, toMm: 50 },
      },
    ];
    const phantom = drawSection(sampleCase({ parts }));
    expect(phantom.tissue[0]!.rings.map((one) => one.length)).toEqual([4, 4]);
    expect(drawSection(sampleCase({ parts }), { sliceOffsetMm: 60 }).tissue[0]!.rings).toEqual([]);
    const tilted = drawSection(sampleCase({ parts, prescription: { tiltAboutReadoutDeg: 20 } }));
    expect(area([tilted.tissue[0]!.rings[0]!])).toBeCloseTo((200 * 200) / Math.cos((20 * Math.PI) / 180), 3);
    const coronal = drawSection(sampleCase({ parts, prescription: { plane: 'coronal', phaseAxis: 'SI' } }));
    // Through the hole: two bars of 60 mm by 100 mm.
    expect(area(coronal.tissue[0]!.rings)).toBeCloseTo(2 * 60 * 100, 6);
  });
});
