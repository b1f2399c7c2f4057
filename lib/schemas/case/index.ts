export { CASE_DEFAULTS, caseInput, type CaseInput } from '@/lib/schemas/case/case-input';
export { caseSchema } from '@/lib/schemas/case/case-schema';
export { displayedBox, stackWidthMm } from '@/lib/domain/case/displayed-box';
export { keepClearSchema, patientBoxSchema } from '@/lib/schemas/case/keep-clear';
export { patientSchema, readingSchema } from '@/lib/schemas/case/patient';
export { policySchema } from '@/lib/schemas/case/policy';
export { prescriptionSchema, refinePrescription } from '@/lib/schemas/case/prescription';
export { scannerSchema, refineScanner } from '@/lib/schemas/case/scanner';
export { CaseInputError, parseCase, toCase } from '@/lib/schemas/case/to-case';
