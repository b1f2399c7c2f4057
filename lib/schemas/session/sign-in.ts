import '@/lib/schemas/fields/jitless';
import * as z from 'zod';

/** Typed at sign-in. Long input is cut off here, before it costs anything. */
export const signInSchema = z.object({
  email: z
    .string()
    .trim()
    .min(1, 'Type your e-mail address.')
    .max(320, 'At most 320 characters are accepted.')
    .regex(/^[^\s@\p{Cc}]+@[^\s@\p{Cc}]+$/u, 'This is not an e-mail address; it needs a name, an @ and a domain.'),
  password: z
    .string()
    .min(1, 'Type your password.')
    .max(200, 'At most 200 characters are accepted.')
    .regex(/^\P{Cc}*$/u, 'A password has no control characters.'),
});

export type SignInInput = z.infer<typeof signInSchema>;
