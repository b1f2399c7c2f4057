import type { PlanInput, PlanView } from '@/lib/schemas/plan';
import type { RecordReadings } from '@/lib/schemas/size-reading';
import { putPlan, type Problem } from '@/components/bench/saving/put-plan';

export interface ReadingsItem {
  readonly kind: 'readings';
  readonly bookingId: string;
  /** Each carries an id of its own, so that a reading sent twice is one. */
  readonly readings: RecordReadings['readings'];
}

export interface PlanItem {
  readonly kind: 'plan';
  readonly idempotencyKey: string;
  readonly plan: PlanInput;
  /** Set when it is first sent: from then on it may have arrived, and is never replaced or renumbered. */
  readonly expectedVersion?: number;
}

export type SendItem = ReadingsItem | PlanItem;

/** What waits to be sent, in order, and the plan it belongs to. Plain data: it lives in sessionStorage. */
export interface SendQueue {
  readonly shape: 1;
  readonly planId: string;
  /** Newest version known to be stored; 0 before the first. */
  readonly version: number;
  readonly items: readonly SendItem[];
}

/** Adds to the end; a plan that was never sent gives way to the newer one. */
export function addToQueue(queue: SendQueue, added: readonly SendItem[]): SendQueue {
  const replaces = added.some(({ kind }) => kind === 'plan');
  const kept = queue.items.filter((item) => !(replaces && item.kind === 'plan' && item.expectedVersion === undefined));
  return { ...queue, items: [...kept, ...added] };
}

/** The queue with its first item in the form in which it goes out. */
export function markSent(queue: SendQueue): SendQueue {
  const [first, ...rest] = queue.items;
  if (first?.kind !== 'plan' || first.expectedVersion !== undefined) return queue;
  return { ...queue, items: [{ ...first, expectedVersion: queue.version }, ...rest] };
}

export type SendResult =
  | { readonly kind: 'stored'; readonly plan?: PlanView }
  | { readonly kind: 'refused'; readonly problem: Problem }
  /** No answer, or one that promises nothing: worth another try. */
  | { readonly kind: 'unreached' };

const RETRIED: readonly number[] = [429, 502, 503, 504];

async function sendReadings({ bookingId, readings }: ReadingsItem, send: typeof fetch): Promise<SendResult> {
  let response: Response;
  try {
    response = await send(`/api/v1/bookings/${bookingId}/size-readings`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ readings }),
    });
  } catch {
    return { kind: 'unreached' };
  }
  if (response.ok) return { kind: 'stored' };
  if (RETRIED.includes(response.status)) return { kind: 'unreached' };
  const problem = (await response.json().catch(() => null)) as Problem | null;
  return { kind: 'refused', problem: problem ?? { code: 'unexpected', title: `The server answered ${response.status}.` } };
}

/** Sends the first item as it stands in the queue. */
export async function sendFirst(queue: SendQueue, send: typeof fetch = fetch): Promise<SendResult> {
  const [item] = queue.items;
  if (!item) return { kind: 'stored' };
  if (item.kind === 'readings') return sendReadings(item, send);
  const { idempotencyKey, plan, expectedVersion = queue.version } = item;
  const result = await putPlan({ id: queue.planId, expectedVersion, idempotencyKey, plan }, send);
  return result.kind === 'saved' ? { kind: 'stored', plan: result.plan } : result;
}

/** The queue after its first item was stored. */
export function afterStored(queue: SendQueue, plan: PlanView | undefined): SendQueue {
  return { ...queue, version: plan?.version ?? queue.version, items: queue.items.slice(1) };
}

/** Ours goes on top of what somebody else stored meanwhile: theirs stays in the history. */
export function onTopOf(queue: SendQueue, theirs: Pick<PlanView, 'id' | 'version'>): SendQueue {
  const items = queue.items.map((item, index) =>
    index === 0 && item.kind === 'plan' ? { ...item, expectedVersion: theirs.version } : item,
  );
  return { ...queue, planId: theirs.id, version: theirs.version, items };
}

export const queueKey = (userId: string, bookingId: string): string => `selvedge/at-scanner/${userId}/${bookingId}`;

type Store = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

export function readQueue(store: Store, key: string): SendQueue | null {
  try {
    const kept = JSON.parse(store.getItem(key) ?? 'null') as Partial<SendQueue> | null;
    return kept?.shape === 1 && Array.isArray(kept.items) && kept.items.length > 0 ? (kept as SendQueue) : null;
  } catch {
    return null; // Not ours, or cut short.
  }
}

export function writeQueue(store: Store, key: string, queue: SendQueue): void {
  try {
    if (queue.items.length > 0) store.setItem(key, JSON.stringify(queue));
    else store.removeItem(key);
  } catch {
    // A full or forbidden store costs the safety net; what is in memory is still sent.
  }
}
