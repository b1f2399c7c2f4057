import type { Reading } from '../model/patient';

/** The older of two readings dates what is worked out from both; undefined when either is undated. */
export function olderDate(a: Reading, b: Reading): string | undefined {
  if (a.takenOn === undefined || b.takenOn === undefined) return undefined;
  return a.takenOn < b.takenOn ? a.takenOn : b.takenOn;
}
