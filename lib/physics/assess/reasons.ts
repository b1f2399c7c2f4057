import type { FoldResult, Reason, SlabResult, Verdict, WidthRequirement } from '../model/assessment';
import { AXIS_SIDES } from '../geometry/vector';
import type { PatientAxis, Side } from '../model/axes';
import type { Prescription } from '../model/prescription';
import {
  AXIS_LETTERS,
  capitalised,
  figure,
  millimetres,
  OPPOSITE_SIDE,
  percentBeyond,
  squareCentimetres,
} from './words';

/** "Posterior tissue": the trunk goes by its side, every other part by its name; fat that EPI displaced is named so. */
function intruder(from: NonNullable<FoldResult['from']>): string {
  if (from.fatDisplacedMm !== undefined) {
    const whose = from.part === 'trunk' ? `on the ${from.side} side` : `of the ${from.part}`;
    return `Fat ${whose}, displaced ${millimetres(from.fatDisplacedMm)} by EPI,`;
  }
  return from.part === 'trunk' ? capitalised(`${from.side} tissue`) : `Tissue of the ${from.part}`;
}

/** Image-domain unfolding shows tissue again m·W/R away, not on the opposite side; the words are the picture's. */
function ghostOf(from: NonNullable<FoldResult['from']>): string {
  const { part, side, distanceMm, fatDisplacedMm } = from;
  const what = fatDisplacedMm === undefined ? 'tissue' : 'fat';
  const whose = part === 'trunk' ? what : `${what} of the ${part}`;
  const displaced = fatDisplacedMm === undefined ? '' : `, displaced ${millimetres(fatDisplacedMm)} by EPI`;
  return `Unfolding shows a ghost of ${whose} from the ${side} side${displaced}, ${millimetres(distanceMm)} away`;
}

/** How far the fold reaches, saying which figure counts the margin. */
function depthWords(fold: FoldResult): string {
  if (fold.depthMm <= 0)
    return `only within the margin, ${millimetres(fold.depthWithMarginMm)} deep with margin`;
  return `${millimetres(fold.depthWithMarginMm)} deep with margin`;
}

function foldInReason(fold: FoldResult, p: Prescription): Reason {
  const { from } = fold;
  const where = from === undefined ? 'Tissue' : intruder(from);
  if (fold.ghosts && fold.depthWithMarginMm <= 0) {
    return {
      code: 'ghosts-in-keep-clear',
      text: `${where} lies beyond the acquired width, and unfolding leaves ghosts of it in the keep-clear area.`,
    };
  }
  const place = fold.placeUncertain ? ' Beyond the usable FOV its place is uncertain.' : '';
  if (fold.ghosts && from !== undefined && sidesOf(p.phaseAxis).includes(from.side))
    return { code: 'fold-in-keep-clear', text: `${ghostOf(from)}, ${depthWords(fold)}.${place}` };
  const lands =
    from === undefined ? 'lands in the keep-clear area' : `lands on the ${OPPOSITE_SIDE[from.side]} side`;
  return { code: 'fold-in-keep-clear', text: `${where} ${lands}, ${depthWords(fold)}.${place}` };
}

function foldOutsideReason(fold: FoldResult): Reason {
  const { from } = fold;
  const where =
    from === undefined ? 'Tissue lands' : `${intruder(from)} lands on the ${OPPOSITE_SIDE[from.side]} side,`;
  const share = squareCentimetres(fold.displayedAreaMm2);
  return {
    code: 'fold-outside-keep-clear',
    text: `${where} outside the keep-clear area: ${share} of the picture.`,
  };
}

