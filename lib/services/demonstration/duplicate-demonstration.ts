import { authorise } from '@/lib/domain/access';
import { idParams } from '@/lib/schemas/fields/ids';
import { parseInput } from '@/lib/schemas/parse-input';
import type { ServiceContext } from '../context';
import { storeDemonstration } from './create-demonstration';
import { getDemonstration } from './get-demonstration';

/** The database takes no longer title. */
const TITLE_MAX = 120;
const COPY = ' (copy)';

/** The same scenes under new ids; its links stay with the one they were made for. */
export async function duplicateDemonstration(context: ServiceContext, input: { readonly id: string }): Promise<{ id: string }> {
  authorise(context.actor, 'demonstration.edit');
  const { id } = parseInput(idParams, input);
  const { title, scenes } = await getDemonstration(context, { id });
  return storeDemonstration(
    context,
    `${title.slice(0, TITLE_MAX - COPY.length)}${COPY}`,
    scenes.map(({ id: _id, ...document }) => document),
  );
}
