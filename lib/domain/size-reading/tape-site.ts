/** Where a tape went round. The tables that sizes are worked out from were measured at the iliac crest. */
export const TAPE_SITES = ['iliac-crest', 'umbilicus', 'midway', 'hips'] as const;
export type TapeSite = (typeof TAPE_SITES)[number];

export const TAPE_SITE_LABELS: Readonly<Record<TapeSite, string>> = {
  'iliac-crest': 'at the iliac crest',
  umbilicus: 'at the navel',
  midway: 'midway between lowest rib and iliac crest',
  hips: 'round the hips',
};

/** Added to the spread of a girth that was taken elsewhere, cm: our judgement, no source. */
export const ELSEWHERE_SPREAD_CM = 3;
