import { toMicrometres } from '../geometry/micrometres';
import type { RowBand } from '../section/row-band';
import { ghostWidths, mirrorMargin, mirrorPhase } from '../acceleration/ghost-widths';
import type { UnfoldingRule } from '../acceleration/unfolding-rule';
import { displacements, type Interval } from './displacement';
import type { DisplayedSections, TargetSection } from './displayed-sections';
import type { FoldProblem } from './fold-problem';
import { appendForbidden, appendInterval, EVERY_WIDTH, mergeWidths, type WidthSet } from './forbidden-widths';
import { NO_MARGIN } from './section-margin';
import { overSliceMargin, sectionAt, type TissueSolid } from './tissue-sections';

/**
 * Aliases that move tissue by (i/factor + share)·W along phase, i whole: they reach the target when that lies in `moves`.
 */
export interface Lattice {
  readonly moves: Interval;
  readonly solid: number;
  /** −κ of fat displaced in EPI (tissue that was displaced to larger coordinates moves less towards smaller ones); else 0. */
  readonly share: number;
  /** j: the tissue lies j·W_z along the slab from where it lands; 0 in its own section. */
  readonly sliceOrder: number;
  readonly factor: number;
}

/** Ghosts at one multiple of W/R of tissue beyond the acquired width: they reach the target for W within `widths`. */
export interface Ghost {
  readonly widths: Interval;
  readonly solid: number;
  /** M = m/R > 0, and the end of phase the tissue lies at. */
  readonly multiple: number;
  readonly end: 'low' | 'high';
  /** m along the slab, in units of W_z/R_z. */
  readonly sliceMultiple: number;
  /** κ of fat displaced in EPI, positive towards the end the tissue lies at; else 0. */
  readonly share: number;
}

/** Everything that can reach a target at one slice sampling. */
export interface AliasFamily {
  readonly lattices: readonly Lattice[];
  readonly ghosts: readonly Ghost[];
  /** Merged forbidden widths, µm. */
  readonly widths: WidthSet;
  /** The acquired slab ends inside excited tissue although slices are unfolded on a grid that ends there. */
  readonly slabTooThin: boolean;
}

export interface FamilyQuestion {
  readonly problem: FoldProblem;
  readonly sections: DisplayedSections;
  readonly rule: UnfoldingRule;
  readonly target: 'clear' | 'window';
  readonly withMargin: boolean;
  /** Acquired slab W_z, mm; absent for a stack. */
  readonly slabMm?: number;
}

/** A section where tissue may come from: j·(repeat) away from where it lands. */
interface Source {
  readonly sMm: number;
  readonly target: TargetSection;
  readonly index: number;
}

export function aliasFamily(question: FamilyQuestion): AliasFamily {
  const { problem, sections, rule, withMargin, slabMm } = question;
  const targets = question.target === 'clear' ? sections.clear : sections.windows;
  const margin = withMargin ? sections.margin : NO_MARGIN;
  const fov = problem.prescription.fovPhaseMm;
  const ghosting = rule.kind === 'grid-ends';
  const shares = sharesSeen(problem);
  const lattices: Lattice[] = [];
  const ghosts: Ghost[] = [];

  const reach = (
    tissue: TissueSolid,
    source: Source,
    evaluate: (bands: readonly RowBand[]) => Interval | undefined,
    covered?: readonly Interval[],
  ) => overSliceMargin(tissue, source.sMm, margin.slice, evaluate, covered);
  const bandsOf = (target: TargetSection) => (withMargin ? target.grown : target.bands);

  const addLattice = (solid: number, sources: readonly Source[], factor: number) => {
    const tissue = sections.tissue[solid]!;
    const merged: Interval[] = [];
    const visit = (look: typeof reach) =>
      forDistinct(tissue, sources, bandsOf, (source) => {
        const clear = bandsOf(source.target);
        const moves = look(tissue, source, (bands) => displacements(bands, clear, margin.phase), merged);
        if (moves) mergeInto(merged, moves);
      });
    // In a tilted stack the sections themselves already cover most of what moving across the slice can bring.
    if (tissue.coupled && margin.slice[0] + margin.slice[1] > 0) {
      visit((one, source, evaluate) => overSliceMargin(one, source.sMm, NO_MARGIN.slice, evaluate));
    }
    visit(reach);
    for (const moves of merged)
      for (const share of shares)
        lattices.push({ moves, solid, share: 0 - share, sliceOrder: sources[0]!.index, factor });
  };

  const addGhosts = (solid: number, sources: readonly Source[]) => {
    const tissue = sections.tissue[solid]!;
    const centre = sections.frame.centrePhaseMm;
    forDistinct(tissue, sources, bandsOf, (source) => {
      const clear = bandsOf(source.target);
      const mirrored = mirrorPhase(clear);
      const phase = margin.phase;
      const sides = [
        [
          'high',
          (bands: readonly RowBand[], m: number, share: number) =>
            ghostWidths(bands, clear, phase, centre, m, share),
        ],
        [
          'low',
          (bands: readonly RowBand[], m: number, share: number) =>
            ghostWidths(mirrorPhase(bands), mirrored, mirrorMargin(phase), -centre, m, share),
        ],
      ] as const;
      const moves = reach(tissue, source, (bands) => displacements(bands, clear, phase));
      if (!moves) return;
      for (const [end, widthsFor] of sides) {
        const farthest = end === 'high' ? moves[1] : -moves[0];
        for (const towardsHigh of shares) {
          const share = end === 'high' ? towardsHigh : 0 - towardsHigh;
          const offset = share * rule.factorPhase;
          for (let m = 1; m <= offset || (farthest * rule.factorPhase) / (m - offset) > fov; m++) {
            const multiple = m / rule.factorPhase;
            const widths = reach(tissue, source, (bands) => widthsFor(bands, multiple, share));
            if (widths) ghosts.push({ widths, solid, multiple, end, share, sliceMultiple: source.index });
          }
        }
      }
    });
  };

  const own = targets.map((target): Source => ({ sMm: target.sMm, target, index: 0 }));
  sections.tissue.forEach((_, solid) => {
    if (own.length === 0) return;
    if (ghosting) addGhosts(solid, own);
    else addLattice(solid, own, 1);
  });

  let slabTooThin = false;
  if (slabMm !== undefined && targets.length > 0) {
    const unfoldSlices = ghosting && rule.factorSlice > 1;
    slabTooThin = unfoldSlices && excitedBeyond(question, slabMm / 2);
    const repeat = unfoldSlices ? slabMm / rule.factorSlice : slabMm;
    sections.tissue.forEach((tissue, solid) => {
      for (const sources of alongSlab(
        question,
        tissue,
        targets,
        repeat,
        unfoldSlices ? slabMm / 2 : Infinity,
      )) {
        if (unfoldSlices) addGhosts(solid, sources);
        else addLattice(solid, sources, ghosting ? rule.factorPhase : 1);
      }
    });
  }
  return { lattices, ghosts, slabTooThin, widths: forbidden(lattices, ghosts, slabTooThin, fov) };
}

