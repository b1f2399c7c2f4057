import type { Reading } from '../model/patient';

/** The opening a patient lies in; lengths mm. Site data. */
export interface Bore {
  readonly diameterMm: number;
  /** Table below the bore's centre, mm > 0, its pad compressed. */
  readonly tableBelowCentreMm: number;
  /** Half the length of the narrow part; a section further from the isocentre is not in it. Absent: all are. */
  readonly halfLengthMm?: number;
}

export type SectionName = 'hips' | 'trunk' | 'arms' | 'shoulders' | 'elbows';

/** One solid of a section, lying on the table (or raised above it), seen along the bore. */
export interface BorePart {
  readonly name: string;
  readonly breadthMm: Reading;
  readonly depthMm: Reading;
  /** Centre from the patient's mid-line, mm, positive to the patient's left. */
  readonly centreMm: number;
  /** Lowest point above the (padded) table, mm ≥ 0. */
  readonly raisedMm: number;
  /** Whether the anterior coil lies on it. */
  readonly underCoil: boolean;
}

export interface BoreSection {
  readonly name: SectionName;
  /** Along the bore from the target, mm, positive towards the head. */
  readonly zFromTargetMm: number;
  readonly parts: readonly BorePart[];
}

export interface BoreSetting {
  readonly bore: Bore;
  /** Room the anterior coil takes above what it lies on, mm. */
  readonly coilMm: number;
  /** Pad added on the table, compressed, mm. */
  readonly padMm: number;
  /** Patient's mid-line from the bore's, mm, positive to the patient's left. */
  readonly lateralOffsetMm: number;
}

export type BoreOutline = 'ellipse' | 'superellipse';

export interface Clearance {
  /** Smallest distance to the bore, mm; negative: that much too large. */
  readonly clearanceMm: number;
  /** One standard deviation from the sizes' own, mm. */
  readonly spreadMm: number;
  /** Where: the outline's parameter t, degrees, 0 = patient's left, 90 = front. */
  readonly angleDeg: number;
  /** The tightest point, mm from the bore's centre: to the patient's left, up. */
  readonly pointMm: readonly [number, number];
  readonly outline: BoreOutline;
  readonly part: string;
  readonly section: SectionName;
}
