import { isExpired, type SizeReading } from '@/lib/domain/size-reading/size-reading';
import { QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';

/** An operation on the stomach changes sizes from the day it is done; sex and height stay. */
const UNCHANGED_BY_SURGERY: readonly SizeQuantity[] = ['sex', 'height-cm'];

export interface CurrentReadings {
  readonly current: readonly SizeReading[];
  /** The newest of a quantity that does not count any more and has no newer one, with why. */
  readonly lapsed: readonly { readonly quantity: SizeQuantity; readonly text: string }[];
}

/**
 * Readings that count on the day of the scan: not older than the policy's days by then, and not from before surgery
 * that changes the body's size. They are judged on that day and not on the day of the check, so the answer to a
 * booking does not change by waiting.
 */
export function currentReadings(
  readings: readonly SizeReading[],
  on: { readonly scanAt: Date; readonly expiryDays: number; readonly surgeryOn: string },
): CurrentReadings {
  const why = (reading: SizeReading): string | undefined => {
    const { label } = QUANTITY_FACTS[reading.quantity];
    if (on.surgeryOn && reading.takenOn < on.surgeryOn && !UNCHANGED_BY_SURGERY.includes(reading.quantity)) {
      return `${label} of ${reading.takenOn} is from before the surgery of ${on.surgeryOn}`;
    }
    if (isExpired(reading, on.scanAt, on.expiryDays)) {
      return `${label} of ${reading.takenOn} is older than ${on.expiryDays} days on the day of the scan`;
    }
    return undefined;
  };
  const current = readings.filter((reading) => why(reading) === undefined);
  const known = new Set(current.map(({ quantity }) => quantity));
  const newest = new Map<SizeQuantity, SizeReading>();
  for (const reading of readings) {
    const other = newest.get(reading.quantity);
    if (!known.has(reading.quantity) && (!other || reading.recordedAt > other.recordedAt)) newest.set(reading.quantity, reading);
  }
  return {
    current,
    lapsed: [...newest.values()].map((reading) => ({ quantity: reading.quantity, text: why(reading)! })),
  };
}
