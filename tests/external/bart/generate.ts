/**
 * Regenerates fixtures/published/bart-fold/*.json with Debian's package `bart`:
 *   npx tsx tests/external/bart/generate.ts
 */
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

import { measureFold } from './measure-fold';
import { GHOST_CASES, measureGhosts } from './measure-ghosts';
import { BART_PRESCRIPTIONS } from './prescriptions';
import { Bart } from './toolbox';

const folder = fileURLToPath(new URL('../../../fixtures/published/bart-fold/', import.meta.url));
const bart = new Bart();
try {
  const fold = BART_PRESCRIPTIONS.map((c) => measureFold(bart, c));
  writeFileSync(`${folder}fold.json`, `${lines(fold)}\n`);
  const ghosts = GHOST_CASES.map((c) => measureGhosts(bart, c));
  writeFileSync(`${folder}ghosts.json`, `${lines(ghosts)}\n`);
} finally {
  bart.close();
}

/** One record a line, so that a changed case shows as one changed line. */
function lines(records: readonly unknown[]): string {
  return `[\n${records.map((r) => `  ${JSON.stringify(r)}`).join(',\n')}\n]`;
}
