/** A 32-bit mix of a pixel's number and a seed; whole numbers only, so every machine draws the same noise. */
function mix(index: number, seed: number): number {
  let state = Math.imul(index + 1, 0x9e3779b1) ^ Math.imul(seed + 1, 0x85ebca77);
  state = Math.imul(state ^ (state >>> 15), 0x2c1b3c6d);
  state = Math.imul(state ^ (state >>> 12), 0x297a2d39);
  return (state ^ (state >>> 15)) >>> 0;
}

/** Sum of four bytes, centred and scaled to mean 0 and variance 1: close to normal, without transcendental functions. */
function nearNormal(bits: number): number {
  const sum = (bits & 255) + ((bits >>> 8) & 255) + ((bits >>> 16) & 255) + (bits >>> 24);
  // Variance of one byte is (256² − 1)/12; four of them.
  return (sum - 510) / Math.sqrt((4 * (256 * 256 - 1)) / 12);
}

/**
 * Magnitude of signal with complex noise: |s + σ(a + ib)|.
 * @param index the pixel's number; seed which draw; sigma σ in the signal's own unit
 */
export function noisyMagnitude(signal: number, sigma: number, index: number, seed: number): number {
  if (sigma === 0) return signal;
  const real = signal + sigma * nearNormal(mix(2 * index, seed));
  const imaginary = sigma * nearNormal(mix(2 * index + 1, seed));
  return Math.sqrt(real * real + imaginary * imaginary);
}
