import type { LinesNode } from './scene';
import type { ScreenPoint } from './section-frame';
import { inWindow, type WindowFrame } from './window-frame';

/** How far the edge runs past the displayed window along readout, mm. */
export const OVERHANG_MM = 26;

/**
 * The acquired edge: an ink double line with woven ticks, the outer line away from the picture. Distances that are
 * about drawing, not about the patient, are given in pixels and turned into mm here.
 */
export function wovenEdge(window: WindowFrame, sign: -1 | 1, mmPerPx: number): readonly LinesNode[] {
  const side = sign < 0 ? 'low' : 'high';
  const reach = window.halfReadoutMm + OVERHANG_MM;
  const gap = 5 * mmPerPx;
  const at = (out: number, along: number): ScreenPoint => inWindow(window, sign * (window.halfAcquiredMm + out), along);
  const spacing = 9 * mmPerPx;
  const ticks: (readonly ScreenPoint[])[] = [];
  for (let along = -reach; along + gap <= reach; along += spacing) {
    ticks.push([at(0, along), at(gap, along + gap * 0.8)]);
  }
  return [
    {
      kind: 'lines',
      name: `acquired-edge/${side}`,
      lines: [[at(0, -reach), at(0, reach)]],
      stroke: { colour: 'ink', widthPx: 2, edge: 'solid' },
    },
    {
      kind: 'lines',
      name: `acquired-edge/${side}/outer`,
      lines: [[at(gap, -reach), at(gap, reach)]],
      stroke: { colour: 'ink', widthPx: 1, edge: 'solid' },
    },
    {
      kind: 'lines',
      name: `acquired-edge/${side}/ticks`,
      lines: ticks,
      stroke: { colour: 'ink', widthPx: 1, edge: 'solid' },
    },
  ];
}

/** The acquired edge a remedy would give: dashed indigo, with its width. */
export function triedEdge(window: WindowFrame, sign: -1 | 1): LinesNode {
  const reach = window.halfReadoutMm + OVERHANG_MM;
  return {
    kind: 'lines',
    name: `tried-edge/${sign < 0 ? 'low' : 'high'}`,
    lines: [[inWindow(window, sign * window.halfAcquiredMm, -reach), inWindow(window, sign * window.halfAcquiredMm, reach)]],
    stroke: { colour: 'indigo', widthPx: 1.5, edge: 'dashed' },
  };
}
