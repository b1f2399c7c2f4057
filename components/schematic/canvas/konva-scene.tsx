'use client';

import type { Stage as KonvaStage } from 'konva/lib/Stage';
import { useEffect, useRef, useState } from 'react';
import { Layer, Stage } from 'react-konva/lib/ReactKonvaCore';
import type { Fit, Scene, SceneNode } from '../scene/scene';
import { AreaShape, LinesShape, MarkerShape, TextShape } from './konva-nodes';
import { useTokens } from './use-tokens';

export interface KonvaSceneProps {
  readonly scene: Scene;
  readonly fit: Fit;
  readonly widthPx: number;
  readonly heightPx: number;
  /** While something is dragged nothing slides in. */
  readonly still: boolean;
  readonly onHover?: (name: string | null) => void;
}

declare global {
  interface Window {
    /** The stages on this page by name: journeys read the scene's nodes instead of comparing pixels. */
    selvedgeStages?: Record<string, KonvaStage>;
  }
}

export default function KonvaScene({ name, ...props }: KonvaSceneProps & { name: string }) {
  const { palette } = useTokens();
  const stage = useRef<KonvaStage>(null);
  // Asked once: a computed style at every frame of a drag would lay the page out again before it is painted.
  const [family] = useState(() => getComputedStyle(document.body).fontFamily);
  const reduced = window.matchMedia('(prefers-reduced-motion: reduce)').matches;
  const still = props.still || reduced;

  useEffect(() => {
    const mine = stage.current;
    if (!mine) return;
    window.selvedgeStages = { ...window.selvedgeStages, [name]: mine };
    return () => {
      if (window.selvedgeStages?.[name] === mine) delete window.selvedgeStages[name];
    };
  }, [name]);

  // Text drawn before the fonts arrive would keep the fallback's shapes.
  useEffect(() => {
    let gone = false;
    void document.fonts.ready.then(() => {
      if (!gone) stage.current?.batchDraw();
    });
    return () => {
      gone = true;
    };
  }, []);

  const paint = (node: SceneNode) => {
    const common = { fit: props.fit, palette };
    switch (node.kind) {
      case 'area':
        return <AreaShape key={node.name} node={node} still={still} onHover={props.onHover} {...common} />;
      case 'lines':
        return <LinesShape key={node.name} node={node} still={still} {...common} />;
      case 'text':
        return <TextShape key={node.name} node={node} family={family} {...common} />;
      case 'marker':
        return <MarkerShape key={node.name} node={node} {...common} />;
    }
  };

  return (
    <Stage ref={stage} width={props.widthPx} height={props.heightPx}>
      {/* Nothing is hovered while a handle is held: then the second canvas, which finds what is, need not be painted. */}
      <Layer listening={!props.still}>{props.scene.nodes.map(paint)}</Layer>
    </Stage>
  );
}
