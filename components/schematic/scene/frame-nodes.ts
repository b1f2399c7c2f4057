import type { Case } from '@/lib/physics/model/case';
import { SIDE_LETTERS } from '@/lib/presentation/anatomy-words';
import type { Bounds, LinesNode, SceneNode, TextNode } from './scene';
import { screenAxes, screenFrame, type ScreenPoint } from './section-frame';
import type { WindowFrame } from './window-frame';

/** L R A P S I at the edges of the picture, and the phase direction in its corner. */
export function letterNodes(bounds: Bounds, question: Case, window: WindowFrame, mmPerPx: number): SceneNode[] {
  const { sides } = screenFrame(question.prescription);
  const inset = 13 * mmPerPx;
  // Beside the window while it is in sight; they never leave the picture with it.
  const beside = (at: number, low: number, high: number): number => Math.min(high - 3 * inset, Math.max(low + 3 * inset, at));
  const u = beside(window.centre[0], bounds.left, bounds.right);
  const v = beside(window.centre[1], bounds.top, bounds.bottom);
  const letter = (side: keyof typeof sides, at: ScreenPoint): TextNode => ({
    kind: 'text',
    name: `letter/${side}`,
    text: SIDE_LETTERS[sides[side]],
    at,
    offsetPx: [0, 6],
    anchor: 'middle',
    size: 'letter',
    colour: 'ink',
  });
  const down = question.prescription.phaseAxis === screenAxes(question.prescription.plane).vertical;
  const corner: ScreenPoint = [bounds.left + 10 * mmPerPx, bounds.bottom - 10 * mmPerPx];
  const length = 40 * mmPerPx;
  const tip: ScreenPoint = down ? [corner[0], corner[1] - length] : [corner[0] + length, corner[1]];
  const head = (at: ScreenPoint, sign: number): (readonly ScreenPoint[])[] => {
    const a = 5 * mmPerPx;
    return down
      ? [[[at[0] - a, at[1] + sign * a], at, [at[0] + a, at[1] + sign * a]]]
      : [[[at[0] - sign * a, at[1] - a], at, [at[0] - sign * a, at[1] + a]]];
  };
  const arrow: LinesNode = {
    kind: 'lines',
    name: 'phase-direction',
    lines: [[corner, tip], ...head(tip, 1), ...head(corner, -1)],
    stroke: { colour: 'ink', widthPx: 1.5, edge: 'solid' },
  };
  return [
    letter('left', [bounds.left + inset, v]),
    letter('right', [bounds.right - inset, v]),
    letter('top', [u, bounds.top + inset]),
    letter('bottom', [u, bounds.bottom - inset]),
    arrow,
    {
      kind: 'text',
      name: 'phase-direction/label',
      text: 'phase',
      at: down ? [corner[0], corner[1] - length / 2] : [tip[0], tip[1]],
      offsetPx: down ? [12, 5] : [12, 5],
      anchor: 'start',
      size: 'note',
      colour: 'ink-soft',
    },
  ];
}

/** A whole length that takes a third of the picture at most. */
function barLengthMm(bounds: Bounds): number {
  const most = (bounds.right - bounds.left) / 3;
  return [100, 50, 20, 10].find((length) => length <= most) ?? 5;
}

/** 100 mm, or less when the picture is zoomed, in the lower right corner. */
export function scaleNodes(bounds: Bounds, mmPerPx: number): SceneNode[] {
  const right = bounds.right - 10 * mmPerPx;
  const length = barLengthMm(bounds);
  const at = bounds.bottom - 10 * mmPerPx;
  const tick = 5 * mmPerPx;
  return [
    {
      kind: 'lines',
      name: 'scale-bar',
      lines: [
        [[right - length, at], [right, at]],
        [[right - length, at - tick], [right - length, at + tick]],
        [[right, at - tick], [right, at + tick]],
      ],
      stroke: { colour: 'ink', widthPx: 1.5, edge: 'solid' },
    },
    {
      kind: 'text',
      name: 'scale-bar/label',
      text: `${length} mm`,
      at: [right - length / 2, at],
      offsetPx: [0, -8],
      anchor: 'middle',
      size: 'note',
      colour: 'ink-soft',
    },
  ];
}
