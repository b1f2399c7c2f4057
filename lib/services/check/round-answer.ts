/**
 * Decimals of a number by what its name says it is. Transcendental functions differ in the last bits between
 * machines; rounded far below what anyone reads, the answer is the same text everywhere.
 */
const DECIMALS: readonly (readonly [RegExp, number])[] = [
  [/Mm2$/, 1],
  [/Mm$|MmPer|Per100HzMm$/, 3],
  [/Share$|share/, 5],
  [/Ms$/, 3],
  [/S$|RangeS$/, 3],
  [/^(signal|alias)$/, 4],
];
const OTHER_DECIMALS = 6;
/** SNR is in arbitrary units over many magnitudes, so it keeps digits and not decimals. */
const SNR_DIGITS = 6;

function roundNumber(value: number, key: string): number | null {
  if (!Number.isFinite(value)) return null;
  if (Number.isInteger(value)) return value === 0 ? 0 : value;
  if (/^snr/.test(key)) return Number(value.toPrecision(SNR_DIGITS));
  const decimals = DECIMALS.find(([pattern]) => pattern.test(key))?.[1] ?? OTHER_DECIMALS;
  const rounded = Number(value.toFixed(decimals));
  return rounded === 0 ? 0 : rounded;
}

/** A copy in which every number is rounded by the name of its field; lists take the name of the field they are in. */
export function roundAnswer(value: unknown, key = ''): unknown {
  if (typeof value === 'number') return roundNumber(value, key);
  if (Array.isArray(value)) return value.map((each) => roundAnswer(each, key));
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .filter(([, each]) => each !== undefined)
      .map(([name, each]) => [name, roundAnswer(each, name)]),
  );
}
