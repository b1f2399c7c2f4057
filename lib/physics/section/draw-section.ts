import { unfoldingRule } from '../acceleration/unfolding-rule';
import { partSolids } from '../body/part-solids';
import { acquiredSlabMm, acquiredWidthMm } from '../fold/acquired-lines';
import { alongSlabSources, sharesSeen } from '../fold/alias-family';
import {
  displayedSections,
  regionSolid,
  type DisplayedSections,
  type TargetSection,
} from '../fold/displayed-sections';
import { growInReadout } from '../fold/displacement';
import { foldProblem, type FoldProblem } from '../fold/fold-problem';
import { beyondUsable } from '../fold/landed-area';
import { sectionAt, type TissueSolid } from '../fold/tissue-sections';
import { regionOfBox, type OrientedRegion } from '../geometry/oriented-region';
import { sectionFrame, toPatient, type SectionFrame } from '../geometry/section-frame';
import { AXIS_SIDES } from '../geometry/vector';
import type { Case } from '../model/case';
import type { SolidPart } from '../model/patient';
import { bandRings, cropBands, intersectBands, moveBands } from './band-outline';
import { cutSolid, solidInSection } from './convex-solid';
import { straight } from './curve';
import { outlineRings } from './outline-rings';
import type { RowBand } from './row-band';
import { piecesByPlace, splitByUsable } from './split-by-usable';
import type {
  GhostDrawing,
  PieceDrawing,
  SectionDrawing,
  SectionRing,
  TissueDrawing,
} from './section-drawing';

export interface DrawSectionOptions {
  /** Which section, from the FOV centre along the slice axis, mm; default 0. */
  readonly sliceOffsetMm?: number;
  /** Default: the prescription's own. */
  readonly acquiredLines?: number;
  readonly acquiredPartitions?: number;
  /** A keep-clear region frozen by a remedy; default: the case's own. */
  readonly keepClear?: OrientedRegion;
  /** Profile of the slab (see FoldProblem). */
  readonly slabWeight?: (offsetFromSlabCentreMm: number) => number;
}

interface Picture {
  readonly problem: FoldProblem;
  readonly frame: SectionFrame;
  readonly sections: DisplayedSections;
  readonly target: TargetSection;
  readonly keepClear: readonly RowBand[];
  readonly widthMm: number;
  readonly slabMm: number | undefined;
}

/**
 * One section as outlines for painting, in section coordinates (readout, phase) [mm]: tissue where it is, the window and
 * acquired edges, the keep-clear area, and every piece of tissue that is seen in a wrong place, where it is and where
 * it lands. The same fold law and the same solids as the solver; tissue as measured (the margin only widens keep-clear).
 */
export function drawSection(question: Case, options: DrawSectionOptions = {}): SectionDrawing {
  const { prescription } = question;
  const sliceOffsetMm = options.sliceOffsetMm ?? 0;
  const acquiredLines = options.acquiredLines ?? prescription.acquiredLines;
  const widthMm = acquiredWidthMm(acquiredLines, prescription.linesAcrossFov, prescription.fovPhaseMm);
  const problem = foldProblem(question, {
    ...(options.keepClear && { keepClear: options.keepClear }),
    ...(options.slabWeight && { slabWeight: options.slabWeight }),
  });
  const { slices } = prescription;
  const slabMm =
    slices.mode === 'slab'
      ? acquiredSlabMm(options.acquiredPartitions ?? slices.acquiredPartitions, slices.partitionThicknessMm)
      : undefined;
  const all = displayedSections(problem);
  const frame = sectionFrame(prescription, sliceOffsetMm);
  const keepClear = cutRegion(problem.keepClear, frame);
  const target: TargetSection = {
    sMm: frame.sliceMm,
    offsetMm: sliceOffsetMm,
    bands: [all.window],
    grown: [all.window],
  };
  const sections: DisplayedSections = { ...all, windows: [target] };
  const picture: Picture = { problem, frame, sections, target, keepClear, widthMm, slabMm };
  const half = widthMm / 2;
  const { window, margin } = all;
  const { mustStayDisplayed } = question.keepClear;

  return {
    frame,
    sliceOffsetMm,
    acquiredLines,
    acquiredWidthMm: widthMm,
    displayedReadoutMm: [window.r0, window.r1],
    displayedPhaseMm: [window.lower.offset, window.upper.offset],
    acquiredPhaseMm: [frame.centrePhaseMm - half, frame.centrePhaseMm + half],
    tissue: problem.parts.map((part) => drawTissue(part, picture)),
    keepClear: bandRings(keepClear)[0] ?? [],
    keepClearWithMargin:
      bandRings(
        growInReadout(keepClear, margin.readout).map((band) => ({
          ...band,
          lower: { ...band.lower, offset: band.lower.offset - margin.phase[1] },
          upper: { ...band.upper, offset: band.upper.offset + margin.phase[0] },
        })),
      )[0] ?? [],
    mustStayDisplayed: mustStayDisplayed
      ? (bandRings(cutRegion(regionOfBox(mustStayDisplayed), frame))[0] ?? [])
      : [],
    pieces: drawPieces(picture),
    ghosts: drawGhosts(picture),
  };
}

