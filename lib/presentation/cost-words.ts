import type { CostTerm } from '@/lib/physics/model/remedy';
import { withMinus } from './round';

/** Tenths of a cost point as people read them: 69 → "6.9". */
export function formatCost(tenths: number): string {
  return withMinus((tenths / 10).toFixed(1));
}

const TERM_WORDS: Readonly<Record<CostTerm['kind'], string>> = {
  time: 'time',
  snr: 'SNR',
  voxel: 'voxel',
  'breath-hold': 'breath-hold',
  'side-effects': 'side effects',
  effort: 'effort',
  'leftover-fold': 'leftover fold',
};

/** "time 6.7 + effort 0.2": the terms that cost something, the dearest first. */
export function costBreakdown(terms: readonly CostTerm[]): string {
  const paid = terms.filter(({ tenths }) => tenths > 0).sort((a, b) => b.tenths - a.tenths);
  if (paid.length === 0) return 'costs nothing';
  return paid.map(({ kind, tenths }) => `${TERM_WORDS[kind]} ${formatCost(tenths)}`).join(' + ');
}
