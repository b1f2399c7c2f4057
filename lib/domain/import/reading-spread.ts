import { ELSEWHERE_SPREAD_CM } from '@/lib/domain/size-reading/tape-site';
import type { ImportedQuantity, ImportedReading, ImportedSource } from './import-row';

/** One standard deviation of a size nobody gave a spread for, in the unit of the quantity: our judgement, no source. */
const SPREADS: Readonly<Record<ImportedSource, Readonly<Record<ImportedQuantity, number>>>> = {
  measured: {
    'weight-kg': 1, 'height-cm': 1, 'girth-cm': 2, 'hip-girth-cm': 2, 'breadth-mm': 5, 'depth-mm': 6, sex: 0,
    'arms-position': 0, 'breath-hold-s': 2,
  },
  reported: {
    'weight-kg': 4, 'height-cm': 2, 'girth-cm': 4, 'hip-girth-cm': 4, 'breadth-mm': 20, 'depth-mm': 20, sex: 0,
    'arms-position': 0, 'breath-hold-s': 4,
  },
};

export function spreadOf({ quantity, source, tapeSite }: Pick<ImportedReading, 'quantity' | 'source' | 'tapeSite'>): number {
  const spread = SPREADS[source][quantity];
  const elsewhere = quantity === 'girth-cm' && tapeSite !== undefined && tapeSite !== 'iliac-crest';
  return elsewhere ? Math.round(Math.hypot(spread, ELSEWHERE_SPREAD_CM) * 10) / 10 : spread;
}
