import { describe, expect, it } from 'vitest';
import { rankRemedies } from '@/lib/physics';
import { SEARCHED_KINDS, searchRemedies } from '@/tests/support/exhaustive-remedies';
import { countOf, NO_HURRY_MS, progress, tally } from '@/tests/support/tally';
import { drawCase } from '@/tests/support/draw-case';

const CASES = countOf('SELVEDGE_RANKINGS', 40);

describe('ranking against a search written independently', () => {
  it(
    `finds the same outcomes at the same prices in ${CASES} seeded cases`,
    async () => {
      let folding = 0;
      let outcomes = 0;
      for (let seed = 1; folding < CASES; seed++) {
        const given = drawCase(seed);
        const ranking = rankRemedies(given, { filters: { changes: SEARCHED_KINDS } });
        if (ranking.now.verdict !== 'fold-in-keep-clear') continue;
        await progress('rankings against an exhaustive search', folding, CASES, 10);
        folding++;
        const listed = (entries: readonly { prescription: unknown; arms: string; costTenths: number }[]) =>
          entries
            .map(({ prescription, arms, costTenths }) => JSON.stringify([costTenths, arms, prescription]))
            .sort();
        const searched = searchRemedies(given);
        outcomes += searched.length;
        expect(listed(ranking.remedies), `seed ${seed}, ${given.prescription.family}`).toEqual(
          listed(searched),
        );
        // The first in the list is a cheapest one, among those without fold in the keep-clear area where there are any.
        const without = searched.filter((outcome) => !outcome.leavesFold);
        const best = Math.min(
          ...(without.length > 0 ? without : searched).map((outcome) => outcome.costTenths),
        );
        if (searched.length > 0) expect(ranking.remedies[0]!.costTenths, `seed ${seed}`).toBe(best);
      }
      tally('rankings against an exhaustive search', folding, `${outcomes} outcomes`);
    },
    NO_HURRY_MS,
  );
});
