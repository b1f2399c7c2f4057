import type { Side, Vec3 } from './axes';

/** How a number about the patient was got. Only 'measured' and 'localiser' count as measured. */
export type ReadingSource =
  | 'measured'
  | 'localiser'
  | 'reported'
  | 'girth-and-depth'
  | 'girth'
  | 'weight-and-height'
  | 'population'
  | 'policy-default';

/** One number with how it was got, when, and its spread (one standard deviation, same unit as the value). */
export interface Reading {
  readonly value: number;
  readonly source: ReadingSource;
  /** ISO 8601 date (YYYY-MM-DD). */
  readonly takenOn?: string;
  readonly spread: number;
}

export type ArmPosition = 'down' | 'up' | 'cannot-be-raised';
export type PatientPosition = 'head-first-supine' | 'feet-first-supine' | 'head-first-prone' | 'feet-first-prone';
export type BodyRegion = 'abdomen' | 'pelvis' | 'chest' | 'head' | 'shoulder' | 'hip' | 'knee' | 'breast';

export type PartKind = 'trunk' | 'arm' | 'head' | 'nose' | 'breast' | 'leg' | 'other';

/** A point of an outline, in the two patient axes across the prism's own axis, mm. */
export type OutlinePoint = readonly [number, number];

export type PartShape =
  | {
      /** Elliptic cylinder along a patient axis. Semi-axes [mm] lie on the two other axes in the order x, y, z. */
      readonly type: 'elliptic-cylinder';
      readonly along: 'x' | 'y' | 'z';
      readonly centreMm: Vec3;
      readonly semiAxesMm: readonly [number, number];
      /** In-plane rotation of the semi-axes about `along`, right-handed, degrees. */
      readonly rotationDeg?: number;
      /** Extent along the axis [mm], patient coordinates; absent: as far as coil and magnet see. */
      readonly fromMm?: number;
      readonly toMm?: number;
    }
  | {
      readonly type: 'ellipsoid';
      readonly centreMm: Vec3;
      readonly semiAxesMm: Vec3;
    }
  | {
      /** Uploaded outline: closed rings, even-odd rule, so an inner ring is a hole. */
      readonly type: 'outline-prism';
      readonly along: 'x' | 'y' | 'z';
      readonly rings: readonly (readonly OutlinePoint[])[];
      readonly fromMm?: number;
      readonly toMm?: number;
    };

export interface SolidPart {
  /** Unique in its body; shown to people: "trunk", "right arm". */
  readonly name: string;
  readonly kind: PartKind;
  readonly shape: PartShape;
  /** Signal weight relative to trunk tissue, ≥ 0; unknown is 1. */
  readonly signalWeight: number;
  readonly estimated: boolean;
}

export interface Patient {
  readonly region: BodyRegion;
  /** Extent of the body part each side of the origin, mm ≥ 0. The engine builds the trunk from these. */
  readonly extents: Readonly<Record<Side, Reading>>;
  readonly arms: {
    readonly position: ArmPosition;
    /** Right–left breadth and anterior–posterior depth of one arm, and the gap between trunk and arm, mm. */
    readonly breadthMm: number;
    readonly depthMm: number;
    readonly gapMm: number;
  };
  readonly weightKg?: Reading;
  readonly heightCm?: Reading;
  readonly sex?: 'female' | 'male';
  readonly breathHoldS: Reading;
  readonly breathPeriodS: Reading;
  readonly position: PatientPosition;
  /** Which of a pair is imaged (knee); absent: not known, and the other one is assumed on either side. */
  readonly pairedSide?: 'right' | 'left';
  /** Gap between the knees, mm; absent: 20. */
  readonly legGapMm?: number;
  /** Patient's mid-line from the scanner's mid-line, mm, positive to the patient's left. */
  readonly lateralOffsetMm: number;
  /** z of the magnet's isocentre in patient coordinates, mm. */
  readonly isocentreZMm: number;
  /** Replaces the body built from the extents: ellipses, ellipsoids or outlines, whole. */
  readonly parts?: readonly SolidPart[];
}
