/** Quanta of presented values by the unit a field's name ends in. First match counts. */
const QUANTA: readonly (readonly [RegExp, number])[] = [
  [/Mm2$/, 0.1],
  [/Mm$/, 0.001],
  [/Ms$/, 0.001],
  [/S$/, 0.001],
  [/Share|Oversampling|^alias$|^signal$|probability/i, 1e-6],
];
/** Fields without a unit of their own. */
const DEFAULT_QUANTUM = 1e-6;
/** SNR is in arbitrary units: it is rounded to this many significant figures. */
const SNR_FIGURES = 6;

function roundNumber(value: number, field: string): number {
  if (!Number.isFinite(value) || Number.isInteger(value)) return value + 0;
  if (field.startsWith('snr')) return Number(value.toPrecision(SNR_FIGURES));
  const quantum = QUANTA.find(([pattern]) => pattern.test(field))?.[1] ?? DEFAULT_QUANTUM;
  // Dividing by the inverse keeps 0.001-steps exact to the last digit printed.
  const inverse = Math.round(1 / quantum);
  return Math.round(value * inverse) / inverse + 0;
}

function roundValue(value: unknown, field: string): unknown {
  if (typeof value === 'number') return roundNumber(value, field);
  if (Array.isArray(value)) return value.map((entry) => roundValue(entry, field));
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(Object.entries(value).map(([name, entry]) => [name, roundValue(entry, name)]));
}

/**
 * An assessment, a ranking or any part of one with every number rounded to the quantum it is presented in: lengths
 * 1 µm, areas 0.1 mm², times 1 ms, shares 1e-6, SNR six figures. Browser and server agree on the rounded result, because
 * transcendental functions differ only in the last bits of a double.
 * @returns a new object of the same shape; nothing is changed in place
 */
export const roundAssessment = <T>(result: T): T => roundValue(result, '') as T;
