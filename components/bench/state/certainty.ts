import type { SitePolicy } from '@/lib/physics/model/policy';

/** Between these the engine answers. */
export const SURE_MIN = 0.5;
export const SURE_MAX = 0.999;

const lastAsked = new WeakMap<SitePolicy, SitePolicy>();

/** The site's policy at the certainty chosen on the bench. The same object while the same is asked: answers are kept by identity. */
export function policyAt(policy: SitePolicy, sureAt: number | null): SitePolicy {
  if (sureAt === null || sureAt === policy.sureAt) return policy;
  const last = lastAsked.get(policy);
  if (last?.sureAt === sureAt) return last;
  const asked = { ...policy, sureAt };
  lastAsked.set(policy, asked);
  return asked;
}

/** What a typed or slid percent asks for: in range, to the tenth of a percent; the site's own figure is no choice. */
export function chosenCertainty(percent: number, policy: SitePolicy): number | null {
  const inRange = Math.min(SURE_MAX, Math.max(SURE_MIN, Math.round(percent * 10) / 1000));
  return Math.abs(inRange - policy.sureAt) < 1e-9 ? null : inRange;
}
