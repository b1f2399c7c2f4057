import type { Reading } from '@/lib/domain/case/model';

/** From this share of a limit on, only a measured value counts. */
export const NEAR_LIMIT = 0.9;

export const isMeasured = ({ source }: Pick<Reading, 'source'>): boolean => source === 'measured' || source === 'localiser';

/** Where a value stands against an upper limit. */
export type Standing = 'within' | 'near-unmeasured' | 'over';

export function standingOf(reading: Reading, limit: number): Standing {
  if (reading.value > limit) return 'over';
  return reading.value >= NEAR_LIMIT * limit && !isMeasured(reading) ? 'near-unmeasured' : 'within';
}
