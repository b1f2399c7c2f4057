import { assess } from '@/lib/physics';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { CaseInputError, parseCase } from '@/lib/schemas/case';
import { quickCheckCase, quickCheckForm, type QuickCheckForm } from '@/lib/schemas/case/quick-check';

export type QuickAnswer =
  | { readonly kind: 'answered'; readonly form: QuickCheckForm; readonly question: Case; readonly assessment: Assessment }
  /** A field is not allowed yet; the form says which. */
  | { readonly kind: 'incomplete' }
  /** Allowed one by one, but not together. */
  | { readonly kind: 'refused'; readonly words: string };

/** Form → the check's schema → engine: the same way in as every other door. */
export function answerQuickCheck(values: unknown): QuickAnswer {
  const parsed = quickCheckForm.safeParse(values);
  if (!parsed.success) return { kind: 'incomplete' };
  try {
    const question = parseCase(quickCheckCase(parsed.data));
    return { kind: 'answered', form: parsed.data, question, assessment: assess(question) };
  } catch (error) {
    if (error instanceof CaseInputError) return { kind: 'refused', words: error.issues.map(({ message }) => message).join(' ') };
    if (error instanceof Error && error.name === 'DomainError') return { kind: 'refused', words: error.message };
    throw error;
  }
}
