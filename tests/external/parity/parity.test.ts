/**
 * The same cases in Node and in Debian's Chromium: the rounded answers are the same text, although transcendental
 * functions may differ in the last bits. Hashes are compared; where one differs the two texts are shown.
 */
import { chromium } from '@playwright/test';
import { build, type Rolldown } from 'vite';
import path from 'node:path';
import { expect, it } from 'vitest';
import { countOf, tally } from '@/tests/support/tally';
import { answerHashes, answerText } from './answer-hashes';

const CASES = countOf('SELVEDGE_PARITY', 5000);
const BATCH = 500;
const ROOT = path.join(import.meta.dirname, '../../..');

/** The engine and its seeded cases as one script for a browser. */
async function browserScript(): Promise<string> {
  const built = (await build({
    root: ROOT,
    configFile: false,
    logLevel: 'error',
    resolve: { alias: { '@': ROOT } },
    build: {
      write: false,
      minify: false,
      lib: { entry: path.join(import.meta.dirname, 'answer-hashes.ts'), formats: ['iife'], name: 'parity' },
    },
  })) as Rolldown.RolldownOutput[];
  return built[0]!.output[0].code;
}

interface Browser {
  readonly parity: { answerHashes(from: number, to: number): number[]; answerText(seed: number): string };
}

it(`gives the same rounded answers in Node and Chromium in ${CASES} seeded cases`, async () => {
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'],
  });
  try {
    const page = await browser.newPage();
    await page.addScriptTag({ content: await browserScript() });
    for (let from = 1; from <= CASES; from += BATCH) {
      const to = Math.min(CASES + 1, from + BATCH);
      const there = await page.evaluate(([a, b]) => (globalThis as unknown as Browser).parity.answerHashes(a!, b!), [from, to]);
      const here = answerHashes(from, to);
      const differs = here.findIndex((hash, i) => hash !== there[i]);
      if (differs < 0) continue;
      const seed = from + differs;
      const text = await page.evaluate((which) => (globalThis as unknown as Browser).parity.answerText(which), seed);
      expect(JSON.parse(text), `seed ${seed}`).toEqual(JSON.parse(answerText(seed)));
    }
    tally('rounded answers in Node and Chromium', CASES);
  } finally {
    await browser.close();
  }
}, CASES * 60);
