import { scanMinutes, worstVerdict, type BookingState } from '@/lib/domain/booking/booking';
import { onScanner } from '@/lib/domain/case/lines';
import type { Assessment, Case, KeepClear, Patient, Prescription, Scanner, Side, SitePolicy } from '@/lib/domain/case/model';
import { keepClearOfPreset } from '@/lib/domain/protocol/keep-clear-presets';
import type { ProtocolDocument, SequenceRecord } from '@/lib/domain/protocol/document';
import { assess } from '@/lib/physics';

/** The protocol's keep-clear area in this patient: a preset follows the body's size, a typed box does not. */
export function keepClearFor(protocol: Pick<ProtocolDocument, 'keepClear' | 'keepClearPreset'>, patient: Patient): KeepClear {
  const extents = Object.fromEntries(
    Object.entries(patient.extents).map(([side, reading]) => [side, reading.value]),
  ) as Record<Side, number>;
  return keepClearOfPreset(protocol.keepClearPreset, extents) ?? protocol.keepClear;
}

interface Booked {
  readonly patient: Patient;
  readonly protocol: Pick<ProtocolDocument, 'keepClear' | 'keepClearPreset'>;
  readonly sequences: readonly Pick<SequenceRecord, 'prescription'>[];
  readonly scanner: Scanner;
  readonly policy: SitePolicy;
}

/** The question of every sequence as it is booked, on the scanner's own step. */
export function casesAsBooked({ patient, protocol, sequences, scanner, policy }: Booked): Case[] {
  const keepClear = keepClearFor(protocol, patient);
  return sequences.map(({ prescription }: { readonly prescription: Prescription }) => ({
    patient,
    prescription: onScanner(prescription, scanner),
    keepClear,
    scanner,
    policy,
  }));
}

export function assessAsBooked(booked: Booked): Assessment[] {
  return casesAsBooked(booked).map((question) => assess(question));
}

/** What lists show of these assessments. */
export function stateOfAssessments(assessments: readonly Assessment[]): BookingState {
  const verdict = worstVerdict(assessments);
  return {
    ...(verdict ? { verdict } : {}),
    minutesNeeded: Math.round(scanMinutes(assessments) * 100) / 100,
  };
}
