import type { Case } from '@/lib/domain/case/model';
import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

export const SCENE_VIEWS = ['section', 'slab', 'picture'] as const;
export type SceneView = (typeof SCENE_VIEWS)[number];

/** What a scene draws the eye to; painted heavier, the rest stays as it is. */
export const HIGHLIGHTS = ['nothing', 'what-wraps', 'keep-clear', 'acquired-edge'] as const;
export type Highlight = (typeof HIGHLIGHTS)[number];

/** What the people in front may move; each is one value of the case (see controls.ts). */
export const CONTROL_IDS = [
  'phase-oversampling',
  'phase-fov',
  'phase-direction',
  'averages',
  'depth',
  'arms',
  'offset',
  'unfolding',
  'slab-thickness',
  'partitions',
  'slice-oversampling',
  'pulse-sharpness',
  'flip',
  'selective',
] as const;
export type ControlId = (typeof CONTROL_IDS)[number];

export const SCENES_MAX = 40;

/** One scene as it is stored: a whole case in the engine's form, with what is said and shown about it. */
export interface SceneDocument {
  readonly schemaVersion: 1;
  readonly title: string;
  /** For the presenter alone; never leaves by a shared link. */
  readonly note: string;
  readonly question: Case;
  readonly view: SceneView;
  readonly highlight: Highlight;
  /** Which slice or partition, from the FOV centre along the slice axis, mm. */
  readonly sliceOffsetMm: number;
  readonly controls: readonly ControlId[];
}

export interface Scene extends SceneDocument {
  readonly id: string;
}

const UPCASTS: Upcasts = {};

export function readSceneDocument(stored: unknown): SceneDocument {
  return readDocument<SceneDocument>(stored, 1, UPCASTS);
}

/** Scenes in the hands of people without an account: no note, no id of a row, no names of scanner, coil or protocol. */
export function withoutPrivateParts(scenes: readonly Scene[]): readonly Omit<Scene, 'note'>[] {
  return scenes.map(({ note: _note, id: _id, question, ...rest }, index) => ({
    ...rest,
    id: `scene-${index + 1}`,
    question: nameless(question),
  }));
}

/** The same case without what names a scanner, a coil or a site's own words. */
export function nameless(question: Case): Case {
  const { scanner, prescription, keepClear, policy } = question;
  const { coils: _coils, ...bare } = scanner;
  const { coilElements: _elements, ...sequence } = prescription;
  const { area } = keepClear;
  return {
    ...question,
    scanner: { ...bare, name: 'Scanner' },
    // A protocol's own name for a sequence can name a place or a person; its family says what it is.
    prescription: { ...sequence, name: sequence.family, coil: 'coil' },
    keepClear: area.kind === 'box' ? { ...keepClear, area: { kind: 'box', box: area.box } } : keepClear,
    policy: { ...policy, version: 1 },
  };
}
