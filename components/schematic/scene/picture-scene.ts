import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Prescription } from '@/lib/physics/model/prescription';
import { SIDE_LETTERS } from '@/lib/presentation/anatomy-words';
import type { Bounds, Ring, Scene, SceneNode, TextNode } from './scene';
import { screenFrame, toScreen, type ScreenPoint } from './section-frame';

export interface PictureSceneInput {
  readonly prescription: Prescription;
  readonly keepClear: KeepClear;
  /** The picture now, and the tried one, on the screen, mm. */
  readonly now: Bounds;
  readonly tried?: Bounds;
  /** Where the wipe stands, mm on the screen: now is left of it. */
  readonly wipeAt?: number;
  readonly bounds: Bounds;
  /** Size of a screen pixel, mm; absent: as when the whole picture lies in a small box. */
  readonly mmPerPx?: number;
}

/** What lies over the simulated pictures: letters, the keep-clear area, and the wipe between now and tried. */
export function pictureScene({ prescription, keepClear, now, tried, wipeAt, bounds, mmPerPx }: PictureSceneInput): Scene {
  const frame = screenFrame(prescription);
  const nodes: SceneNode[] = [
    { kind: 'area', name: 'picture/now', rings: [ringOf(now)], stroke: { colour: 'ink', widthPx: 1.25, edge: 'solid' } },
  ];
  if (tried) {
    nodes.push({ kind: 'area', name: 'picture/tried', rings: [ringOf(tried)], stroke: { colour: 'indigo', widthPx: 1.25, edge: 'dashed' } });
  }
  if (keepClear.area.kind === 'box' && prescription.inPlaneRotationDeg === 0) {
    const { xMm, yMm, zMm } = keepClear.area.box;
    const [u0, v0] = toScreen(frame, [xMm[0], yMm[0], zMm[0]]);
    const [u1, v1] = toScreen(frame, [xMm[1], yMm[1], zMm[1]]);
    const box: Bounds = { left: Math.min(u0, u1), right: Math.max(u0, u1), top: Math.min(v0, v1), bottom: Math.max(v0, v1) };
    // A pale rim below it: over a dark picture indigo alone would be lost by day.
    nodes.push(
      { kind: 'area', name: 'keep-clear/rim', rings: [ringOf(box)], stroke: { colour: 'paper', widthPx: 3.5, edge: 'solid', opacity: 0.7 } },
      { kind: 'area', name: 'keep-clear', rings: [ringOf(box)], stroke: { colour: 'indigo', widthPx: 1.75, edge: 'dashed' } },
    );
  }
  const { sides } = frame;
  const middle: ScreenPoint = [(bounds.left + bounds.right) / 2, (bounds.top + bounds.bottom) / 2];
  const inset = mmPerPx === undefined ? 11 : 13 * mmPerPx;
  nodes.push(
    letter(SIDE_LETTERS[sides.left], 'left', [bounds.left + inset, middle[1]]),
    letter(SIDE_LETTERS[sides.right], 'right', [bounds.right - inset, middle[1]]),
    letter(SIDE_LETTERS[sides.top], 'top', [middle[0], bounds.top + inset]),
    letter(SIDE_LETTERS[sides.bottom], 'bottom', [middle[0], bounds.bottom - inset]),
  );
  if (tried && wipeAt !== undefined) {
    const line = [[[wipeAt, bounds.top + 2 * inset], [wipeAt, bounds.bottom - 2 * inset]]] as const;
    // Over the picture's ends: there neither the line nor a letter nor the keep-clear area comes in their way.
    const over = Math.max(Math.min(now.top, tried.top), bounds.top + 2 * inset);
    const [left, right] = [Math.max(Math.min(now.left, tried.left), bounds.left), Math.min(Math.max(now.right, tried.right), bounds.right)];
    nodes.push(
      { kind: 'lines', name: 'wipe/rim', lines: line, stroke: { colour: 'paper', widthPx: 4.5, edge: 'solid', opacity: 0.7 } },
      { kind: 'lines', name: 'wipe', lines: line, stroke: { colour: 'indigo', widthPx: 2, edge: 'solid' } },
      word('wipe/now', 'now', [left, over], 6, 'start'),
      word('wipe/tried', 'tried', [right, over], -6, 'end'),
    );
  }
  return { bounds, nodes };
}

function ringOf({ left, right, top, bottom }: Bounds): Ring {
  return [[left, top], [right, top], [right, bottom], [left, bottom]];
}

function letter(text: string, side: string, at: ScreenPoint): TextNode {
  return { kind: 'text', name: `letter/${side}`, text, at, offsetPx: [0, 6], anchor: 'middle', size: 'letter', colour: 'ink' };
}

function word(name: string, text: string, at: ScreenPoint, dx: number, anchor: TextNode['anchor']): TextNode {
  return { kind: 'text', name, text, at, offsetPx: [dx, -7], anchor, size: 'note', colour: 'indigo' };
}
