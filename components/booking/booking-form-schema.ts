import * as z from 'zod';
import { createBookingInput } from '@/lib/schemas/booking';
import { day, refused, strict } from '@/lib/schemas/fields/fields';

const { accession, slotMinutes, scannerId, protocolId } = createBookingInput.shape;

/** As a person types it: a day and a time of day at the site. The server makes one moment of the two. */
export const bookingFormSchema = strict({
  accession,
  day: day('Day of the slot.'),
  time: z
    .string({ error: refused('a time such as 10:40') })
    .regex(/^([01]\d|2[0-3]):[0-5]\d$/, { error: refused('a time such as 10:40') })
    .describe('Start of the slot.'),
  slotMinutes,
  scannerId,
  protocolId,
});
export type BookingForm = z.output<typeof bookingFormSchema>;
