'use server';

import { bookingFormSchema, type BookingForm } from '@/components/booking/booking-form-schema';
import { runAction } from '@/lib/http/run-action';
import { parseInput } from '@/lib/schemas/parse-input';
import type { RecordReadings } from '@/lib/schemas/size-reading';
import { createBooking } from '@/lib/services/booking/create-booking';
import { recordReadings } from '@/lib/services/size-reading/record-readings';

export async function addBooking(form: BookingForm) {
  return runAction('add a booking', async (context) => {
    const { day, time, ...rest } = parseInput(bookingFormSchema, form);
    // Wall-clock time of the site, whose zone this server keeps.
    return createBooking(context, { ...rest, scheduledAt: new Date(`${day}T${time}:00`).toISOString() });
  });
}

export async function addReadings(bookingId: string, readings: RecordReadings['readings']) {
  return runAction('record sizes', (context) => recordReadings(context, { bookingId, readings }));
}
