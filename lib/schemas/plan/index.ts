import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { Assessment, KeepClear, Patient, Prescription, Scanner, SitePolicy } from '@/lib/domain/case/model';
import type { PlanState } from '@/lib/domain/plan/states';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { patientSchema } from '@/lib/schemas/case/patient';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import { choice, count, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema, idSchema } from '@/lib/schemas/fields/ids';

/** What the bench worked out, so that the server can say where its own answer differs. */
const seenResult = strict({
  verdict: choice(
    ['no-fold-expected', 'fold-outside-keep-clear', 'fold-in-keep-clear', 'cannot-be-scanned', 'not-modelled'],
    'Verdict shown.',
  ),
  scanS: quantity({ min: 0, max: 1e6, unit: 's', text: 'Scan time shown, rounded to 0.1 s' }).optional(),
});

export const plannedSequenceSchema = strict({
  id: words(80, 'Stable name of the sequence inside the plan: the protocol’s sequence id, or one made on the bench.'),
  prescription: prescriptionSchema,
  frozenKeepClear: keepClearSchema
    .describe('Keep-clear area of this sequence alone: what the whole picture was before a remedy changed the window.')
    .optional(),
  adopted: z
    .array(
      strict({
        key: words(120, 'Key of the adopted remedy.'),
        sentence: words(600, 'The remedy as it was read.'),
        costTenths: count({ min: 0, max: 10_000_000, text: 'Its cost in tenths of a point' }),
      }),
    )
    .max(50)
    .describe('Remedies adopted on the bench, in order.'),
  seen: seenResult.optional(),
});

/** A whole plan as the bench holds it. The scanner, protocol and policy are named, never sent. */
export const planInput = strict({
  bookingId: idSchema.nullable().describe('Booking the plan is for; null for a plan without one.'),
  scannerId: idSchema,
  scannerVersion: count({ min: 1, max: 1_000_000, text: 'Version of the scanner the bench worked with' }),
  protocolId: idSchema.nullable(),
  protocolVersion: count({ min: 0, max: 1_000_000, text: 'Version of the protocol the bench began with; 0 without one' }),
  policyVersion: count({ min: 0, max: 1_000_000, text: 'Version of the policy the bench worked with' }),
  patient: patientSchema,
  keepClear: keepClearSchema,
  sequences: z
    .array(plannedSequenceSchema)
    .min(1, { error: refused('1 to 20 sequences') })
    .max(20, { error: refused('1 to 20 sequences') }),
  note: z.string({ error: refused('text') }).max(2000, { error: refused('text of up to 2000 characters') }).default(''),
});
export type PlanInput = z.output<typeof planInput>;

/** Body of `PUT /api/v1/plans/{id}`; the idempotency key is the header Idempotency-Key. */
export const savePlanBody = strict({ expectedVersion: expectedVersionSchema, plan: planInput });
export type SavePlanBody = z.output<typeof savePlanBody>;

export const idempotencyKeySchema = z
  .string({ error: refused('8 to 128 letters, digits, - or _') })
  .regex(/^[A-Za-z0-9_-]{8,128}$/, { error: refused('8 to 128 letters, digits, - or _') })
  .describe('The same key again returns the first answer and saves nothing twice.');

const movePlanShape = {
  expectedVersion: expectedVersionSchema,
  to: choice(['draft', 'for use', 'used'], 'State to move the plan to.'),
};
export const movePlanBody = strict(movePlanShape);
export const movePlanInput = strict({ id: idSchema, ...movePlanShape });

const signOffShape = {
  expectedVersion: expectedVersionSchema,
  decision: choice(['signed off', 'sent back'], 'The radiologist’s decision.'),
  reason: z.string().trim().max(2000, { error: refused('text of up to 2000 characters') }).default(''),
};
export const signOffBody = strict(signOffShape);
export const signOffInput = strict({ id: idSchema, ...signOffShape });

/** Search parameters of a plan: digits, because that is what a link carries. */
export const planQuery = strict({
  version: z
    .string()
    .regex(/^[1-9][0-9]{0,6}$/, { error: refused('a version, a whole number from 1') })
    .transform(Number)
    .pipe(z.int())
    .describe('A version of the plan; left out: the newest.')
    .optional(),
});
export const codeParams = z.object({ code: z.string().min(1).max(20).describe('Short code of a plan sheet.') });

export interface AdoptedView {
  readonly key: string;
  readonly sentence: string;
  readonly costTenths: number;
}

export interface PlannedSequence {
  readonly id: string;
  readonly prescription: Prescription;
  readonly frozenKeepClear?: KeepClear;
  readonly adopted: readonly AdoptedView[];
}

/** Where the bench and the server did not agree; the server's value is the one stored. */
export interface ResultDifference {
  /** Name of the sequence; empty where the difference is in what all of them rest on. */
  readonly sequence: string;
  readonly field: 'verdict' | 'scanS' | 'scanner' | 'policy';
  readonly bench: string;
  readonly server: string;
}

/** Enough to see that somebody else has saved: no values of the plan. */
export interface NewestVersionView {
  readonly newest: {
    readonly planId: string;
    readonly state: PlanState;
    readonly version: number;
    readonly savedBy: string;
    readonly savedAt: string;
  } | null;
}

export interface PlanView {
  readonly id: string;
  readonly shortCode: string;
  readonly bookingId: string | null;
  readonly accession: string | null;
  readonly state: PlanState;
  readonly version: number;
  readonly currentVersion: number;
  /** True when the version shown is not the newest. */
  readonly newerVersionExists: boolean;
  readonly scannerId: string;
  readonly scannerVersion: number;
  readonly scanner: Scanner;
  readonly protocolId: string | null;
  readonly protocolVersion: number;
  readonly policy: SitePolicy;
  readonly patient: Patient;
  readonly keepClear: KeepClear;
  readonly sequences: readonly PlannedSequence[];
  /** One a sequence, worked out by the server when the version was saved. */
  readonly results: readonly Assessment[];
  readonly differences: readonly ResultDifference[];
  readonly engineVersion: string;
  readonly inputHash: string;
  readonly note: string;
  readonly savedAt: string;
  readonly savedBy: string;
  readonly needsSignOff: boolean;
  readonly signOff?: { readonly decision: 'signed off' | 'sent back'; readonly reason: string; readonly by: string; readonly at: string };
}
