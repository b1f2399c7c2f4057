import { describe, expect, it } from 'vitest';
import { foldProbability } from '@/lib/physics';
import { foldShareWithMargin } from '@/lib/physics/certainty/fold-probability';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { normalQuantile } from '@/lib/physics/certainty/normal';
import { haltonPoints } from '@/lib/physics/certainty/quasi-random';
import { patientAtDraw, sizeVariables } from '@/lib/physics/certainty/size-variables';
import { sizesAt } from '@/lib/physics/certainty/sizes-at';
import type { Patient, Reading } from '@/lib/physics/model/patient';
import {
  extentsOf,
  measured,
  sketchCase,
  typicalPatient,
  typicalPrescription,
} from '@/tests/support/physics-cases';

const unsure = (
  spreads: Partial<Record<'anterior' | 'posterior' | 'right' | 'left' | 'superior', number>>,
  region: Patient['region'] = 'abdomen',
): Patient =>
  typicalPatient({
    region,
    extents: {
      ...extentsOf({}),
      ...Object.fromEntries(Object.entries(spreads).map(([side, spread]) => [side, measured(170, spread)])),
    },
  });

describe('which sizes vary', () => {
  it('two sides got the same way move together, got differently or one alone by themselves', () => {
    expect(sizeVariables(unsure({}))).toEqual([]);
    expect(sizeVariables(unsure({ anterior: 3, posterior: 4 }))).toEqual([['anterior', 'posterior']]);
    expect(sizeVariables(unsure({ posterior: 4 }))).toEqual([['posterior']]);
    expect(sizeVariables(unsure({ right: 4, left: 2, anterior: 1 }))).toEqual([
      ['anterior'],
      ['right', 'left'],
    ]);
    const girth: Reading = { value: 165, source: 'girth', spread: 5 };
    const patient = unsure({ anterior: 3 });
    expect(sizeVariables({ ...patient, extents: { ...patient.extents, posterior: girth } })).toEqual([
      ['anterior'],
      ['posterior'],
    ]);
    // A trunk's upper and lower ends play no part; a head's do.
    expect(sizeVariables(unsure({ superior: 5 }))).toEqual([]);
    expect(sizeVariables(unsure({ superior: 5 }, 'head'))).toEqual([['superior']]);
  });
  it('a variable that is not drawn stays at its mean', () => {
    const { extents } = patientAtDraw(unsure({ anterior: 3, right: 8 }), [['anterior'], ['right']], [1]);
    expect([extents.anterior.value, extents.right.value]).toEqual([173, 170]);
  });
  it('a draw moves every side of its variable by its own spread, and none below 1 mm', () => {
    const drawn = patientAtDraw(
      unsure({ anterior: 3, posterior: 4, right: 80 }),
      [['anterior', 'posterior'], ['right']],
      [2, -3],
    );
    expect(
      [drawn.extents.anterior, drawn.extents.posterior, drawn.extents.right].map(({ value, spread }) => [
        value,
        spread,
      ]),
    ).toEqual([
      [176, 0],
      [178, 0],
      [1, 0],
    ]);
  });
});

describe('sizes at a certainty', () => {
  it('grow by the quantile as soon as more than half is asked for', () => {
    const patient = unsure({ anterior: 10 });
    expect(sizesAt(patient, 0.5)).toBe(patient);
    expect(sizesAt(patient, 0.503).extents.anterior.value).toBeCloseTo(170 + 10 * normalQuantile(0.503), 9);
    expect(sizesAt(patient, 0.503).extents.anterior.value).toBeGreaterThan(170);
    expect(sizesAt(patient, 0.9).extents.left).toBe(patient.extents.left);
  });
});

describe('quasi-random points', () => {
  it('one to six dimensions', () => {
    for (const dimensions of [1, 6]) expect(haltonPoints(3, dimensions)[0]).toHaveLength(dimensions);
    for (const dimensions of [0, 7, 1.5])
      expect(() => haltonPoints(3, dimensions)).toThrow(
        expect.objectContaining({ code: 'dimensions-out-of-range' }),
      );
  });
});

describe('the share of sizes that fold', () => {
  it('is a share of many sizes where depth and breadth decide together', () => {
    // Turned in its plane, phase meets both the front and the side.
    const extents = {
      ...extentsOf({}),
      anterior: measured(170, 9),
      posterior: measured(170, 9),
      right: measured(240, 9),
      left: measured(240, 9),
    };
    const given = sketchCase({
      patient: typicalPatient({ extents }),
      prescription: typicalPrescription({ inPlaneRotationDeg: 35, acquiredLines: 275, fovReadoutMm: 480 }),
    });
    const { method, probability, draws } = foldProbability(given);
    expect([method, draws]).toEqual(['quasi-random', 512]);
    expect(probability).toBeGreaterThan(0);
    expect(probability).toBeLessThan(1);
  });
  it('is none where no size varies and the gap is clean', () => {
    expect(foldShareWithMargin(freeze(sketchCase()))).toBe(0);
  });
});
