export interface EquivalentMutant {
  readonly file: string;
  /** The source line, without its indent. */
  readonly within: string;
  readonly code: string;
  readonly mutated: string;
  readonly reason: string;
}

const CACHE = 'A cache: how much it keeps changes what is worked out again, no answer.';
const FINER_KEY =
  'A key that tells more apart than it must: the same thing is worked out twice, no answer changes.';
const START_OF_SEARCH =
  'Where a search upwards begins: further down it only tries more before it finds the same.';

/**
 * Mutants that change no answer, with the reason: no test can tell them from the code. Matched by file, line and text;
 * one that a test tells apart all the same, or that is no longer there, is reported.
 */
export const EQUIVALENT: readonly EquivalentMutant[] = [
  {
    file: 'lib/physics/assess/geometry-class.ts',
    within: 'if (this.answers.size > this.most) this.answers.delete(this.answers.keys().next().value!);',
    code: 'this.answers.size > this.most',
    mutated: 'this.answers.size <= this.most',
    reason: CACHE,
  },
  {
    file: 'lib/physics/assess/geometry-class.ts',
    within: "a.factorPhase * a.factorSlice > 1 && a.unfolding === 'image-domain-grid-ends'",
    code: 'a.factorPhase * a.factorSlice > 1',
    mutated: 'a.factorPhase * a.factorSlice >= 1',
    reason: FINER_KEY,
  },
  {
    file: 'lib/physics/assess/slab-result.ts',
    within: 'const answers = new KeptAnswers<SlabResult>(256);',
    code: '256',
    mutated: '259',
    reason: CACHE,
  },
  {
    file: 'lib/physics/assess/round-assessment.ts',
    within: '[/Mm2$/, 0.1],',
    code: '0.1',
    mutated: '0.101',
    reason: 'The quantum is used by its inverse, rounded to a whole number: 10 either way.',
  },
  {
    file: 'lib/physics/assess/detail-of.ts',
    within: 'const frame = sectionFrame(p, 0);',
    code: '0',
    mutated: '1',
    reason: 'Only the frame’s directions are used, and they are the same in every slice.',
  },
  {
    file: 'lib/physics/fold/acquired-lines.ts',
    within:
      'let lines = nextAcquiredLines(linesAcrossFov, Math.floor((minWidthMm * linesAcrossFov) / fovMm) - 1, step);',
    code: 'minWidthMm * linesAcrossFov',
    mutated: 'minWidthMm / linesAcrossFov',
    reason: START_OF_SEARCH,
  },
  {
    file: 'lib/physics/fold/alias-family.ts',
    within: 'const alike = !tissue.varies && source.sMm > tissue.lowMm && source.sMm < tissue.highMm;',
    code: 'source.sMm < tissue.highMm',
    mutated: 'source.sMm >= tissue.highMm',
    reason:
      'Alike sections are passed over to save work: beyond the solid’s end they are empty, within it looked at again.',
  },
];
