import type { Prescription } from '@/lib/physics/model/prescription';
import type { PaybackKind, Remedy, RemedyKind } from '@/lib/physics/model/remedy';
import { AXIS_WORDS } from './anatomy-words';
import { formatPercent } from './percent';
import { formatShort } from './round';

const CHANGE_TITLES: Readonly<Record<RemedyKind, string>> = {
  'phase-oversampling': 'Phase oversampling',
  'slice-oversampling': 'Slice oversampling',
  swap: 'Swap phase direction',
  'larger-fov-same-matrix': 'Larger FOV, same matrix',
  'larger-fov-same-voxel': 'Larger FOV, same voxel',
  recentre: 'Recentre',
  'arms-up': 'Arms up',
  presaturation: 'Presaturation band',
  'drop-end-partitions': 'Drop end partitions',
  'enlarge-slab': 'Enlarge the slab',
  'sharper-pulse': 'Sharper slab pulse',
  'coil-elements': 'Choose coil elements',
  'regroup-breath-holds': 'Regroup breath-holds',
};

const PAYBACK_TITLES: Readonly<Record<PaybackKind, string>> = {
  'fewer-averages': 'fewer averages',
  'more-acceleration': 'more acceleration',
  'partial-fourier': 'partial Fourier',
};

/** "Phase oversampling + swap phase direction, fewer averages". */
export function remedyTitle(remedy: Pick<Remedy, 'changes' | 'payback'>): string {
  const changes = remedy.changes.map((kind, i) => {
    const title = CHANGE_TITLES[kind];
    return i === 0 ? title : title.charAt(0).toLowerCase() + title.slice(1);
  });
  const words = changes.join(' + ');
  return remedy.payback ? `${words}, ${PAYBACK_TITLES[remedy.payback]}` : words;
}

/** What is changed at the scanner, before → after, in the figures of the prescription: "0 → 5 % · 252 lines". */
export function remedyChange(now: Prescription, remedy: Remedy): string {
  const next = remedy.prescription;
  const parts: string[] = [];
  const swapped = next.phaseAxis !== now.phaseAxis;
  if (swapped) parts.push(`${AXIS_WORDS[now.phaseAxis]} → ${AXIS_WORDS[next.phaseAxis]}`);
  else if (next.fovPhaseMm !== now.fovPhaseMm) {
    parts.push(`${AXIS_WORDS[now.phaseAxis]} ${formatShort(now.fovPhaseMm, 0.1)} → ${formatShort(next.fovPhaseMm, 0.1)} mm`);
  }
  const share = (p: Prescription): number => (p.acquiredLines / p.linesAcrossFov - 1) * 100;
  const [before, after] = [formatShort(share(now), 0.1), formatShort(share(next), 0.1)];
  if (before !== after) parts.push(`${before} → ${after} %`);
  if (next.acquiredLines !== now.acquiredLines) parts.push(`${next.acquiredLines} lines`);
  if (now.slices.mode === 'slab' && next.slices.mode === 'slab') {
    if (next.slices.acquiredPartitions !== now.slices.acquiredPartitions || next.slices.partitions !== now.slices.partitions) {
      parts.push(`${now.slices.acquiredPartitions} → ${next.slices.acquiredPartitions} partitions`);
    }
    const dropped = next.slices.droppedPartitionsPerEnd - now.slices.droppedPartitionsPerEnd;
    if (dropped > 0) parts.push(`${dropped} given up each end`);
    if (next.slices.timeBandwidthProduct !== now.slices.timeBandwidthProduct) {
      parts.push(`TBW ${now.slices.timeBandwidthProduct ?? 'unknown'} → ${next.slices.timeBandwidthProduct ?? 'unknown'}`);
    }
  }
  if (next.centreMm.some((value, i) => value !== now.centreMm[i])) {
    const moved = Math.hypot(...next.centreMm.map((value, i) => value - (now.centreMm[i] ?? 0)));
    parts.push(`centre moved ${formatShort(moved, 1)} mm`);
  }
  if (next.averages !== now.averages) parts.push(`${now.averages} → ${next.averages} averages`);
  const factor = (p: Prescription): number => p.acceleration.factorPhase * p.acceleration.factorSlice;
  if (factor(next) !== factor(now)) parts.push(`R ${factor(now)} → ${factor(next)}`);
  if (next.partialFourierPhase !== now.partialFourierPhase) {
    parts.push(`PF ${formatPercent(now.partialFourierPhase * 100, 1)} → ${formatPercent(next.partialFourierPhase * 100, 1)}`);
  }
  if (next.presaturation.length !== now.presaturation.length) {
    const band = next.presaturation.at(-1);
    if (band) parts.push(`${band.side} band, ${formatShort(band.thicknessMm, 1)} mm`);
  }
  if (next.coil !== now.coil) parts.push(next.coil);
  if (parts.length === 0 && remedy.changes.includes('arms-up')) parts.push('arms down → up');
  return parts.join(' · ');
}