function cutRegion(region: OrientedRegion, frame: SectionFrame): RowBand[] {
  return cutSolid(solidInSection(regionSolid(region), frame), frame.sliceMm, true);
}

function drawTissue(part: SolidPart, { problem, frame }: Picture): TissueDrawing {
  const solids = partSolids([part], problem, { bands: [], b1Scale: 1, t1Ms: [] }, -1);
  const whole = outlineRings(part.shape, frame, problem);
  const cuts = solids.map(({ solid }) => cutSolid(solidInSection(solid, frame), frame.sliceMm));
  const rings = whole ?? cuts.flatMap(bandRings);
  const placeUncertain = isUncertain(rings, problem, frame, frame.sliceMm);
  const split =
    placeUncertain && !whole
      ? cuts.map((bands) => splitByUsable(bands, problem.usable, frame, frame.sliceMm))
      : undefined;
  return {
    name: `tissue/${part.name}`,
    part: part.name,
    kind: part.kind,
    estimated: part.estimated,
    placeUncertain,
    rings,
    ...(split && {
      withinUsable: split.flatMap(({ within }) => bandRings(within)),
      beyondUsable: split.flatMap(({ beyond }) => beyond.flatMap(bandRings)),
    }),
  };
}

function isUncertain(
  rings: readonly SectionRing[],
  problem: FoldProblem,
  frame: SectionFrame,
  sMm: number,
): boolean {
  return rings.some((ring) =>
    ring.some(([r, p]) => beyondUsable(problem.usable, toPatient(frame, r, p, sMm))),
  );
}

interface Draft {
  readonly source: RowBand[];
  readonly landed: RowBand[];
  readonly inKeepClear: RowBand[];
  readonly part: SolidPart;
  readonly sMm: number;
  /** Moved by −moveMm along phase. */
  readonly moveMm: number;
  readonly sliceOrder: number;
  readonly multiple: number;
  /** Displaced along phase before it folded (fat in EPI), mm; counted in moveMm. */
  readonly displacedMm: number;
}

/** Bands of one solid that land in the window when moved by −moveMm, optionally only beyond an acquired edge. */
function draft(
  picture: Picture,
  tissue: TissueSolid,
  bands: readonly RowBand[],
  move: Pick<Draft, 'moveMm' | 'sMm' | 'sliceOrder' | 'multiple' | 'displacedMm'>,
  beyond?: { readonly end: 'low' | 'high' },
): Draft | undefined {
  const { sections, frame, widthMm, keepClear, problem } = picture;
  const { window } = sections;
  const lowers = [straight(window.lower.offset + move.moveMm)];
  const uppers = [straight(window.upper.offset + move.moveMm)];
  // Beyond the acquired edge as it is sampled: displaced.
  if (beyond?.end === 'high') lowers.push(straight(frame.centrePhaseMm + widthMm / 2 - move.displacedMm));
  if (beyond?.end === 'low') uppers.push(straight(frame.centrePhaseMm - widthMm / 2 - move.displacedMm));
  const source = cropBands(bands, { lowers, uppers, r0: window.r0, r1: window.r1 });
  if (source.length === 0) return undefined;
  const landed = moveBands(source, -move.moveMm);
  return {
    ...move,
    source,
    landed,
    inKeepClear: intersectBands(landed, keepClear),
    part: problem.parts[tissue.part]!,
  };
}

/** Whole i for which a move by i·step − displaced brings some of the bands into the window. */
function movesInto(window: RowBand, bands: readonly RowBand[], step: number, displacedMm: number): number[] {
  const rings = bandRings(bands).flat();
  if (rings.length === 0) return [];
  const phases = rings.map(([, p]) => p + displacedMm);
  const from = Math.ceil((Math.min(...phases) - window.upper.offset) / step);
  const to = Math.floor((Math.max(...phases) - window.lower.offset) / step);
  return Array.from({ length: Math.max(0, to - from + 1) }, (_, k) => from + k);
}

