import type { Assessment } from '@/lib/physics/model/assessment';
import { foldFigure, snrFigure } from './assessment-figures';
import { VERDICT_WORDS } from './verdict-words';

/** What the picture is, first; then what it shows, for those who do not see it. */
export function describePicture(now: Assessment | undefined, tried: Assessment | undefined): readonly string[] {
  const lines = [
    'A simulation: invented tissue at the sizes given, with this prescription’s contrast, fold, chemical shift and noise. Not this patient’s picture.',
  ];
  if (now) lines.push(`Now: ${shows(now)}.`);
  if (now && tried) lines.push(`Tried: ${shows(tried)}, SNR ${snrFigure(tried, now)} of now.`);
  return lines;
}

function shows(assessment: Assessment): string {
  const words = VERDICT_WORDS[assessment.verdict];
  const fold = foldFigure(assessment);
  return fold === 'none' ? words.toLowerCase() : `${words.toLowerCase()}, ${fold}`;
}
