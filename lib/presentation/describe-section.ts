import type { PatientAxis, Side } from '@/lib/physics/model/axes';
import type { GhostDrawing, PieceDrawing, SectionDrawing } from '@/lib/physics/section/section-drawing';
import { AXIS_NAMES, SIDE_LETTERS } from './anatomy-words';

const OPPOSITE: Readonly<Record<Side, Side>> = {
  right: 'left', left: 'right', anterior: 'posterior', posterior: 'anterior', superior: 'inferior', inferior: 'superior',
};

/** "Trunk tissue from the posterior side lands on the anterior side, 300 mm away, in the keep-clear area." */
export function describePiece(piece: PieceDrawing): string {
  const distance = `${Math.round(piece.distanceMm)} mm away`;
  const partly = piece.placeUncertain && (piece.byPlace?.certain.landed.length ?? 0) > 0;
  const where = partly
    ? `${distance}, what lies beyond the usable FOV at an uncertain place`
    : piece.placeUncertain
      ? 'at an uncertain place'
      : distance;
  const along = piece.order === 0 ? 'along the slab' : `on the ${OPPOSITE[piece.side]} side`;
  const area = piece.inKeepClear.length > 0 ? 'in the keep-clear area' : 'outside the keep-clear area';
  const order = Math.abs(piece.order) > 1 ? ` It has folded ${Math.abs(piece.order)} times.` : '';
  const what = piece.fatDisplacedMm === undefined ? 'tissue' : `fat, displaced ${Math.round(Math.abs(piece.fatDisplacedMm))} mm by EPI,`;
  return `${capital(piece.part)} ${what} from the ${piece.side} side lands ${along}, ${where}, ${area}.${order}`;
}

/** "Unfolding shows a ghost of trunk tissue from the anterior side, 150 mm away, in the keep-clear area." */
export function describeGhost(ghost: GhostDrawing): string {
  const area = ghost.inKeepClear.length > 0 ? 'in the keep-clear area' : 'outside the keep-clear area';
  const fat = ghost.fatDisplacedMm;
  const what = fat === undefined ? 'tissue' : 'fat';
  const displaced = fat === undefined ? '' : `, displaced ${Math.round(Math.abs(fat))} mm by EPI`;
  const where = ghost.placeUncertain ? 'at an uncertain place' : `${Math.round(ghost.distanceMm)} mm away`;
  return `Unfolding shows a ghost of ${ghost.part} ${what} from the ${ghost.side} side${displaced}, ${where}, ${area}.`;
}

/** The picture in words, for those who do not see it. */
export function describeSection(drawing: SectionDrawing, phaseAxis: PatientAxis, readoutAxis: PatientAxis): readonly string[] {
  const width = ([low, high]: readonly [number, number]): number => Math.round(high - low);
  const lines = [
    `Displayed: ${width(drawing.displayedPhaseMm)} mm ${AXIS_NAMES[phaseAxis]} (phase) by ${width(drawing.displayedReadoutMm)} mm ${AXIS_NAMES[readoutAxis]} (readout).`,
    `Acquired along phase: ${Math.round(drawing.acquiredWidthMm)} mm.`,
  ];
  const landed = drawing.pieces.filter((piece) => piece.landed.length > 0);
  if (landed.length === 0 && drawing.ghosts.length === 0) lines.push('Nothing lands in the picture of this slice.');
  return [...lines, ...landed.map(describePiece), ...drawing.ghosts.map(describeGhost)];
}

/** A place in the picture from the origin of the sizes: "L 34 · A 120 mm". */
export function describePlace(
  u: number,
  v: number,
  sides: { readonly left: Side; readonly right: Side; readonly top: Side; readonly bottom: Side },
): string {
  const across = `${SIDE_LETTERS[u < 0 ? sides.left : sides.right]} ${Math.abs(Math.round(u))}`;
  const down = `${SIDE_LETTERS[v < 0 ? sides.top : sides.bottom]} ${Math.abs(Math.round(v))}`;
  return `${across} · ${down} mm`;
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
