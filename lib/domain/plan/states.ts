/** Plan states, as people read them and as they are stored. */
export const PLAN_STATES = ['draft', 'for use', 'signed off', 'used'] as const;
export type PlanState = (typeof PLAN_STATES)[number];
