import type { FoldProbability } from '@/lib/physics';
import { formatPercent, formatProbability } from './percent';

/**
 * One sentence that names both figures: the probability counts no margin, the verdict does, and takes the sizes at the
 * certainty asked for.
 */
export function describeProbability({ probability, method }: FoldProbability, sureAt: number, tried: boolean): string {
  const verdict = `the verdict adds the margin and takes sizes at ${formatPercent(sureAt * 100, 1)}`;
  const subject = tried ? 'With what is tried and without the margin' : 'Without the margin';
  if (method === 'certain') {
    const folds = probability > 0.5 ? 'fold reaches' : 'no fold reaches';
    return `${subject}, ${folds} the keep-clear area; the sizes have no spread, and the verdict adds the margin.`;
  }
  // A share of a few hundred sizes: a figure to the percent would claim more than it knows.
  const about = method === 'quasi-random' && probability > 0.01 && probability < 0.99 ? 'about ' : '';
  return `${subject}, fold reaches the keep-clear area in ${about}${formatProbability(probability)} of patients with these sizes; ${verdict}.`;
}
