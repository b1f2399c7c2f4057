'use server';

import { bookingFormSchema, type BookingForm } from '@/components/booking/booking-form-schema';
import { runAction } from '@/lib/http/run-action';
import { parseInput } from '@/lib/schemas/parse-input';
import type { RecordReadings } from '@/lib/schemas/size-reading';
import { createBooking } from '@/lib/services/booking/create-booking';
import type { KeepClearRequestForm } from '@/lib/schemas/keep-clear-request';
import { requestKeepClear } from '@/lib/services/keep-clear-request/request-keep-clear';
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

export async function askKeepClear(bookingId: string, form: KeepClearRequestForm) {
  return runAction('ask for a keep-clear area', (context) => requestKeepClear(context, { ...form, bookingId }));
}
