import type { FrozenCase } from '../assess/geometry-class';
import type { OrientedRegion } from '../geometry/oriented-region';
import type { Assessment, FoldResult, Reason, WidthRequirement } from '../model/assessment';
import type { RangeMm, Side } from '../model/axes';
import type { Prescription } from '../model/prescription';

/** A case on its way to a remedy. */
export interface TargetedCase extends FrozenCase {
  /** What sizing keeps free of fold where that is more than the keep-clear area: the whole picture as it is now. */
  readonly target?: OrientedRegion;
}

/** What a change is worked out with: one geometry solution a class, everything else arithmetic. */
export interface Solver {
  /** Widths that are enough along phase, at the case's own acquired partitions. */
  requirement(given: TargetedCase): WidthRequirement;
  /** Nothing reaches the keep-clear area, margin included, in plane or through the slab. */
  isClean(given: TargetedCase): boolean;
  /** No keep-clear partition is contaminated through the slab alone. */
  slabIsClean(given: TargetedCase): boolean;
  /** Smallest L_z on the scanner's step that is clean; undefined: none. */
  cleanPartitions(given: TargetedCase): number | undefined;
  /** What reaches deepest, as the case stands. */
  intruder(given: TargetedCase): FoldResult['from'];
  /** Why the planned window no longer shows what must stay in it; undefined: it does. */
  leavesPicture(planned: TargetedCase): Reason | undefined;
  /** Distance from the origin to the displayed window's edge, and to the body's, towards a side [mm]. */
  windowEdgeMm(given: TargetedCase, side: Side): number;
  bodyEdgeMm(given: TargetedCase, side: Side): number;
  /** Body along the phase direction, margin included, section coordinates [mm]. */
  bodyAlongPhaseMm(given: TargetedCase): RangeMm;
  assess(given: TargetedCase): Assessment;
}

/** A change applied, with what it changes beside its purpose; or nothing to change here; or refused with its reason. */
export type ChangeResult =
  | { readonly outcome: 'changed'; readonly planned: TargetedCase; readonly sideEffects: readonly string[] }
  | { readonly outcome: 'nothing-to-change' }
  | { readonly outcome: 'refused'; readonly reason: Reason };

export type Change = (given: TargetedCase, solver: Solver) => ChangeResult;

export const NOTHING_TO_CHANGE: ChangeResult = { outcome: 'nothing-to-change' };

export const changed = (planned: TargetedCase, ...sideEffects: string[]): ChangeResult => ({
  outcome: 'changed',
  planned,
  sideEffects,
});

export const refused = (code: string, text: string): ChangeResult => ({
  outcome: 'refused',
  reason: { code, text },
});

export const withPrescription = (given: TargetedCase, values: Partial<Prescription>): TargetedCase => ({
  ...given,
  prescription: { ...given.prescription, ...values },
});
