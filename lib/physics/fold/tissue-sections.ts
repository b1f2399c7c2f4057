import { partSolids } from '../body/part-solids';
import type { SectionFrame } from '../geometry/section-frame';
import { cutSolid, sliceDependence, solidInSection, withoutSliceEnds, type ConvexSolid } from '../section/convex-solid';
import type { RowBand } from '../section/row-band';
import type { Interval } from './displacement';
import type { FoldProblem } from './fold-problem';
import type { AxisMargin } from './section-margin';

/** A convex piece of the body in section axes, with what the solver needs to know about its slices. */
export interface TissueSolid {
  readonly part: number;
  readonly weight: number;
  readonly solid: ConvexSolid;
  readonly varies: boolean;
  readonly coupled: boolean;
  readonly lowMm: number;
  readonly highMm: number;
  readonly widestMm: number;
  /** Its one section when it does not vary. */
  readonly bands: readonly RowBand[];
}

export function tissueSolids(problem: FoldProblem, frame: SectionFrame): TissueSolid[] {
  const pieces = partSolids(
    problem.parts,
    problem,
    {
      bands: problem.prescription.presaturation,
      b1Scale: problem.presaturationB1Scale,
      t1Ms: problem.presaturatedT1Ms,
    },
    problem.tissueTolerance,
  );
  return pieces.map(({ part, weight, solid }) => {
    const turned = solidInSection(solid, frame);
    const dependence = sliceDependence(turned);
    const open = withoutSliceEnds(turned);
    return { part, weight, solid: open, ...dependence, bands: dependence.varies ? [] : cutSolid(open, 0) };
  });
}

/** Section of one solid at one slice coordinate. */
export function sectionAt(tissue: TissueSolid, sMm: number): readonly RowBand[] {
  if (!(sMm > tissue.lowMm && sMm < tissue.highMm)) return [];
  return tissue.varies ? cutSolid(tissue.solid, sMm) : tissue.bands;
}

/**
 * Extent of `evaluate` over the sections that tissue may bring to slice coordinate s when it moves by the slice margin:
 * those at s' from s − margin[1] to s + margin[0].
 * - Sections that do not vary, or are nested: the widest one in range is the union. Exact.
 * - Tilted: `evaluate` is a convex problem in s' too, so its ends are found by a bracketed golden-section search to
 *   1e-7 of the range (a nanometre).
 */
export function overSliceMargin(
  tissue: TissueSolid,
  sMm: number,
  margin: AxisMargin,
  evaluate: (bands: readonly RowBand[]) => Interval | undefined,
): Interval | undefined {
  if (margin[0] === 0 && margin[1] === 0) {
    const bands = sectionAt(tissue, sMm);
    return bands.length ? evaluate(bands) : undefined;
  }
  const from = Math.max(sMm - margin[1], tissue.lowMm);
  const to = Math.min(sMm + margin[0], tissue.highMm);
  if (!(to > from)) return undefined;
  if (!tissue.varies) return tissue.bands.length ? evaluate(tissue.bands) : undefined;
  const at = (s: number): Interval | undefined => {
    const bands = cutSolid(tissue.solid, s);
    return bands.length ? evaluate(bands) : undefined;
  };
  if (!tissue.coupled) return at(Math.min(Math.max(tissue.widestMm, from), to));
  const low = largest((s) => negated(at(s)?.[0]), from, to);
  const high = largest((s) => at(s)?.[1] ?? -Infinity, from, to);
  return low === -Infinity ? undefined : [-low, high];
}

const negated = (value: number | undefined): number => (value === undefined ? -Infinity : -value);

const SAMPLES = 16;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Largest value of a concave function (−∞ outside its domain, an interval) on [from, to]. */
function largest(f: (s: number) => number, from: number, to: number): number {
  const step = (to - from) / SAMPLES;
  let best = 0;
  let bestValue = -Infinity;
  for (let i = 0; i <= SAMPLES; i++) {
    const value = f(from + i * step);
    if (value > bestValue) {
      best = i;
      bestValue = value;
    }
  }
  if (bestValue === -Infinity) return bestValue;
  let a = from + Math.max(0, best - 1) * step;
  let b = from + Math.min(SAMPLES, best + 1) * step;
  while (b - a > 1e-7 * (to - from)) {
    const c = b - GOLDEN * (b - a);
    const d = a + GOLDEN * (b - a);
    const fc = f(c);
    const fd = f(d);
    bestValue = Math.max(bestValue, fc, fd);
    // Where both are outside the domain, the best sample between them tells which way it lies.
    if (fc === fd && fc === -Infinity) {
      if (from + best * step > (a + b) / 2) a = c;
      else b = d;
    } else if (fc > fd) b = d;
    else a = c;
  }
  return bestValue;
}
