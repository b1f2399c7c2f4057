import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { createBookingInput } from '@/lib/schemas/booking';
import { benchViewSchema, bookingListItemSchema, bookingPageSchema } from '@/lib/schemas/booking/views';
import { assessmentSchema, checkAnswerSchema, remedySchema } from '@/lib/schemas/case/assessment';
import { caseInput } from '@/lib/schemas/case/case-input';
import { caseSchema } from '@/lib/schemas/case/case-schema';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { patientSchema } from '@/lib/schemas/case/patient';
import { policySchema } from '@/lib/schemas/case/policy';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import { scannerSchema } from '@/lib/schemas/case/scanner';
import { bundleDoneSchema, commitImportBody, importDoneSchema, importStartedSchema, stagedRowsSchema, stageRowsBody, startImportInput } from '@/lib/schemas/import';
import { changeBookedBody } from '@/lib/schemas/move-proposal';
import { outcomeListSchema, outcomeViewSchema, recordOutcomeBody } from '@/lib/schemas/outcome';
import { requestSheetBody, sheetViewSchema } from '@/lib/schemas/plan-sheet';
import { movePlanBody, savePlanBody, signOffBody } from '@/lib/schemas/plan';
import { newestVersionViewSchema, planViewSchema } from '@/lib/schemas/plan/views';
import { protocolListSchema, protocolViewSchema } from '@/lib/schemas/protocol/views';
import { scannerListSchema, scannerViewSchema } from '@/lib/schemas/scanner/views';
import { policyViewSchema } from '@/lib/schemas/site-policy/views';
import { addReadingsBody } from '@/lib/schemas/size-reading';
import { sizeRecordSchema } from '@/lib/schemas/size-reading/views';

/** RFC 9457, with the members every refusal of ours may carry. */
const problemSchema = z.object({
  type: z.string().describe('urn:selvedge:problem:<code>'),
  title: z.string().describe('What went wrong, for people.'),
  status: z.int(),
  code: z.string(),
  fields: z.record(z.string(), z.string()).describe('Dotted field name → what was given and what is allowed.').optional(),
  details: z.record(z.string(), z.unknown()).optional(),
  incidentId: z.string().describe('Number to quote when the fault is ours.').optional(),
});

/** Parts both requests and answers are made of. */
const SHARED = {
  Patient: patientSchema,
  Prescription: prescriptionSchema,
  KeepClear: keepClearSchema,
  Scanner: scannerSchema,
  Policy: policySchema,
};

export const REQUESTS = {
  CaseInput: caseInput,
  NewBooking: createBookingInput,
  ChangeBooked: changeBookedBody,
  NewSizeReadings: addReadingsBody,
  StartImport: startImportInput,
  StageRows: stageRowsBody,
  CommitImport: commitImportBody,
  SavePlan: savePlanBody,
  MovePlan: movePlanBody,
  SignOff: signOffBody,
  NewOutcome: recordOutcomeBody,
  RequestSheet: requestSheetBody,
} as const;

export const ANSWERS = {
  Problem: problemSchema,
  Case: caseSchema,
  Assessment: assessmentSchema,
  Remedy: remedySchema,
  CheckAnswer: checkAnswerSchema,
  Booking: bookingListItemSchema,
  BookingPage: bookingPageSchema,
  Bench: benchViewSchema,
  SizeRecord: sizeRecordSchema,
  ImportStarted: importStartedSchema,
  StagedRows: stagedRowsSchema,
  ImportDone: importDoneSchema,
  BundleDone: bundleDoneSchema,
  ScannerVersion: scannerViewSchema,
  ScannerList: scannerListSchema,
  ProtocolVersion: protocolViewSchema,
  ProtocolList: protocolListSchema,
  PolicyVersion: policyViewSchema,
  Plan: planViewSchema,
  NewestVersion: newestVersionViewSchema,
  Outcome: outcomeViewSchema,
  OutcomeList: outcomeListSchema,
  Sheet: sheetViewSchema,
} as const;

export type RequestName = keyof typeof REQUESTS;
export type AnswerName = keyof typeof ANSWERS;

type JsonSchema = Record<string, unknown>;

function toComponents(schemas: Readonly<Record<string, z.ZodType>>, io: 'input' | 'output'): Record<string, JsonSchema> {
  const registry = z.registry<{ id: string }>();
  for (const [id, schema] of Object.entries(schemas)) registry.add(schema, { id });
  const { schemas: made } = z.toJSONSchema(registry, { io, uri: (id) => `#/components/schemas/${id}` });
  return Object.fromEntries(
    Object.entries(made).map(([id, { $schema: _dialect, $id: _uri, ...schema }]) => [id, schema]),
  );
}

/** Every schema of the API by name: what is sent as it may be written, what is answered as it arrives. */
export function componentSchemas(): Record<string, JsonSchema> {
  return { ...toComponents({ ...SHARED, ...REQUESTS }, 'input'), ...toComponents({ ...SHARED, ...ANSWERS }, 'output') };
}
