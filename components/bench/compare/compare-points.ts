import type { Assessment } from '@/lib/physics/model/assessment';
import type { Remedy } from '@/lib/physics/model/remedy';

/** A remedy as price and gain: scan time and SNR against the present plan. */
export interface ComparePoint {
  readonly key: string;
  /** Change of scan time, percent. */
  readonly timePct: number;
  /** Change of SNR, percent. */
  readonly snrPct: number;
  /** No other one is at least as quick with at least as much SNR. */
  readonly onFront: boolean;
  readonly leavesFold: boolean;
}

const percentOf = (now: number, then: number): number => (then / now - 1) * 100;

/** Fold that reaches the keep-clear area is left. */
export function leavesFoldInside({ assessment }: Pick<Remedy, 'assessment'>): boolean {
  return assessment.verdict === 'fold-in-keep-clear';
}

/**
 * What is listed before "show all": not those another one beats, and none that leaves fold in the keep-clear area while
 * some remedy leaves none. The tried one always stays.
 */
export function listedFirst(remedies: readonly Remedy[], triedKey: string | null): readonly Remedy[] {
  // Among those that would be listed: what another one beats must not empty the list.
  const someLeaveNone = remedies.some((remedy) => !remedy.dominated && !leavesFoldInside(remedy));
  return remedies.filter(
    (remedy) => remedy.key === triedKey || (!remedy.dominated && !(someLeaveNone && leavesFoldInside(remedy))),
  );
}

/** Remedies that have a time and an SNR, with the front of time against SNR among those that leave least fold. */
export function comparePoints(remedies: readonly Remedy[], now: Assessment): readonly ComparePoint[] {
  const { time, detail } = now;
  if (!time || !detail) return [];
  const points = remedies.flatMap((remedy): Omit<ComparePoint, 'onFront'>[] => {
    const { time: after, detail: seen } = remedy.assessment;
    if (!after || !seen) return [];
    return [
      {
        key: remedy.key,
        timePct: percentOf(time.scanS, after.scanS),
        snrPct: percentOf(detail.snr, seen.snr),
        leavesFold: leavesFoldInside(remedy),
      },
    ];
  });
  const someLeaveNone = points.some(({ leavesFold }) => !leavesFold);
  const runs = points.filter(({ leavesFold }) => !(someLeaveNone && leavesFold));
  return points.map((point) => ({ ...point, onFront: runs.includes(point) && !runs.some((other) => beats(other, point)) }));
}

/** Percent are compared as they are shown, to the tenth. */
function beats(a: Omit<ComparePoint, 'onFront'>, b: Omit<ComparePoint, 'onFront'>): boolean {
  const tenth = (value: number) => Math.round(value * 10);
  const [time, snr] = [tenth(a.timePct) - tenth(b.timePct), tenth(a.snrPct) - tenth(b.snrPct)];
  return time <= 0 && snr >= 0 && (time < 0 || snr > 0);
}

/** The front as a line: ascending in time. Points that coincide count once. */
export function frontOf(points: readonly ComparePoint[]): readonly ComparePoint[] {
  return points.filter(({ onFront }) => onFront).sort((a, b) => a.timePct - b.timePct || b.snrPct - a.snrPct);
}
