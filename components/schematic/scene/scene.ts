import type { ScreenPoint } from './section-frame';

/** Names of the colour tokens (CSS custom properties without the dashes). No colour value appears in a scene. */
export type Token =
  | 'cloth'
  | 'paper'
  | 'ink'
  | 'ink-soft'
  | 'line-strong'
  | 'indigo'
  | 'wash'
  | 'thread'
  | 'thread-wash'
  | 'ochre'
  | 'ochre-wash'
  | 'tissue-fat'
  | 'tissue-lean'
  | 'tissue-organ'
  | 'tissue-gland'
  | 'tissue-vessel'
  | 'tissue-bone';

export type Ring = readonly ScreenPoint[];
/** Measured is solid, estimated dotted, an uncertain place dashed. */
export type EdgeStyle = 'solid' | 'dotted' | 'dashed';

export interface Stroke {
  readonly colour: Token;
  /** Screen pixels, so that a line keeps its weight at every zoom. */
  readonly widthPx: number;
  readonly edge: EdgeStyle;
  readonly opacity?: number;
}

interface Named {
  /** Stable: tests and hover find a node by it. */
  readonly name: string;
}

/** Closed outlines filled by the even-odd rule. */
export interface AreaNode extends Named {
  readonly kind: 'area';
  readonly rings: readonly Ring[];
  readonly fill?: Token;
  readonly fillOpacity?: number;
  readonly stroke?: Stroke;
  /** A piece that can be hovered; its name is what gets the focus. */
  readonly hover?: string;
  /** Where it comes from, mm on the screen: painted sliding in from there once, when it first appears. */
  readonly slideFrom?: ScreenPoint;
}

export interface LinesNode extends Named {
  readonly kind: 'lines';
  readonly lines: readonly (readonly ScreenPoint[])[];
  readonly stroke: Stroke;
  readonly slideFrom?: ScreenPoint;
}

export interface TextNode extends Named {
  readonly kind: 'text';
  readonly text: string;
  readonly at: ScreenPoint;
  /** Moves the text off its point, screen pixels. */
  readonly offsetPx: ScreenPoint;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly size: 'note' | 'letter';
  readonly colour: Token;
}

export interface MarkerNode extends Named {
  readonly kind: 'marker';
  readonly at: ScreenPoint;
  readonly shape: 'dot' | 'ring' | 'handle' | 'centre';
  readonly colour: Token;
}

export type SceneNode = AreaNode | LinesNode | TextNode | MarkerNode;

export interface Bounds {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** A picture as data: canvas, sheet and share page paint the same one. Later nodes lie on top. */
export interface Scene {
  readonly bounds: Bounds;
  readonly nodes: readonly SceneNode[];
}

/** Bare mm → pixels: one scale, both ways. */
export interface Fit {
  readonly scale: number;
  readonly x: number;
  readonly y: number;
}

export function fitScene(bounds: Bounds, widthPx: number, heightPx: number): Fit {
  const width = Math.max(1, bounds.right - bounds.left);
  const height = Math.max(1, bounds.bottom - bounds.top);
  const scale = Math.max(0.01, Math.min(widthPx / width, heightPx / height));
  return {
    scale,
    x: widthPx / 2 - (scale * (bounds.left + bounds.right)) / 2,
    y: heightPx / 2 - (scale * (bounds.top + bounds.bottom)) / 2,
  };
}

export function toPixels(fit: Fit, [u, v]: ScreenPoint): ScreenPoint {
  return [fit.x + u * fit.scale, fit.y + v * fit.scale];
}

export function fromPixels(fit: Fit, [x, y]: ScreenPoint): ScreenPoint {
  return [(x - fit.x) / fit.scale, (y - fit.y) / fit.scale];
}
