import { onScanner } from '@/lib/domain/case/lines';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Scanner } from '@/lib/physics/model/scanner';
import type { BenchView } from '@/lib/schemas/booking';
import type { PlanInput, PlanView } from '@/lib/schemas/plan';
import type { ProtocolView } from '@/lib/schemas/protocol';
import { assumedPatient } from '../free-patient';
import type { Results } from '../live/results';
import type { BenchDocument } from './bench-document';
import { isAbout } from './case-of';

/** What a plan rests on besides what is edited: named by id and version, never sent whole. */
export interface PlanBasis {
  readonly bookingId: string | null;
  readonly scannerId: string;
  readonly scannerVersion: number;
  readonly protocolId: string | null;
  readonly protocolVersion: number;
  readonly policyVersion: number;
}

type PlannedParts = Pick<PlanView, 'patient' | 'keepClear' | 'scanner' | 'sequences'>;

export function documentOfPlan({ patient, keepClear, scanner, sequences }: PlannedParts): BenchDocument {
  return {
    patient,
    keepClear,
    scanner,
    sequences: sequences.map(({ id, prescription, frozenKeepClear, adopted }) => ({
      id,
      prescription,
      ...(frozenKeepClear ? { frozenKeepClear } : {}),
      adopted,
    })),
  };
}

/** The newest plan of a booking, else its protocol laid over its size record; null while sizes are missing. */
export function documentOfBooking(view: BenchView): BenchDocument | null {
  const { plan, sizeRecord, protocol, scanner, requested } = view;
  if (plan) return documentOfPlan({ ...plan, scanner: scanner.scanner });
  if (!sizeRecord.patient) return null;
  return {
    patient: sizeRecord.patient,
    // What a radiologist asked for goes before what the protocol starts from.
    keepClear: requested?.keepClear ?? protocol.keepClear,
    scanner: scanner.scanner,
    sequences: protocol.sequences.map(({ id, prescription }) => ({ id, prescription, adopted: [] })),
  };
}

export function basisOfBooking({ booking, scanner, protocol, policy, plan }: BenchView): PlanBasis {
  return {
    bookingId: booking.id,
    scannerId: scanner.id,
    scannerVersion: scanner.version,
    // A plan keeps the protocol version it began with; scanner and policy are today's.
    protocolId: plan ? plan.protocolId : protocol.id,
    protocolVersion: plan ? plan.protocolVersion : protocol.version,
    policyVersion: policy.version,
  };
}

/** The protocol's own prescriptions on this scanner, by sequence: what a changed one can go back to. */
export function prescriptionsOf({ sequences }: Pick<ProtocolView, 'sequences'>, scanner: Scanner): Record<string, Prescription> {
  return Object.fromEntries(sequences.map(({ id, prescription }) => [id, onScanner(prescription, scanner)]));
}

/** A bench without a booking: a protocol on a scanner, over a body that is assumed until it is typed. */
export function documentOfProtocol(protocol: ProtocolView, scanner: Scanner): BenchDocument {
  return {
    patient: assumedPatient(protocol.region),
    keepClear: protocol.keepClear,
    scanner,
    sequences: protocol.sequences.map(({ id, prescription }) => ({
      id,
      prescription: onScanner(prescription, scanner),
      adopted: [],
    })),
  };
}

/**
 * What is sent to be saved, with what the bench showed, so that the server can say where its own answer differs. An
 * answer to what stood there before, while the newer one is on its way, is nothing the bench showed of this.
 */
export function planInputOf(document: BenchDocument, basis: PlanBasis, results: Results): PlanInput {
  return {
    ...basis,
    patient: document.patient,
    keepClear: document.keepClear,
    sequences: document.sequences.map((sequence) => {
      const { question, assessment } = results[sequence.id] ?? {};
      const shown = question && isAbout(question, document, sequence) ? assessment : undefined;
      return {
        ...sequence,
        adopted: [...sequence.adopted],
        ...(shown ? { seen: seenOf(shown) } : {}),
      };
    }),
    note: '',
  } as PlanInput;
}

function seenOf({ verdict, time }: NonNullable<Results[string]['assessment']>) {
  return { verdict, ...(time ? { scanS: Math.round(time.scanS * 10) / 10 } : {}) };
}
