import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { refused, strict } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

/** Never repeats what was typed: an address belongs in no message. */
const address = z
  .string()
  .trim()
  .max(254, { error: 'allowed: an address of up to 254 characters' })
  .refine((text) => z.email().safeParse(text).success, { error: 'Not an e-mail address; allowed: name@example.org' });

export const askSizeInput = strict({
  bookingId: idSchema,
  /** Absent: the link is handed over by other means. */
  address: address.optional(),
});
export type AskSize = z.output<typeof askSizeInput>;

export const sendSizeRequestInput = strict({ id: idSchema, address: address.optional() });

const typed = (text: string) => z.number({ error: `${text} is needed, as a number` }).min(0, { error: 'more than 0, please' }).max(5000, { error: 'This is too large.' });

/** The form of the page, in the writer's units. */
export const sizeAnswerInput = strict({
  units: z.enum(['metric', 'imperial'], { error: refused('metric or imperial') }),
  weight: typed('Your weight'),
  height: typed('Your height'),
  heightFeet: typed('Your height in feet').optional(),
  girth: typed('The length round your body'),
  depth: typed('The depth').optional(),
  sex: z.enum(['female', 'male'], { error: refused('female or male') }).optional(),
  arms: z.enum(['up', 'cannot-be-raised'], { error: refused('one of the answers') }).optional(),
  breathHoldS: typed('The time').optional(),
  /** Set once the writer has been asked about what looks unusual. */
  confirmed: z.boolean({ error: refused('yes or no') }),
});
export type SizeAnswer = z.output<typeof sizeAnswerInput>;

export interface SizeRequestView {
  readonly id: string;
  readonly status: 'open' | 'answered' | 'cancelled' | 'expired';
  readonly askedAt: string;
  readonly expiresAt: string;
  readonly settledAt?: string;
  readonly sentCount: number;
  readonly lastSentAt?: string;
  /** Where it goes, masked; absent: handed over by copying. */
  readonly addressMasked?: string;
  /** Of the newest mail: on its way, handed to the mail server, or not accepted there. */
  readonly mail?: { readonly status: 'queued' | 'sent' | 'failed'; readonly problem?: string };
}

/** What a stranger with the link may see. */
export interface SizeFormView {
  readonly siteName: string;
  readonly expiresAt: string;
}
