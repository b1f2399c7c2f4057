import type { Assessment, SitePolicy } from '@/lib/domain/case/model';
import type { PlanState } from '@/lib/domain/plan/states';

/** Verdicts with which a plan may not be put for use: nothing says what would come out. */
const BARRED: readonly Assessment['verdict'][] = ['cannot-be-scanned', 'not-modelled'];

type SignOffPolicy = Pick<SitePolicy, 'signOffAlways' | 'tolerateFoldOutsidePct'>;

/** Why a radiologist decides about a plan; the first that holds. */
export type SignOffCause = 'policy' | 'fold-in-keep-clear' | 'fold-outside-beyond-tolerated';

/**
 * A radiologist decides when fold is left in the keep-clear area, when more is left beside it than is tolerated (by the
 * policy, or as asked for this exam), or always when the policy says so.
 */
export function signOffCause(assessments: readonly Assessment[], policy: SignOffPolicy): SignOffCause | undefined {
  if (assessments.some(({ verdict }) => verdict === 'fold-in-keep-clear')) return 'fold-in-keep-clear';
  const beyond = ({ fold }: Assessment) => (fold?.displayedShare ?? 0) * 100 > policy.tolerateFoldOutsidePct;
  if (assessments.some(beyond)) return 'fold-outside-beyond-tolerated';
  return policy.signOffAlways ? 'policy' : undefined;
}

export function needsSignOff(assessments: readonly Assessment[], policy: SignOffPolicy): boolean {
  return signOffCause(assessments, policy) !== undefined;
}

export interface PlanSituation {
  readonly state: PlanState;
  readonly assessments: readonly Assessment[];
  readonly policy: SignOffPolicy;
}

/**
 * Why a plan may not move to a state; undefined when it may.
 * draft → for use → signed off → used; a plan that needs no sign-off goes from for use straight to used;
 * anything but a used plan can go back to draft.
 */
export function refusalToMove({ state, assessments, policy }: PlanSituation, to: PlanState): string | undefined {
  if (state === 'used') return 'A used plan stays as it was used. Make a new plan instead.';
  if (state === to) return `The plan is ${to} already.`;
  switch (to) {
    case 'draft':
      return undefined;
    case 'for use': {
      if (state !== 'draft') return `Only a draft can be put for use; this plan is ${state}.`;
      const barred = assessments.findIndex((assessment) => BARRED.includes(assessment.verdict));
      return barred < 0 ? undefined : `Sequence ${barred + 1} cannot be scanned as planned or is not modelled: ${assessments[barred]?.reasons[0]?.text ?? ''}`.trim();
    }
    case 'signed off':
      return state === 'for use' ? undefined : `Only a plan for use can be signed off; this plan is ${state}.`;
    case 'used':
      if (state === 'signed off') return undefined;
      if (state !== 'for use') return `Only a plan for use can be marked as used; this plan is ${state}.`;
      return needsSignOff(assessments, policy) ? 'A radiologist has to sign this plan off before it is used.' : undefined;
  }
}

/** A new version of a plan was made by hand: whatever was agreed on was agreed on something else. */
export function stateAfterSave(state: PlanState): PlanState {
  return state === 'used' ? 'used' : 'draft';
}
