import { partSolids } from '../body/part-solids';
import type { SectionFrame } from '../geometry/section-frame';
import {
  cutSolid,
  sliceDependence,
  solidInSection,
  withoutSliceEnds,
  type ConvexSolid,
} from '../section/convex-solid';
import type { RowBand } from '../section/row-band';
import { sliceRange } from '../section/slice-range';
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
    // Thin pieces of an outline must not slip between the samples of a slice margin: their own range is sampled.
    const [low, high] = dependence.coupled ? sliceRange(turned) : [-Infinity, Infinity];
    return {
      part,
      weight,
      solid: open,
      ...dependence,
      lowMm: Math.max(dependence.lowMm, low),
      highMm: Math.min(dependence.highMm, high),
      bands: dependence.varies ? [] : cutSolid(open, 0),
    };
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
 * - Tilted: the extent's ends are a convex and a concave function of s', so they are bracketed by five samples and then
 *   found by golden-section search to 1e-5 of the range (a third of a micrometre for 30 mm).
 * @param covered  extents already known to belong to the same union: the search is left out where nothing beyond them
 *                 can be found
 */
export function overSliceMargin(
  tissue: TissueSolid,
  sMm: number,
  margin: AxisMargin,
  evaluate: (bands: readonly RowBand[]) => Interval | undefined,
  covered: readonly Interval[] = [],
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
  const step = (to - from) / (SAMPLES - 1);
  const samples = Array.from({ length: SAMPLES }, (_, i) => at(from + i * step));
  const highs = samples.map((sample) => sample?.[1] ?? -Infinity);
  const lows = samples.map((sample) => (sample ? -sample[0] : -Infinity));
  const coarse: Interval = [-Math.max(...lows), Math.max(...highs)];
  const known = covered.find((one) => coarse[0] < one[1] && coarse[1] > one[0]);
  if (known && concaveBound(highs) <= known[1] && concaveBound(lows) <= -known[0]) return coarse;
  const high = largest((s) => at(s)?.[1] ?? -Infinity, highs, from, step);
  const low = largest((s) => -(at(s)?.[0] ?? Infinity), lows, from, step);
  return high === -Infinity ? undefined : [-low, high];
}

const SAMPLES = 5;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * What a concave function with these equally spaced values (−∞ outside its domain) can reach between them: chords of
 * neighbours prolonged into each gap.
 */
function concaveBound(values: readonly number[]): number {
  const finite = (value: number | undefined): value is number => value !== undefined && value !== -Infinity;
  let bound = -Infinity;
  for (let i = 0; i + 1 < values.length; i++) {
    const here = values[i];
    const next = values[i + 1];
    if (!finite(here) && !finite(next)) continue;
    const before = values[i - 1];
    const after = values[i + 2];
    const fromLeft = finite(here) && finite(before) ? here + Math.max(0, here - before) : Infinity;
    const fromRight = finite(next) && finite(after) ? next + Math.max(0, next - after) : Infinity;
    bound = Math.max(bound, Math.min(fromLeft, fromRight));
  }
  return bound;
}

/** Largest value of a concave function (−∞ outside its domain, an interval) around the best of its samples. */
function largest(f: (s: number) => number, samples: readonly number[], from: number, step: number): number {
  let best = 0;
  for (let i = 1; i < samples.length; i++) if (samples[i]! > samples[best]!) best = i;
  let found = samples[best]!;
  if (found === -Infinity) return found;
  const middle = from + best * step;
  let a = from + Math.max(0, best - 1) * step;
  let b = from + Math.min(samples.length - 1, best + 1) * step;
  let c = b - GOLDEN * (b - a);
  let d = a + GOLDEN * (b - a);
  let fc = f(c);
  let fd = f(d);
  const enough = 1e-5 * step * (samples.length - 1);
  while (b - a > enough) {
    found = Math.max(found, fc, fd);
    // Outside the domain on both sides: it lies where the best sample is.
    const keepLeft = fc === -Infinity && fd === -Infinity ? middle < (a + b) / 2 : fc > fd;
    if (keepLeft) {
      b = d;
      d = c;
      fd = fc;
      c = b - GOLDEN * (b - a);
      fc = f(c);
    } else {
      a = c;
      c = d;
      fc = fd;
      d = a + GOLDEN * (b - a);
      fd = f(d);
    }
  }
  return found;
}
