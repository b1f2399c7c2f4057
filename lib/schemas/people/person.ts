import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { ROLES } from '@/lib/domain/access';

const displayName = z
  .string()
  .trim()
  .min(1, 'Type a name.')
  .max(200, 'At most 200 characters are accepted.')
  .regex(/^\P{Cc}*$/u, 'A name has no control characters.');

const roles = z
  .array(z.enum(ROLES, `Allowed: ${ROLES.join(', ')}.`))
  .min(1, 'Choose at least one role.')
  .max(ROLES.length, 'Each role can be chosen once.');

export const invitePersonSchema = z.object({
  email: z
    .string()
    .trim()
    .min(1, 'Type the e-mail address.')
    .max(320, 'At most 320 characters are accepted.')
    .pipe(z.email('This is not an e-mail address; it needs a name, an @ and a domain.')),
  displayName,
  roles,
});
export type InvitePersonInput = z.infer<typeof invitePersonSchema>;

export const editPersonSchema = z.object({
  id: z.uuid(),
  version: z.int().min(1),
  displayName,
  roles,
});
export type EditPersonInput = z.infer<typeof editPersonSchema>;

/** For the one-click actions on a person. */
export const personIdSchema = z.object({ id: z.uuid() });
