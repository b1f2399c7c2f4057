import { unfoldingRule } from '../acceleration/unfolding-rule';
import { maxOn, minOn } from '../section/curve';
import type { RowBand } from '../section/row-band';
import type { FoldResult, WidthRequirement } from '../model/assessment';
import { DomainError } from '../model/domain-error';
import {
  acquiredSlabMm,
  acquiredWidthMm,
  nextAcquiredLines,
  nextAcquiredPartitions,
  smallestAcquiredLines,
} from './acquired-lines';
import { aliasFamily, type AliasFamily } from './alias-family';
import { displayedSections, type DisplayedSections } from './displayed-sections';
import type { Interval } from './displacement';
import type { FoldProblem } from './fold-problem';
import { forbiddenFrom, forbiddenUntilMm } from './forbidden-widths';
import { leftoverFold } from './leftover';
import type { SolvedFold } from './solved-fold';
import { NO_MARGIN } from './section-margin';
import { overSliceMargin } from './tissue-sections';

/**
 * Solves one geometry class: which acquired widths let nothing fold into the keep-clear area.
 *
 * Method: in every displayed section each convex piece of tissue and the (convex) keep-clear area give one open interval
 * of phase displacements at which they meet; W is forbidden when n·W lies inside for a whole n ≠ 0. The union over
 * pieces, sections and orders, merged, leaves the clean widths. Closed forms throughout, no search over widths or rows.
 * Along a slab the same is asked of tissue j·W_z away, for every j that the slab's profile leaves bright enough.
 * Units mm. Valid for Cartesian sampling. Source: derived from the fold law ([bernstein-2004], [graves-2013]).
 * @throws DomainError for impossible FOV, lines, bodies, margins
 */
export function solveFold(problem: FoldProblem): SolvedFold {
  const { prescription } = problem;
  requirePositive('fovPhaseMm', prescription.fovPhaseMm);
  requirePositive('fovReadoutMm', prescription.fovReadoutMm);
  const sections = displayedSections(problem);
  const rule = unfoldingRule(prescription);
  const { linesAcrossFov, fovPhaseMm, slices } = prescription;
  const slab = slices.mode === 'slab' ? slices : undefined;

  const families = new Map<string, AliasFamily>();
  const family = (
    target: 'clear' | 'window',
    withMargin: boolean,
    partitions: number | undefined,
  ): AliasFamily => {
    const key = `${target}${withMargin ? '+' : ''}${partitions ?? ''}`;
    let found = families.get(key);
    if (!found) {
      const slabMm = slab && acquiredSlabMm(partitions!, slab.partitionThicknessMm);
      found = aliasFamily({ problem, sections, rule, target, withMargin, slabMm });
      families.set(key, found);
    }
    return found;
  };
  const partitionsOf = (acquired: number | undefined) => (slab ? (acquired ?? slab.partitions) : undefined);
  const widthOf = (lines: number) => acquiredWidthMm(lines, linesAcrossFov, fovPhaseMm);
  const isWidthClean = (widthMm: number, acquired?: number) =>
    forbiddenUntilMm(family('clear', true, partitionsOf(acquired)).widths, widthMm) === undefined;
  const isClean = (lines: number, acquired?: number) => isWidthClean(widthOf(lines), acquired);

  const requirements = new Map<number | undefined, WidthRequirement>();
  const leftovers = new Map<string, FoldResult>();

  return {
    problem,
    frame: sections.frame,
    keepClearIsDisplayed: sections.clear.length > 0,
    isClean,
    isWidthClean,
    requirement(acquired) {
      const partitions = partitionsOf(acquired);
      let found = requirements.get(partitions);
      if (!found) {
        found = widthRequirement(problem, sections, family('clear', true, partitions));
        requirements.set(partitions, found);
      }
      return found;
    },
    smallestCleanPartitions(lines) {
      if (!slab) return undefined;
      let partitions = slab.partitions;
      while (partitions <= problem.acquiredPartitionsMax) {
        if (isClean(lines, partitions)) return partitions;
        partitions = nextAcquiredPartitions(slab.partitions, partitions + 1, problem.partitionStep);
      }
      return undefined;
    },
    leftover(lines, acquired) {
      const partitions = partitionsOf(acquired);
      const key = `${lines}/${partitions ?? ''}`;
      let found = leftovers.get(key);
      if (!found) {
        found = leftoverFold({
          problem,
          sections,
          rule,
          widthMm: widthOf(lines),
          slabMm: slab && acquiredSlabMm(partitions!, slab.partitionThicknessMm),
          clear: family('clear', true, partitions),
          window: family('window', true, partitions),
          clearTight: () => family('clear', false, partitions),
        });
        leftovers.set(key, found);
      }
      return found;
    },
  };
}

