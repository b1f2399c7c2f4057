export interface Axis {
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
}

/** Percent; changes smaller than this would otherwise fill the chart. */
const NARROWEST = 4;

/** A range that holds every value and 0, in round steps, with about four ticks. */
export function axisOf(values: readonly number[]): Axis {
  const least = Math.min(0, ...values);
  const most = Math.max(0, ...values);
  const step = roundStep(Math.max(NARROWEST, most - least) / 4);
  const low = Math.floor(least / step - 0.25) * step;
  const high = Math.ceil(most / step + 0.25) * step;
  const ticks = Array.from({ length: Math.round((high - low) / step) + 1 }, (_, i) => low + i * step);
  return { low, high, ticks };
}

/** 1, 2 or 5 times a power of ten, at least as large. */
function roundStep(atLeast: number): number {
  const power = 10 ** Math.floor(Math.log10(atLeast));
  return [1, 2, 5, 10].map((times) => times * power).find((step) => step >= atLeast - 1e-9) ?? 10 * power;
}
