/** One measured figure. Ratios are made within one run, so that the machine's own speed falls out. */
export interface MeasureRow {
  readonly what: string;
  readonly value: number;
  readonly unit: string;
  /** What the value is compared with, in words. */
  readonly against?: string;
  /** What we aim at, in words; never a reason to fail. */
  readonly aim?: string;
}

/** What every module in this folder exports. It gets a folder to work in and returns its rows. */
export type Measure = (context: { readonly workFolder: string }) => Promise<readonly MeasureRow[]>;

/** Quantile of a sample by linear interpolation between order statistics. */
export function quantile(sample: readonly number[], share: number): number {
  const sorted = [...sample].sort((a, b) => a - b);
  const at = (sorted.length - 1) * share;
  const low = sorted[Math.floor(at)] ?? Number.NaN;
  const high = sorted[Math.ceil(at)] ?? Number.NaN;
  return low + (high - low) * (at - Math.floor(at));
}

/** Milliseconds of `runs` calls after `warmUp` unmeasured ones. */
export function time(work: () => unknown, runs: number, warmUp: number): number[] {
  for (let run = 0; run < warmUp; run++) work();
  return Array.from({ length: runs }, () => {
    const begun = performance.now();
    work();
    return performance.now() - begun;
  });
}
