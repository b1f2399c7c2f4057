import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { KEPT } from './kept-questions';

/**
 * Answers to a wide set of questions, kept so that no constant, sign or limit of the engine changes unseen. They are what
 * the engine said, not what is true: that is asked elsewhere, of outside sources and of independent counts.
 * SELVEDGE_WRITE_GOLDEN=1 writes them anew.
 */
const FOLDER = path.join(import.meta.dirname, '../../../fixtures/golden/engine');

/**
 * Seven figures: the last bits of transcendental functions differ between machines, and sums of them by a few times as
 * much. What cancels to nothing is nothing.
 */
function rounded(value: unknown): unknown {
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) return String(value);
    return Math.abs(value) < 1e-9 ? 0 : Number(value.toPrecision(7));
  }
  if (Array.isArray(value)) return value.map(rounded);
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(Object.entries(value).map(([name, entry]) => [name, rounded(entry)]));
}

/** One line for each entry of a list keeps a difference findable and the file short. */
const lines = (value: unknown): string =>
  Array.isArray(value)
    ? `[\n${value.map((entry) => JSON.stringify(entry)).join(',\n')}\n]\n`
    : `${JSON.stringify(value, null, 1)}\n`;

describe('answers that were kept', () => {
  it.each(Object.keys(KEPT))('%s', (name) => {
    const file = path.join(FOLDER, `${name}.json`);
    const text = lines(rounded(KEPT[name]!()));
    if (process.env.SELVEDGE_WRITE_GOLDEN === '1') {
      mkdirSync(FOLDER, { recursive: true });
      writeFileSync(file, text);
    }
    expect(existsSync(file), `${file} is missing`).toBe(true);
    expect(JSON.parse(text)).toEqual(JSON.parse(readFileSync(file, 'utf8')));
  });
});
