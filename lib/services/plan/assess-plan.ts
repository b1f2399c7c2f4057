import type { Assessment, Case, Scanner, SitePolicy } from '@/lib/domain/case/model';
import type { PlanDifference, PlanDocument, PlanResultDocument } from '@/lib/domain/plan/document';
import { assess } from '@/lib/physics';
import type { PlanInput } from '@/lib/schemas/plan';
import { canonicalJson, inputHash } from '../check/input-hash';

export interface AssessedPlan {
  readonly document: PlanDocument;
  readonly result: PlanResultDocument;
  readonly engineVersion: string;
  readonly inputHash: string;
}

interface Today {
  readonly scannerVersion: number;
  readonly scanner: Scanner;
  readonly policyVersion: number;
  readonly policy: SitePolicy;
}

/** The bench shows tenths of a second; anything beyond half of one is a real difference. */
const SAME_SCAN_S = 0.051;

function toDocument(plan: PlanInput, today: Pick<Today, 'scannerVersion' | 'policyVersion'>): PlanDocument {
  return {
    schemaVersion: 1,
    scannerId: plan.scannerId,
    scannerVersion: today.scannerVersion,
    protocolId: plan.protocolId,
    protocolVersion: plan.protocolVersion,
    policyVersion: today.policyVersion,
    patient: plan.patient,
    keepClear: plan.keepClear,
    sequences: plan.sequences.map(({ seen: _seen, ...sequence }) => sequence),
  };
}

/** Whether this is the plan that was stored, whatever scanner and policy were the newest then. */
export function isStoredPlan(plan: PlanInput, stored: { readonly document: PlanDocument; readonly note: string }): boolean {
  return plan.note === stored.note && canonicalJson(toDocument(plan, stored.document)) === canonicalJson(stored.document);
}

/** The questions a plan puts to the engine, one a sequence. */
export function casesOfPlan(document: PlanDocument, today: Pick<Today, 'scanner' | 'policy'>): Case[] {
  return document.sequences.map(({ prescription, frozenKeepClear }) => ({
    patient: document.patient,
    prescription,
    keepClear: frozenKeepClear ?? document.keepClear,
    scanner: today.scanner,
    policy: today.policy,
  }));
}

function differencesOf(plan: PlanInput, assessments: readonly Assessment[], today: Today): PlanDifference[] {
  const differences: PlanDifference[] = [];
  const versions = [
    ['scanner', plan.scannerVersion, today.scannerVersion],
    ['policy', plan.policyVersion, today.policyVersion],
  ] as const;
  for (const [field, bench, server] of versions) {
    if (bench !== server) differences.push({ sequence: '', field, bench: `version ${bench}`, server: `version ${server}` });
  }
  plan.sequences.forEach(({ seen, prescription }, index) => {
    const assessment = assessments[index];
    if (!seen || !assessment) return;
    const sequence = prescription.name;
    if (seen.verdict !== assessment.verdict) {
      differences.push({ sequence, field: 'verdict', bench: seen.verdict, server: assessment.verdict });
    }
    const scanS = assessment.time?.scanS;
    if (seen.scanS !== undefined && scanS !== undefined && Math.abs(seen.scanS - scanS) > SAME_SCAN_S) {
      differences.push({ sequence, field: 'scanS', bench: seen.scanS.toFixed(1), server: scanS.toFixed(1) });
    }
  });
  return differences;
}

/** The server's own answer to a whole plan, with today's scanner and policy: this is what is stored. */
export function assessPlan(plan: PlanInput, today: Today): AssessedPlan {
  const document = toDocument(plan, today);
  const cases = casesOfPlan(document, today);
  const assessments = cases.map((question) => assess(question));
  return {
    document,
    result: { schemaVersion: 1, assessments, differences: differencesOf(plan, assessments, today) },
    engineVersion: assessments[0]?.engineVersion ?? '',
    inputHash: inputHash(cases),
  };
}