const UNDISPLACED: readonly number[] = [0];

/** κ of everything that is seen: water in its place, and fat where EPI displaces it. */
export const sharesSeen = ({ fatShares = [] }: FoldProblem): readonly number[] =>
  fatShares.length === 0 ? UNDISPLACED : [...UNDISPLACED, ...fatShares];

/** Visits every source; of those where an unvarying solid meets the same target outline, only the first. */
function forDistinct(
  tissue: TissueSolid,
  sources: readonly Source[],
  bandsOf: (target: TargetSection) => unknown,
  visit: (source: Source) => void,
): void {
  let seen: unknown;
  for (const source of sources) {
    const alike = !tissue.varies && source.sMm > tissue.lowMm && source.sMm < tissue.highMm;
    if (alike && bandsOf(source.target) === seen) continue;
    visit(source);
    if (alike) seen = bandsOf(source.target);
  }
}

/** Adds an interval to a list of disjoint ones, joining what it overlaps. */
function mergeInto(merged: Interval[], next: Interval): void {
  let low = next[0];
  let high = next[1];
  for (let i = merged.length - 1; i >= 0; i--) {
    const one = merged[i]!;
    if (low < one[1] && high > one[0]) {
      low = Math.min(low, one[0]);
      high = Math.max(high, one[1]);
      merged.splice(i, 1);
    }
  }
  merged.push([low, high]);
}

/** Sources at j·repeat along the slice axis, j ≠ 0, where excited tissue of this solid is bright enough; one list a j. */
function alongSlab(
  { problem, sections, withMargin }: FamilyQuestion,
  tissue: TissueSolid,
  targets: readonly TargetSection[],
  repeatMm: number,
  withinMm: number,
): Source[][] {
  const weight = slabWeightOf(problem);
  const [low, high] = sliceExtent(tissue, problem);
  const slice = withMargin ? sections.margin.slice : NO_MARGIN.slice;
  const lists: Source[][] = [];
  const first = targets[0]!.sMm;
  const last = targets[targets.length - 1]!.sMm;
  const from = Math.ceil((low - slice[0] - last) / repeatMm);
  const to = Math.floor((high + slice[1] - first) / repeatMm);
  for (let j = from; j <= to; j++) {
    if (j === 0) continue;
    const list: Source[] = [];
    for (const target of targets) {
      const offset = target.offsetMm + j * repeatMm;
      if (Math.abs(offset) > withinMm) continue;
      if (tissue.weight * weight(offset) > problem.slabTolerance)
        list.push({ sMm: target.sMm + j * repeatMm, target, index: j });
    }
    if (list.length) lists.push(list);
  }
  return lists;
}

