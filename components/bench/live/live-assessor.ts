import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking } from '@/lib/physics/model/remedy';
import { sequenceById, type BenchSetting } from '../state/bench-document';
import type { BenchStore } from '../state/bench-store';
import { caseOf } from '../state/case-of';
import { createLatestWins } from './latest-wins';
import { answerTo, sameQuestion, type Answer, type Results, type SequenceResult } from './results';

export interface Asked {
  readonly id: string;
  readonly question: Case;
}

export interface LiveAssessorOptions {
  readonly store: BenchStore;
  readonly setting: BenchSetting;
  readonly initial: Results;
  /** On the main thread, once a frame: the active sequence. */
  readonly assess: (question: Case) => Assessment;
  /** Away from the main thread: the ranking of the active sequence, and what the edit means for the others. */
  readonly rank: (question: Case) => Promise<Ranking>;
  readonly assessOthers: (questions: readonly Asked[]) => Promise<readonly Answer[]>;
  readonly requestFrame: (callback: () => void) => number;
  readonly cancelFrame: (handle: number) => void;
  /** Called once for every answer worked out on the main thread, with how it is to be run. */
  readonly onWork?: (sequenceId: string, work: () => void) => void;
  readonly onFault: (error: unknown) => void;
}

export interface LiveAssessor {
  readonly read: () => Results;
  readonly subscribe: (listener: () => void) => () => void;
  readonly start: () => () => void;
}

/**
 * Answers every edit in the next animation frame, however many edits fall into it. The ranking and the other
 * sequences follow from a Worker in which the latest question wins.
 */
export function createLiveAssessor(options: LiveAssessorOptions): LiveAssessor {
  const { store, setting, onFault } = options;
  let results = options.initial;
  const listeners = new Set<() => void>();

  const publish = (changed: Results): void => {
    results = { ...results, ...changed };
    for (const listener of [...listeners]) listener();
  };

  const questionOf = (id: string): Case => {
    const { document, sureAt } = store.read();
    return caseOf(document, setting, sequenceById(document, id), sureAt);
  };

  const answerActive = (): void => {
    const { activeId } = store.read();
    const question = questionOf(activeId);
    const known = results[activeId];
    if (known && sameQuestion(known.question, question) && (known.assessment || known.refusal)) return;
    const work = (): void => {
      const answer = answerTo(options.assess, question);
      publish({ [activeId]: { question, ...answer, ...(known?.ranked ? { ranked: known.ranked } : {}) } });
    };
    if (options.onWork) options.onWork(activeId, work);
    else work();
  };

  const start = (): (() => void) => {
    let frame: number | null = null;

    const rankings = createLatestWins<Asked, Ranking>(
      ({ question }) => options.rank(question),
      ({ id, question }, ranking) => {
        const known = results[id];
        if (known) publish({ [id]: { ...known, ranked: { question, ranking } } });
      },
      (_asked, error) => onFault(error),
    );

    const others = createLatestWins<readonly Asked[], readonly Answer[]>(
      options.assessOthers,
      (asked, answers) => {
        const changed: Record<string, SequenceResult> = {};
        asked.forEach(({ id, question }, i) => {
          const answer = answers[i];
          // It may have been edited, or put on the bench, since: then its own answer stays.
          if (answer && sameQuestion(question, questionOf(id)) && id !== store.read().activeId) {
            changed[id] = { ...results[id], question, ...answer };
          }
        });
        publish(changed);
      },
      (_asked, error) => onFault(error),
    );

    const askWorker = (): void => {
      const { document, activeId } = store.read();
      const active = results[activeId];
      if (active?.assessment && !sameQuestion(active.ranked?.question, active.question)) {
        rankings.ask({ id: activeId, question: active.question });
      }
      const stale = document.sequences
        .filter(({ id }) => id !== activeId)
        .map(({ id }) => ({ id, question: questionOf(id) }))
        .filter(({ id, question }) => !sameQuestion(results[id]?.question, question));
      if (stale.length > 0) others.ask(stale);
    };

    const onFrame = (): void => {
      frame = null;
      try {
        answerActive();
        askWorker();
      } catch (error) {
        onFault(error);
      }
    };
    const schedule = (): void => {
      frame ??= options.requestFrame(onFrame);
    };
    const unsubscribe = store.subscribe(schedule);
    schedule();
    return () => {
      unsubscribe();
      rankings.stop();
      others.stop();
      if (frame !== null) options.cancelFrame(frame);
    };
  };

  return {
    read: () => results,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    start,
  };
}
