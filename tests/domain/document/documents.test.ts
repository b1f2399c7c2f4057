import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { changedFields } from '@/lib/domain/document/changed-fields';
import { readDocument } from '@/lib/domain/document/read-document';
import { readEntryDocument } from '@/lib/domain/booking/entry';
import { readPreCheckDocument } from '@/lib/domain/pre-check/document';
import { NEXT_ACTION_KINDS, PRE_CHECK_RESULTS } from '@/lib/domain/pre-check/result';
import { readPlanDocument, readPlanResult } from '@/lib/domain/plan/document';
import { readProtocolDocument, readSequenceDocument } from '@/lib/domain/protocol/document';
import { readScannerDocument } from '@/lib/domain/scanner/document';
import { readPolicyDocument } from '@/lib/domain/site-policy/document';
import { assessmentSchema } from '@/lib/schemas/case/assessment';
import { keepClearSchema, patientSchema, policySchema, prescriptionSchema, scannerSchema } from '@/lib/schemas/case';

const FOLDER = new URL('../../../fixtures/golden/documents/', import.meta.url);
const golden = (name: string): unknown => JSON.parse(readFileSync(new URL(name, FOLDER), 'utf8'));

/** What each kind of document is read with, and what today's forms say to it. */
const KINDS: Readonly<Record<string, (stored: unknown) => boolean>> = {
  scanner: (stored) => scannerSchema.safeParse(readScannerDocument(stored).scanner).success,
  protocol: (stored) => keepClearSchema.safeParse(readProtocolDocument(stored).keepClear).success,
  sequence: (stored) => prescriptionSchema.safeParse(readSequenceDocument(stored).prescription).success,
  policy: (stored) => {
    const { policy, pathway } = readPolicyDocument(stored);
    return policySchema.safeParse(policy).success && pathway.setUpMinutes >= 10;
  },
  plan: (stored) => {
    const { patient, keepClear, sequences } = readPlanDocument(stored);
    return (
      patientSchema.safeParse(patient).success &&
      keepClearSchema.safeParse(keepClear).success &&
      sequences.every(({ prescription }) => prescriptionSchema.safeParse(prescription).success)
    );
  },
  'pre-check': (stored) => {
    const { result, findings, next, booked, alternatives } = readPreCheckDocument(stored);
    return (
      PRE_CHECK_RESULTS.includes(result) && NEXT_ACTION_KINDS.includes(next.kind) && findings.length > 0 &&
      booked.sequences.length === 2 && alternatives[0]?.standing === 'fits'
    );
  },
  'booking-entry': (stored) => readEntryDocument(stored).to?.scanner === 'Scanner B',
  'plan-result': (stored) => readPlanResult(stored).assessments.every((each) => assessmentSchema.safeParse(each).success),
};

describe('stored documents', () => {
  const files = readdirSync(FOLDER).filter((name) => name.endsWith('.json'));

  it('each kind has a golden file for each version', () => {
    expect([...new Set(files.map((name) => name.split('.')[0]))].sort()).toEqual(Object.keys(KINDS).sort());
  });

  it.each(files)('%s is read in today’s shape and passes today’s forms', (name) => {
    expect(KINDS[name.split('.')[0]!]!(golden(name))).toBe(true);
  });

  it('old versions are lifted step by step; unknown and newer ones are refused', () => {
    const upcasts = { 1: (old: Record<string, unknown>) => ({ ...old, b: 2 }), 2: (old: Record<string, unknown>) => ({ ...old, c: 3 }) };
    expect(readDocument({ schemaVersion: 1, a: 1 }, 3, upcasts)).toEqual({ schemaVersion: 3, a: 1, b: 2, c: 3 });
    expect(() => readDocument({ schemaVersion: 4 }, 3, upcasts)).toThrow('schemaVersion 4');
    expect(() => readDocument({ schemaVersion: 0 }, 3, upcasts)).toThrow('schemaVersion 0');
    expect(() => readDocument({}, 3, upcasts)).toThrow('no schemaVersion');
  });
});

describe('changed fields', () => {
  it('are named by path and never by value', () => {
    const before = { name: 'A', limits: { fovMaxMm: 500, matrixMax: 512 }, list: [1, 2] };
    expect(changedFields(before, { name: 'B', limits: { fovMaxMm: 480, matrixMax: 512 }, list: [1, 3], note: '' })).toEqual([
      'limits.fovMaxMm', 'list', 'name', 'note',
    ]);
    expect(changedFields(before, structuredClone(before))).toEqual([]);
  });
});
