import { type SignOffCause, signOffCause } from '@/lib/domain/plan/transitions';
import type { PlanView } from '@/lib/schemas/plan';

const CAUSES: Readonly<Record<SignOffCause, string>> = {
  'fold-in-keep-clear': 'fold is left in the keep-clear area',
  'fold-outside-beyond-tolerated': 'more fold is left beside the keep-clear area than is tolerated',
  policy: 'site policy asks for it',
};

/** Why a radiologist decides, in words; absent when none has to. */
export function signOffWords(plan: PlanView): string | undefined {
  const cause = signOffCause(plan.results, plan.policy) ?? (plan.needsSignOff ? 'policy' : undefined);
  return cause && CAUSES[cause];
}
