/**
 * Numbers in [0, 1) from a seed, the same on every machine: a 32-bit counter stirred by multiply and shift
 * (the mixing of [Steele, Lea, Flood 2014, "Fast splittable pseudorandom number generators"], from memory).
 */
export function seededNumbers(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let mixed = state;
    mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
    mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
    return ((mixed ^ (mixed >>> 16)) >>> 0) / 4294967296;
  };
}
