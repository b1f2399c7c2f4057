import { describe, expect, it } from 'vitest';
import { exactly, sectionClearance } from '@/lib/physics/bore/bore-clearance';
import type { BorePart, BoreSetting } from '@/lib/physics/bore/bore-types';
import { chordMm } from '@/lib/physics/bore/chord';
import { farthestPoint } from '@/lib/physics/bore/farthest-point';
import { expectLimits } from '@/tests/support/expect-limits';

const part = (name: string, breadth: number, centreMm = 0): BorePart => ({
  name,
  breadthMm: exactly(breadth),
  depthMm: exactly(200),
  centreMm,
  raisedMm: 0,
  underCoil: true,
});
const clearance = (overrides: Partial<BoreSetting>, ...parts: readonly BorePart[]) =>
  sectionClearance(
    { name: 'trunk', zFromTargetMm: 0, parts: parts.length > 0 ? parts : [part('trunk', 300)] },
    {
      bore: { diameterMm: 600, tableBelowCentreMm: 170 },
      coilMm: 0,
      padMm: 0,
      lateralOffsetMm: 0,
      ...overrides,
    },
  );

describe('what a bore may be', () => {
  it('opening 300 to 1500 mm, table inside it, coil and pad up to 300 mm, offset up to 500 mm', () => {
    expectLimits(
      (diameterMm) => clearance({ bore: { diameterMm, tableBelowCentreMm: 100 } }),
      'bore-out-of-range',
      300,
      1500,
    );
    expectLimits(
      (tableBelowCentreMm) => clearance({ bore: { diameterMm: 600, tableBelowCentreMm } }),
      'table-out-of-range',
      0,
      300,
    );
    expectLimits((coilMm) => clearance({ coilMm }), 'coil-out-of-range', 0, 300);
    // Whether or not it lies on this part.
    const bare = { ...part('trunk', 300), underCoil: false };
    expectLimits((coilMm) => clearance({ coilMm }, bare), 'coil-out-of-range', 0, 300);
    expectLimits((padMm) => clearance({ padMm }), 'pad-out-of-range', 0, 300);
    expectLimits((lateralOffsetMm) => clearance({ lateralOffsetMm }), 'offset-out-of-range', -500, 500);
    expectLimits((mm) => chordMm(mm, 100), 'bore-out-of-range', 300, 1500);
    expectLimits((mm) => chordMm(600, mm), 'height-out-of-range', 0, 300);
  });
  it('outline: semi-axes 1 to 1000 mm, exponent 2 to 10, raised front up to 300 mm', () => {
    const at = (overrides: object) =>
      farthestPoint({ a: 200, b: 150, x0: 0, y0: 0, exponent: 2, frontRaisedMm: 0, ...overrides });
    expectLimits((a) => at({ a }), 'semi-axis-out-of-range', 1, 1000);
    expectLimits((b) => at({ b }), 'semi-axis-out-of-range', 1, 1000);
    expectLimits((exponent) => at({ exponent }), 'exponent-out-of-range', 2, 10);
    expectLimits((frontRaisedMm) => at({ frontRaisedMm }), 'coil-out-of-range', 0, 300);
  });
  it('of several parts the tightest counts, wherever it is in the list', () => {
    const [near, far] = [part('near', 100), part('far', 100, 200)];
    expect(clearance({}, near, far).part).toBe('far');
    expect(clearance({}, far, near).part).toBe('far');
    expect(clearance({}, far, near).clearanceMm).toBe(clearance({}, far).clearanceMm);
  });
  it('its spread is the slope of the clearance times the size’s spread, for breadth and for depth', () => {
    const of = (breadth: number, depth: number, breadthSd: number, depthSd: number): BorePart => ({
      ...part('trunk', breadth),
      breadthMm: { ...exactly(breadth), spread: breadthSd },
      depthMm: { ...exactly(depth), spread: depthSd },
    });
    const at = (breadth: number, depth: number) => clearance({}, of(breadth, depth, 0, 0)).clearanceMm;
    // Half a millimetre each way against the engine's one: the clearance is smooth here, 1 % is generous.
    const perBreadth = Math.abs(at(480.5, 380) - at(479.5, 380));
    const perDepth = Math.abs(at(480, 380.5) - at(480, 379.5));
    expect(clearance({}, of(480, 380, 12, 0)).spreadMm / (12 * perBreadth)).toBeCloseTo(1, 2);
    expect(clearance({}, of(480, 380, 0, 9)).spreadMm / (9 * perDepth)).toBeCloseTo(1, 2);
  });
  it('a size said to be exact has no spread', () => {
    expect(exactly(540)).toEqual({ value: 540, spread: 0, source: 'measured' });
    expect(clearance({}).spreadMm).toBe(0);
  });
});
