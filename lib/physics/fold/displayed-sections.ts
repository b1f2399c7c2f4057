import { displayedSliceOffsetsMm, sectionFrame, type SectionFrame } from '../geometry/section-frame';
import type { OrientedRegion } from '../geometry/oriented-region';
import { scale } from '../geometry/vector';
import {
  cutSolid,
  sliceDependence,
  solidInSection,
  withoutSliceEnds,
  type ConvexSolid,
  type HalfSpace,
} from '../section/convex-solid';
import type { RowBand } from '../section/row-band';
import { growInReadout } from './displacement';
import type { FoldProblem } from './fold-problem';
import { sectionMargin, type SectionMargin } from './section-margin';
import { tissueSolids, type TissueSolid } from './tissue-sections';
import { straight } from '../section/curve';
import { TOUCH_MM } from '../section/row-band';

/** An area in one displayed section that tissue must not reach. */
export interface TargetSection {
  readonly sMm: number;
  /** Offset from the stack's or slab's centre, mm. */
  readonly offsetMm: number;
  /** As it is, and grown along readout by the reflected margin. The same object where sections are alike. */
  readonly bands: readonly RowBand[];
  readonly grown: readonly RowBand[];
}

/** All sections that are displayed, and what lies in them. */
export interface DisplayedSections {
  readonly frame: SectionFrame;
  readonly margin: SectionMargin;
  readonly tissue: readonly TissueSolid[];
  readonly window: RowBand;
  /** Sections that show some of the keep-clear area (cropped to the window), ascending. */
  readonly clear: readonly TargetSection[];
  /** Every displayed section with the window itself. */
  readonly windows: readonly TargetSection[];
}

export function regionSolid(region: OrientedRegion): ConvexSolid {
  const halfSpaces = region.axes.flatMap((axis, i): HalfSpace[] => {
    const [low, high] = region.rangesMm[i as 0 | 1 | 2];
    return [
      { normal: axis, limit: high },
      { normal: scale(axis, -1), limit: -low },
    ];
  });
  return { halfSpaces };
}

export function displayedSections(problem: FoldProblem): DisplayedSections {
  const { prescription } = problem;
  const frame = sectionFrame(prescription, 0);
  const margin = sectionMargin(frame, problem.marginMm);
  const window = windowBand(prescription.fovReadoutMm, prescription.fovPhaseMm, frame);
  const offsets = displayedSliceOffsetsMm(prescription);
  const windowGrown = growInReadout([window], margin.readout);
  const windows = offsets.map((offsetMm) => ({
    sMm: frame.sliceMm + offsetMm,
    offsetMm,
    bands: [window],
    grown: windowGrown,
  }));

  const turned = solidInSection(regionSolid(problem.keepClear), frame);
  const inWindow: ConvexSolid = {
    halfSpaces: [
      ...turned.halfSpaces,
      { normal: [1, 0, 0], limit: window.r1 },
      { normal: [-1, 0, 0], limit: -window.r0 },
      { normal: [0, 1, 0], limit: window.upper.offset },
      { normal: [0, -1, 0], limit: -window.lower.offset },
    ],
  };
  const dependence = sliceDependence(inWindow);
  const open = withoutSliceEnds(inWindow);
  const cutAt = (sMm: number) => {
    const bands = cutSolid(open, sMm, true);
    return { bands, grown: growInReadout(bands, margin.readout) };
  };
  const alike = dependence.varies ? undefined : cutAt(0);
  const clear = windows.flatMap(({ sMm, offsetMm }) => {
    if (sMm < dependence.lowMm - TOUCH_MM || sMm > dependence.highMm + TOUCH_MM) return [];
    const cut = alike ?? cutAt(sMm);
    return cut.bands.length ? [{ sMm, offsetMm, ...cut }] : [];
  });
  return { frame, margin, tissue: tissueSolids(problem, frame), window, clear, windows };
}

function windowBand(fovReadoutMm: number, fovPhaseMm: number, frame: SectionFrame): RowBand {
  return {
    r0: frame.centreReadoutMm - fovReadoutMm / 2,
    r1: frame.centreReadoutMm + fovReadoutMm / 2,
    lower: straight(frame.centrePhaseMm - fovPhaseMm / 2),
    upper: straight(frame.centrePhaseMm + fovPhaseMm / 2),
  };
}
