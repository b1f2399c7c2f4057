import type { CostTerm, Remedy } from '../model/remedy';

const tenthsOf = (terms: readonly CostTerm[], kind: CostTerm['kind']): number =>
  terms.find((term) => term.kind === kind)?.tenths ?? 0;

/** What remedies are compared in, less is better: rounded as they are shown, so that every machine agrees. */
function measures({ assessment, terms }: Remedy): readonly number[] {
  const voxel = assessment.detail?.voxelMm.reduce((product, edge) => product * edge, 1) ?? 0;
  return [
    Math.round((assessment.time?.scanS ?? 0) * 10),
    -Math.round((assessment.detail?.snr ?? 0) * 1e4),
    Math.round(voxel * 1e3),
    Math.round((assessment.fold?.displayedShare ?? 0) * 1e4) + (assessment.slab?.contaminated ?? 0) * 1e4,
    Math.round((assessment.fold?.keepClearShare ?? 0) * 1e4) +
      (assessment.slab?.contaminatedInKeepClear ?? 0) * 1e4,
    Number(assessment.fold?.inKeepClear ?? false),
    tenthsOf(terms, 'breath-hold'),
    tenthsOf(terms, 'side-effects'),
    tenthsOf(terms, 'effort'),
  ];
}

/**
 * Marks every remedy that another one beats: no worse in time, SNR, voxel, fold, breath-hold, side effects and effort,
 * and better in at least one. What is left is the Pareto front.
 */
export function markDominated(remedies: readonly Remedy[]): Remedy[] {
  const all = remedies.map(measures);
  const beats = (a: readonly number[], b: readonly number[]): boolean => {
    let better = false;
    for (let i = 0; i < a.length; i++) {
      if (a[i]! > b[i]!) return false;
      if (a[i]! < b[i]!) better = true;
    }
    return better;
  };
  return remedies.map((remedy, index) => ({
    ...remedy,
    dominated: all.some((other) => beats(other, all[index]!)),
  }));
}