function requirePositive(argument: string, value: number): void {
  if (!(value > 0) || !Number.isFinite(value))
    throw new DomainError('length-not-positive', argument, value, '> 0 mm');
}

function widthRequirement(
  problem: FoldProblem,
  sections: DisplayedSections,
  family: AliasFamily,
): WidthRequirement {
  const { fovPhaseMm, linesAcrossFov } = problem.prescription;
  const { lineStep, acquiredLinesMax } = problem;
  const forbiddenMm = forbiddenFrom(family.widths, fovPhaseMm);
  const alwaysCleanMm = forbiddenMm.length ? forbiddenMm[forbiddenMm.length - 1]![1] : fovPhaseMm;
  let firstCleanMm = fovPhaseMm;
  // A width that two intervals merely touch is clean, so each step ends at a clean width.
  firstCleanMm = forbiddenUntilMm(family.widths, firstCleanMm) ?? firstCleanMm;

  const onGrid = (minWidthMm: number) =>
    Number.isFinite(minWidthMm)
      ? smallestAcquiredLines({ linesAcrossFov, fovMm: fovPhaseMm, minWidthMm, step: lineStep })
      : undefined;
  let firstCleanLines = nextAcquiredLines(linesAcrossFov, linesAcrossFov, lineStep);
  while (firstCleanLines !== undefined && firstCleanLines <= acquiredLinesMax) {
    const until = forbiddenUntilMm(
      family.widths,
      acquiredWidthMm(firstCleanLines, linesAcrossFov, fovPhaseMm),
    );
    if (until === undefined) break;
    firstCleanLines = onGrid(until);
  }
  const alwaysCleanLines = onGrid(alwaysCleanMm);
  const coverBodyMm = coverBody(problem, sections);
  const reachable = (lines: number | undefined) =>
    lines !== undefined && lines <= acquiredLinesMax ? lines : undefined;
  return {
    forbiddenMm,
    firstCleanMm,
    alwaysCleanMm,
    firstCleanLines: reachable(firstCleanLines),
    alwaysCleanLines: reachable(alwaysCleanLines),
    coverBodyMm,
    coverBodyLines: onGrid(coverBodyMm) ?? Math.ceil((coverBodyMm * linesAcrossFov) / fovPhaseMm - 1e-9),
  };
}

/**
 * Width that covers all tissue with its margin, in the displayed sections and rows: 2·max|p − c|, because the
 * acquired width is centred on the FOV centre; at least F.
 */
function coverBody(
  { prescription }: FoldProblem,
  { tissue, windows, margin, frame }: DisplayedSections,
): number {
  const rows = windows[0]?.grown[0];
  let low = frame.centrePhaseMm;
  let high = frame.centrePhaseMm;
  if (rows) {
    const extentOf = (bands: readonly RowBand[]): Interval | undefined => {
      let from = Infinity;
      let to = -Infinity;
      for (const band of bands) {
        const r0 = Math.max(band.r0, rows.r0);
        const r1 = Math.min(band.r1, rows.r1);
        if (!(r1 > r0)) continue;
        from = Math.min(from, minOn(band.lower, r0, r1) - margin.phase[0]);
        to = Math.max(to, maxOn(band.upper, r0, r1) + margin.phase[1]);
      }
      return to > from ? [from, to] : undefined;
    };
    // First the sections themselves, then what moving across the slice adds.
    for (const slice of [NO_MARGIN.slice, margin.slice]) {
      for (const solid of tissue) {
        const sites = solid.varies ? windows : [windows[0]!, windows[windows.length - 1]!];
        for (const { sMm } of sites) {
          const extent = overSliceMargin(solid, sMm, slice, extentOf, [[low, high]]);
          if (!extent) continue;
          low = Math.min(low, extent[0]);
          high = Math.max(high, extent[1]);
        }
      }
    }
  }
  const reach = Math.max(high - frame.centrePhaseMm, frame.centrePhaseMm - low);
  return Math.max(prescription.fovPhaseMm, 2 * reach);
}
