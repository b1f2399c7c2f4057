import { buildBody } from '../body/build-body';
import { b1ScaleOf } from '../body/presaturated-weight';
import { keepClearRegion, type OrientedRegion } from '../geometry/oriented-region';
import type { PerSide, Vec3 } from '../model/axes';
import type { Case } from '../model/case';
import type { SolidPart } from '../model/patient';
import type { Prescription } from '../model/prescription';
import type { LineStep } from '../model/scanner';
import { fatShares } from './fat-shares';

/** Where the scanner maps tissue rightly, patient coordinates: an elliptic cylinder along z about the isocentre. */
export interface UsableVolume {
  readonly centreMm: Vec3;
  /** Half of the usable FOV along x, y and z. */
  readonly halfMm: Vec3;
}

/**
 * One geometry class: everything on which fold depends but the number of acquired lines and partitions.
 * `prescription.acquiredLines` and its slab's `acquiredPartitions` are not read.
 */
export interface FoldProblem {
  readonly parts: readonly SolidPart[];
  readonly prescription: Prescription;
  /** Frozen in the patient. */
  readonly keepClear: OrientedRegion;
  readonly marginMm: PerSide;
  readonly tissueTolerance: number;
  readonly slabTolerance: number;
  readonly tissueReachMm: number;
  readonly isocentreZMm: number;
  readonly usable: UsableVolume;
  readonly lineStep: LineStep;
  readonly acquiredLinesMax: number;
  readonly partitionStep: number;
  readonly acquiredPartitionsMax: number;
  /**
   * Signal of tissue at this offset from the slab centre along the slice axis [mm], relative to slab centre.
   * Absent: 1 within the nominal slab and 0 outside (an ideal slab), or 1 everywhere when it is not selective.
   */
  readonly slabWeight?: (offsetFromSlabCentreMm: number) => number;
  /** T1 of what a presaturation band covers, ms; the worst of them counts. */
  readonly presaturatedT1Ms: readonly number[];
  /** True over nominal flip angle of presaturation bands. */
  readonly presaturationB1Scale: number;
  /** Shares of the acquired width by which EPI displaces fat (see fatShares); absent: nothing is displaced. */
  readonly fatShares?: readonly number[];
}

/**
 * The usable volume in patient coordinates: x from the mid-line's lateral offset, y from the table (the back lies
 * `tableBelowCentreMm` below the bore's centre), z from the isocentre.
 */
export function usableVolume(question: Pick<Case, 'patient' | 'scanner'>): UsableVolume {
  const { patient, scanner } = question;
  const prone = patient.position.endsWith('prone');
  const { anterior, posterior } = patient.extents;
  const y = prone
    ? scanner.tableBelowCentreMm - anterior.value
    : posterior.value - scanner.tableBelowCentreMm;
  const [width, height, length] = scanner.limits.usableFovMm;
  return {
    centreMm: [-patient.lateralOffsetMm, y, patient.isocentreZMm],
    halfMm: [width / 2, height / 2, length / 2],
  };
}

/** The geometry class of a case; `changes` replaces what a remedy changes (a frozen keep-clear region, the slab profile…). */
export function foldProblem(question: Case, changes: Partial<FoldProblem> = {}): FoldProblem {
  const { patient, prescription, keepClear, scanner, policy } = question;
  const slab = prescription.slices.mode === 'slab' ? prescription.slices : undefined;
  const { limits } = scanner;
  return {
    parts: changes.parts ?? buildBody(patient, scanner),
    prescription,
    keepClear: changes.keepClear ?? keepClearRegion(keepClear, prescription),
    marginMm: policy.marginMm,
    tissueTolerance: policy.tissueTolerance,
    slabTolerance: policy.slabTolerance,
    tissueReachMm: scanner.tissueReachMm,
    isocentreZMm: patient.isocentreZMm,
    usable: usableVolume(question),
    lineStep: scanner.lineStep,
    acquiredLinesMax: Math.min(
      limits.acquiredLinesMax,
      Math.floor(prescription.linesAcrossFov * (1 + limits.phaseOversamplingMaxPct / 100) + 1e-9),
    ),
    partitionStep: scanner.partitionStep,
    acquiredPartitionsMax: slab
      ? Math.floor(slab.partitions * (1 + limits.sliceOversamplingMaxPct / 100) + 1e-9)
      : 1,
    presaturatedT1Ms: [policy.tissueT1Ms.parenchyma, policy.tissueT1Ms.fat],
    presaturationB1Scale: b1ScaleOf(policy),
    fatShares: fatShares(prescription, scanner.fieldStrengthT),
    ...changes,
  };
}
