import { describe, expect, it } from 'vitest';
import { freeze } from '@/lib/physics/assess/geometry-class';
import type { OpenInterval, WidthRequirement } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { largerFovSameMatrix, largerFovSameVoxel } from '@/lib/physics/remedy/larger-fov';
import { sketchCase, typicalPrescription, typicalScanner } from '@/tests/support/physics-cases';
import { codeOf, planned, solverThat } from './stated-solver';

describe('a larger FOV', () => {
  const requirement = (forbiddenMm: readonly OpenInterval[]): WidthRequirement => ({
    forbiddenMm,
    firstCleanMm: 0,
    alwaysCleanMm: forbiddenMm.at(-1)?.[1] ?? 0,
    coverBodyMm: 0,
    coverBodyLines: 0,
  });
  const clean = (forbiddenMm: readonly OpenInterval[], width: number) =>
    !forbiddenMm.some(([low, high]) => width > low + 1e-9 && width < high - 1e-9);
  const sets: readonly (readonly OpenInterval[])[] = [
    [[280, 351.3]],
    [
      [250, 331],
      [331.2, 340],
      [352, 377.7],
    ],
    [
      [250, 300],
      [305, 310],
    ],
    [[250, 401]],
  ];
  // 300 mm in 240 lines, 250 acquired: W is 312.5 mm.
  const at = (
    acquiredLines: number,
    overrides: Partial<Case['prescription']> = {},
    scanner = typicalScanner(),
  ) => freeze(sketchCase({ scanner, prescription: typicalPrescription({ acquiredLines, ...overrides }) }));

  it('at the same lines is the first whole millimetre whose acquired width is free', () => {
    for (const forbiddenMm of sets)
      for (const lines of [240, 250, 288]) {
        const given = at(lines);
        const result = largerFovSameMatrix(
          given,
          solverThat({ requirement: () => requirement(forbiddenMm) }),
        );
        let fov = 300;
        while (!clean(forbiddenMm, (fov * lines) / 240)) fov++;
        if (fov === 300) expect(codeOf(result)).toBe('nothing-to-change');
        else {
          expect(planned(result).prescription).toMatchObject({ fovPhaseMm: fov, acquiredLines: lines });
          expect(planned(result).prescription.fovReadoutMm).toBe(480);
        }
      }
  });
  it('at the same pixel is the first number of lines whose acquired width is free on the scanner’s lines', () => {
    for (const lineStep of [
      { kind: 'line' },
      { kind: 'even-lines' },
      { kind: 'percent', percent: 10 },
    ] as const)
      for (const forbiddenMm of sets)
        for (const lines of [240, 264]) {
          const given = at(lines, {}, typicalScanner({ lineStep }));
          const result = largerFovSameVoxel(
            given,
            solverThat({ requirement: () => requirement(forbiddenMm) }),
          );
          if (clean(forbiddenMm, lines * 1.25)) {
            expect(codeOf(result)).toBe('nothing-to-change');
            continue;
          }
          const share = lines / 240;
          const onGrid = (n: number) => {
            const needed = Math.max(n, Math.ceil(n * share - 1e-9));
            if (lineStep.kind === 'line') return needed;
            if (lineStep.kind === 'even-lines') return needed + (needed % 2);
            let steps = 0;
            while (Math.ceil(n * (1 + steps * 0.1) - 1e-9) < needed) steps++;
            return Math.ceil(n * (1 + steps * 0.1) - 1e-9);
          };
          let n = 241;
          while (!clean(forbiddenMm, onGrid(n) * 1.25)) n++;
          const after = planned(result).prescription;
          expect([after.linesAcrossFov, after.acquiredLines]).toEqual([n, onGrid(n)]);
          expect(after.fovPhaseMm).toBeCloseTo(n * 1.25, 9);
        }
  });
  it('goes up to the scanner’s largest, itself included', () => {
    const solver = solverThat({ requirement: () => requirement([[250, 400]]) });
    const limited = (fovMaxMm: number, matrixMax = 1024) =>
      typicalScanner({ limits: { fovMaxMm, matrixMax } });
    expect(planned(largerFovSameMatrix(at(240, {}, limited(400)), solver)).prescription.fovPhaseMm).toBe(400);
    expect(codeOf(largerFovSameMatrix(at(240, {}, limited(399)), solver))).toBe('fov-over-maximum');
    expect(planned(largerFovSameVoxel(at(240, {}, limited(400)), solver)).prescription.linesAcrossFov).toBe(
      320,
    );
    expect(codeOf(largerFovSameVoxel(at(240, {}, limited(399)), solver))).toBe('fov-over-maximum');
    expect(
      planned(largerFovSameVoxel(at(240, {}, limited(500, 320)), solver)).prescription.linesAcrossFov,
    ).toBe(320);
    expect(codeOf(largerFovSameVoxel(at(240, {}, limited(500, 319)), solver))).toBe('fov-over-maximum');
  });
  it('takes the readout FOV with it only where it would exceed it and must not', () => {
    const solver = solverThat({ requirement: () => requirement([[250, 400]]) });
    const free = typicalScanner({ phaseFovMayExceedReadoutFov: true });
    const after = (fovReadoutMm: number, change = largerFovSameMatrix, scanner = typicalScanner()) =>
      planned(change(at(240, { fovReadoutMm, readoutMatrix: 256 }, scanner), solver)).prescription;
    expect(after(400)).toMatchObject({ fovPhaseMm: 400, fovReadoutMm: 400, readoutMatrix: 256 });
    expect(after(399)).toMatchObject({ fovReadoutMm: 400, readoutMatrix: 256 });
    expect(after(320)).toMatchObject({ fovReadoutMm: 400, readoutMatrix: 256 });
    expect(after(320, largerFovSameMatrix, free)).toMatchObject({ fovReadoutMm: 320 });
    // At the same pixel the readout keeps its own too: 400 / (320 / 256) = 320.
    expect(after(320, largerFovSameVoxel)).toMatchObject({ fovReadoutMm: 400, readoutMatrix: 320 });
    expect(after(410, largerFovSameVoxel)).toMatchObject({ fovReadoutMm: 410, readoutMatrix: 256 });
  });
  it('is no help while tissue wraps along the slab', () => {
    const solver = solverThat({
      requirement: () => ({ ...requirement([]), alwaysCleanMm: Infinity }),
    });
    expect(codeOf(largerFovSameMatrix(at(240), solver))).toBe('wraps-along-slab');
    expect(codeOf(largerFovSameVoxel(at(240), solver))).toBe('wraps-along-slab');
  });
});
