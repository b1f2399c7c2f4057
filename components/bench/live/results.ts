import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { DomainError } from '@/lib/physics/model/domain-error';
import type { Ranking } from '@/lib/physics/model/remedy';

/** What the engine says about one sequence as it stands. */
export interface SequenceResult {
  /** The question that was answered; another object means the answer is stale. */
  readonly question: Case;
  readonly assessment?: Assessment;
  readonly ranking?: Ranking;
  /** Why the question could not be put: which value, and what is allowed. */
  readonly refusal?: string;
}

export type Results = Readonly<Record<string, SequenceResult>>;

export interface Engine {
  readonly assess: (question: Case) => Assessment;
  readonly rankRemedies: (question: Case) => Ranking;
}

/** A refused value is an answer a person can act on; anything else is a fault and goes on up. */
export function refusalOf(error: unknown): string {
  if (error instanceof DomainError || (error instanceof Error && error.name === 'DomainError')) return error.message;
  throw error;
}

export function assessed(engine: Pick<Engine, 'assess'>, question: Case): SequenceResult {
  try {
    return { question, assessment: engine.assess(question) };
  } catch (error) {
    return { question, refusal: refusalOf(error) };
  }
}

export function ranked(engine: Pick<Engine, 'rankRemedies'>, question: Case): SequenceResult {
  try {
    const ranking = engine.rankRemedies(question);
    return { question, assessment: ranking.now, ranking };
  } catch (error) {
    return { question, refusal: refusalOf(error) };
  }
}

/** Two questions are the same when everything in them is: edits replace objects, they never change them. */
export function sameQuestion(a: Case | undefined, b: Case): boolean {
  return (
    a !== undefined &&
    a.patient === b.patient &&
    a.prescription === b.prescription &&
    a.keepClear === b.keepClear &&
    a.scanner === b.scanner &&
    a.policy === b.policy
  );
}
