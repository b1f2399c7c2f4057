import { Circle, Path, Svg, Text } from '@react-pdf/renderer';
import { EDGE_DASH } from '../scene/edge-dash';
import { fitScene, toPixels, type Fit, type Scene, type SceneNode, type Stroke } from '../scene/scene';
import { ON_PAPER, onPaper, pathOf } from '../svg/scene-svg';

function strokeOf(stroke: Stroke) {
  const dash = EDGE_DASH[stroke.edge].join(' ');
  return {
    stroke: ON_PAPER[stroke.colour],
    strokeWidth: stroke.widthPx,
    ...(dash ? { strokeDasharray: dash } : {}),
    ...(stroke.edge === 'dotted' ? { strokeLineCap: 'round' as const } : {}),
    strokeLineJoin: 'round' as const,
  };
}

function PdfNode({ node, fit, font }: { node: SceneNode; fit: Fit; font: string }) {
  switch (node.kind) {
    case 'area': {
      const path = pathOf(node.rings, fit, true);
      if (!path) return null;
      return (
        <Path
          d={path}
          fillRule="evenodd"
          fill={node.fill ? ON_PAPER[node.fill] : 'none'}
          {...(node.stroke ? strokeOf(node.stroke) : {})}
        />
      );
    }
    case 'lines': {
      const path = pathOf(node.lines, fit, false);
      return path ? <Path d={path} fill="none" {...strokeOf(node.stroke)} /> : null;
    }
    case 'text': {
      const [x, y] = toPixels(fit, node.at);
      return (
        <Text
          x={x + node.offsetPx[0]}
          y={y + node.offsetPx[1]}
          textAnchor={node.anchor}
          style={{ fontFamily: font, fontSize: node.size === 'letter' ? 19 : 14, fontWeight: node.size === 'letter' ? 700 : 400 }}
        >
          {node.text}
        </Text>
      );
    }
    case 'marker': {
      if (node.shape === 'handle' || node.shape === 'centre') return null; // Nothing to take hold of on paper.
      const [x, y] = toPixels(fit, node.at);
      return <Circle cx={x} cy={y} r={4} fill={node.shape === 'dot' ? 'black' : 'white'} stroke="black" strokeWidth={1.5} />;
    }
  }
}

/** The same scene as canvas and sheet, black on white, for a PDF page. */
export function ScenePdf({ scene, widthPx, heightPx, font, width }: {
  scene: Scene;
  widthPx: number;
  heightPx: number;
  /** Registered family of its letters. */
  font: string;
  /** On the page, points. */
  width: number;
}) {
  const fit = fitScene(scene.bounds, widthPx, heightPx);
  return (
    <Svg viewBox={`0 0 ${widthPx} ${heightPx}`} style={{ width, height: (width * heightPx) / widthPx }}>
      {scene.nodes.filter(onPaper).map((node) => (
        <PdfNode key={node.name} node={node} fit={fit} font={font} />
      ))}
    </Svg>
  );
}
