/**
 * Presented values are rounded to a stated quantum, once, here: two screens that show the same quantity can
 * then never disagree in the last digit, and browser and server print the same figure (their transcendental
 * functions may differ in the last bits).
 */
export const QUANTA = {
  lengthMm: 1,
  fineLengthMm: 0.1,
  voxelMm: 0.01,
  scanS: 1,
  holdS: 0.1,
  trMs: 1,
  percent: 1,
  finePercent: 0.01,
  ratio: 0.01,
  areaCm2: 1,
  fineAreaCm2: 0.1,
  costPoint: 0.1,
} as const;

export type Quantity = keyof typeof QUANTA;

/** Half rounds away from zero, so that +0.5 % and −0.5 % read alike. Absorbs binary noise below 1e-9 of a quantum. */
export function roundToQuantum(value: number, quantum: number): number {
  const steps = Math.abs(value) / quantum;
  const whole = Math.floor(steps + 0.5 + 1e-9);
  const decimals = decimalsOf(quantum);
  const rounded = Number((whole * quantum).toFixed(decimals));
  return value < 0 && rounded !== 0 ? -rounded : rounded;
}

export function roundQuantity(value: number, quantity: Quantity): number {
  return roundToQuantum(value, QUANTA[quantity]);
}

/** Fixed number of decimals, so that figures stay aligned in a column; a true minus sign. */
export function formatQuantity(value: number, quantity: Quantity): string {
  return withMinus(roundQuantity(value, quantity).toFixed(decimalsOf(QUANTA[quantity])));
}

/** As few decimals as the quantum allows: 300, 312.5. */
export function formatShort(value: number, quantum: number): string {
  return withMinus(String(roundToQuantum(value, quantum)));
}

export function withMinus(text: string): string {
  return text.replace(/^-/, '−');
}

function decimalsOf(quantum: number): number {
  const text = String(quantum);
  const point = text.indexOf('.');
  return point < 0 ? 0 : text.length - point - 1;
}
