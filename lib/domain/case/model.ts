/** The engine's contract types, under one roof for forms, routes and services. */
export type { Case } from '@/lib/physics/model/case';
export type { Assessment, Reason, Assumption, Verdict } from '@/lib/physics/model/assessment';
export type { PatientAxis, PatientBox, PerSide, RangeMm, Side, Vec3 } from '@/lib/physics/model/axes';
export type { KeepClear, KeepClearArea } from '@/lib/physics/model/keep-clear';
export type {
  ArmPosition,
  BodyRegion,
  PartKind,
  PartShape,
  Patient,
  PatientPosition,
  Reading,
  ReadingSource,
  SolidPart,
} from '@/lib/physics/model/patient';
export type { CostWeights, SitePolicy } from '@/lib/physics/model/policy';
export type {
  Acceleration,
  Plane,
  Prescription,
  PresaturationBand,
  SequenceFamily,
  Slab,
  SliceStack,
  Trajectory,
  Unfolding,
} from '@/lib/physics/model/prescription';
export type { Ranking, Remedy, RemedyKind, RemedyNotPossible, PaybackKind } from '@/lib/physics/model/remedy';
export type {
  CoilDescription,
  CoilElement,
  LineStep,
  OversamplingForm,
  Scanner,
  ScannerLimits,
  SliceOversamplingForm,
} from '@/lib/physics/model/scanner';
export { SIDES } from '@/lib/physics/model/axes';
export { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
export { DomainError } from '@/lib/physics/model/domain-error';
