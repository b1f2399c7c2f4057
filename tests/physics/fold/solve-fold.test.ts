import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import type { PerSide } from '@/lib/physics/model/axes';
import { boxPart, ellipsePart, NO_MARGIN_MM, samplePrescription, sampleProblem } from './sample-problem';
import { runsOf } from '@/tests/support/tally';

const trunk = ellipsePart('trunk', [0, 0], [240, 170]);
const gridEnds = (factorPhase: number) => ({
  ...samplePrescription().acceleration,
  factorPhase,
  unfolding: 'image-domain-grid-ends' as const,
});

describe('worked case: body 480 × 340, phase A–P, FOV 300 × 480, 256 lines, whole picture, no margin', () => {
  const solved = solveFold(sampleProblem([trunk]));

  it('274 lines are enough and 273 are not; covering the body takes 291', () => {
    const requirement = solved.requirement();
    expect(requirement.firstCleanMm).toBe(320);
    expect(requirement.firstCleanLines).toBe(274);
    expect(requirement.alwaysCleanLines).toBe(274);
    expect(requirement.coverBodyMm).toBe(340);
    expect(requirement.coverBodyLines).toBe(291);
    expect(solved.isClean(273)).toBe(false);
    expect(solved.isClean(274)).toBe(true);
  });

  it('at 256 lines 20 mm of fold is left, from A–P, one acquired width away', () => {
    const left = solved.leftover(256);
    expect(left.inKeepClear).toBe(true);
    expect(left.outsideKeepClear).toBe(false);
    expect(left.depthMm).toBe(20);
    expect(left.depthWithMarginMm).toBe(20);
    expect(left.from).toMatchObject({ part: 'trunk', distanceMm: 300 });
    expect(Math.abs(left.from!.order)).toBe(1);
    // Two caps of the ellipse beyond ±150: a·b·(acos h − h·√(1 − h²)) each, h = 150/170; row sum good to 1e-6.
    const h = 150 / 170;
    const caps = 2 * 240 * 170 * (Math.acos(h) - h * Math.sqrt(1 - h * h));
    expect(left.displayedAreaMm2 / caps).toBeCloseTo(1, 5);
    expect(left.displayedShare).toBeCloseTo(caps / (300 * 480), 7);
    expect(solved.leftover(274).displayedAreaMm2).toBe(0);
  });

  it('with image-domain unfolding that ends at the acquired width: 291, and 292 on an even-line grid', () => {
    const accelerated = samplePrescription({ acceleration: gridEnds(2) });
    expect(solveFold(sampleProblem([trunk], accelerated)).requirement().firstCleanLines).toBe(291);
    const even = sampleProblem([trunk], accelerated, { lineStep: { kind: 'even-lines' } });
    expect(solveFold(even).requirement().firstCleanLines).toBe(292);
    expect(solveFold(sampleProblem([trunk], accelerated)).leftover(280).ghosts).toBe(true);
  });

  it('an unknown unfolding is treated as one that ends, k-space methods and wider maps as plain', () => {
    const lines = (unfolding: 'unknown' | 'k-space-self-calibrating' | 'image-domain-beyond') =>
      solveFold(
        sampleProblem([trunk], samplePrescription({ acceleration: { ...gridEnds(2), unfolding } })),
      ).requirement().firstCleanLines;
    expect(lines('unknown')).toBe(291);
    expect(lines('k-space-self-calibrating')).toBe(274);
    expect(lines('image-domain-beyond')).toBe(274);
  });
});

