import type { Assessment } from '@/lib/physics/model/assessment';
import type { Prescription } from '@/lib/physics/model/prescription';
import { formatClock, formatClockRange, formatHold } from './duration';
import { formatQuantity, formatShort, roundQuantity } from './round';

/** A value now and, when something is tried, then. */
export interface NowTried {
  readonly now: string;
  readonly tried?: string;
}

export function pair(now: string, tried: string | undefined): NowTried {
  return tried === undefined ? { now } : { now, tried };
}

export function scanTimeFigure({ time }: Assessment, prescription: Prescription): string {
  if (!time) return 'none';
  if (prescription.breathing === 'breath-hold') {
    return time.breathHolds > 1 ? `${time.breathHolds} × ${formatHold(time.longestHoldS)}` : formatHold(time.longestHoldS);
  }
  return formatClock(time.scanS);
}

/** Triggered scans last as long as the patient's breathing makes them. */
export function scanRangeFigure({ time }: Assessment): string | undefined {
  if (!time?.scanRangeS) return undefined;
  const range = formatClockRange(time.scanRangeS);
  return range.includes('–') ? range : undefined;
}

/** SNR against another prescription's; alone it would have no unit. */
export function snrFigure(assessment: Pick<Assessment, 'detail'>, present: Pick<Assessment, 'detail'>): string {
  if (!assessment.detail || !present.detail) return '—';
  return formatQuantity(assessment.detail.snr / present.detail.snr, 'ratio');
}

export function voxelFigure({ detail }: Assessment): string {
  if (!detail) return '—';
  return detail.voxelMm.map((side) => formatShort(side, 0.01)).join('×');
}

/** Only the sides that change, "1.25 → 1.34": three figures twice are more than a card has room for. */
export function voxelChange(now: Assessment, after: Assessment): NowTried | null {
  if (!now.detail || !after.detail) return null;
  const sides = now.detail.voxelMm.map((side, i) => [formatShort(side, 0.01), formatShort(after.detail!.voxelMm[i] ?? side, 0.01)] as const);
  const changed = sides.filter(([a, b]) => a !== b);
  if (changed.length === 0) return null;
  const once = new Map(changed.map(([a, b]) => [`${a}/${b}`, [a, b] as const]));
  return { now: [...once.values()].map(([a]) => a).join('×'), tried: [...once.values()].map(([, b]) => b).join('×') };
}

/** Area under fold in the worst slice, or the number of contaminated partitions; "none" when there is none. */
export function foldFigure({ fold, slab }: Assessment): string {
  const parts: string[] = [];
  const cm2 = (fold?.displayedAreaMm2 ?? 0) / 100;
  if (cm2 > 0) {
    const whole = roundQuantity(cm2, 'areaCm2');
    parts.push(whole >= 10 ? `${whole} cm²` : cm2 < 0.1 ? '< 0.1 cm²' : `${formatShort(cm2, 0.1)} cm²`);
  }
  if (slab && slab.contaminated > 0) parts.push(`${slab.contaminated} part.`);
  if (parts.length === 0 && (fold?.inKeepClear || fold?.outsideKeepClear)) return 'margin only';
  return parts.join(' + ') || 'none';
}

export function shotsFigure({ time }: Assessment): string {
  return time ? String(time.shots) : '—';
}
