import type { Patient, PartKind, PartShape, Reading, SolidPart } from '../model/patient';
import { shouldersFromWeightAndHeight } from '../size/estimate-shoulders';

const MEASURED: ReadonlySet<Reading['source']> = new Set(['measured', 'localiser']);

/** Whether any of these readings is worked out, reported or assumed rather than measured. */
export function isEstimated(...readings: readonly Reading[]): boolean {
  return readings.some((reading) => !MEASURED.has(reading.source));
}

/**
 * Whether somebody said where the part ends on this side. A policy default along z only says how far coil and magnet
 * see, so it ends nothing.
 */
export function endIsKnown(reading: Reading): boolean {
  return reading.source !== 'policy-default';
}

/** Extents of the imaged part as centre and half-lengths, mm. */
export interface PartBox {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly halfX: number;
  readonly halfY: number;
  readonly halfZ: number;
}

export function partBox({ extents }: Patient): PartBox {
  const { right, left, anterior, posterior, superior, inferior } = extents;
  return {
    x: (left.value - right.value) / 2,
    y: (posterior.value - anterior.value) / 2,
    z: (superior.value - inferior.value) / 2,
    halfX: (left.value + right.value) / 2,
    halfY: (posterior.value + anterior.value) / 2,
    halfZ: (superior.value + inferior.value) / 2,
  };
}

/** Ends along z, patient coordinates [mm]; an absent one is as far as coil and magnet see. */
export interface EndsMm {
  readonly fromMm?: number;
  readonly toMm?: number;
}

export function cylinder(x: number, y: number, halfX: number, halfY: number, ends: EndsMm = {}): PartShape {
  return { type: 'elliptic-cylinder', along: 'z', centreMm: [x, y, 0], semiAxesMm: [halfX, halfY], ...ends };
}

export function part(name: string, kind: PartKind, shape: PartShape, estimated: boolean): SolidPart {
  return { name, kind, shape, signalWeight: 1, estimated };
}

/** Both arms beside a part of half-breadth `halfX` about x, level with y. */
export function armsBeside(
  patient: Patient,
  box: Pick<PartBox, 'x' | 'y' | 'halfX'>,
  ends: EndsMm = {},
): SolidPart[] {
  const { breadthMm, depthMm, gapMm } = patient.arms;
  if (!(breadthMm > 0) || !(depthMm > 0)) return [];
  const centre = box.halfX + gapMm + breadthMm / 2;
  return (['right', 'left'] as const).map((side) => {
    const x = box.x + (side === 'left' ? centre : -centre);
    return part(`${side} arm`, 'arm', cylinder(x, box.y, breadthMm / 2, depthMm / 2, ends), true);
  });
}

/**
 * Sizes of parts that no reading describes, mm; adults' means rounded up. [ansur-2], from memory: head breadth 154,
 * head length 197, crown to chin 230, neck girth 390.
 */
export const ADULT = {
  headHalfBreadth: 78,
  headHalfDepth: 98,
  headHalfHeight: 116,
  neckHalfBreadth: 62,
  neckHalfDepth: 66,
  /** Chin to the top of the shoulders. */
  neckLength: 60,
  shoulderHalfBreadth: 255,
  shoulderHalfDepth: 130,
} as const;

/** Half-breadth and half-depth over the shoulders [mm]: from weight and height where known, else adults' means. */
export function shoulderHalves(patient: Patient): readonly [number, number] {
  const { weightKg, heightCm, sex } = patient;
  if (!weightKg || !heightCm) return [ADULT.shoulderHalfBreadth, ADULT.shoulderHalfDepth];
  const { breadth, depth } = shouldersFromWeightAndHeight(weightKg, heightCm, sex);
  return [breadth.value / 2, depth.value / 2];
}

/** Neck and head above a shoulder top at z, about (x, y); all estimated. */
export function neckAndHead(x: number, y: number, shoulderTopMm: number): SolidPart[] {
  const chin = shoulderTopMm + ADULT.neckLength;
  const middle = chin + ADULT.headHalfHeight;
  return [
    part(
      'neck',
      'other',
      cylinder(x, y, ADULT.neckHalfBreadth, ADULT.neckHalfDepth, { fromMm: shoulderTopMm - 1, toMm: middle }),
      true,
    ),
    part(
      'head',
      'head',
      {
        type: 'ellipsoid',
        centreMm: [x, y, middle],
        semiAxesMm: [ADULT.headHalfBreadth, ADULT.headHalfDepth, ADULT.headHalfHeight],
      },
      true,
    ),
  ];
}

/** Raised arms beside the head, from the shoulder top upwards. */
export function raisedArms(
  patient: Patient,
  x: number,
  y: number,
  shoulderTopMm: number,
  headHalfBreadth: number,
): SolidPart[] {
  return armsBeside(patient, { x, y, halfX: headHalfBreadth }, { fromMm: shoulderTopMm }).map((arm) => ({
    ...arm,
    name: `raised ${arm.name}`,
  }));
}