describe('what decides', () => {
  it('clean widths need not be a half-line: between arm and trunk a smaller width can be clean where a larger is not', () => {
    // Row of tissue [-200, 200] and an arm [300, 380]; keep-clear [-50, 50] in a FOV of 240.
    const parts = [
      boxPart('trunk', { xMm: [-100, 100], yMm: [-200, 200], zMm: [-200, 200] }),
      boxPart('slim arm', { xMm: [-100, 100], yMm: [300, 380], zMm: [-200, 200] }),
    ];
    const prescription = samplePrescription({ fovPhaseMm: 240, fovReadoutMm: 240, linesAcrossFov: 240 });
    const solved = solveFold(
      sampleProblem(parts, prescription, {
        keepClear: {
          axes: [
            [1, 0, 0],
            [0, 1, 0],
            [0, 0, 1],
          ],
          rangesMm: [
            [-90, 90],
            [-10, 10],
            [-9, 9],
          ],
        },
      }),
    );
    // n = 1: trunk forbids W < 210, the arm 290 to 390; n = 2: 145 to 195.
    expect(solved.requirement()).toMatchObject({
      forbiddenMm: [[290, 390]],
      firstCleanMm: 240,
      alwaysCleanMm: 390,
      firstCleanLines: 240,
      alwaysCleanLines: 390,
    });
    expect(solved.isClean(290)).toBe(true);
    expect(solved.isClean(291)).toBe(false);
    expect(solved.isClean(389)).toBe(false);
    expect(solved.isClean(390)).toBe(true);
  });

  it('moving the FOV centre changes nothing when keep-clear is fixed in the body', () => {
    const keepClear = {
      axes: [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
      rangesMm: [
        [-90, 90],
        [-80, 40],
        [-9, 9],
      ],
    } as const;
    const widths = [0, 13, -20].map(
      (y) =>
        solveFold(
          sampleProblem([trunk], samplePrescription({ centreMm: [0, y, 0] }), { keepClear }),
        ).requirement().firstCleanMm,
    );
    expect(new Set(widths).size).toBe(1);
  });

  it('tissue at or below the tolerance does not count; arms always do', () => {
    const faint = { ...trunk, signalWeight: 0.05 };
    expect(solveFold(sampleProblem([faint])).requirement().firstCleanMm).toBe(300);
    const arm = { ...trunk, kind: 'arm' as const, signalWeight: 0.01 };
    expect(solveFold(sampleProblem([arm])).requirement().firstCleanMm).toBe(320);
  });

  it('a presaturation band frees the width only as far as its true weight allows', () => {
    const band = {
      side: 'posterior' as const,
      innerEdgeMm: 130,
      thicknessMm: 80,
      nominalFlipDeg: 90,
      delayMs: 10,
    };
    const with90 = samplePrescription({ presaturation: [band] });
    // Posterior tissue beyond 130 keeps 3 % at 90°: only the front wall (170) still needs 170 + 150.
    expect(solveFold(sampleProblem([trunk], with90)).requirement().firstCleanMm).toBe(320);
    const both = samplePrescription({ presaturation: [band, { ...band, side: 'anterior' }] });
    expect(solveFold(sampleProblem([trunk], both)).requirement().firstCleanMm).toBe(300);
    // At a true flip of 70° it keeps 36 %: nothing is gained.
    const weak = sampleProblem([trunk], both, { presaturationB1Scale: 70 / 90 });
    expect(solveFold(weak).requirement().firstCleanMm).toBe(320);
  });

  it('tissue ends at the reach about the isocentre, not at the FOV', () => {
    const sagittal = samplePrescription({
      plane: 'sagittal',
      phaseAxis: 'SI',
      fovPhaseMm: 300,
      fovReadoutMm: 400,
    });
    // Reach 250 about z = 40: tissue from -210 to 290; keep-clear -150 to 150.
    const solved = solveFold(sampleProblem([trunk], sagittal, { isocentreZMm: 40 }));
    expect(solved.requirement().firstCleanMm).toBe(440);
  });

  it('every slice of a stack counts: a coronal breadth shrinks away from the middle', () => {
    const coronal = samplePrescription({
      plane: 'coronal',
      phaseAxis: 'RL',
      fovPhaseMm: 400,
      fovReadoutMm: 400,
    });
    const at = (centreY: number, slices: number) =>
      solveFold(
        sampleProblem([trunk], {
          ...coronal,
          centreMm: [0, centreY, 0],
          slices: { mode: 'stack', slices, thicknessMm: 10, gapMm: 0 },
        }),
      ).requirement().firstCleanMm;
    // Half-breadth at y: 240·√(1 − (y/170)²); W = 200 + that.
    expect(at(85, 1)).toBeCloseTo(200 + 240 * Math.sqrt(1 - 0.25), 3);
    expect(at(85, 9)).toBeCloseTo(200 + 240 * Math.sqrt(1 - (45 / 170) ** 2), 3);
  });

  it('the per-side margin dilates tissue in phase, readout and slice', () => {
    const marginMm: PerSide = { ...NO_MARGIN_MM, anterior: 10, posterior: 3 };
    // Front wall to 180 lands on the back edge: 180 + 150.
    expect(solveFold(sampleProblem([trunk], undefined, { marginMm })).requirement().firstCleanMm).toBe(330);
    const coronal = samplePrescription({
      plane: 'coronal',
      phaseAxis: 'RL',
      fovPhaseMm: 400,
      fovReadoutMm: 400,
      centreMm: [0, -85, 0],
    });
    // At y = -85 the anterior margin brings tissue from y = -75 (dilated backwards only by posterior 3: from -88).
    const solved = solveFold(sampleProblem([trunk], coronal, { marginMm }));
    expect(solved.requirement().firstCleanMm).toBeCloseTo(200 + 240 * Math.sqrt(1 - (75 / 170) ** 2), 3);
  });
});

describe('an uploaded outline of many points', () => {
  const ring = Array.from({ length: 180 }, (_, i) => {
    const t = (2 * Math.PI * i) / 180;
    return [240 * Math.cos(t), 170 * Math.sin(t)] as const;
  });
  const outline = {
    ...trunk,
    shape: { type: 'outline-prism' as const, along: 'z' as const, rings: [ring] },
  };

  it.each(['axial', 'coronal'] as const)('gives what the ellipse it follows gives (%s)', (plane) => {
    const prescription = samplePrescription({
      plane,
      phaseAxis: plane === 'axial' ? 'AP' : 'RL',
      slices: { mode: 'stack', slices: 5, thicknessMm: 6, gapMm: 1 },
    });
    const marginMm: PerSide = { ...NO_MARGIN_MM, anterior: 10, posterior: 3, right: 4 };
    const [a, b] = [outline, trunk].map((part) =>
      solveFold(sampleProblem([part], prescription, { marginMm })),
    );
    // 180 chords of an ellipse 480 wide stay within 0.04 mm of it; a corner lies on each of its four ends.
    expect(Math.abs(a!.requirement().firstCleanMm - b!.requirement().firstCleanMm)).toBeLessThan(0.05);
    const [left, right] = [a!.leftover(256), b!.leftover(256)];
    expect(left!.inKeepClear).toBe(right!.inKeepClear);
    expect(Math.abs(left!.depthMm - right!.depthMm)).toBeLessThan(0.05);
    // Chords, and even rows in place of break points.
    expect(Math.abs(left!.displayedAreaMm2 / right!.displayedAreaMm2 - 1)).toBeLessThan(0.01);
  });
});

describe('laws', () => {
  const size = fc.integer({ min: 60, max: 260 });
  const shift = fc.integer({ min: -60, max: 60 });

  it('one interval: W ≥ e + r + |o − q|; whole FOV, centred: s ≥ (e − F/2)/F', () => {
    fc.assert(
      fc.property(size, shift, fc.integer({ min: 20, max: 100 }), shift, (e, o, r, q) => {
        const part = boxPart('trunk', { xMm: [-50, 50], yMm: [o - e, o + e], zMm: [-99, 99] });
        const prescription = samplePrescription({
          fovPhaseMm: 2 * r,
          fovReadoutMm: 200,
          centreMm: [0, q, 0],
        });
        const { firstCleanMm, alwaysCleanMm } = solveFold(sampleProblem([part], prescription)).requirement();
        const needed = e + r + Math.abs(o - q);
        expect(alwaysCleanMm).toBeCloseTo(Math.max(needed, 2 * r), 6);
        if (o === q && e > r) {
          const s = firstCleanMm / (2 * r) - 1;
          expect(s).toBeCloseTo((e - r) / (2 * r), 9);
        }
      }),
      { seed: 5, numRuns: runsOf(300) },
    );
  });

  const scene = fc.record({
    a: size,
    b: size,
    x: shift,
    y: shift,
    armX: fc.integer({ min: 150, max: 380 }),
    armR: fc.integer({ min: 20, max: 60 }),
    fov: fc.integer({ min: 120, max: 400 }),
    phaseAxis: fc.constantFrom('RL' as const, 'AP' as const),
    margin: fc.integer({ min: 0, max: 12 }),
    // 1 is a plain acquisition: no unfolding.
    factor: fc.constantFrom(1, 2, 3),
  });
  type Scene = typeof scene extends fc.Arbitrary<infer T> ? T : never;
  const solveScene = (
    s: Scene,
    changes: { margin?: number; dx?: number; mirror?: boolean; tolerance?: number; weight?: number } = {},
  ) => {
    const { dx = 0, mirror = false, margin = s.margin } = changes;
    const sign = mirror ? -1 : 1;
    const parts = [
      ellipsePart('trunk', [sign * s.x + dx, sign * s.y + dx], [s.a, s.b]),
      ellipsePart('other', [sign * s.armX + dx, dx], [s.armR, s.armR], {
        kind: 'other',
        signalWeight: changes.weight ?? 1,
      }),
    ];
    const prescription = samplePrescription({
      fovPhaseMm: s.fov,
      fovReadoutMm: 300,
      phaseAxis: s.phaseAxis,
      centreMm: [dx, dx, 0],
      acceleration: gridEnds(s.factor),
    });
    const all = {
      right: margin,
      left: margin,
      anterior: margin,
      posterior: margin,
      superior: 0,
      inferior: 0,
    };
    return solveFold(
      sampleProblem(parts, prescription, { marginMm: all, tissueTolerance: changes.tolerance ?? 0.05 }),
    );
  };

  it('widths do not change when everything is moved or mirrored', () => {
    fc.assert(
      fc.property(scene, fc.integer({ min: -200, max: 200 }), (s, dx) => {
        const here = solveScene(s).requirement();
        for (const other of [
          solveScene(s, { dx }).requirement(),
          solveScene(s, { mirror: true }).requirement(),
        ]) {
          expect(other.forbiddenMm.length).toBe(here.forbiddenMm.length);
          // Two roundings to 1 µm of the same length, computed elsewhere.
          expect(Math.abs(other.firstCleanMm - here.firstCleanMm)).toBeLessThan(0.0021);
          expect(Math.abs(other.alwaysCleanMm - here.alwaysCleanMm)).toBeLessThan(0.0021);
          expect(Math.abs(other.coverBodyMm - here.coverBodyMm)).toBeLessThan(0.0021);
        }
      }),
      { seed: 6, numRuns: runsOf(200) },
    );
  });

  it('a larger margin never frees a width, a larger tolerance never fouls one', () => {
    fc.assert(
      fc.property(
        scene,
        fc.integer({ min: 1, max: 15 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (s, more, weight) => {
          const tight = solveScene(s, { weight });
          const wide = solveScene(s, { weight, margin: s.margin + more });
          const lenient = solveScene(s, { weight, tolerance: 0.5 });
          for (let lines = 256; lines < 640; lines += 7) {
            if (wide.isClean(lines)) expect(tight.isClean(lines)).toBe(true);
            if (tight.isClean(lines)) expect(lenient.isClean(lines)).toBe(true);
          }
        },
      ),
      { seed: 7, numRuns: runsOf(200) },
    );
  });

  it('leftover agrees with the verdict: depth and area vanish exactly when clean', () => {
    fc.assert(
      fc.property(scene, fc.integer({ min: 256, max: 560 }), (s, lines) => {
        const solved = solveScene(s, { margin: 0 });
        const left = solved.leftover(lines);
        expect(left.inKeepClear).toBe(!solved.isClean(lines));
        expect(left.depthMm > 0).toBe(left.inKeepClear);
        expect(left.keepClearAreaMm2).toBeCloseTo(left.displayedAreaMm2, 6);
        if (left.depthMm > 0.5) expect(left.displayedAreaMm2).toBeGreaterThan(0);
        if (!left.inKeepClear) expect(left.displayedAreaMm2).toBe(0);
        expect(left.displayedShare).toBeLessThanOrEqual(1 + 1e-9);
      }),
      { seed: 8, numRuns: runsOf(200) },
    );
  });
});
