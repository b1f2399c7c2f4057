import type { BodyRegion, SitePolicy } from '@/lib/domain/case/model';
import { composePatient } from '@/lib/domain/size-reading/compose-patient';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import { isExpired, type SizeReading } from '@/lib/domain/size-reading/size-reading';
import type { SizeRecordView } from '@/lib/schemas/size-reading';

export interface SizeRecordQuestion {
  readonly readings: readonly SizeReading[];
  readonly region: BodyRegion;
  readonly tissueReachMm: number;
  readonly policy: SitePolicy;
  readonly now: Date;
}

/** Readings as people see them, and the patient the engine takes from them. */
export function toSizeRecord(question: SizeRecordQuestion): SizeRecordView {
  const { readings, policy, now } = question;
  return {
    readings: readings.map((reading) => ({
      id: reading.id,
      quantity: reading.quantity,
      value: reading.value,
      unit: QUANTITY_FACTS[reading.quantity].unit,
      source: reading.source,
      spread: reading.spread,
      takenOn: reading.takenOn,
      ...(reading.tapeSite ? { tapeSite: reading.tapeSite } : {}),
      recordedAt: reading.recordedAt.toISOString(),
      expired: isExpired(reading, now, policy.readingExpiryDays),
    })),
    ...composePatient(question),
  };
}
