import type { Scanner, SitePolicy } from '@/lib/domain/case/model';
import type { PlanRecord } from '@/lib/domain/plan/plan';
import { needsSignOff } from '@/lib/domain/plan/transitions';
import type { PlanView } from '@/lib/schemas/plan';

/** @param rests the scanner and policy of the versions the plan was worked out with */
export function toPlanView(plan: PlanRecord, rests: { readonly scanner: Scanner; readonly policy: SitePolicy }): PlanView {
  const { document, result, signOff } = plan;
  return {
    id: plan.id,
    shortCode: plan.shortCode,
    bookingId: plan.bookingId,
    accession: plan.accession,
    state: plan.state,
    version: plan.version,
    currentVersion: plan.currentVersion,
    newerVersionExists: plan.version < plan.currentVersion,
    scannerId: document.scannerId,
    scannerVersion: document.scannerVersion,
    scanner: rests.scanner,
    protocolId: document.protocolId,
    protocolVersion: document.protocolVersion,
    policy: rests.policy,
    patient: document.patient,
    keepClear: document.keepClear,
    sequences: document.sequences,
    results: result.assessments,
    differences: result.differences,
    engineVersion: plan.engineVersion,
    inputHash: plan.inputHash,
    note: plan.note,
    savedAt: plan.savedAt.toISOString(),
    savedBy: plan.savedBy,
    needsSignOff: needsSignOff(result.assessments, rests.policy),
    ...(signOff ? { signOff: { ...signOff, at: signOff.at.toISOString() } } : {}),
  };
}
