import { execFileSync, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { BODY_REGRESSIONS } from '@/lib/physics/size/body-regressions';
import { parseRows, readPublished, type PublishedRow } from '@/tests/support/read-published';

/*
 * R's lm on the data set `body` of package gclus (Heinz, Peterson, Johnson, Kerk 2003, J Stat Educ 11(2); n = 507).
 * Debian packages r-base-core and r-cran-gclus; where they are absent the committed values stand in.
 */
const script = fileURLToPath(new URL('compute-regressions.R', import.meta.url));
const available =
  spawnSync('Rscript', ['--vanilla', '-e', 'library(gclus)'], { stdio: 'ignore' }).status === 0;
const computed: readonly PublishedRow[] | undefined = available
  ? parseRows(
      'Rscript',
      execFileSync('Rscript', ['--vanilla', script], { encoding: 'utf8', timeout: 60_000 }),
    )
  : undefined;
const published = readPublished('body-regressions');

const COLUMNS = [
  'n',
  'intercept',
  'height',
  'weight',
  'male',
  'R2',
  'resid_sd',
  'loo_rmse',
  'max_abs_resid',
  'alt_sqrt_int',
  'alt_sqrt_WH',
  'alt_sqrt_male',
  'alt_sqrt_R2',
  'alt_sqrt_resid_sd',
];
/** The same least squares on another machine. */
const TOLERANCE = 1e-6;

console.info(
  computed
    ? 'body regressions: computed again with R and compared.'
    : 'body regressions: R with gclus is not here; compared with the committed values.',
);

describe('regressions of the data set `body`', () => {
  const rows = computed ?? published;
  it.each(Object.entries(BODY_REGRESSIONS))('%s: the engine’s line is R’s within 1e-6', (_, line) => {
    const row = rows.find((one) => one.text('y') === line.column)!;
    const pairs = [
      [line.intercept, 'intercept'],
      [line.perCm, 'height'],
      [line.perKg, 'weight'],
      [line.male, 'male'],
      [line.residualSd, 'resid_sd'],
    ] as const;
    for (const [value, column] of pairs)
      expect(Math.abs(value - row.number(column))).toBeLessThanOrEqual(TOLERANCE);
  });
  it('R gives the committed values again, every column', () => {
    expect(rows.map((row) => row.text('y'))).toEqual(published.map((row) => row.text('y')));
    rows.forEach((row, i) => {
      for (const column of COLUMNS)
        expect(Math.abs(row.number(column) - published[i]!.number(column))).toBeLessThanOrEqual(TOLERANCE);
    });
  });
});
