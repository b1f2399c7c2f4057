/** What must be said wherever a plan is read at the scanner. Wording is ours; local policy prevails. */
export const CAUTIONS: readonly string[] = [
  'Planning aid, a planning estimate. Trained staff, implant screening, equipment labelling and local policy decide. Licensed practice prevails.',
  'Skin must not touch the bore, and skin must not form a loop: pad by local policy, ask about warmth, stop when the patient says so.',
  'Large cross-sections raise SAR and may stretch TR: enter the true weight; the scanner’s own SAR monitor prevails.',
];