/** The pieces of one part and move drawn as one: presaturation and outlines cut a part into several solids. */
function gather(drafts: readonly Draft[], picture: Picture, nameOf: (draft: Draft) => string) {
  const groups = new Map<string, Draft[]>();
  for (const one of drafts) groups.set(nameOf(one), [...(groups.get(nameOf(one)) ?? []), one]);
  const { frame, problem } = picture;
  return [...groups].map(([name, group]) => {
    const first = group[0]!;
    const rings = (pick: (one: Draft) => RowBand[]) => group.flatMap((one) => bandRings(pick(one)));
    const source = rings((one) => one.source);
    const placeUncertain = isUncertain(source, problem, frame, first.sMm);
    // The side it came from is that of the fold, whatever displaced it before.
    const foldedMm = first.moveMm + first.displacedMm;
    return {
      first,
      drawing: {
        name,
        part: first.part.name,
        estimated: first.part.estimated,
        side:
          foldedMm !== 0
            ? AXIS_SIDES[frame.phaseAxis][foldedMm > 0 ? 1 : 0]
            : AXIS_SIDES[frame.sliceAxis][first.sliceOrder > 0 ? 1 : 0],
        distanceMm:
          foldedMm !== 0 ? Math.abs(first.moveMm) : Math.abs(first.sliceOrder) * (picture.slabMm ?? 0),
        ...(first.displacedMm !== 0 && { fatDisplacedMm: first.displacedMm }),
        placeUncertain,
        ...(placeUncertain && { byPlace: piecesByPlace(group, problem.usable, frame, picture.keepClear) }),
        source,
        landed: rings((one) => one.landed),
        inKeepClear: rings((one) => one.inKeepClear),
      },
    };
  });
}

const fatName = ({ displacedMm }: Draft): string =>
  displacedMm === 0 ? '' : displacedMm > 0 ? '/fat-high' : '/fat-low';

function drawPieces(picture: Picture): PieceDrawing[] {
  const { problem, sections, target, frame, widthMm, slabMm } = picture;
  const rule = unfoldingRule(problem.prescription);
  const drafts: Draft[] = [];
  const add = (solid: number, sMm: number, sliceOrder: number, step: number) => {
    const tissue = sections.tissue[solid]!;
    const bands = sectionAt(tissue, sMm);
    for (const share of sharesSeen(problem)) {
      const displacedMm = share * widthMm;
      for (const i of movesInto(sections.window, bands, step, displacedMm)) {
        if (i === 0 && sliceOrder === 0) continue;
        const one = draft(picture, tissue, bands, {
          moveMm: i * step - displacedMm,
          sMm,
          sliceOrder,
          multiple: (i * step) / widthMm,
          displacedMm,
        });
        if (one) drafts.push(one);
      }
    }
  };
  if (rule.kind === 'plain') sections.tissue.forEach((_, solid) => add(solid, frame.sliceMm, 0, widthMm));
  if (slabMm !== undefined) {
    const step = rule.kind === 'grid-ends' ? widthMm / rule.factorPhase : widthMm;
    for (const { solid, sMm, everyOrder } of alongSlabSources(problem, sections, rule, slabMm).get(target) ??
      []) {
      if (everyOrder) add(solid, sMm, Math.round((sMm - frame.sliceMm) / slabMm), step);
    }
  }
  const orderOf = (one: Draft) => 0 - one.multiple;
  return gather(drafts, picture, (one) => {
    const along = one.sliceOrder === 0 ? '' : `/${one.sliceOrder}`;
    return `piece/${one.part.name}/${orderOf(one)}${along}${fatName(one)}`;
  }).map(({ first, drawing }) => ({ ...drawing, order: orderOf(first), sliceOrder: first.sliceOrder }));
}

function drawGhosts(picture: Picture): GhostDrawing[] {
  const { problem, sections, target, frame, widthMm, slabMm } = picture;
  const rule = unfoldingRule(problem.prescription);
  if (rule.kind !== 'grid-ends') return [];
  const drafts: Draft[] = [];
  const step = widthMm / rule.factorPhase;
  const add = (solid: number, sMm: number, sliceOrder: number) => {
    const tissue = sections.tissue[solid]!;
    const bands = sectionAt(tissue, sMm);
    for (const share of sharesSeen(problem)) {
      const displacedMm = share * widthMm;
      for (const i of movesInto(sections.window, bands, step, displacedMm)) {
        if (i === 0) continue;
        const moveMm = i * step - displacedMm;
        const end = i > 0 ? 'high' : 'low';
        const move = { moveMm, sMm, sliceOrder, multiple: Math.abs(i), displacedMm };
        const one = draft(picture, tissue, bands, move, { end });
        if (one) drafts.push(one);
      }
    }
  };
  sections.tissue.forEach((_, solid) => add(solid, frame.sliceMm, 0));
  if (slabMm !== undefined && rule.factorSlice > 1) {
    const repeat = slabMm / rule.factorSlice;
    for (const { solid, sMm, everyOrder } of alongSlabSources(problem, sections, rule, slabMm).get(target) ??
      []) {
      if (!everyOrder) add(solid, sMm, Math.round((sMm - frame.sliceMm) / repeat));
    }
  }
  return gather(drafts, picture, (one) => {
    const end = one.moveMm + one.displacedMm > 0 ? 'high' : 'low';
    return `ghost/${one.part.name}/${end}/${one.multiple}/${one.sliceOrder}${fatName(one)}`;
  }).map(({ first, drawing }) => ({ ...drawing, multiple: first.multiple, sliceMultiple: first.sliceOrder }));
}
