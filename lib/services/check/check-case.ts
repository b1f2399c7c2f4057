import { ServiceError } from '@/lib/domain/errors';
import { DomainError, type Case } from '@/lib/domain/case/model';
import { rankRemedies } from '@/lib/physics';
import { CaseInputError, parseCase } from '@/lib/schemas/case';
import type { CheckAnswer } from '@/lib/schemas/case/check-answer';
import { fieldMessages } from '@/lib/schemas/fields/field-issues';
import { inputHash } from './input-hash';
import { roundAnswer } from './round-answer';

function readCase(input: unknown): Case {
  try {
    return parseCase(input);
  } catch (error) {
    if (error instanceof CaseInputError) throw new ServiceError('invalid', { fields: fieldMessages(error.issues) });
    throw error;
  }
}

/**
 * The engine's answer to one case: no database, no clock, no account. The API and the command line both call it, so
 * both give the same text.
 */
export function checkCase(input: unknown): CheckAnswer {
  const question = readCase(input);
  try {
    const { now, ...ranking } = rankRemedies(question);
    return roundAnswer({
      engineVersion: now.engineVersion,
      inputHash: inputHash(question),
      assessment: now,
      ...ranking,
      case: question,
    }) as CheckAnswer;
  } catch (error) {
    if (error instanceof DomainError) throw new ServiceError('invalid', { fields: { [error.argument]: error.message } });
    throw error;
  }
}

/** The one text form of an answer. */
export function renderAnswer(answer: CheckAnswer): string {
  return `${JSON.stringify(answer, null, 2)}\n`;
}
