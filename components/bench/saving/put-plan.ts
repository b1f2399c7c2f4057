import type { PlanInput, PlanView } from '@/lib/schemas/plan';

export interface Problem {
  readonly code: string;
  readonly title: string;
  readonly fields?: Readonly<Record<string, string>>;
  readonly details?: Readonly<Record<string, unknown>>;
  readonly incidentId?: string;
}

export type PutResult =
  | { readonly kind: 'saved'; readonly plan: PlanView }
  | { readonly kind: 'refused'; readonly problem: Problem }
  /** No answer, or one that promises nothing: worth another try with the same key. */
  | { readonly kind: 'unreached' };

export interface PutPlan {
  readonly id: string;
  readonly expectedVersion: number;
  readonly idempotencyKey: string;
  readonly plan: PlanInput;
}

const RETRIED: readonly number[] = [429, 502, 503, 504];

export async function putPlan({ id, expectedVersion, idempotencyKey, plan }: PutPlan, send = fetch): Promise<PutResult> {
  let response: Response;
  try {
    response = await send(`/api/v1/plans/${id}`, {
      method: 'PUT',
      headers: { 'content-type': 'application/json', 'idempotency-key': idempotencyKey },
      body: JSON.stringify({ expectedVersion, plan }),
    });
  } catch {
    return { kind: 'unreached' };
  }
  if (response.ok) return { kind: 'saved', plan: (await response.json()) as PlanView };
  if (RETRIED.includes(response.status)) return { kind: 'unreached' };
  const problem = (await response.json().catch(() => null)) as Problem | null;
  return { kind: 'refused', problem: problem ?? { code: 'unexpected', title: `The server answered ${response.status}.` } };
}

/** The plan as it is stored now. */
export async function getStoredPlan(id: string, send = fetch): Promise<PlanView | null> {
  try {
    const response = await send(`/api/v1/plans/${id}`, { headers: { accept: 'application/json' } });
    return response.ok ? ((await response.json()) as PlanView) : null;
  } catch {
    return null;
  }
}
