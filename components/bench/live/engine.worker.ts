import { expose } from 'comlink';
import { assess, rankRemedies } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking } from '@/lib/physics/model/remedy';
import { answerTo, type Answer } from './results';

/** The engine away from the main thread: whole questions in, plain answers out. */
const engine = {
  rank: (question: Case): Ranking => rankRemedies(question),
  assessAll: (questions: readonly Case[]): Answer[] => questions.map((question) => answerTo(assess, question)),
};

export type EngineWorker = typeof engine;

expose(engine);
