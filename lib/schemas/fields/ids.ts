import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { refused } from '@/lib/schemas/fields/fields';

export const idSchema = z.uuid({ error: refused('an id as this product writes it') }).describe('Record id.');

/** The version the writer saw; another one stored means someone else was faster. */
export const expectedVersionSchema = z
  .int({ error: refused('the version that was read') })
  .min(0, { error: refused('the version that was read') })
  .describe('Version the change was made on.');

/** Path parameters of every route about one record. */
export const idParams = z.object({ id: idSchema });
