'use client';

import type { Context } from 'konva/lib/Context';
import type { Shape as KonvaShape } from 'konva/lib/Shape';
import 'konva/lib/shapes/Text';
import 'konva/lib/Tween';
import { useLayoutEffect, useRef } from 'react';
import { Shape, Text } from 'react-konva/lib/ReactKonvaCore';
import { EDGE_DASH } from '../scene/edge-dash';
import { toPixels, type AreaNode, type Fit, type LinesNode, type MarkerNode, type TextNode } from '../scene/scene';
import type { ScreenPoint } from '../scene/section-frame';
import type { Palette } from './use-tokens';

const SLIDE_S = 0.2;

interface Painted<Node> {
  readonly node: Node;
  readonly fit: Fit;
  readonly palette: Palette;
}

/** A landed piece slides once from its source when it first appears, unless motion is reduced or a drag is on. */
function useSlide(from: ScreenPoint | undefined, scale: number, still: boolean) {
  const shape = useRef<KonvaShape>(null);
  const wasStill = useRef(still);
  const start = useRef(from && ([from[0] * scale, from[1] * scale] as const));
  useLayoutEffect(() => {
    const node = shape.current;
    if (!node || !start.current || wasStill.current) return;
    node.position({ x: start.current[0], y: start.current[1] });
    node.to({ x: 0, y: 0, duration: SLIDE_S });
  }, []);
  return shape;
}

function trace(context: Context, rings: readonly (readonly ScreenPoint[])[], fit: Fit, close: boolean): void {
  context.beginPath();
  for (const ring of rings) {
    ring.forEach((point, i) => {
      const [x, y] = toPixels(fit, point);
      if (i === 0) context.moveTo(x, y);
      else context.lineTo(x, y);
    });
    if (close) context.closePath();
  }
}

export function AreaShape({
  node,
  fit,
  palette,
  still,
  onHover,
}: Painted<AreaNode> & { still: boolean; onHover?: (name: string | null) => void }) {
  const shape = useSlide(node.slideFrom, fit.scale, still);
  const { hover } = node;
  return (
    <Shape
      ref={shape}
      name={node.name}
      listening={hover !== undefined}
      onMouseEnter={hover && onHover ? () => onHover(hover) : undefined}
      onMouseLeave={hover && onHover ? () => onHover(null) : undefined}
      sceneFunc={(context) => {
        trace(context, node.rings, fit, true);
        if (node.fill) {
          context.setAttr('globalAlpha', node.fillOpacity ?? 1);
          context.setAttr('fillStyle', palette(node.fill));
          context.fill('evenodd');
          context.setAttr('globalAlpha', 1);
        }
        if (node.stroke) {
          context.setAttr('globalAlpha', node.stroke.opacity ?? 1);
          context.setAttr('strokeStyle', palette(node.stroke.colour));
          context.setAttr('lineWidth', node.stroke.widthPx);
          context.setAttr('lineJoin', 'round');
          context.setAttr('lineCap', node.stroke.edge === 'dotted' ? 'round' : 'butt');
          context.setLineDash([...EDGE_DASH[node.stroke.edge]]);
          context.stroke();
        }
      }}
      hitFunc={(context, self) => {
        trace(context, node.rings, fit, true);
        self.fill(self.colorKey);
        context.fillShape(self);
      }}
    />
  );
}

export function LinesShape({ node, fit, palette, still }: Painted<LinesNode> & { still: boolean }) {
  const shape = useSlide(node.slideFrom, fit.scale, still);
  return (
    <Shape
      ref={shape}
      name={node.name}
      listening={false}
      sceneFunc={(context) => {
        trace(context, node.lines, fit, false);
        context.setAttr('globalAlpha', node.stroke.opacity ?? 1);
        context.setAttr('strokeStyle', palette(node.stroke.colour));
        context.setAttr('lineWidth', node.stroke.widthPx);
        context.setAttr('lineCap', node.stroke.edge === 'dotted' ? 'round' : 'butt');
        context.setLineDash([...EDGE_DASH[node.stroke.edge]]);
        context.stroke();
      }}
    />
  );
}

export const NOTE_PX = 14;
export const LETTER_PX = 19;

export function TextShape({ node, fit, palette, family }: Painted<TextNode> & { family: string }) {
  const [x, y] = toPixels(fit, node.at);
  const size = node.size === 'letter' ? LETTER_PX : NOTE_PX;
  const width = 600;
  const left = node.anchor === 'start' ? 0 : node.anchor === 'end' ? -width : -width / 2;
  return (
    <Text
      name={node.name}
      listening={false}
      text={node.text}
      x={x + node.offsetPx[0] + left}
      y={y + node.offsetPx[1] - size * 0.8}
      width={width}
      align={node.anchor === 'start' ? 'left' : node.anchor === 'end' ? 'right' : 'center'}
      fontFamily={family}
      fontSize={size}
      fontStyle={node.size === 'letter' ? '650' : '500'}
      fill={palette(node.colour)}
      // Words over hatching stay legible: a rim of the ground round each letter.
      stroke={palette('cloth')}
      strokeWidth={4}
      lineJoin="round"
      fillAfterStrokeEnabled
      wrap="none"
    />
  );
}

export function MarkerShape({ node, fit, palette }: Painted<MarkerNode>) {
  return (
    <Shape
      name={node.name}
      listening={false}
      sceneFunc={(context) => {
        const [x, y] = toPixels(fit, node.at);
        const colour = palette(node.colour);
        context.beginPath();
        if (node.shape === 'handle') context.rect(x - 4.5, y - 4.5, 9, 9);
        else if (node.shape === 'centre') {
          context.moveTo(x - 9, y);
          context.lineTo(x + 9, y);
          context.moveTo(x, y - 9);
          context.lineTo(x, y + 9);
        } else context.arc(x, y, node.shape === 'ring' ? 4 : 3.5, 0, Math.PI * 2, false);
        if (node.shape === 'handle' || node.shape === 'ring') {
          context.setAttr('fillStyle', palette('paper'));
          context.fill();
        }
        if (node.shape === 'dot') {
          context.setAttr('fillStyle', colour);
          context.fill();
        }
        context.setAttr('strokeStyle', colour);
        context.setAttr('lineWidth', 1.5);
        context.setLineDash([]);
        context.stroke();
      }}
    />
  );
}
