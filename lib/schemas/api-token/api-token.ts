import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { SCOPES } from '@/lib/domain/access';

export const TOKEN_DAYS_MAX = 366;
export const TOKEN_DAYS_CHOICES = [30, 90, 180, 366] as const;

export const createApiTokenSchema = z.object({
  name: z
    .string()
    .trim()
    .min(1, 'Type a name that says which system holds the token.')
    .max(200, 'At most 200 characters are accepted.')
    .regex(/^\P{Cc}*$/u, 'A name has no control characters.'),
  scopes: z
    .array(z.enum(SCOPES, `Allowed: ${SCOPES.join(', ')}.`))
    .min(1, 'Choose at least one thing the token may do.')
    .max(SCOPES.length),
  days: z
    .int('Give whole days.')
    .min(1, `Give 1 to ${TOKEN_DAYS_MAX} days.`)
    .max(TOKEN_DAYS_MAX, `Give 1 to ${TOKEN_DAYS_MAX} days.`),
});
export type CreateApiTokenInput = z.infer<typeof createApiTokenSchema>;

export const apiTokenIdSchema = z.object({ id: z.uuid() });
