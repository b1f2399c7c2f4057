import type { UnfoldingRule } from '../acceleration/unfolding-rule';
import { roundToMicrometre, toMicrometres } from '../geometry/micrometres';
import { AXIS_SIDES } from '../geometry/vector';
import type { FoldResult } from '../model/assessment';
import { alongSlabSources, sharesSeen, type AliasFamily } from './alias-family';
import type { DisplayedSections } from './displayed-sections';
import type { FoldProblem } from './fold-problem';
import { forbiddenUntilMm } from './forbidden-widths';
import { landedArea, polygonAreaMm2, type LandingSolid } from './landed-area';
import { sectionAt } from './tissue-sections';

export interface LeftoverQuestion {
  readonly problem: FoldProblem;
  readonly sections: DisplayedSections;
  readonly rule: UnfoldingRule;
  readonly widthMm: number;
  readonly slabMm: number | undefined;
  /** Reaching keep-clear with margin, without it, and the window with margin. */
  readonly clear: AliasFamily;
  readonly window: AliasFamily;
  readonly clearTight: () => AliasFamily;
}

interface Deepest {
  readonly depthMm: number;
  readonly solid: number;
  /** Along phase, positive towards smaller coordinates. */
  readonly move: number;
  readonly order: number;
  readonly sliceOrder: number;
  /** Fat displaced in EPI, by so much of the acquired width; 0 where nothing is displaced. */
  readonly share: number;
}

/** The alias that reaches deepest into the target at this width. */
function deepest(family: AliasFamily, widthMm: number): Deepest | undefined {
  let best: Deepest | undefined;
  const offer = (candidate: Deepest) => {
    if (!best || toMicrometres(candidate.depthMm) > toMicrometres(best.depthMm)) best = candidate;
  };
  for (const { moves, solid, share, sliceOrder, factor } of family.lattices) {
    const [low, high] = moves;
    const step = widthMm / factor;
    const offset = share * factor;
    const from = Math.ceil(low / step - offset);
    const to = Math.floor(high / step - offset);
    for (let i = from; i <= to; i++) {
      if (i === 0 && sliceOrder === 0) continue;
      const d = (i + offset) * step;
      if (toMicrometres(d) <= toMicrometres(low) || toMicrometres(d) >= toMicrometres(high)) continue;
      const depthMm = i > 0 ? high - d : i < 0 ? d - low : Math.min(high, -low);
      offer({ depthMm, solid, move: d, order: i === 0 ? 0 : -i / factor, sliceOrder, share: Math.abs(share) });
    }
  }
  const width = toMicrometres(widthMm);
  for (const { widths, solid, multiple, end, share, sliceMultiple } of family.ghosts) {
    if (width <= toMicrometres(widths[0]) || width >= toMicrometres(widths[1])) continue;
    const sign = end === 'high' ? 1 : -1;
    offer({
      depthMm: Math.abs(multiple - share) * (widths[1] - widthMm),
      solid,
      move: sign * (multiple - share) * widthMm,
      order: -sign * multiple,
      sliceOrder: sliceMultiple,
      share: Math.abs(share),
    });
  }
  return best;
}

/**
 * What is left in the picture at one width: verdict parts with margin, areas without (of the tissue as measured).
 * `from.order` is n of fold(p) = p + n·W, a fraction m/R for a ghost.
 */
export function leftoverFold(question: LeftoverQuestion): FoldResult {
  const { problem, sections, widthMm, slabMm, clear, window } = question;
  const inKeepClear = forbiddenUntilMm(clear.widths, widthMm) !== undefined;
  const inWindow = inKeepClear || forbiddenUntilMm(window.widths, widthMm) !== undefined;
  if (!inWindow) return NOTHING_LEFT;

  const intruder = inKeepClear ? deepest(clear, widthMm) : undefined;
  const tight = inKeepClear ? question.clearTight() : undefined;
  const tightDepth = tight ? (deepest(tight, widthMm)?.depthMm ?? 0) : 0;
  const areas = worstAreas(question);
  const windowArea = problem.prescription.fovPhaseMm * problem.prescription.fovReadoutMm;
  const from = intruder && {
    part: problem.parts[sections.tissue[intruder.solid]!.part]!.name,
    side: sideOf(intruder, sections),
    order: intruder.order,
    distanceMm: roundToMicrometre(
      intruder.order === 0 ? Math.abs(intruder.sliceOrder) * (slabMm ?? 0) : Math.abs(intruder.move),
    ),
    ...(intruder.share > 0 && { fatDisplacedMm: roundToMicrometre(intruder.share * widthMm) }),
  };
  return {
    inKeepClear,
    outsideKeepClear: !inKeepClear || areas.displayedMm2 - areas.keepClearMm2 > AREA_QUANTUM_MM2,
    depthWithMarginMm: intruder ? roundToMicrometre(intruder.depthMm) : 0,
    depthMm: roundToMicrometre(tightDepth),
    displayedAreaMm2: areas.displayedMm2,
    keepClearAreaMm2: areas.keepClearMm2,
    displayedShare: areas.displayedMm2 / windowArea,
    keepClearShare: areas.keepClearShare,
    ...(from && { from }),
    placeUncertain: areas.placeUncertain,
    ghosts: inKeepClear && (clear.slabTooThin || deepestIsGhost(clear, widthMm)),
  };
}

