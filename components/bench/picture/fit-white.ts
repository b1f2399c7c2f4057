/** This share of the picture may stay white: a vessel or a corner does not darken the rest. */
const STAYS_WHITE = 0.02;

/**
 * The same brightness with white where the picture needs it: tissue that lies over tissue is up to twice as bright as
 * white, and what lands there could not be told from what it lands on.
 */
export function fitWhite(values: Float32Array): Float32Array {
  const lit = values.filter((value) => value > 0.1).sort();
  const white = Math.max(1, lit[Math.floor((lit.length - 1) * (1 - STAYS_WHITE))] ?? 1);
  return white === 1 ? values : values.map((value) => value / white);
}
