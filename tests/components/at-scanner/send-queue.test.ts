import { describe, expect, it } from 'vitest';
import { addToQueue, afterStored, markSent, onTopOf, readQueue, sendFirst, writeQueue, type PlanItem, type ReadingsItem, type SendQueue } from '@/components/at-scanner/send-queue';
import type { PlanInput, PlanView } from '@/lib/schemas/plan';

const empty: SendQueue = { shape: 1, planId: 'p', version: 2, items: [] };
const plan = (key: string): PlanItem => ({ kind: 'plan', idempotencyKey: key, plan: { note: key } as PlanInput });
const readings: ReadingsItem = { kind: 'readings', bookingId: 'b', readings: [] };
const stored = (version: number) => ({ id: 'p', version }) as PlanView;
const answering = (status: number, body: unknown) => async () => new Response(JSON.stringify(body), { status });
const silent = async () => {
  throw new TypeError('Failed to fetch');
};

describe('what waits to be sent from the scanner', () => {
  it('goes out in order: sizes, then the plan on the version that is known by then', () => {
    const queue = addToQueue(empty, [readings, plan('first')]);
    expect(queue.items.map(({ kind }) => kind)).toEqual(['readings', 'plan']);
    expect(markSent(queue)).toEqual(queue);
    const next = markSent(afterStored(queue, undefined));
    expect(next.items).toEqual([{ ...plan('first'), expectedVersion: 2 }]);
    expect(afterStored(next, stored(3))).toEqual({ ...empty, version: 3 });
  });

  it('a plan that was never sent gives way to a newer one; one that may have arrived stays before it', () => {
    const twice = addToQueue(addToQueue(empty, [plan('first')]), [plan('second')]);
    expect(twice.items).toEqual([plan('second')]);
    const sent = addToQueue(markSent(addToQueue(empty, [plan('first')])), [plan('second')]);
    expect(sent.items).toEqual([{ ...plan('first'), expectedVersion: 2 }, plan('second')]);
    // The answer to the first was lost; its repeat makes version 3, and the second goes on top of that.
    expect(markSent(afterStored(sent, stored(3))).items).toEqual([{ ...plan('second'), expectedVersion: 3 }]);
  });

  it('sizes are never dropped for newer ones: each is a reading of its own', () => {
    expect(addToQueue(addToQueue(empty, [readings, plan('a')]), [readings, plan('b')]).items.map(({ kind }) => kind)).toEqual(['readings', 'readings', 'plan']);
  });

  it('without an answer, or one that promises nothing, it stays to be tried again; a refusal is told', async () => {
    const queue = markSent(addToQueue(empty, [plan('first')]));
    expect(await sendFirst(queue, silent)).toEqual({ kind: 'unreached' });
    expect(await sendFirst(queue, answering(503, {}))).toEqual({ kind: 'unreached' });
    expect(await sendFirst(queue, answering(409, { code: 'conflict', title: 'Someone else' }))).toMatchObject({ kind: 'refused', problem: { code: 'conflict' } });
    expect(await sendFirst(addToQueue(empty, [readings]), answering(401, { code: 'unauthenticated', title: 'Sign in first.' }))).toMatchObject({ kind: 'refused' });
    expect(await sendFirst(addToQueue(empty, [readings]), answering(200, {}))).toEqual({ kind: 'stored' });
  });

  it('goes on top of what somebody else stored, under their plan', () => {
    const queue = markSent(addToQueue(empty, [plan('mine')]));
    expect(onTopOf(queue, { id: 'theirs', version: 7 })).toEqual({ ...queue, planId: 'theirs', version: 7, items: [{ ...plan('mine'), expectedVersion: 7 }] });
  });

  it('is read back from the tab as it was kept, and an empty one leaves nothing', () => {
    const kept = new Map<string, string>();
    const store = { getItem: (key: string) => kept.get(key) ?? null, setItem: (key: string, value: string) => void kept.set(key, value), removeItem: (key: string) => void kept.delete(key) };
    const queue = markSent(addToQueue(empty, [plan('first')]));
    writeQueue(store, 'k', queue);
    expect(readQueue(store, 'k')).toEqual(queue);
    writeQueue(store, 'k', empty);
    expect(kept.size).toBe(0);
    kept.set('k', '{"shape":1,');
    expect(readQueue(store, 'k')).toBeNull();
  });
});
