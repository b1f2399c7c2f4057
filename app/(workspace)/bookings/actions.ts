'use server';

import { bookingFormSchema, type BookingForm } from '@/components/booking/booking-form-schema';
import { moveFormSchema, sessionFormSchema, sessionsOf, type MoveForm, type NoteForm, type SessionForm, type SurgeryForm } from '@/components/booking/coordinator-forms';
import { atClock } from '@/lib/domain/site/local-day';
import { runAction } from '@/lib/http/run-action';
import { parseInput } from '@/lib/schemas/parse-input';
import type { RecordReadings } from '@/lib/schemas/size-reading';
import { addNote, decideBooking, escalateBooking, setSurgeryDay } from '@/lib/services/booking-entry/write-entry';
import { createBooking } from '@/lib/services/booking/create-booking';
import type { KeepClearRequestForm } from '@/lib/schemas/keep-clear-request';
import { requestKeepClear } from '@/lib/services/keep-clear-request/request-keep-clear';
import { proposeMove } from '@/lib/services/move-proposal/propose-move';
import { proposeMoves } from '@/lib/services/move-proposal/propose-moves';
import { withdrawMove } from '@/lib/services/move-proposal/withdraw-move';
import { recheckBookings } from '@/lib/services/pre-check/recheck-bookings';
import { addSessions, removeSession } from '@/lib/services/scanner-session/change-sessions';
import { recordReadings } from '@/lib/services/size-reading/record-readings';

export async function addBooking(form: BookingForm) {
  return runAction('add a booking', async (context) => {
    const { day, time, ...rest } = parseInput(bookingFormSchema, form);
    return createBooking(context, { ...rest, scheduledAt: atClock(day, time).toISOString() });
  });
}

export async function addReadings(bookingId: string, readings: RecordReadings['readings']) {
  return runAction('record sizes', (context) => recordReadings(context, { bookingId, readings }));
}

export async function askKeepClear(bookingId: string, form: KeepClearRequestForm) {
  return runAction('ask for a keep-clear area', (context) => requestKeepClear(context, { ...form, bookingId }));
}

export async function recheckChosen(bookingIds: string[]) {
  return runAction('check bookings again', (context) => recheckBookings(context, { bookingIds }));
}

export async function proposeChosen(bookingIds: string[]) {
  return runAction('propose moves', (context) => proposeMoves(context, { bookingIds }));
}

export async function proposePlace(bookingId: string, form: MoveForm) {
  return runAction('propose a move', (context) => {
    const { day, time, ...rest } = parseInput(moveFormSchema, form);
    return proposeMove(context, { bookingId, ...rest, scheduledAt: atClock(day, time).toISOString() });
  });
}

export async function withdrawPlace(bookingId: string) {
  return runAction('take a proposed move back', (context) => withdrawMove(context, { bookingId }));
}

export async function noteBooking(bookingId: string, form: NoteForm) {
  return runAction('write a note', (context) => addNote(context, { bookingId, note: form.note }));
}

export async function askLead(bookingId: string, form: NoteForm) {
  return runAction('ask a lead', (context) => escalateBooking(context, { bookingId, note: form.note }));
}

export async function decideAsLead(bookingId: string, form: NoteForm) {
  return runAction('decide about a booking', (context) => decideBooking(context, { bookingId, note: form.note }));
}

export async function setSurgery(bookingId: string, form: SurgeryForm) {
  return runAction('set the day of surgery', (context) => setSurgeryDay(context, { bookingId, surgeryOn: form.surgeryOn }));
}

export async function addScannerSessions(form: SessionForm) {
  return runAction('enter sessions', (context) => {
    const { scannerId, ...when } = parseInput(sessionFormSchema, form);
    return addSessions(context, { scannerId, sessions: sessionsOf(when) });
  });
}

export async function removeScannerSession(id: string) {
  return runAction('remove a session', (context) => removeSession(context, { id }));
}
