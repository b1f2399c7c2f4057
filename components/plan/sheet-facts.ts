import type { PlannedSequence, PlanView } from '@/lib/schemas/plan';
import type { Assessment } from '@/lib/physics/model/assessment';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import { formatClock, formatClockRange, formatHold } from '@/lib/presentation/duration';
import { AXIS_WORDS, PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import { phaseOversamplingSetting, sliceOversamplingSetting, type ScannerSetting } from '@/lib/presentation/oversampling-form';
import { formatShort } from '@/lib/presentation/round';

export interface SheetSequence {
  readonly id: string;
  readonly name: string;
  readonly geometry: string;
  readonly phase: ScannerSetting;
  readonly slice?: ScannerSetting;
  readonly averages: string;
  readonly time: string;
  readonly verdict: Assessment['verdict'];
  readonly adopted: readonly string[];
}

/** One row of the sheet: what is set at the scanner, in its own form, and what comes of it. */
export function sheetSequence(sequence: PlannedSequence, result: Assessment, plan: PlanView): SheetSequence {
  const p = sequence.prescription;
  const { readoutAxis } = sectionFrame(p);
  const slice = sliceOversamplingSetting(p, plan.scanner);
  return {
    id: sequence.id,
    name: p.name,
    geometry:
      `${PLANE_WORDS[p.plane]}, phase ${AXIS_WORDS[p.phaseAxis]} ${formatShort(p.fovPhaseMm, 0.1)} × ` +
      `${AXIS_WORDS[readoutAxis]} ${formatShort(p.fovReadoutMm, 0.1)} mm, ${p.linesAcrossFov}\u00a0×\u00a0${p.readoutMatrix}`,
    phase: phaseOversamplingSetting(p, plan.scanner),
    ...(slice ? { slice } : {}),
    averages: formatShort(p.averages, 0.1),
    time: timeOf(result, p.breathing),
    verdict: result.verdict,
    adopted: sequence.adopted.map(({ sentence }) => sentence),
  };
}

function timeOf({ time }: Assessment, breathing: PlannedSequence['prescription']['breathing']): string {
  if (!time) return 'none';
  if (breathing === 'breath-hold') {
    return time.breathHolds > 1 ? `${time.breathHolds} holds of ${formatHold(time.longestHoldS)}` : `hold ${formatHold(time.longestHoldS)}`;
  }
  return time.scanRangeS ? formatClockRange(time.scanRangeS) : formatClock(time.scanS);
}
