import { assess, rankRemedies } from '@/lib/physics';
import type { Results } from '../live/results';
import { answerTo } from '../live/results';
import { sequenceById, type BenchDocument, type BenchSetting } from './bench-document';
import { caseOf } from './case-of';

/** What the bench shows before anything is touched: every verdict, and the remedies of the sequence that needs one most. */
export function firstView(
  document: BenchDocument,
  setting: BenchSetting,
): { readonly initial: Results; readonly activeId: string } {
  const answers = document.sequences.map((sequence) => {
    const question = caseOf(document, setting, sequence);
    return { id: sequence.id, question, ...answerTo(assess, question) };
  });
  const activeId =
    answers.find(({ assessment }) => assessment?.verdict === 'fold-in-keep-clear')?.id ??
    answers.find(({ assessment }) => assessment?.verdict === 'cannot-be-scanned')?.id ??
    sequenceById(document, '').id;
  const initial = Object.fromEntries(
    answers.map(({ id, ...answer }) => {
      if (id !== activeId || !answer.assessment) return [id, answer];
      const { question } = answer;
      return [id, { ...answer, ranked: { question, ranking: rankRemedies(question) } }];
    }),
  );
  return { initial, activeId };
}
