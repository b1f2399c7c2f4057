import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { CONTROL_IDS, HIGHLIGHTS, SCENE_VIEWS, SCENES_MAX, type Scene, type SceneDocument } from '@/lib/domain/demonstration/scene';
import { PAPERS, type Paper, type SheetState } from '@/lib/domain/plan/sheet';
import { caseSchema } from '@/lib/schemas/case';
import { choice, count, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema, idSchema } from '@/lib/schemas/fields/ids';

export const demonstrationTitle = words(120, 'Title of the demonstration.');

const text = (max: number) =>
  z
    .string({ error: refused(`text of up to ${max} characters`) })
    .max(max, { error: refused(`text of up to ${max} characters`) })
    // The database stores no NUL in text.
    .refine((value) => !value.includes('\0'), { error: refused('text without control characters') });

const sceneShape = {
  schemaVersion: z.literal(1, { error: refused('schemaVersion 1') }),
  title: words(120, 'Title of the scene.'),
  note: text(4000).describe('For the presenter alone.'),
  question: caseSchema,
  view: choice(SCENE_VIEWS, 'View that is shown.'),
  highlight: choice(HIGHLIGHTS, 'What is painted heavier.'),
  sliceOffsetMm: quantity({ min: -1000, max: 1000, unit: 'mm', text: 'Slice or partition shown, from the FOV centre' }),
  controls: z
    .array(choice(CONTROL_IDS, 'A control the audience may move.'))
    .max(CONTROL_IDS.length)
    .refine((ids) => new Set(ids).size === ids.length, { error: refused('each control once') }),
};

export const sceneDocumentSchema = strict(sceneShape, 'One scene.') satisfies z.ZodType<SceneDocument>;
export const sceneSchema = strict({ id: idSchema, ...sceneShape }, 'One scene with its id.') satisfies z.ZodType<Scene>;

const scenes = z.array(sceneSchema).max(SCENES_MAX, { error: refused(`0 to ${SCENES_MAX} scenes`) });

/** What is typed for an empty one. */
export const newDemonstrationForm = strict({ title: demonstrationTitle });
export type NewDemonstrationForm = z.input<typeof newDemonstrationForm>;

export const createDemonstrationInput = strict({
  title: demonstrationTitle,
  setPiece: z.string({ error: refused('the key of a set piece') }).max(60).describe('Set piece to copy; left out: begin empty.').optional(),
  scene: sceneDocumentSchema.describe('First scene, taken from the bench.').optional(),
}).refine(({ setPiece, scene }) => setPiece === undefined || scene === undefined, { error: 'a set piece and a scene given; allowed: one of them' });
export interface CreateDemonstrationInput {
  readonly title: string;
  readonly setPiece?: string;
  readonly scene?: SceneDocument;
}

/** The whole demonstration as it is edited: what is not in the list any more is taken out. */
export const saveDemonstrationInput = strict({
  id: idSchema,
  expectedVersion: expectedVersionSchema,
  title: demonstrationTitle,
  scenes: scenes.refine((list) => new Set(list.map(({ id }) => id)).size === list.length, { error: refused('each scene once') }),
});
export interface SaveDemonstrationInput {
  readonly id: string;
  readonly expectedVersion: number;
  readonly title: string;
  readonly scenes: readonly Scene[];
}

export const addSceneInput = strict({ demonstrationId: idSchema, scene: sceneDocumentSchema });
export interface AddSceneInput {
  readonly demonstrationId: string;
  readonly scene: SceneDocument;
}

/** What a file of scenes holds; nothing in it names a site or a person. */
export const demonstrationFile = strict({
  format: z.literal('selvedge-demonstration', { error: refused('a file of scenes downloaded from here') }),
  schemaVersion: z.literal(1, { error: refused('schemaVersion 1') }),
  title: demonstrationTitle,
  scenes: z
    .array(sceneDocumentSchema)
    .min(1, { error: refused(`1 to ${SCENES_MAX} scenes`) })
    .max(SCENES_MAX, { error: refused(`1 to ${SCENES_MAX} scenes`) }),
});
export interface DemonstrationFile {
  readonly format: 'selvedge-demonstration';
  readonly schemaVersion: 1;
  readonly title: string;
  readonly scenes: readonly SceneDocument[];
}

/** The file as it was read: nothing is trusted before it has been parsed here. */
export const FILE_CHARACTERS_MAX = 900_000;
export const importDemonstrationInput = strict({
  text: z.string({ error: refused('a file of scenes') }).max(FILE_CHARACTERS_MAX, 'The file is larger than 900 kB; allowed: up to 40 scenes.'),
});
export type ImportDemonstrationInput = z.input<typeof importDemonstrationInput>;

export const SHARE_DAYS_MAX = 366;
export const createShareInput = strict({
  id: idSchema,
  days: count({ min: 1, max: SHARE_DAYS_MAX, unit: 'days', text: 'How long the link works' }),
});
export type CreateShareInput = z.input<typeof createShareInput>;
export const revokeShareInput = strict({ id: idSchema });

export const requestHandOutBody = strict({ paper: choice(PAPERS, 'Paper size.').default('A4') });
export const requestHandOutInput = strict({ demonstrationId: idSchema, ...requestHandOutBody.shape });
export type RequestHandOutInput = z.input<typeof requestHandOutInput>;
export const handOutParams = z.object({ id: idSchema, handOutId: idSchema });

/** Where the making of a hand-out stands. */
export interface HandOutView {
  readonly id: string;
  readonly demonstrationId: string;
  readonly paper: Paper;
  readonly state: SheetState;
  /** Tries that did not end in a file. */
  readonly attempts: number;
  readonly sizeBytes?: number;
}

export const putAwayInput = strict({ id: idSchema, away: z.boolean({ error: refused('true or false') }) });
export type PutAwayInput = z.input<typeof putAwayInput>;

export interface DemonstrationLine {
  readonly id: string;
  readonly title: string;
  readonly scenes: number;
  readonly changedAt: string;
  /** Links that work now. */
  readonly links: number;
}

export interface DemonstrationView {
  readonly id: string;
  readonly title: string;
  readonly version: number;
  readonly scenes: readonly Scene[];
}

export interface ShareLine {
  readonly id: string;
  readonly state: 'works' | 'expired' | 'revoked';
  readonly madeAt: string;
  readonly expiresAt: string;
  readonly openings: number;
  readonly lastOpenedAt: string | null;
}

/** All that a holder of a link is given. */
export interface SharedDemonstration {
  readonly title: string;
  readonly scenes: readonly Omit<Scene, 'note'>[];
}
