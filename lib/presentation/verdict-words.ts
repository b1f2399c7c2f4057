import type { Verdict } from '@/lib/physics/model/assessment';

/** Verdicts are never shortened, on no screen. */
export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  'no-fold-expected': 'No fold expected',
  'fold-outside-keep-clear': 'Fold outside the keep-clear area',
  'fold-in-keep-clear': 'Fold in the keep-clear area',
  'cannot-be-scanned': 'Cannot be scanned as planned',
  'not-modelled': 'Not modelled',
};
