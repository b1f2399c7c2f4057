import type { PlanView } from '@/lib/schemas/plan';

export interface PlanIdentity {
  readonly planId: string;
  /** The version the bench rests on; 0 before the first save. */
  readonly version: number;
  readonly state: PlanView['state'] | null;
  readonly shortCode: string | null;
}

/**
 * Where saving starts: the newest plan, or one that does not exist yet under an id drawn here. A used plan stays as it
 * was used, so what is saved from its bench is a new one.
 */
export function identityOf(plan: PlanView | undefined): PlanIdentity {
  if (!plan || plan.state === 'used') return { planId: crypto.randomUUID(), version: 0, state: null, shortCode: null };
  return { planId: plan.id, version: plan.currentVersion, state: plan.state, shortCode: plan.shortCode };
}
