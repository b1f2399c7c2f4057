import type { Reading } from '../model/patient';
import { requireRange } from '../model/require-argument';
import type { BorePart, BoreOutline, BoreSection, BoreSetting, Clearance } from './bore-types';
import { farthestPoint } from './farthest-point';

/** A back lying on a table is flat: besides the ellipse, this superellipse. */
export const FLAT_BACK_EXPONENT = 2.5;
const EXPONENTS: readonly (readonly [BoreOutline, number])[] = [
  ['ellipse', 2],
  ['superellipse', FLAT_BACK_EXPONENT],
];

function requireSetting({ bore, coilMm, padMm, lateralOffsetMm }: BoreSetting): void {
  requireRange('bore-out-of-range', 'bore.diameterMm', bore.diameterMm, 300, 1500);
  requireRange(
    'table-out-of-range',
    'bore.tableBelowCentreMm',
    bore.tableBelowCentreMm,
    0,
    bore.diameterMm / 2,
  );
  requireRange('coil-out-of-range', 'coilMm', coilMm, 0, 300);
  requireRange('pad-out-of-range', 'padMm', padMm, 0, 300);
  requireRange('offset-out-of-range', 'lateralOffsetMm', lateralOffsetMm, -500, 500);
}

/** Smallest clearance of one part with given breadth and depth: the smaller of the two outlines counts. */
function clearanceOf(part: BorePart, breadthMm: number, depthMm: number, setting: BoreSetting) {
  const { bore, coilMm, padMm, lateralOffsetMm } = setting;
  const b = depthMm / 2;
  // The table's pad lifts the patient; the outline's lowest point lies on it.
  const y0 = b - bore.tableBelowCentreMm + padMm + part.raisedMm;
  const candidates = EXPONENTS.map(([outline, exponent]) => {
    const farthest = farthestPoint({
      a: breadthMm / 2,
      b,
      x0: part.centreMm + lateralOffsetMm,
      y0,
      exponent,
      frontRaisedMm: part.underCoil ? coilMm : 0,
    });
    return {
      outline,
      clearanceMm: bore.diameterMm / 2 - farthest.distanceMm,
      angleDeg: farthest.angleDeg,
      pointMm: farthest.pointMm,
    };
  });
  return candidates.reduce((least, one) => (one.clearanceMm < least.clearanceMm ? one : least));
}

/** SD of the clearance: breadth and depth may come from one girth, so their contributions are added, not in quadrature. */
function spreadOf(part: BorePart, setting: BoreSetting): number {
  const change = (db: number, dd: number): number =>
    (clearanceOf(part, part.breadthMm.value + db, part.depthMm.value + dd, setting).clearanceMm -
      clearanceOf(part, part.breadthMm.value - db, part.depthMm.value - dd, setting).clearanceMm) /
    2;
  return Math.abs(change(1, 0)) * part.breadthMm.spread + Math.abs(change(0, 1)) * part.depthMm.spread;
}

/** A size that has no spread and was measured, for parts whose size is not estimated. */
export const exactly = (value: number): Reading => ({ value, spread: 0, source: 'measured' });

/**
 * Smallest clearance of one section: the least over its parts, each as an ellipse and as a superellipse with a flatter
 * back (exponent 2.5). 540 × 400 mm in a 600 mm bore with the table 170 mm below its centre: 26.3 mm at 10.5°
 * (ellipse).
 * @returns mm; negative when the part is that much too large
 * @throws DomainError naming the argument
 * Valid: cylinder bore, rigid outline lying on the table. A planning estimate: skin gives, clothing adds.
 */
export function sectionClearance(section: BoreSection, setting: BoreSetting): Clearance {
  requireSetting(setting);
  const all = section.parts.map((part): Clearance => {
    const least = clearanceOf(part, part.breadthMm.value, part.depthMm.value, setting);
    return { ...least, spreadMm: spreadOf(part, setting), part: part.name, section: section.name };
  });
  return all.reduce((least, one) => (one.clearanceMm < least.clearanceMm ? one : least));
}

export interface BoreAnswer {
  /** The tightest section inside the bore; absent when none is. */
  readonly tightest?: Clearance;
  /** Every section inside the bore, as given. */
  readonly sections: readonly Clearance[];
  /** Their solids, in the same order. */
  readonly inside: readonly BoreSection[];
  /** Sections outside the narrow part when the target is at the isocentre. */
  readonly outside: readonly BoreSection[];
}

/**
 * Every section inside the bore with the target at the isocentre, and the tightest of them.
 * @throws DomainError naming the argument
 */
export function boreClearance(sections: readonly BoreSection[], setting: BoreSetting): BoreAnswer {
  const half = setting.bore.halfLengthMm ?? Number.POSITIVE_INFINITY;
  const inside = sections.filter(({ zFromTargetMm }) => Math.abs(zFromTargetMm) <= half);
  const clearances = inside.map((section) => sectionClearance(section, setting));
  const outside = sections.filter((section) => !inside.includes(section));
  if (clearances.length === 0) return { sections: [], inside, outside };
  const tightest = clearances.reduce((least, one) => (one.clearanceMm < least.clearanceMm ? one : least));
  return { tightest, sections: clearances, inside, outside };
}
