import { reachAlongZ } from '../body/coil-reach';
import { foldProblem, type FoldProblem } from '../fold/fold-problem';
import { solveFold } from '../fold/solve-fold';
import type { SolvedFold } from '../fold/solved-fold';
import { keepClearRegion, type OrientedRegion } from '../geometry/oriented-region';
import type { Case } from '../model/case';
import type { Prescription, Slab } from '../model/prescription';
import { mostAcquiredLines } from './line-grid';
import { slabSources } from '../slab/assess-slab';
import type { SlabSource } from '../slab/slab-types';

/**
 * A case whose keep-clear area is fixed in the patient, so that a remedy may change the window without moving it.
 * Absent: the area as the case says it.
 */
export interface FrozenCase extends Case {
  readonly frozen?: OrientedRegion;
}

/** Answers kept by key, oldest dropped first: a ranking needs a few dozen, a drag makes new ones every frame. */
export class KeptAnswers<T> {
  private readonly answers = new Map<string, T>();

  constructor(private readonly most: number) {}

  get(key: string, workOut: () => T): T {
    const known = this.answers.get(key);
    if (known !== undefined) return known;
    const made = workOut();
    this.answers.set(key, made);
    if (this.answers.size > this.most) this.answers.delete(this.answers.keys().next().value!);
    return made;
  }
}

/** The keep-clear area fixed where it is now. */
export const freeze = (given: Case): FrozenCase => ({
  ...given,
  frozen: keepClearRegion(given.keepClear, given.prescription),
});

/** Everything of a slab on which its profile depends. */
export const slabKey = (slab: Slab, p: Prescription): string =>
  `${slab.partitions}/${slab.partitionThicknessMm}/${slab.selective}/${slab.timeBandwidthProduct}/${slab.pulseDurationMs}/` +
  `${slab.droppedPartitionsPerEnd}/${slab.fatShiftTowards}/${p.flipDeg}/${p.trMs}/${p.family}`;

const identities = new WeakMap<object, number>();
let nextIdentity = 0;

/** A number for an object that is never changed in place. */
export function identityOf(object: object): number {
  let identity = identities.get(object);
  if (identity === undefined) {
    identity = nextIdentity++;
    identities.set(object, identity);
  }
  return identity;
}

/** Everything of a prescription on which fold depends, but the number of acquired lines and partitions. */
function prescriptionKey(p: Prescription): string {
  const { acceleration: a, slices } = p;
  const stack =
    slices.mode === 'stack' ? `${slices.slices}/${slices.thicknessMm}/${slices.gapMm}` : slabKey(slices, p);
  const bands = p.presaturation
    .map(
      (band) => `${band.side}/${band.innerEdgeMm}/${band.thicknessMm}/${band.nominalFlipDeg}/${band.delayMs}`,
    )
    .join(';');
  return [
    p.plane,
    p.phaseAxis,
    p.centreMm.join('/'),
    p.tiltAboutReadoutDeg,
    p.tiltAboutPhaseDeg,
    p.inPlaneRotationDeg,
    p.fovPhaseMm,
    p.fovReadoutMm,
    p.linesAcrossFov,
    stack,
    // Only a grid that ends at W makes fold depend on how much is accelerated.
    a.factorPhase * a.factorSlice > 1 && a.unfolding === 'image-domain-grid-ends'
      ? `${a.factorPhase}/${a.factorSlice}`
      : '',
    bands,
    p.coil,
    p.coilElements?.join('/'),
    p.family === 'echo-planar'
      ? `${p.echoSpacingMs}/${p.shots}/${a.factorPhase}/${p.fatDisplacedTowards ?? ''}`
      : '',
  ].join('|');
}

/** The key of a case's geometry class. */
function classKey(given: FrozenCase): string {
  const { position, breadthMm, depthMm, gapMm } = given.patient.arms;
  return [
    given.patient.region,
    identityOf(given.patient.extents),
    `${given.patient.weightKg?.value}/${given.patient.heightCm?.value}/${given.patient.sex}`,
    `${position}/${breadthMm}/${depthMm}/${gapMm}`,
    given.patient.parts === undefined ? '' : identityOf(given.patient.parts),
    given.patient.lateralOffsetMm,
    given.patient.isocentreZMm,
    given.patient.position,
    identityOf(given.frozen ?? given.keepClear),
    identityOf(given.scanner),
    identityOf(given.policy),
    prescriptionKey(given.prescription),
  ].join('#');
}

/** Signal of the worst tissue at an offset from the slab centre, relative to the slab centre. */
function worstSlabWeight(sources: readonly SlabSource[], slab: Slab): (offsetMm: number) => number {
  const slabMm = slab.partitions * slab.partitionThicknessMm;
  return (offsetMm) =>
    sources.reduce(
      (worst, source) => Math.max(worst, source.profile.at(offsetMm / slabMm - source.shiftShare)),
      0,
    );
}

/** Signal of a slab relative to its centre, by offset from it [mm]; undefined for a stack. */
export function slabWeightFor({
  prescription: p,
  scanner,
  policy,
}: Case): ((offsetMm: number) => number) | undefined {
  return p.slices.mode === 'slab'
    ? worstSlabWeight(slabSources(p, p.slices, scanner, policy), p.slices)
    : undefined;
}

function problemOf(given: FrozenCase): FoldProblem {
  const { prescription: p, scanner } = given;
  const slabWeight = slabWeightFor(given);
  return foldProblem(given, {
    acquiredLinesMax: mostAcquiredLines(p.linesAcrossFov, scanner.limits),
    ...reachAlongZ(given),
    ...(given.frozen === undefined ? {} : { keepClear: given.frozen }),
    ...(slabWeight === undefined ? {} : { slabWeight }),
  });
}

const solved = new KeptAnswers<SolvedFold>(48);

/** The geometry class of a case, solved once; the key is every value the solution depends on. */
export const solveClass = (given: FrozenCase): SolvedFold =>
  solved.get(classKey(given), () => solveFold(problemOf(given)));

/** As solveClass, for sizes asked about once: nothing is kept. */
export const solveOnce = (given: FrozenCase): SolvedFold => solveFold(problemOf(given));