/** Below this an area is rounding of the row sum, not fold [mm²]. */
const AREA_QUANTUM_MM2 = 0.01;

const NOTHING_LEFT: FoldResult = {
  inKeepClear: false,
  outsideKeepClear: false,
  depthWithMarginMm: 0,
  depthMm: 0,
  displayedAreaMm2: 0,
  keepClearAreaMm2: 0,
  displayedShare: 0,
  keepClearShare: 0,
  placeUncertain: false,
  ghosts: false,
};

function deepestIsGhost(family: AliasFamily, widthMm: number): boolean {
  const width = toMicrometres(widthMm);
  return family.ghosts.some(
    ({ widths }) => width > toMicrometres(widths[0]) && width < toMicrometres(widths[1]),
  );
}

function sideOf(intruder: Deepest, sections: DisplayedSections) {
  const { frame } = sections;
  if (intruder.order !== 0) return AXIS_SIDES[frame.phaseAxis][intruder.order < 0 ? 1 : 0];
  return AXIS_SIDES[frame.sliceAxis][intruder.sliceOrder > 0 ? 1 : 0];
}

interface WorstAreas {
  readonly displayedMm2: number;
  readonly keepClearMm2: number;
  readonly keepClearShare: number;
  readonly placeUncertain: boolean;
}

/** Largest areas over the displayed sections; sections with the same content are looked at once. */
function worstAreas({ problem, sections, rule, widthMm, slabMm }: LeftoverQuestion): WorstAreas {
  const clearAt = new Map(sections.clear.map((section) => [section.sMm, section.bands]));
  const elsewhere = slabMm === undefined ? undefined : alongSlabSources(problem, sections, rule, slabMm);
  const seen = new Set<string>();
  const outlines = new Map<unknown, number>();
  let displayedMm2 = 0;
  let keepClearMm2 = 0;
  let keepClearShare = 0;
  let placeUncertain = false;
  sections.windows.forEach((target, index) => {
    const clear = clearAt.get(target.sMm) ?? [];
    const outline = clearAt.get(target.sMm) ?? 'none';
    if (!outlines.has(outline)) outlines.set(outline, outlines.size);
    const solids: LandingSolid[] = [];
    let key = `${outlines.get(outline)}`;
    const add = (solid: number, sMm: number, fromElsewhere: boolean) => {
      const tissue = sections.tissue[solid]!;
      const bands = sectionAt(tissue, sMm);
      if (bands.length === 0) return;
      solids.push({ bands, sMm, fromElsewhere });
      key += tissue.varies
        ? `|${solid}@${index}`
        : `|${solid}${fromElsewhere ? '+' : sMm === target.sMm ? '' : '~'}`;
    };
    sections.tissue.forEach((_, solid) => add(solid, target.sMm, false));
    for (const { solid, sMm, everyOrder } of elsewhere?.get(target) ?? []) add(solid, sMm, everyOrder);
    if (seen.has(key)) return;
    seen.add(key);
    const area = landedArea(sections, solids, clear, rule, widthMm, problem.usable, sharesSeen(problem));
    const clearArea = polygonAreaMm2(clear);
    displayedMm2 = Math.max(displayedMm2, area.displayedMm2);
    keepClearMm2 = Math.max(keepClearMm2, area.keepClearMm2);
    if (clearArea > 0) keepClearShare = Math.max(keepClearShare, area.keepClearMm2 / clearArea);
    placeUncertain ||= area.placeUncertain;
  });
  return { displayedMm2, keepClearMm2, keepClearShare, placeUncertain };
}
