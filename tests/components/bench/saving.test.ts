import { describe, expect, it } from 'vitest';
import { keptEditsKey, readKeptEdits, writeKeptEdits, type KeptEdits } from '@/components/bench/saving/kept-edits';
import { putPlan, type PutPlan } from '@/components/bench/saving/put-plan';
import type { PlanIdentity } from '@/components/bench/saving/plan-identity';
import { isNews, type NewestVersion } from '@/components/bench/saving/use-newest-version';
import { identityOfKept, keptSubject } from '@/components/bench/saving/use-plan-saving';
import { documentOfPlan, planInputOf, type PlanBasis } from '@/components/bench/state/plan-document';
import { changedLeaves, withLeaf } from '@/components/bench/bench-form';
import type { Case } from '@/lib/physics/model/case';
import type { Assessment } from '@/lib/physics/model/assessment';
import { planInput } from '@/lib/schemas/plan';
import { benchDocument } from '@/tests/support/bench-documents';

const basis: PlanBasis = {
  bookingId: '00000000-0000-4000-8000-000000000001',
  scannerId: '00000000-0000-4000-8000-000000000002',
  scannerVersion: 1,
  protocolId: '00000000-0000-4000-8000-000000000003',
  protocolVersion: 2,
  policyVersion: 0,
};
const put: PutPlan = { id: 'p', expectedVersion: 1, idempotencyKey: 'key-12345678', plan: {} as PutPlan['plan'] };
const answer = (status: number, body: unknown) => () => Promise.resolve(new Response(JSON.stringify(body), { status }));

describe('what is sent to be saved', () => {
  it('is what the schema takes, with what the bench showed, and comes back as the same bench', () => {
    const document = benchDocument();
    const { patient, keepClear, scanner, sequences } = document;
    const question = { patient, keepClear, scanner, prescription: sequences[0]!.prescription } as Case;
    const results = { a: { question, assessment: { verdict: 'no-fold-expected', time: { scanS: 128.04 } } as Assessment } };
    const sent = planInput.parse(planInputOf(document, basis, results));
    expect(sent.sequences[0]?.seen).toEqual({ verdict: 'no-fold-expected', scanS: 128 });
    expect(sent.sequences[1]?.seen).toBeUndefined();
    const older = { a: { ...results.a, question: { ...question, patient: { ...patient } } } };
    expect(planInputOf(document, basis, older).sequences[0]?.seen).toBeUndefined();
    const { seen: _seen, ...first } = sent.sequences[0]!;
    expect(first).toEqual(document.sequences[0]);
    const stored = sent.sequences.map(({ seen: _, ...sequence }) => sequence);
    expect(documentOfPlan({ ...sent, sequences: stored, scanner })).toEqual(document);
  });
});

describe('sending', () => {
  it('tells a stored plan, a refusal and silence apart', async () => {
    expect(await putPlan(put, answer(200, { id: 'p', version: 2 }))).toEqual({ kind: 'saved', plan: { id: 'p', version: 2 } });
    const conflict = { code: 'conflict', title: 'Someone else changed this.', details: { currentVersion: 3 } };
    expect(await putPlan(put, answer(409, conflict))).toEqual({ kind: 'refused', problem: conflict });
    expect(await putPlan(put, () => Promise.reject(new TypeError('no network')))).toEqual({ kind: 'unreached' });
    for (const status of [429, 502, 503, 504]) expect((await putPlan(put, answer(status, {}))).kind).toBe('unreached');
    const broken = () => Promise.resolve(new Response('<html>', { status: 500 }));
    expect(await putPlan(put, broken)).toMatchObject({ kind: 'refused', problem: { title: 'The server answered 500.' } });
  });

  it('names version and key, so that a repeated send saves nothing twice', async () => {
    const seen: Request[] = [];
    await putPlan(put, (url, init) => {
      seen.push(new Request(`http://bench.example${String(url)}`, init));
      return answer(200, {})();
    });
    expect(seen[0]?.method).toBe('PUT');
    expect(seen[0]?.headers.get('idempotency-key')).toBe('key-12345678');
    expect(await seen[0]?.json()).toEqual({ expectedVersion: 1, plan: {} });
  });
});