export interface ElsewhereSource {
  readonly solid: number;
  readonly sMm: number;
  /** True: a plain alias along the slab, seen at every order in phase. False: only what lies beyond W leaves ghosts. */
  readonly everyOrder: boolean;
}

/** For each displayed section, the solids that lie elsewhere along the slab and may be seen in it (without margin). */
export function alongSlabSources(
  problem: FoldProblem,
  sections: DisplayedSections,
  rule: UnfoldingRule,
  slabMm: number,
): Map<TargetSection, ElsewhereSource[]> {
  const found = new Map<TargetSection, ElsewhereSource[]>();
  const question: FamilyQuestion = { problem, sections, rule, target: 'window', withMargin: false, slabMm };
  const unfoldSlices = rule.kind === 'grid-ends' && rule.factorSlice > 1;
  const look = (repeatMm: number, withinMm: number, everyOrder: boolean) =>
    sections.tissue.forEach((tissue, solid) => {
      for (const sources of alongSlab(question, tissue, sections.windows, repeatMm, withinMm)) {
        for (const { target, sMm } of sources) {
          const list = found.get(target);
          if (list) list.push({ solid, sMm, everyOrder });
          else found.set(target, [{ solid, sMm, everyOrder }]);
        }
      }
    });
  look(slabMm, Infinity, true);
  if (unfoldSlices) look(slabMm / rule.factorSlice, slabMm / 2, false);
  return found;
}

/** The profile asked for, else an ideal slab (or none when the excitation is not selective). */
export function slabWeightOf(problem: FoldProblem): (offsetMm: number) => number {
  const { slices } = problem.prescription;
  if (problem.slabWeight) return problem.slabWeight;
  if (slices.mode === 'stack' || !slices.selective) return () => 1;
  const half = (slices.partitions * slices.partitionThicknessMm) / 2;
  return (offset) => (Math.abs(offset) < half ? 1 : 0);
}

/** Slice coordinates between which a solid can exist at all, mm. */
export function sliceExtent(tissue: TissueSolid, problem: FoldProblem): Interval {
  // No solid reaches farther from the origin than this: parts end at the tissue reach, and bores are under a metre.
  const bound = Math.abs(problem.isocentreZMm) + problem.tissueReachMm + 1000;
  let low = Math.max(-bound, tissue.lowMm);
  let high = Math.min(bound, tissue.highMm);
  const q = tissue.solid.quadric;
  if (q && q.zz > 0 && !tissue.coupled) {
    low = Math.max(low, q.centre[2] - 1 / Math.sqrt(q.zz));
    high = Math.min(high, q.centre[2] + 1 / Math.sqrt(q.zz));
  }
  return [low, high];
}

/** Whether excited tissue lies beyond ±halfMm of the slab centre, looked at every quarter of a partition. */
function excitedBeyond({ problem, sections, withMargin }: FamilyQuestion, halfMm: number): boolean {
  const { slices } = problem.prescription;
  if (slices.mode !== 'slab') return false;
  const weight = slabWeightOf(problem);
  const slice = withMargin ? sections.margin.slice : NO_MARGIN.slice;
  const step = slices.partitionThicknessMm / 4;
  return sections.tissue.some((tissue) => {
    const extent = sliceExtent(tissue, problem);
    const low = extent[0] - slice[0] - sections.frame.sliceMm;
    const high = extent[1] + slice[1] - sections.frame.sliceMm;
    const bright = (offset: number) =>
      offset > low && offset < high && tissue.weight * weight(offset) > problem.slabTolerance;
    for (let offset = halfMm + step / 2; offset < Math.max(high, -low); offset += step) {
      if (bright(offset) || bright(-offset)) return present(tissue, sections.frame.sliceMm, offset, slice);
    }
    return false;
  });
}

function present(
  tissue: TissueSolid,
  centreMm: number,
  offsetMm: number,
  slice: readonly [number, number],
): boolean {
  if (!tissue.coupled) return true;
  return [offsetMm, -offsetMm].some((offset) =>
    [-slice[1], 0, slice[0]].some((moved) => sectionAt(tissue, centreMm + offset + moved).length > 0),
  );
}

function forbidden(
  lattices: readonly Lattice[],
  ghosts: readonly Ghost[],
  slabTooThin: boolean,
  fov: number,
): WidthSet {
  if (slabTooThin) return EVERY_WIDTH;
  const pairs: number[] = [];
  for (const { moves, factor, share, sliceOrder } of lattices) {
    // Along the slab, tissue that needs no move in phase reaches the target at every width.
    if (sliceOrder !== 0 && toMicrometres(moves[0]) < 0 && toMicrometres(moves[1]) > 0) return EVERY_WIDTH;
    appendForbidden(moves, factor, share, fov, pairs);
  }
  for (const { widths } of ghosts) if (widths[1] > fov) appendInterval(widths[0], widths[1], pairs);
  return mergeWidths(pairs);
}
