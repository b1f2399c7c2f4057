/**
 * First half of a Hamming-windowed sinc as hard pulses: cos θ/2, sin θ/2 of each, in time order.
 * B1(t) ∝ (0.54 + 0.46·cos 2πt/T)·sinc(TBW·t/T), t from −T/2 to 0 at step middles, scaled so that the whole pulse
 * turns on-resonant spins by the flip angle.
 * @param timeBandwidthProduct TBW > 0; flipDeg [degree]; steps whole, steps of the half
 * @returns 2·steps numbers
 * Source: [pauly-1991].
 */
export function halfPulse(timeBandwidthProduct: number, flipDeg: number, steps: number): Float64Array {
  const shape = new Float64Array(steps);
  let sum = 0;
  for (let k = 0; k < steps; k += 1) {
    const t = -0.5 + (k + 0.5) / (2 * steps);
    const x = Math.PI * timeBandwidthProduct * t;
    shape[k] = (0.54 + 0.46 * Math.cos(2 * Math.PI * t)) * (Math.sin(x) / x);
    sum += shape[k]!;
  }
  const half = ((flipDeg * Math.PI) / 180 / (2 * sum)) * 0.5;
  const tips = new Float64Array(2 * steps);
  for (let k = 0; k < steps; k += 1) {
    tips[2 * k] = Math.cos(half * shape[k]!);
    tips[2 * k + 1] = Math.sin(half * shape[k]!);
  }
  return tips;
}
