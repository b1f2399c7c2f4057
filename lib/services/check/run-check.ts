import { authorise } from '@/lib/domain/access';
import type { CheckAnswer } from '@/lib/schemas/case/check-answer';
import type { ServiceContext } from '../context';
import { checkCase } from './check-case';

/** Checks one case that was sent along; nothing is stored, so there is nothing to audit. */
export function runCheck({ actor }: ServiceContext, input: unknown): CheckAnswer {
  authorise(actor, 'check.run');
  return checkCase(input);
}
