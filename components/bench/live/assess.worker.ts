import { expose } from 'comlink';
import { assess } from '@/lib/physics';
import { assessed } from './results';
import type { OtherAnswer, OtherQuestion } from './live-assessor';

/** The engine away from the main thread: whole questions in, plain answers out. */
export const assessWorker = {
  assessAll(questions: readonly OtherQuestion[]): OtherAnswer[] {
    return questions.map(({ id, question }) => {
      const { assessment, refusal } = assessed({ assess }, question);
      return { id, ...(assessment ? { assessment } : {}), ...(refusal ? { refusal } : {}) };
    });
  },
};

expose(assessWorker);
