import type { BodyRegion, Reading } from '@/lib/domain/case/model';
import type { NewestReadings } from '@/lib/domain/size-reading/newest-readings';

interface DerivedSpan {
  readonly low: Reading;
  readonly high: Reading;
  readonly at: number;
  readonly route: string;
}

export interface DerivedSizes {
  readonly across?: DerivedSpan;
  readonly depth?: DerivedSpan;
  readonly remarks: readonly string[];
}

export function deriveSizes(_newest: NewestReadings, _region: BodyRegion): DerivedSizes {
  return { remarks: [] };
}