/** EPI: how far fat is seen from its place, which by itself is not fold. */
function displacedReason(p: Prescription, fatShare: number): Reason {
  const mm = millimetres((fatShare * p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov);
  return {
    code: 'fat-displaced',
    text: `EPI shows fat ${mm} from its place along ${AXIS_LETTERS[p.phaseAxis]}: displacement, counted as fold only where it leaves by one edge and comes in by the other.`,
  };
}

function slabReason(slab: SlabResult): Reason {
  const inside = slab.contaminatedInKeepClear;
  const count = inside > 0 ? inside : slab.contaminated;
  const where = inside > 0 ? 'in the keep-clear area' : 'outside the keep-clear area';
  return {
    code: inside > 0 ? 'slab-wrap-in-keep-clear' : 'slab-wrap-outside-keep-clear',
    text: `${count} of ${slab.partitions.length} partitions ${where} ${count === 1 ? 'holds' : 'hold'} tissue from the other end of the slab.`,
  };
}

/** What is enough, and what covering the whole body would take. */
function enoughReason(p: Prescription, width: WidthRequirement): Reason {
  const lines = width.firstCleanLines;
  if (!Number.isFinite(width.firstCleanMm)) {
    return {
      code: 'wraps-along-slab',
      text: 'No phase oversampling is enough while tissue wraps along the slab.',
    };
  }
  if (lines === undefined) {
    return {
      code: 'no-width-on-grid',
      text:
        `${percentBeyond(width.firstCleanMm, p.fovPhaseMm)} oversampling (${figure(width.firstCleanMm)} mm acquired) would be ` +
        `enough, more than this scanner can be set to.`,
    };
  }
  const widthMm = (lines * p.fovPhaseMm) / p.linesAcrossFov;
  const enough =
    lines === p.linesAcrossFov
      ? `No oversampling is needed (${figure(widthMm)} mm acquired).`
      : `${percentBeyond(lines, p.linesAcrossFov)} oversampling is enough (${figure(widthMm)} mm acquired).`;
  // Worth comparing only where the body asks for more: a scanner's coarse steps or a slab's diagonal can ask for more still.
  const coverMm = Math.max(width.coverBodyMm, p.fovPhaseMm);
  if (!(coverMm > widthMm + 0.05)) return { code: 'enough-width', text: enough };
  const cover = percentBeyond(coverMm, p.fovPhaseMm);
  return { code: 'enough-width', text: `${enough} Covering the whole body would take ${cover}.` };
}

function noFoldReason(p: Prescription, width: WidthRequirement): Reason {
  const acquiredMm = (p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov;
  const spare = acquiredMm - width.alwaysCleanMm;
  const extra = spare >= 1 ? `, ${Math.floor(spare)} mm more than needed` : '';
  return {
    code: 'no-fold-expected',
    text: `${figure(acquiredMm)} mm acquired ${AXIS_LETTERS[p.phaseAxis]} is enough with margin${extra}.`,
  };
}

const sidesOf = (axis: PatientAxis): readonly Side[] => AXIS_SIDES[axis];

export interface ReasonInputs {
  readonly verdict: Verdict;
  readonly hard: readonly Reason[];
  readonly prescription: Prescription;
  readonly width?: WidthRequirement;
  readonly fold?: FoldResult;
  readonly slab?: SlabResult | undefined;
  readonly keepClearIsDisplayed: boolean;
  /** Share of the acquired width by which EPI displaces fat, > 0; absent: nothing is displaced. */
  readonly fatShare?: number | undefined;
}

/** The sentences beside the verdict, the deciding one first. */
export function reasonsFor({
  hard,
  prescription,
  width,
  fold,
  slab,
  keepClearIsDisplayed,
  fatShare,
}: ReasonInputs): readonly Reason[] {
  const reasons: Reason[] = [...hard];
  const slabInside = (slab?.contaminatedInKeepClear ?? 0) > 0;
  const alongSlab =
    slabInside && fold?.from !== undefined && !sidesOf(prescription.phaseAxis).includes(fold.from.side);
  if (fold?.inKeepClear && !alongSlab) reasons.push(foldInReason(fold, prescription));
  // Wrap along the slab lays a whole section over the picture, in-plane fold only a rim: it decides the area told after it.
  if (slab !== undefined && slab.contaminated > 0) reasons.push(slabReason(slab));
  if (fold?.outsideKeepClear && !fold.inKeepClear) reasons.push(foldOutsideReason(fold));
  if (width !== undefined) {
    const folds = fold !== undefined && (fold.inKeepClear || fold.outsideKeepClear);
    reasons.push(folds ? enoughReason(prescription, width) : noFoldReason(prescription, width));
  }
  if (fatShare !== undefined) reasons.push(displacedReason(prescription, fatShare));
  if (!keepClearIsDisplayed) {
    reasons.push({
      code: 'keep-clear-not-displayed',
      text: 'The keep-clear area lies outside every displayed slice.',
    });
  }
  return reasons;
}
