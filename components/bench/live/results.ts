import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking } from '@/lib/physics/model/remedy';

/** A ranking with the question it answers. */
export interface Ranked {
  readonly question: Case;
  readonly ranking: Ranking;
}

/** What the engine says about one sequence as it stands. */
export interface SequenceResult {
  /** The question that was answered; another object means the answer is stale. */
  readonly question: Case;
  readonly assessment?: Assessment;
  /** Why the question could not be put: which value, and what is allowed. */
  readonly refusal?: string;
  /** The newest ranking there is: it follows the assessment from a Worker. */
  readonly ranked?: Ranked;
}

export type Results = Readonly<Record<string, SequenceResult>>;

export interface Answer {
  readonly assessment?: Assessment;
  readonly refusal?: string;
}

/** A refused value is an answer a person can act on; anything else is a fault and goes on up. */
export function refusalOf(error: unknown): string {
  if (error instanceof Error && error.name === 'DomainError') return error.message;
  throw error;
}

export function answerTo(assess: (question: Case) => Assessment, question: Case): Answer {
  try {
    return { assessment: assess(question) };
  } catch (error) {
    return { refusal: refusalOf(error) };
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

/** The ranking, if it answers the very question that is on the bench: only then may a remedy be tried or adopted. */
export function presentRanking(result: SequenceResult): Ranking | undefined {
  return result.ranked && sameQuestion(result.ranked.question, result.question) ? result.ranked.ranking : undefined;
}
