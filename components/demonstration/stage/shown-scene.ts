import { fitScene, fromPixels, type Scene as Picture, type SceneNode } from '@/components/schematic/scene/scene';
import { sectionBounds, sectionScene } from '@/components/schematic/scene/section-scene';
import type { Highlight, Scene } from '@/lib/domain/demonstration/scene';
import { assess, drawSection } from '@/lib/physics';
import { geometryCase } from '@/lib/physics/assess/assess';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { describeSection } from '@/lib/presentation/describe-section';
import { describeSlab } from '@/lib/presentation/describe-slab';
import { slabStage } from '../slab/slab-stage';

/** A scene in anyone's hands: with or without a note. */
export type ShownScene = Omit<Scene, 'note'> & { readonly note?: string };

export interface Size {
  readonly widthPx: number;
  readonly heightPx: number;
}

/** The answer to one scene: what the engine says, or why it refuses. */
export type Answer = { readonly assessment: Assessment; readonly refusal?: undefined } | { readonly assessment?: undefined; readonly refusal: string };

/** Stage, panels and figures ask about one and the same question; it is worked out once. */
const answers = new WeakMap<Case, Answer>();

function workOut(question: Case): Answer {
  try {
    return { assessment: assess(question) };
  } catch (error) {
    if (error instanceof Error && error.name === 'DomainError') return { refusal: error.message };
    throw error;
  }
}

export function answerOf(question: Case): Answer {
  const known = answers.get(question) ?? workOut(question);
  answers.set(question, known);
  return known;
}

export interface Drawn {
  readonly picture: Picture;
  /** The same in words, for those who do not see it. */
  readonly words: readonly string[];
}

/** The section or slab of a scene as a picture of that size; null where the view does not belong to the sequence. */
export function drawScene(scene: ShownScene, { assessment }: Answer, size: Size): Drawn | null {
  if (!assessment) return null;
  const { question, view, highlight, sliceOffsetMm } = scene;
  if (view === 'slab') {
    if (!assessment.slab) return null;
    const picture = slabStage({ question, slab: assessment.slab, size, sliceOffsetMm });
    return { picture: highlighted(picture, highlight), words: describeSlab(assessment.slab) };
  }
  const drawing = drawSection(geometryCase(question), { sliceOffsetMm });
  const now = { question, drawing, asGiven: drawSection(question, { sliceOffsetMm }).tissue };
  const fit = fitScene(sectionBounds(now), size.widthPx, size.heightPx);
  const [left, top] = fromPixels(fit, [0, 0]);
  const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
  const picture = sectionScene({ ...now, bounds: { left, top, right, bottom }, mmPerPx: 1 / fit.scale });
  return {
    picture: highlighted(picture, highlight),
    words: describeSection(drawing, assessment.phaseAxis, assessment.readoutAxis),
  };
}

/** What a scene shows in words, whether it is drawn or simulated. */
export function sceneWords(scene: ShownScene, answer: Answer): readonly string[] {
  const { assessment } = answer;
  if (!assessment) return [];
  if (scene.view === 'slab') return assessment.slab ? describeSlab(assessment.slab) : [];
  const drawing = drawSection(geometryCase(scene.question), { sliceOffsetMm: scene.sliceOffsetMm });
  return describeSection(drawing, assessment.phaseAxis, assessment.readoutAxis);
}

const MATCHES: Readonly<Record<Exclude<Highlight, 'nothing'>, RegExp>> = {
  'what-wraps': /\/landed$|\/in-keep-clear$|ghost|^partitions\/alias\/(thread|ochre)|^travel|^thread$/,
  'keep-clear': /^keep-clear$/,
  'acquired-edge': /^acquired-edge/,
};

/** Painted twice as heavy; what is not meant keeps its weight, so that nothing is hidden. */
export function highlighted(picture: Picture, highlight: Highlight): Picture {
  if (highlight === 'nothing') return picture;
  const heavier = (node: SceneNode): SceneNode => {
    if ((node.kind !== 'area' && node.kind !== 'lines') || !node.stroke || !MATCHES[highlight].test(node.name)) return node;
    return { ...node, stroke: { ...node.stroke, widthPx: node.stroke.widthPx * 2, opacity: 1 } } as SceneNode;
  };
  return { ...picture, nodes: picture.nodes.map(heavier) };
}
