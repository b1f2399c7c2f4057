import { AXIS_LETTERS, capitalised, figure } from '../assess/words';
import type { Prescription } from '../model/prescription';
import type { PaybackKind, RemedyKind } from '../model/remedy';
import type { TargetedCase } from './change';

const percent = (part: number, whole: number): string => `${figure((part / whole - 1) * 100)} %`;

const phase = (p: Prescription): string => AXIS_LETTERS[p.phaseAxis];

function slabPhrase(kind: RemedyKind, before: Prescription, after: Prescription): string {
  if (before.slices.mode !== 'slab' || after.slices.mode !== 'slab') return kind;
  const a = before.slices;
  const b = after.slices;
  switch (kind) {
    case 'slice-oversampling':
      return `set slice oversampling to ${percent(b.acquiredPartitions, b.partitions)} (${b.acquiredPartitions} partitions)`;
    case 'drop-end-partitions':
      return `give up ${b.droppedPartitionsPerEnd} end partitions at each end`;
    case 'enlarge-slab':
      return `take ${b.partitions} partitions instead of ${a.partitions}`;
    default:
      return `use a slab pulse with time-bandwidth product ${figure(b.timeBandwidthProduct ?? 0)} instead of ${figure(a.timeBandwidthProduct ?? 0)}`;
  }
}

function changePhrase(kind: RemedyKind, given: TargetedCase, planned: TargetedCase): string {
  const before = given.prescription;
  const after = planned.prescription;
  switch (kind) {
    case 'phase-oversampling':
      return after.acquiredLines === after.linesAcrossFov
        ? 'take phase oversampling off'
        : `set phase oversampling to ${percent(after.acquiredLines, after.linesAcrossFov)} (${after.acquiredLines} lines)`;
    case 'swap':
      return `swap phase to ${phase(after)}`;
    case 'larger-fov-same-matrix':
      return `open the ${phase(after)} FOV to ${figure(after.fovPhaseMm)} mm at the same matrix`;
    case 'larger-fov-same-voxel':
      return `open the ${phase(after)} FOV to ${figure(after.fovPhaseMm)} mm with ${after.linesAcrossFov} lines, same voxel`;
    case 'recentre': {
      const axis = before.centreMm.findIndex(
        (value, index) => Math.abs(value - after.centreMm[index]!) > 1e-6,
      );
      const move = after.centreMm[axis]! - before.centreMm[axis]!;
      const side = [
        ['right', 'left'],
        ['anterior', 'posterior'],
        ['inferior', 'superior'],
      ][axis]![move > 0 ? 1 : 0]!;
      return `move the FOV centre ${figure(Math.hypot(...after.centreMm.map((value, index) => value - before.centreMm[index]!)))} mm ${side}`;
    }
    case 'arms-up':
      return 'raise the arms (confirm with the patient)';
    case 'presaturation': {
      const band = after.presaturation.at(-1);
      return `put a ${figure(band?.thicknessMm ?? 0)} mm presaturation band over the ${band?.side ?? ''} side`;
    }
    case 'regroup-breath-holds':
      return `share the slices out over more breath-holds with TR ${figure(after.trMs)} ms`;
    case 'coil-elements':
      return `use only coil elements ${after.coilElements?.join(', ') ?? ''}`;
    default:
      return slabPhrase(kind, before, after);
  }
}

function paybackPhrase(payback: PaybackKind, before: Prescription, after: Prescription): string {
  switch (payback) {
    case 'fewer-averages':
      return `give up ${before.averages - after.averages} of ${before.averages} averages`;
    case 'more-acceleration':
      return `go from acceleration ${figure(before.acceleration.factorPhase)} to ${figure(after.acceleration.factorPhase)}`;
    case 'partial-fourier':
      return `use ${Math.round(after.partialFourierPhase * 8)}/8 partial Fourier`;
  }
}

/** The remedy in one sentence, as one radiographer would tell another. */
export function remedySentence(
  changes: readonly RemedyKind[],
  payback: PaybackKind | undefined,
  given: TargetedCase,
  planned: TargetedCase,
): string {
  const doing = changes.map((kind) => changePhrase(kind, given, planned));
  const paying =
    payback === undefined ? '' : paybackPhrase(payback, given.prescription, planned.prescription);
  if (doing.length === 0) return `${capitalised(paying)}.`;
  const done = capitalised(doing.join(' and '));
  return paying === '' ? `${done}.` : `${done}, and ${paying} to pay the time back.`;
}
