import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { PLAN_STATES } from '@/lib/domain/plan/states';
import { assessmentSchema } from '@/lib/schemas/case/assessment';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { patientSchema } from '@/lib/schemas/case/patient';
import { policySchema } from '@/lib/schemas/case/policy';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import { scannerSchema } from '@/lib/schemas/case/scanner';
import type { NewestVersionView, PlannedSequence, PlanView, ResultDifference } from '@/lib/schemas/plan';

const plannedSequence = z.strictObject({
  id: z.string(),
  prescription: prescriptionSchema,
  frozenKeepClear: keepClearSchema.optional(),
  adopted: z.array(z.strictObject({ key: z.string(), sentence: z.string(), costTenths: z.int() })),
}) satisfies z.ZodType<PlannedSequence>;

const difference = z.strictObject({
  sequence: z.string().describe('Name of the sequence; empty where all rest on it.'),
  field: z.enum(['verdict', 'scanS', 'scanner', 'policy']),
  bench: z.string(),
  server: z.string(),
}) satisfies z.ZodType<ResultDifference>;

export const planViewSchema = z.strictObject({
  id: z.uuid(),
  shortCode: z.string(),
  bookingId: z.uuid().nullable(),
  accession: z.string().nullable(),
  state: z.enum(PLAN_STATES),
  version: z.int(),
  currentVersion: z.int(),
  newerVersionExists: z.boolean(),
  scannerId: z.uuid(),
  scannerVersion: z.int(),
  scanner: scannerSchema,
  protocolId: z.uuid().nullable(),
  protocolVersion: z.int(),
  policy: policySchema,
  patient: patientSchema,
  keepClear: keepClearSchema,
  sequences: z.array(plannedSequence),
  results: z.array(assessmentSchema).describe('One a sequence, worked out by the server.'),
  differences: z.array(difference).describe('Where the bench had another answer; the server’s is what counts.'),
  engineVersion: z.string(),
  inputHash: z.string(),
  note: z.string(),
  savedAt: z.iso.datetime(),
  savedBy: z.string(),
  needsSignOff: z.boolean(),
  signOff: z
    .strictObject({ decision: z.enum(['signed off', 'sent back']), reason: z.string(), by: z.string(), at: z.iso.datetime() })
    .optional(),
}) satisfies z.ZodType<PlanView>;

export const newestVersionViewSchema = z.strictObject({
  newest: z
    .strictObject({ planId: z.uuid(), state: z.enum(PLAN_STATES), version: z.int(), savedBy: z.string(), savedAt: z.iso.datetime() })
    .nullable()
    .describe('Absent until the booking has a plan.'),
}) satisfies z.ZodType<NewestVersionView>;
