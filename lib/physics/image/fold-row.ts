/** How one row is seen along phase. */
export interface RowSampling {
  /** FOV centre c, displayed F, acquired W along phase [mm]; pixels displayed across F. */
  readonly centreMm: number;
  readonly fovMm: number;
  readonly widthMm: number;
  readonly pixels: number;
  /** Copies of tissue beyond the acquired width: R where unfolding knows nothing beyond it, else 1. */
  readonly ghostFactor: number;
}

/** Adds `signal` to every pixel in proportion to how much of it [fromMm, toMm] covers; what lies outside F is cropped. */
function cover(
  row: Float64Array,
  { centreMm, fovMm, pixels }: RowSampling,
  fromMm: number,
  toMm: number,
  signal: number,
): void {
  const scale = pixels / fovMm;
  const low = Math.max(0, (fromMm - centreMm + fovMm / 2) * scale);
  const high = Math.min(pixels, (toMm - centreMm + fovMm / 2) * scale);
  if (!(high > low)) return;
  const first = Math.floor(low);
  const last = Math.min(pixels - 1, Math.floor(high));
  if (first === last) {
    row[first]! += signal * (high - low);
    return;
  }
  row[first]! += signal * (first + 1 - low);
  for (let pixel = first + 1; pixel < last; pixel++) row[pixel]! += signal;
  row[last]! += signal * (high - last);
}

/**
 * Puts a stretch of tissue where it is seen: cut at the edges of the acquired width, every piece shifted by whole widths
 * into it, what falls outside the displayed FOV cropped. With an unfolding grid that ends at W, pieces from beyond W are
 * seen R times, W/R apart, at their own brightness.
 * @param row displayed pixels along phase, added to
 * @param signal brightness of a fully covered pixel
 * Source: fold(p) = c + ((p − c + W/2) mod W) − W/2, [bernstein-2004]; ghosts [griswold-2004].
 */
export function foldOntoRow(
  row: Float64Array,
  sampling: RowSampling,
  fromMm: number,
  toMm: number,
  signal: number,
): void {
  const { centreMm, widthMm, ghostFactor } = sampling;
  const start = centreMm - widthMm / 2;
  const first = Math.floor((fromMm - start) / widthMm);
  const last = Math.floor((toMm - start) / widthMm);
  for (let n = first; n <= last; n++) {
    const from = Math.max(fromMm, start + n * widthMm) - n * widthMm;
    const to = Math.min(toMm, start + (n + 1) * widthMm) - n * widthMm;
    if (!(to > from)) continue;
    cover(row, sampling, from, to, signal);
    if (n === 0) continue;
    for (let k = 1; k < ghostFactor - 1e-9; k++) {
      const moved = (k * widthMm) / ghostFactor;
      // A copy that runs over the end of the acquired width comes in again at its start.
      for (const turn of [0, -widthMm]) {
        const low = Math.max(start, from + moved + turn);
        const high = Math.min(start + widthMm, to + moved + turn);
        if (high > low) cover(row, sampling, low, high, signal);
      }
    }
  }
}
