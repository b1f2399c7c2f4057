import { describe, expect, it } from 'vitest';
import { createLatestWins } from '@/components/bench/live/latest-wins';
import { createLiveAssessor, type Asked } from '@/components/bench/live/live-assessor';
import { presentRanking, type Answer } from '@/components/bench/live/results';
import { startBench } from '@/components/bench/state/bench-state';
import { createBenchStore } from '@/components/bench/state/bench-store';
import type { Assessment } from '@/lib/physics/model/assessment';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking } from '@/lib/physics/model/remedy';
import { benchDocument } from '@/tests/support/bench-documents';

/** Animation frames that come when the test says so. */
function frames() {
  const waiting: (() => void)[] = [];
  return {
    request: (callback: () => void) => waiting.push(callback),
    pending: () => waiting.length,
    run: () => waiting.splice(0).forEach((callback) => callback()),
  };
}

/** Promises that end when the test says so. */
function later<J, R>() {
  const open: { job: J; resolve: (result: R) => void; reject: (error: unknown) => void }[] = [];
  const run = (job: J) => new Promise<R>((resolve, reject) => open.push({ job, resolve, reject }));
  return { open, run };
}

const verdict = (word: Assessment['verdict']) => ({ verdict: word }) as Assessment;
const settle = () => new Promise<void>((resolve) => setImmediate(resolve));

function bench() {
  const store = createBenchStore(startBench(benchDocument(), 'a', null));
  const clock = frames();
  const worker = later<readonly Asked[], readonly Answer[]>();
  const ranker = later<Case, Ranking>();
  const worked: string[] = [];
  const asked: number[] = [];
  const faults: unknown[] = [];
  const live = createLiveAssessor({
    store,
    setting: { policy: DEFAULT_POLICY, today: '2026-03-02' },
    assess: (question) => {
      asked.push(question.prescription.fovPhaseMm);
      return verdict('no-fold-expected');
    },
    rank: ranker.run,
    initial: {},
    assessOthers: worker.run,
    requestFrame: clock.request,
    cancelFrame: () => {},
    onWork: (id, work) => {
      worked.push(id);
      work();
    },
    onFault: (error) => faults.push(error),
  });
  return { store, clock, worker, ranker, worked, asked, faults, live };
}

describe('answering edits', () => {
  it('answers once per animation frame, however many edits fall into it', () => {
    const { store, clock, worked, asked, live } = bench();
    live.start();
    clock.run();
    expect(worked).toEqual(['a']);
    for (let fov = 301; fov <= 360; fov += 1) {
      store.dispatch({ type: 'edit-prescription', patch: { fovPhaseMm: fov }, step: 'drag' });
    }
    expect(clock.pending()).toBe(1);
    clock.run();
    expect(worked).toEqual(['a', 'a']);
    expect(asked.at(-1)).toBe(360);
  });

  it('does no work for a change that no question contains', () => {
    const { store, clock, worked, live } = bench();
    live.start();
    clock.run();
    store.dispatch({ type: 'choose-view', view: 'slab' });
    store.dispatch({ type: 'choose-slice', index: 3 });
    clock.run();
    expect(worked).toEqual(['a']);
  });

  it('asks the worker for the other sequences only when what they share has changed', async () => {
    const { store, clock, worker, live } = bench();
    live.start();
    clock.run();
    expect(worker.open[0]?.job.map(({ id }) => id)).toEqual(['b', 'c']);
    worker.open[0]?.resolve(worker.open[0].job.map(() => ({ assessment: verdict('not-modelled') })));
    await settle();
    expect(live.read()['b']?.assessment?.verdict).toBe('not-modelled');

    store.dispatch({ type: 'edit-prescription', patch: { fovPhaseMm: 310 } });
    clock.run();
    expect(worker.open).toHaveLength(1);

    store.dispatch({ type: 'edit-patient', patch: { lateralOffsetMm: 10 } });
    clock.run();
    expect(worker.open[1]?.job.map(({ id }) => id)).toEqual(['b', 'c']);
  });

  it('drops an answer to a question that is not asked any more', async () => {
    const { store, clock, worker, live } = bench();
    live.start();
    clock.run();
    store.dispatch({ type: 'edit-patient', patch: { lateralOffsetMm: 10 } });
    clock.run();
    worker.open[0]?.resolve([{ assessment: verdict('not-modelled') }]);
    await settle();
    expect(live.read()['b']).toBeUndefined();
    expect(worker.open[1]?.job[0]?.question.patient.lateralOffsetMm).toBe(10);
  });

  it('reports a fault of the worker and goes on', async () => {
    const { clock, worker, faults, live } = bench();
    live.start();
    clock.run();
    worker.open[0]?.reject(new Error('worker ended'));
    await settle();
    expect(faults).toHaveLength(1);
    expect(live.read()['a']?.assessment?.verdict).toBe('no-fold-expected');
  });
});

describe('ranking', () => {
  const ranking = { now: verdict('no-fold-expected'), remedies: [], notPossible: [], candidates: 7 } as Ranking;

  it('follows the assessment, the latest question only, and counts as present only for that question', async () => {
    const { store, clock, ranker, live } = bench();
    live.start();
    clock.run();
    for (const fov of [310, 320, 330]) {
      store.dispatch({ type: 'edit-prescription', patch: { fovPhaseMm: fov } });
      clock.run();
    }
    ranker.open[0]?.resolve(ranking);
    await settle();
    expect(presentRanking(live.read()['a']!)).toBeUndefined();
    expect(ranker.open.map(({ job }) => job.prescription.fovPhaseMm)).toEqual([300, 330]);
    ranker.open[1]?.resolve(ranking);
    await settle();
    expect(presentRanking(live.read()['a']!)?.candidates).toBe(7);
  });

  it('is not asked again when nothing the question contains has changed', async () => {
    const { store, clock, ranker, live } = bench();
    live.start();
    clock.run();
    ranker.open[0]?.resolve(ranking);
    await settle();
    store.dispatch({ type: 'choose-view', view: 'slab' });
    clock.run();
    expect(ranker.open).toHaveLength(1);
  });
});

describe('latest wins', () => {
  it('runs one job at a time and skips those overtaken while they waited', async () => {
    const { open, run } = later<number, string>();
    const results: [number, string][] = [];
    const jobs = createLatestWins<number, string>(run, (job, result) => results.push([job, result]), () => {});
    [1, 2, 3, 4].forEach((job) => jobs.ask(job));
    expect(open.map(({ job }) => job)).toEqual([1]);
    open[0]?.resolve('one');
    await settle();
    expect(open.map(({ job }) => job)).toEqual([1, 4]);
    open[1]?.resolve('four');
    await settle();
    expect(results).toEqual([[1, 'one'], [4, 'four']]);
  });

  it('keeps quiet once stopped', async () => {
    const { open, run } = later<number, string>();
    const results: unknown[] = [];
    const jobs = createLatestWins<number, string>(run, (_, result) => results.push(result), (_, error) => results.push(error));
    jobs.ask(1);
    jobs.ask(2);
    jobs.stop();
    open[0]?.resolve('one');
    await settle();
    expect(open).toHaveLength(1);
    expect(results).toEqual([]);
  });
});
