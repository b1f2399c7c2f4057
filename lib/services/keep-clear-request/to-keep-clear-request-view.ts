import { keepClearFor } from '@/lib/domain/booking/assess-as-booked';
import type { Patient } from '@/lib/domain/case/model';
import type { KeepClearRequest } from '@/lib/domain/keep-clear-request/document';
import type { KeepClearRequestView } from '@/lib/schemas/keep-clear-request';

/** A preset is laid into the patient as soon as the sizes are known. */
export function toKeepClearRequestView(request: KeepClearRequest, patient: Patient | undefined): KeepClearRequestView {
  const { document } = request;
  return {
    keepClearPreset: document.keepClearPreset,
    keepClear: patient ? keepClearFor(document, patient) : document.keepClear,
    ...(document.toleratedFoldOutsidePct === null ? {} : { toleratedFoldOutsidePct: document.toleratedFoldOutsidePct }),
    note: document.note,
    by: request.requestedBy,
    at: request.requestedAt.toISOString(),
  };
}
