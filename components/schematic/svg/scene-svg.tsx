'use client';

// React streams what a server component puts inside an <svg> with a style attribute of its own, which the content
// security policy refuses; rendered from plain props it comes in one piece.
import { EDGE_DASH } from '../scene/edge-dash';
import { fitScene, toPixels, type Fit, type Scene, type SceneNode, type Stroke, type Token } from '../scene/scene';
import type { ScreenPoint } from '../scene/section-frame';

export type Ground = 'theme' | 'paper';

/** On paper everything is black on white: hatching and edges carry what colour carries on the screen. */
export const ON_PAPER: Readonly<Record<Token, string>> = {
  cloth: 'white',
  paper: 'white',
  ink: 'black',
  'ink-soft': 'black',
  'line-strong': 'black',
  indigo: 'black',
  wash: 'white',
  thread: 'black',
  'thread-wash': 'white',
  ochre: 'black',
  'ochre-wash': 'white',
  'tissue-fat': 'white',
  'tissue-lean': 'white',
  'tissue-organ': 'white',
  'tissue-gland': 'white',
  'tissue-vessel': 'white',
  'tissue-bone': 'white',
};

function colourOf(token: Token, ground: Ground): string {
  return ground === 'paper' ? ON_PAPER[token] : `var(--${token})`;
}

export function pathOf(lines: readonly (readonly ScreenPoint[])[], fit: Fit, close: boolean): string {
  return lines
    .filter((line) => line.length > 1)
    .map((line) => {
      const points = line.map((point) => toPixels(fit, point).map((value) => value.toFixed(1)).join(' '));
      return `M${points.join('L')}${close ? 'Z' : ''}`;
    })
    .join('');
}

function strokeOf(stroke: Stroke, ground: Ground) {
  return {
    stroke: colourOf(stroke.colour, ground),
    strokeWidth: stroke.widthPx,
    strokeOpacity: ground === 'paper' ? undefined : stroke.opacity,
    strokeDasharray: EDGE_DASH[stroke.edge].join(' ') || undefined,
    strokeLinecap: stroke.edge === 'dotted' ? ('round' as const) : undefined,
    strokeLinejoin: 'round' as const,
  };
}

function SvgNode({ node, fit, ground }: { node: SceneNode; fit: Fit; ground: Ground }) {
  switch (node.kind) {
    case 'area':
      return (
        <path
          data-node={node.name}
          d={pathOf(node.rings, fit, true)}
          fillRule="evenodd"
          fill={node.fill ? colourOf(node.fill, ground) : 'none'}
          fillOpacity={ground === 'paper' ? 1 : node.fillOpacity}
          {...(node.stroke ? strokeOf(node.stroke, ground) : {})}
        />
      );
    case 'lines':
      return (
        <path data-node={node.name} d={pathOf(node.lines, fit, false)} fill="none" {...strokeOf(node.stroke, ground)} />
      );
    case 'text': {
      const [x, y] = toPixels(fit, node.at);
      return (
        <text
          data-node={node.name}
          x={x + node.offsetPx[0]}
          y={y + node.offsetPx[1]}
          textAnchor={node.anchor}
          fontSize={node.size === 'letter' ? 19 : 14}
          fontWeight={node.size === 'letter' ? 650 : 500}
          fill={colourOf(node.colour, ground)}
          stroke={colourOf('cloth', ground)}
          strokeWidth={4}
          strokeLinejoin="round"
          paintOrder="stroke"
        >
          {node.text}
        </text>
      );
    }
    case 'marker': {
      const [x, y] = toPixels(fit, node.at);
      const stroke = colourOf(node.colour, ground);
      if (node.shape === 'handle' || node.shape === 'centre') return null; // Nothing to take hold of on paper.
      const fill = node.shape === 'dot' ? stroke : colourOf('paper', ground);
      return <circle data-node={node.name} cx={x} cy={y} r={4} fill={fill} stroke={stroke} strokeWidth={1.5} />;
    }
  }
}

/**
 * What only tints says nothing in black and white: the sketch under tissue, and the band between two outlines that are
 * both drawn, which would print as one thick black line.
 */
export function onPaper(node: SceneNode): boolean {
  return node.name !== 'outside-the-picture' && !node.name.startsWith('sketch/') && !/^tissue\/.*\/band$/.test(node.name);
}

/** The same scene as the canvas, for the sheet, print and shared pages. */
export function SceneSvg({
  scene,
  label,
  widthPx,
  heightPx,
  ground = 'theme',
  className,
}: {
  scene: Scene;
  label: string;
  widthPx: number;
  heightPx: number;
  ground?: Ground;
  className?: string;
}) {
  const fit = fitScene(scene.bounds, widthPx, heightPx);
  const nodes = ground === 'paper' ? scene.nodes.filter(onPaper) : scene.nodes;
  return (
    <svg viewBox={`0 0 ${widthPx} ${heightPx}`} role="img" aria-label={label} className={className}>
      {/* Black on white wherever it is shown: in a dark room a sheet is looked at on a screen first. */}
      {ground === 'paper' && <rect width={widthPx} height={heightPx} fill="white" />}
      {nodes.map((node) => (
        <SvgNode key={node.name} node={node} fit={fit} ground={ground} />
      ))}
    </svg>
  );
}
