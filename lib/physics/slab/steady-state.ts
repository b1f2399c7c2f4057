/**
 * Transverse magnetisation of a spoiled gradient echo in steady state:
 * M = |Mxy|·(1 − E1)/(1 − E1·Mz), E1 = exp(−TR/T1), Mxy and Mz from one pulse on relaxed spins.
 * @param transverse |Mxy|, 0–1; saturation 1 − Mz, 0–2; trOverT1 > 0
 * @returns 0–1
 * Valid: perfect spoiling, no relaxation during the pulse. Source: [bernstein-2004], from memory.
 */
export function spoiledSignal(transverse: number, saturation: number, trOverT1: number): number {
  const recovered = -Math.expm1(-trOverT1);
  // 1 − E1·Mz = (1 − E1) + E1·(1 − Mz), without subtracting numbers near 1.
  return (transverse * recovered) / (recovered + (1 - recovered) * saturation);
}

/**
 * Flip angle of greatest spoiled signal: cos θ = exp(−TR/T1).
 * @returns [degree]
 * Source: [ernst-1966], from memory.
 */
export function ernstAngleDeg(trOverT1: number): number {
  return (Math.acos(Math.exp(-trOverT1)) * 180) / Math.PI;
}
