/**
 * The same cases in Node and in Debian's Chromium: the rounded answers are the same text, although transcendental
 * functions may differ in the last bits. Hashes are compared; where one differs the two texts are shown.
 */
import path from 'node:path';
import { expect, it } from 'vitest';
import { inChromium } from '@/tests/support/engine-in-browser';
import { countOf, tally } from '@/tests/support/tally';
import { answerHashes, answerText } from './answer-hashes';

const CASES = countOf('SELVEDGE_PARITY', 5000);
const BATCH = 500;

interface Browser {
  readonly parity: { answerHashes(from: number, to: number): number[]; answerText(seed: number): string };
}

it(
  `gives the same rounded answers in Node and Chromium in ${CASES} seeded cases`,
  async () => {
    await inChromium(path.join(import.meta.dirname, 'answer-hashes.ts'), 'parity', async (page) => {
      for (let from = 1; from <= CASES; from += BATCH) {
        const to = Math.min(CASES + 1, from + BATCH);
        const there = await page.evaluate(
          ([a, b]) => (globalThis as unknown as Browser).parity.answerHashes(a!, b!),
          [from, to],
        );
        const here = answerHashes(from, to);
        const differs = here.findIndex((hash, i) => hash !== there[i]);
        if (differs < 0) continue;
        const seed = from + differs;
        const text = await page.evaluate(
          (which) => (globalThis as unknown as Browser).parity.answerText(which),
          seed,
        );
        expect(JSON.parse(text), `seed ${seed}`).toEqual(JSON.parse(answerText(seed)));
      }
    });
    tally('rounded answers in Node and Chromium', CASES);
  },
  CASES * 60,
);
