import * as z from 'zod';
import { noteField } from '@/lib/schemas/booking-entry';
import { count, day, refused, strict } from '@/lib/schemas/fields/fields';
import { proposeMoveInput } from '@/lib/schemas/move-proposal';
import { addSessionsInput } from '@/lib/schemas/scanner-session';

/** As a person types them: days and times of day at the site. The server makes moments of them. */
const time = (text: string) =>
  z
    .string({ error: refused('a time such as 10:40') })
    .regex(/^([01]\d|2[0-3]):[0-5]\d$/, { error: refused('a time such as 10:40') })
    .describe(text);

const { scannerId, slotMinutes, reason } = proposeMoveInput.shape;

export const moveFormSchema = strict({ scannerId, day: day('Day to move to.'), time: time('Start of the slot.'), slotMinutes, reason: reason.unwrap() });
export type MoveForm = z.output<typeof moveFormSchema>;

export const noteFormSchema = strict({ note: noteField });
export type NoteForm = z.output<typeof noteFormSchema>;

export const surgeryFormSchema = strict({ surgeryOn: z.union([z.literal(''), day('Day of the surgery.')]) });
export type SurgeryForm = z.output<typeof surgeryFormSchema>;

const sessionShape = {
  scannerId: addSessionsInput.shape.scannerId,
  day: day('Day of the session.'),
  from: time('From.'),
  to: time('To.'),
  weeks: count({ min: 1, max: 52, text: 'Weeks in a row, on the same weekday' }),
};
export const sessionFormSchema = strict(sessionShape).refine(({ from, to }) => to > from, {
  path: ['to'], error: 'not after “From”; allowed: a later time on the same day',
});
export type SessionForm = z.output<typeof sessionFormSchema>;

/** One session a week, at the same time of day whatever the clocks do. */
export function sessionsOf({ day: first, from, to, weeks }: Omit<SessionForm, 'scannerId'>): { startsAt: string; endsAt: string }[] {
  const [year, month, date] = first.split('-').map(Number) as [number, number, number];
  const at = (clock: string, week: number) => {
    const [hour, minute] = clock.split(':').map(Number) as [number, number];
    return new Date(year, month - 1, date + 7 * week, hour, minute).toISOString();
  };
  return Array.from({ length: weeks }, (_, week) => ({ startsAt: at(from, week), endsAt: at(to, week) }));
}
