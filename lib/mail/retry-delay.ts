/** Tries before a mail is given up: with the delays below that is a little over a day. */
export const MAX_ATTEMPTS = 12;

const FIRST_SECONDS = 5;
const LONGEST_SECONDS = 4 * 3600;

/** Seconds until the next try after `failures` failed ones: 5 s, 20 s, 80 s … up to four hours; null to give up. */
export function retryDelaySeconds(failures: number): number | null {
  if (failures >= MAX_ATTEMPTS) return null;
  return Math.min(FIRST_SECONDS * 4 ** (failures - 1), LONGEST_SECONDS);
}
