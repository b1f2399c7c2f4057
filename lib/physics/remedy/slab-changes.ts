import { nextAcquiredPartitions } from '../fold/acquired-lines';
import { figure } from '../assess/words';
import type { Case } from '../model/case';
import type { Slab } from '../model/prescription';
import {
  changed,
  NOTHING_TO_CHANGE,
  refused,
  withPrescription,
  type Change,
  type TargetedCase,
} from './change';

const slabOf = (given: Case): Slab | undefined =>
  given.prescription.slices.mode === 'slab' ? given.prescription.slices : undefined;

const withSlab = (given: TargetedCase, slab: Slab, values: Partial<Slab>): TargetedCase =>
  withPrescription(given, { slices: { ...slab, ...values } });

const most = (given: Case, slab: Slab): number =>
  Math.floor(slab.partitions * (1 + given.scanner.limits.sliceOversamplingMaxPct / 100) + 1e-9);

/** Acquired partitions set to the first number on the scanner's step that leaves every keep-clear partition clean. */
export const sliceOversampling: Change = (given, solver) => {
  const slab = slabOf(given);
  if (slab === undefined) return NOTHING_TO_CHANGE;
  const enough = solver.cleanPartitions(given);
  if (enough === undefined) {
    return refused(
      'slice-oversampling-over-maximum',
      `No slice oversampling up to this scanner’s ${figure(given.scanner.limits.sliceOversamplingMaxPct)} % keeps the ` +
        `keep-clear partitions free of wrap.`,
    );
  }
  return enough === slab.acquiredPartitions
    ? NOTHING_TO_CHANGE
    : changed(withSlab(given, slab, { acquiredPartitions: enough }));
};

/** As few end partitions as needed are given up at both ends, at the acquired partitions there are now. */
export const dropEndPartitions: Change = (given, solver) => {
  const slab = slabOf(given);
  if (slab === undefined) return NOTHING_TO_CHANGE;
  if (solver.slabIsClean(given)) return NOTHING_TO_CHANGE;
  const last = Math.floor((slab.partitions - 1) / 2);
  for (let dropped = slab.droppedPartitionsPerEnd + 1; dropped <= last; dropped++) {
    const planned = withSlab(given, slab, { droppedPartitionsPerEnd: dropped });
    const leaves = solver.leavesPicture(planned);
    if (leaves !== undefined) return { outcome: 'refused', reason: leaves };
    if (solver.slabIsClean(planned)) {
      const lostMm = 2 * (dropped - slab.droppedPartitionsPerEnd) * slab.partitionThicknessMm;
      return changed(planned, `${figure(lostMm)} mm of coverage given up, half at each end`);
    }
  }
  return refused('drop-not-enough', 'Dropping end partitions does not keep the rest free of wrap.');
};

/** A thicker slab around the same keep-clear area: wrap stays in partitions that lie outside it. */
export const enlargeSlab: Change = (given, solver) => {
  const slab = slabOf(given);
  if (slab === undefined || solver.slabIsClean(given)) return NOTHING_TO_CHANGE;
  const share = slab.acquiredPartitions / slab.partitions;
  for (let added = 2; slab.partitions + added <= 2 * slab.partitions; added += 2) {
    const partitions = slab.partitions + added;
    const acquiredPartitions = nextAcquiredPartitions(
      partitions,
      partitions * share,
      given.scanner.partitionStep,
    );
    const planned = withSlab(given, slab, { partitions, acquiredPartitions });
    if (acquiredPartitions <= most(planned, { ...slab, partitions }) && solver.slabIsClean(planned)) {
      return changed(
        planned,
        `${added} more partitions, ${figure(added * slab.partitionThicknessMm)} mm more slab`,
      );
    }
  }
  return refused('slab-not-enough', 'Even twice the slab does not keep the keep-clear area free of wrap.');
};

/** Time-bandwidth products a sharper pulse is chosen from. */
const SHARPNESS_LADDER = [6, 8, 10, 12, 16] as const;

/** A sharper slab pulse at the same pulse bandwidth: it lasts longer, and TR and TE grow with it. */
export const sharperPulse: Change = (given, solver) => {
  const slab = slabOf(given);
  if (slab === undefined || !slab.selective || solver.slabIsClean(given)) return NOTHING_TO_CHANGE;
  const { timeBandwidthProduct: now, pulseDurationMs: duration } = slab;
  if (now === undefined || duration === undefined) {
    return refused(
      'pulse-unknown',
      'The slab pulse’s sharpness and duration are not entered for this sequence, so a sharper one cannot be weighed.',
    );
  }
  for (const sharpness of SHARPNESS_LADDER.filter((value) => value > now)) {
    const longer = (duration * sharpness) / now;
    const addedMs = longer - duration;
    const planned = withPrescription(
      withSlab(given, slab, { timeBandwidthProduct: sharpness, pulseDurationMs: longer }),
      {
        trMs: given.prescription.trMs + addedMs,
        teMs: given.prescription.teMs + addedMs / 2,
      },
    );
    if (solver.slabIsClean(planned)) {
      return changed(planned, `TR +${figure(addedMs)} ms and TE +${figure(addedMs / 2)} ms`);
    }
  }
  return refused('pulse-not-enough', 'No sharper slab pulse up to a time-bandwidth product of 16 is enough.');
};
