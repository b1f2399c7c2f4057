import { execFileSync, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { SlabResponse } from '@/lib/physics/slab/slab-response';
import { parseRows, readPublished } from '@/tests/support/read-published';

/* scipy's solve_ivp on the Bloch equations; where Python with scipy is absent the committed values stand in. */
const script = fileURLToPath(new URL('integrate_bloch.py', import.meta.url));
const available = spawnSync('python3', ['-c', 'import numpy, scipy'], { stdio: 'ignore' }).status === 0;
const computed = available
  ? parseRows('python3', execFileSync('python3', [script], { encoding: 'utf8', timeout: 120_000 }))
  : undefined;
const published = readPublished('bloch-ode');

console.info(
  computed
    ? 'Bloch equations: integrated again with scipy and compared.'
    : 'Bloch equations: Python with scipy is not here; compared with the committed values.',
);

describe('slab response against scipy’s integration of the Bloch equations', () => {
  const rows = computed ?? published;
  it('twelve pulses at ten places', () => expect(rows).toHaveLength(120));
  it('|Mxy| and Mz within 2e-5 (stated with the measurement)', () => {
    for (const row of rows) {
      const response = new SlabResponse(row.number('tbw'), row.number('flip_deg'));
      for (const beta of [
        response.exactBetaAt(row.number('z_over_slab')),
        response.betaAt(row.number('z_over_slab')),
      ]) {
        expect(Math.abs(2 * Math.abs(beta) * Math.sqrt(1 - beta * beta) - row.number('mxy'))).toBeLessThan(
          2e-5,
        );
        expect(Math.abs(1 - 2 * beta * beta - row.number('mz'))).toBeLessThan(2e-5);
      }
    }
  });
  it('scipy gives the committed values again', () => {
    rows.forEach((row, i) => {
      // Printed to 1e-9; another processor's last bits, amplified by some thousand steps.
      for (const column of ['tbw', 'flip_deg', 'z_over_slab', 'mxy', 'mz']) {
        expect(Math.abs(row.number(column) - published[i]!.number(column))).toBeLessThanOrEqual(1e-8);
      }
    });
  });
});
