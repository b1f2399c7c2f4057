import '@/lib/schemas/fields/jitless';
import type * as z from 'zod';
import type { Case } from '@/lib/domain/case/model';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { patientSchema } from '@/lib/schemas/case/patient';
import { policySchema } from '@/lib/schemas/case/policy';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import { scannerSchema } from '@/lib/schemas/case/scanner';
import { strict } from '@/lib/schemas/fields/fields';

/** A whole case in the engine's own form. */
export const caseSchema = strict({
  patient: patientSchema,
  prescription: prescriptionSchema,
  keepClear: keepClearSchema,
  scanner: scannerSchema,
  policy: policySchema,
}) satisfies z.ZodType<Case>;
