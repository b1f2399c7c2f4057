import { formatQuantity, roundToQuantum } from './round';

/** Scan time as a clock: 128 s → "2:08"; hours are not a unit a scan is read in, so minutes run on. */
export function formatClock(seconds: number): string {
  const whole = roundToQuantum(Math.max(0, seconds), 1);
  const minutes = Math.floor(whole / 60);
  return `${minutes}:${String(whole - minutes * 60).padStart(2, '0')}`;
}

/** A breath-hold is judged in tenths of a second: "18.4 s". */
export function formatHold(seconds: number): string {
  return `${formatQuantity(seconds, 'holdS')} s`;
}

/** A range of scan time, one figure when both ends read alike: "2:00–2:24". */
export function formatClockRange([low, high]: readonly [number, number]): string {
  const from = formatClock(low);
  const to = formatClock(high);
  return from === to ? from : `${from}–${to}`;
}

/** Change of scan time in words: "+0:08", "−1:10", "no change". */
export function formatClockChange(seconds: number): string {
  const whole = roundToQuantum(seconds, 1);
  if (whole === 0) return 'no change';
  return `${whole < 0 ? '−' : '+'}${formatClock(Math.abs(whole))}`;
}

/** TR and TE are said in ms below one second and in s above. */
export function formatEchoTime(milliseconds: number): string {
  return milliseconds >= 1000
    ? `${String(roundToQuantum(milliseconds / 1000, 0.01))} s`
    : `${String(roundToQuantum(milliseconds, 0.01))} ms`;
}
