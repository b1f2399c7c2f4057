import type { Assessment, Case, Remedy, RemedyNotPossible } from '@/lib/domain/case/model';

/** What a check answers: the assessment as it stands, the remedies by cost, and the case with all that was assumed. */
export interface CheckAnswer {
  readonly engineVersion: string;
  /** SHA-256 of the completed case. */
  readonly inputHash: string;
  readonly assessment: Assessment;
  readonly remedies: readonly Remedy[];
  readonly notPossible: readonly RemedyNotPossible[];
  readonly candidates: number;
  readonly case: Case;
}
