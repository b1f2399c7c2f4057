import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { passwordFault } from '@/lib/domain/people';

/** The full rule also knows the person's name and address; the service applies that part. */
const newPassword = z
  .string()
  .regex(/^\P{Cc}*$/u, 'A password has no control characters.')
  .superRefine((password, context) => {
    const fault = passwordFault(password);
    if (fault) context.addIssue({ code: 'custom', message: fault });
  });

const repeated = <T extends { newPassword: string; repeatPassword: string }>(input: T) =>
  input.newPassword === input.repeatPassword;
const NOT_REPEATED = { path: ['repeatPassword'], error: 'The two passwords differ.' };

export const setPasswordSchema = z
  .object({ token: z.string().min(1).max(200), newPassword, repeatPassword: z.string() })
  .refine(repeated, NOT_REPEATED);
export type SetPasswordInput = z.infer<typeof setPasswordSchema>;

/** What the page's form holds: the token comes from the link, not from a control. */
export const setPasswordFormSchema = z
  .object({ newPassword, repeatPassword: z.string() })
  .refine(repeated, NOT_REPEATED);

export const changePasswordSchema = z
  .object({
    currentPassword: z.string().min(1, 'Type your present password.').max(200, 'At most 200 characters are accepted.'),
    newPassword,
    repeatPassword: z.string(),
  })
  .refine(repeated, NOT_REPEATED);
export type ChangePasswordInput = z.infer<typeof changePasswordSchema>;

export const askPasswordLinkSchema = z.object({
  email: z
    .string()
    .trim()
    .min(1, 'Type your e-mail address.')
    .max(320, 'At most 320 characters are accepted.')
    .pipe(z.email('This is not an e-mail address; it needs a name, an @ and a domain.')),
});
export type AskPasswordLinkInput = z.infer<typeof askPasswordLinkSchema>;
