import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { BenchSetting } from '../state/bench-document';
import { sequenceById } from '../state/bench-document';
import type { BenchStore } from '../state/bench-store';
import { caseOf } from '../state/case-of';
import { createLatestWins } from './latest-wins';
import { ranked, sameQuestion, type Engine, type Results, type SequenceResult } from './results';

export interface OtherQuestion {
  readonly id: string;
  readonly question: Case;
}

export interface OtherAnswer {
  readonly id: string;
  readonly assessment?: Assessment;
  readonly refusal?: string;
}

export interface LiveAssessorOptions {
  readonly store: BenchStore;
  readonly setting: BenchSetting;
  readonly engine: Engine;
  readonly initial: Results;
  /** The other sequences are assessed away from the main thread. */
  readonly assessOthers: (questions: readonly OtherQuestion[]) => Promise<readonly OtherAnswer[]>;
  readonly requestFrame: (callback: () => void) => number;
  readonly cancelFrame: (handle: number) => void;
  /** Called once for every answer worked out on the main thread. */
  readonly onWork?: (sequenceId: string) => void;
  readonly onFault: (error: unknown) => void;
}

export interface LiveAssessor {
  readonly read: () => Results;
  readonly subscribe: (listener: () => void) => () => void;
  readonly start: () => () => void;
}

/**
 * Answers every edit in the next animation frame, however many edits fall into it, and asks for the other
 * sequences only when what they share has changed.
 */
export function createLiveAssessor(options: LiveAssessorOptions): LiveAssessor {
  const { store, setting, engine } = options;
  let results = options.initial;
  const listeners = new Set<() => void>();

  const publish = (changed: Results): void => {
    results = { ...results, ...changed };
    for (const listener of [...listeners]) listener();
  };

  const questionOf = (id: string): Case => {
    const { document } = store.read();
    return caseOf(document, setting, sequenceById(document, id));
  };

  const answerActive = (): void => {
    const { activeId } = store.read();
    const question = questionOf(activeId);
    const known = results[activeId];
    if (known && sameQuestion(known.question, question) && (known.ranking || known.refusal)) return;
    options.onWork?.(activeId);
    publish({ [activeId]: ranked(engine, question) });
  };

  return {
    read: () => results,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    start() {
      let frame: number | null = null;
      const others = createLatestWins<readonly OtherQuestion[], readonly OtherAnswer[]>(
        options.assessOthers,
        (asked, answers) => {
          const changed: Record<string, SequenceResult> = {};
          for (const { id, ...answer } of answers) {
            const question = asked.find((each) => each.id === id)?.question;
            // The active sequence may have been chosen since: its own, fuller answer stays.
            if (question && sameQuestion(question, questionOf(id)) && id !== store.read().activeId) {
              changed[id] = { question, ...answer };
            }
          }
          publish(changed);
        },
        (_asked, error) => options.onFault(error),
      );

      const askOthers = (): void => {
        const { document, activeId } = store.read();
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
        } catch (error) {
          options.onFault(error);
        }
        askOthers();
      };

      const schedule = (): void => {
        frame ??= options.requestFrame(onFrame);
      };

      const unsubscribe = store.subscribe(schedule);
      schedule();
      return () => {
        unsubscribe();
        others.stop();
        if (frame !== null) options.cancelFrame(frame);
      };
    },
  };
}
