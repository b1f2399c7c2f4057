/**
 * Independent integration of the Bloch equations, sharing nothing with the engine: classical Runge–Kutta on the
 * magnetisation vector, dM/dt = M × Ω(t) with Ω = (ω1(t), 0, 2π·TBW·z/S), time in pulse durations, no relaxation.
 * Signs do not matter to |Mxy| and Mz.
 */
export function integrateBloch(
  timeBandwidthProduct: number,
  flipDeg: number,
  zOverSlab: number,
  steps: number,
): { readonly transverse: number; readonly longitudinal: number } {
  const shape = (t: number): number => {
    const x = Math.PI * timeBandwidthProduct * t;
    return (0.54 + 0.46 * Math.cos(2 * Math.PI * t)) * (Math.abs(x) < 1e-12 ? 1 : Math.sin(x) / x);
  };
  // Simpson's rule over the pulse for the flip on resonance.
  const n = 4000;
  let area = 0;
  for (let k = 0; k <= n; k += 1) area += shape(-0.5 + k / n) * (k === 0 || k === n ? 1 : k % 2 ? 4 : 2);
  area /= 3 * n;
  const scale = (flipDeg * Math.PI) / 180 / area;
  const oz = 2 * Math.PI * timeBandwidthProduct * zOverSlab;
  const rate = (t: number, [x, y, z]: readonly number[]): number[] => {
    const ox = scale * shape(t);
    return [y! * oz, z! * ox - x! * oz, -y! * ox];
  };
  const along = (m: readonly number[], k: readonly number[], h: number): number[] =>
    m.map((v, i) => v + h * k[i]!);
  const h = 1 / steps;
  let m: number[] = [0, 0, 1];
  for (let s = 0; s < steps; s += 1) {
    const t = -0.5 + s * h;
    const k1 = rate(t, m);
    const k2 = rate(t + h / 2, along(m, k1, h / 2));
    const k3 = rate(t + h / 2, along(m, k2, h / 2));
    const k4 = rate(t + h, along(m, k3, h));
    m = m.map((v, i) => v + (h / 6) * (k1[i]! + 2 * k2[i]! + 2 * k3[i]! + k4[i]!));
  }
  return { transverse: Math.hypot(m[0]!, m[1]!), longitudinal: m[2]! };
}

/** Small-tip profile: |∫ B1(t)·e^{−2πi·TBW·(z/S)·t} dt| relative to z = 0, by Simpson's rule. */
export function smallTip(timeBandwidthProduct: number, zOverSlab: number): number {
  const n = 8000;
  const integral = (z: number): number => {
    let sum = 0;
    for (let k = 0; k <= n; k += 1) {
      const t = -0.5 + k / n;
      const x = Math.PI * timeBandwidthProduct * t;
      const shape = (0.54 + 0.46 * Math.cos(2 * Math.PI * t)) * (Math.abs(x) < 1e-12 ? 1 : Math.sin(x) / x);
      // The pulse is even, so the sine part vanishes.
      sum +=
        shape *
        Math.cos(2 * Math.PI * timeBandwidthProduct * z * t) *
        (k === 0 || k === n ? 1 : k % 2 ? 4 : 2);
    }
    return sum;
  };
  return Math.abs(integral(zOverSlab) / integral(0));
}
