import { casesAsBooked } from '@/lib/domain/booking/assess-as-booked';
import type { Case, Patient } from '@/lib/domain/case/model';
import type { PlanDocument } from '@/lib/domain/plan/document';
import type { PlanState } from '@/lib/domain/plan/states';
import type { OnScanner } from './check-on-scanner';

/** A plan of the booking. While it is a draft nothing rests on it. */
export interface CheckedPlan {
  readonly state: PlanState;
  readonly version: number;
  readonly document: Pick<PlanDocument, 'scannerId' | 'patient' | 'keepClear' | 'sequences'>;
}

/** Whether a plan says what will be scanned on this scanner. */
export function planCounts(plan: CheckedPlan | undefined, scannerId: string): plan is CheckedPlan {
  return plan !== undefined && plan.state !== 'draft' && plan.document.scannerId === scannerId;
}

/** Arms that a plan raises are raised, unless they turned out not to be raisable. */
function withPlannedArms(patient: Patient, plan: CheckedPlan): Patient {
  const planned = plan.document.patient.arms.position;
  return planned === 'up' && patient.arms.position === 'down' ? { ...patient, arms: { ...patient.arms, position: 'up' } } : patient;
}

/**
 * The questions to ask the engine: the plan's own sequences where one is for use on this scanner, with today's sizes,
 * else the protocol as booked.
 */
export function assessableCases({ scanner, protocol, policy, plan }: OnScanner, patient: Patient): Case[] {
  const model = scanner.document.scanner;
  if (!planCounts(plan, scanner.id)) {
    return casesAsBooked({ patient, protocol: protocol.document, sequences: protocol.sequences, scanner: model, policy });
  }
  const planned = withPlannedArms(patient, plan);
  return plan.document.sequences.map(({ prescription, frozenKeepClear }) => ({
    patient: planned, prescription, keepClear: frozenKeepClear ?? plan.document.keepClear, scanner: model, policy,
  }));
}
