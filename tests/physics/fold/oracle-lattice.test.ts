import { describe, expect, it } from 'vitest';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { latticeSample, seeded } from './lattice-case';
import { latticeOracle } from './oracle-lattice';
import { countOf, NO_HURRY_MS, progress, tally } from '@/tests/support/tally';

/** Cases in 2D and, unless said, a fifth as many in 3D. test:long sets 100,000 and 20,000. */
const CASES_2D = countOf('SELVEDGE_ORACLE_A', 5000);
const CASES_3D = countOf('SELVEDGE_ORACLE_A_3D', Math.round(CASES_2D / 5));

describe('oracle A: the engine and an independent count of lattice cells never differ', () => {
  it(
    `in 2D: ${CASES_2D} cases, every number of lines`,
    async () => {
      let clean = 0;
      let fouled = 0;
      for (let seed = 1; seed <= CASES_2D; seed++) {
        await progress('oracle A in 2D', seed - 1, CASES_2D);
        const { lattice, problem, lineUnits, lines } = latticeSample(seed, false);
        const oracle = latticeOracle(lattice);
        const solved = solveFold(problem);
        const most = Math.min(4 * lines, lines + Math.ceil(110 / lineUnits));
        let first: number | undefined;
        let always = lines;
        for (let l = lines; l <= most; l++) {
          const expected = oracle(l * lineUnits);
          if (expected) clean++;
          else fouled++;
          if (solved.isClean(l) !== expected) expect.fail(`seed ${seed}, ${l} lines: oracle ${expected}`);
          if (expected) first ??= l;
          else always = l + 1;
        }
        const { firstCleanLines, alwaysCleanLines } = solved.requirement();
        if (first !== undefined && firstCleanLines !== first) {
          expect.fail(`seed ${seed}: first clean ${firstCleanLines}, oracle ${first}`);
        }
        // Between two lines a real width may be fouled, so "always" may lie later than the lattice can tell, never earlier.
        if (alwaysCleanLines === undefined || alwaysCleanLines < Math.min(always, most)) {
          expect.fail(`seed ${seed}: always clean from ${alwaysCleanLines}, oracle ${always}`);
        }
      }
      // Both answers must be common, or the comparison would prove nothing.
      expect(Math.min(clean, fouled)).toBeGreaterThan(CASES_2D);
      tally('oracle A in 2D', CASES_2D, `${clean} widths clean, ${fouled} not, none differs`);
    },
    NO_HURRY_MS,
  );

  it(
    `in 3D: ${CASES_3D} cases, pairs of lines and partitions`,
    async () => {
      let clean = 0;
      let fouled = 0;
      for (let seed = 1; seed <= CASES_3D; seed++) {
        await progress('oracle A in 3D', seed - 1, CASES_3D);
        const { lattice, problem, lineUnits, lines, partitions, partitionMultiple } = latticeSample(
          1e6 + seed,
          true,
        );
        const oracle = latticeOracle(lattice);
        const solved = solveFold(problem);
        const random = seeded(seed);
        for (let k = 0; k < 10; k++) {
          const l = lines + random.whole(0, Math.ceil(60 / lineUnits));
          const lz =
            Math.ceil(random.whole(partitions!, partitions! + 16) / partitionMultiple) * partitionMultiple;
          const expected = oracle(l * lineUnits, lz);
          if (expected) clean++;
          else fouled++;
          if (solved.isClean(l, lz) !== expected) {
            expect.fail(`seed ${1e6 + seed}, ${l} lines, ${lz} partitions: oracle ${expected}`);
          }
        }
      }
      expect(Math.min(clean, fouled)).toBeGreaterThan(CASES_3D);
      tally('oracle A in 3D', CASES_3D, `${clean} pairs clean, ${fouled} not, none differs`);
    },
    NO_HURRY_MS,
  );
});
