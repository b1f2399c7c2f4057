import { authorise } from '@/lib/domain/access';
import { captureCase } from '@/lib/domain/demonstration/capture';
import { nameless } from '@/lib/domain/demonstration/scene';
import { invalidField } from '@/lib/domain/errors';
import { type DemonstrationFile, demonstrationFile, type ImportDemonstrationInput, importDemonstrationInput } from '@/lib/schemas/demonstration';
import { parseInput } from '@/lib/schemas/parse-input';
import type { ServiceContext } from '../context';
import { storeDemonstration } from './create-demonstration';
import { getDemonstration } from './get-demonstration';

/** All scenes as a file for another site: notes stay, since a colleague presents from them; names of equipment do not. */
export async function exportDemonstration(context: ServiceContext, input: { readonly id: string }): Promise<DemonstrationFile> {
  const { title, scenes } = await getDemonstration(context, input);
  return {
    format: 'selvedge-demonstration',
    schemaVersion: 1,
    title,
    scenes: scenes.map(({ id: _id, ...document }) => ({ ...document, question: nameless(document.question) })),
  };
}

/** A new demonstration from a file; a value that is not allowed is named and nothing is stored. */
export async function importDemonstration(context: ServiceContext, input: ImportDemonstrationInput): Promise<{ id: string }> {
  authorise(context.actor, 'demonstration.edit');
  const { text } = parseInput(importDemonstrationInput, input);
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch {
    throw invalidField('text', 'This file is not JSON; allowed: a file of scenes downloaded from a demonstration.');
  }
  const file = parseInput(demonstrationFile, json);
  return storeDemonstration(
    context,
    file.title,
    file.scenes.map((scene) => ({ ...scene, question: captureCase(scene.question) })),
  );
}