describe('unsaved edits of a tab', () => {
  const memory = () => {
    const kept = new Map<string, string>();
    return {
      getItem: (key: string) => kept.get(key) ?? null,
      setItem: (key: string, value: string) => void kept.set(key, value),
      removeItem: (key: string) => void kept.delete(key),
    };
  };
  const edits: KeptEdits = { shape: 1, planId: 'p', version: 2, document: benchDocument() };

  it('are kept per user and bench, and come back as they were', () => {
    const store = memory();
    const key = keptEditsKey('user-1', 'booking-1');
    writeKeptEdits(store, key, edits);
    expect(readKeptEdits(store, key)).toEqual(edits);
    expect(readKeptEdits(store, keptEditsKey('user-2', 'booking-1'))).toBeNull();
    writeKeptEdits(store, key, null);
    expect(readKeptEdits(store, key)).toBeNull();
  });

  it('are passed over when they are not ours or cut short, and a full store loses no work', () => {
    const store = memory();
    store.setItem('k', '{"shape":1,"planId":"p","docu');
    expect(readKeptEdits(store, 'k')).toBeNull();
    store.setItem('k', '{"shape":7}');
    expect(readKeptEdits(store, 'k')).toBeNull();
    const full = { ...store, setItem: () => { throw new DOMException('full', 'QuotaExceededError'); } };
    expect(() => writeKeptEdits(full, 'k', edits)).not.toThrow();
  });

  it('meet what was saved in between instead of going round it', () => {
    const stored: PlanIdentity = { planId: 'p', version: 5, state: 'draft', shortCode: 'ABCD2345' };
    expect(identityOfKept(edits, stored)).toMatchObject({ planId: 'p', version: 2 });
    // Someone made the booking's plan meanwhile: ours is offered as its next version and meets the conflict.
    expect(identityOfKept({ ...edits, planId: 'ours', version: 0 }, stored)).toMatchObject({ planId: 'p', version: 0 });
    const none: PlanIdentity = { planId: 'fresh', version: 0, state: null, shortCode: null };
    expect(identityOfKept({ ...edits, planId: 'ours', version: 0 }, none)).toMatchObject({ planId: 'ours', version: 0 });
  });
});

describe('fields of a form', () => {
  it('replace one leaf and leave everything beside it the same object', () => {
    const before = { a: { b: [1, 2], c: { d: 3 } }, e: { f: 4 } };
    const after = withLeaf(before, ['a', 'b', '1'], 9);
    expect(after).toEqual({ a: { b: [1, 9], c: { d: 3 } }, e: { f: 4 } });
    expect(after.e).toBe(before.e);
    expect(after.a.c).toBe(before.a.c);
    expect(changedLeaves(before, after)).toEqual([['a.b.1', 9]]);
  });
});

describe('what is news to an open bench', () => {
  const newest = (planId: string, version: number, state: NewestVersion['state'] = 'draft'): NewestVersion => ({
    planId, version, state, savedBy: 'Lee Warp', savedAt: '2026-03-02T09:00:00.000Z',
  });
  const bench = (planId: string, version: number): PlanIdentity => ({ planId, version, state: null, shortCode: null });

  it('is a later version of its plan, and the first of another where it has none of its own', () => {
    expect(isNews(newest('a', 3), bench('a', 2))).toBe(true);
    expect(isNews(newest('b', 1), bench('a', 0))).toBe(true);
    expect(isNews(newest('a', 2), bench('a', 2))).toBe(false);
    // The answer to an older question, after this bench saved.
    expect(isNews(newest('a', 2), bench('a', 3))).toBe(false);
    expect(isNews(null, bench('a', 0))).toBe(false);
  });

  it('is not a plan that was used, which a new one follows', () => {
    expect(isNews(newest('b', 4, 'used'), bench('a', 0))).toBe(false);
  });
});

describe('what unsaved edits are kept for', () => {
  it('is the booking; without one the saved plan, and before that the choice of scanner and protocol', () => {
    const identity = (version: number): PlanIdentity => ({ planId: 'p', version, state: null, shortCode: null });
    expect(keptSubject('b', 's/p', identity(2))).toBe('b');
    expect(keptSubject(null, 's/p', identity(0))).toBe('s/p');
    expect(keptSubject(null, 's/p', identity(1))).toBe('plan/p');
  });
});
