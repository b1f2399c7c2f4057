import * as z from 'zod';
import { idSchema } from '@/lib/schemas/fields/ids';

const place = z.tuple([z.iso.datetime(), idSchema]);

interface BookingPlace {
  readonly scheduledAt: Date;
  readonly id: string;
}

/** Where a booking stands in a list by time, as the end of one page and the start of the next. */
export const writePlace = ({ scheduledAt, id }: BookingPlace): string => `${scheduledAt.toISOString()}_${id}`;

/** The place a page wrote; undefined for any other text, days that no calendar has among them. */
export function readPlace(text: string | undefined): BookingPlace | undefined {
  const { data } = place.safeParse(text?.split('_'));
  return data && { scheduledAt: new Date(data[0]), id: data[1] };
}
