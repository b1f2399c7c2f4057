import type { FoldProbability } from '@/lib/physics';
import { formatPercent, formatProbability } from './percent';

/** None, or all, of a few hundred sizes is not never, or always. */
const LEAST = 0.001;

/**
 * One sentence that names both figures: the probability counts no margin, the verdict does, and takes the sizes at the
 * certainty asked for.
 */
export function describeProbability({ probability, method }: FoldProbability, sureAt: number, tried: boolean): string {
  const subject = tried ? 'Tried, without margin' : 'Without margin';
  if (method === 'certain') {
    const folds = probability > 0.5 ? 'fold' : 'no fold';
    return `${subject}: ${folds} in the keep-clear area; the sizes have no spread, and the verdict adds the margin.`;
  }
  const share = `${shareOf({ probability, method })} of such patients`;
  return `${subject}: fold in the keep-clear area in ${share}; the verdict adds it, sure at ${formatPercent(sureAt * 100, 1)}.`;
}

/** The same in a few words, for the line that is always there: "fold in about 93 %". */
export function shortProbability(found: Pick<FoldProbability, 'probability' | 'method'>, tried: boolean): string {
  const fold = found.method !== 'certain' ? `fold in ${shareOf(found)}` : found.probability > 0.5 ? 'fold' : 'no fold';
  return tried ? `tried: ${fold}` : fold;
}

function shareOf({ probability, method }: Pick<FoldProbability, 'probability' | 'method'>): string {
  // A share of a few hundred sizes: a figure to the percent would claim more than it knows.
  const shown = method === 'quasi-random' ? Math.min(1 - LEAST, Math.max(LEAST, probability)) : probability;
  const about = method === 'quasi-random' && probability > 0.01 && probability < 0.99 ? 'about ' : '';
  return `${about}${formatProbability(shown)}`;
}
