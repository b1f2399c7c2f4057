import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync(new URL('../../../app/globals.css', import.meta.url), 'utf8');

/** The `--name: #rrggbb` declarations of the text given. */
function tokensOf(text: string): Map<string, string> {
  return new Map(
    [...text.matchAll(/--([a-z-]+):\s*(#[0-9a-f]{6});/g)].map((match) => [match[1]!, match[2]!]),
  );
}

const night = css.slice(css.indexOf('@variant control-room {'), css.indexOf('@layer base'));
const day = css.slice(css.indexOf(':root {'), css.indexOf('@variant control-room {'));
const themes = { day: tokensOf(day), 'control room': tokensOf(night) };

/** Relative luminance and contrast ratio of WCAG 2.2 (definitions "relative luminance", "contrast ratio"). */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const c = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [high, low] = [luminance(a), luminance(b)].sort((x, y) => y - x) as [number, number];
  return (high + 0.05) / (low + 0.05);
}

const GROUNDS = ['cloth', 'paper', 'sunk', 'wash'];
// Text and thin lines that carry meaning: WCAG 2.2 success criterion 1.4.3, 4.5:1.
const TEXT_PAIRS: [string, string][] = [
  ...['ink', 'ink-soft', 'indigo', 'indigo-deep', 'thread', 'ochre'].flatMap((text) =>
    GROUNDS.map((ground): [string, string] => [text, ground]),
  ),
  ['on-indigo', 'indigo'],
  ['on-indigo', 'indigo-deep'],
  ['paper', 'ink'],
  ['thread', 'thread-wash'],
  ['ochre', 'ochre-wash'],
  ['ink', 'thread-wash'],
  ['ink', 'ochre-wash'],
  ...['fat', 'lean', 'organ', 'gland', 'vessel', 'bone'].map((tissue): [string, string] => [
    'ink',
    `tissue-${tissue}`,
  ]),
];
// The boundary of a control: success criterion 1.4.11, 3:1.
const BOUNDARY_PAIRS: [string, string][] = GROUNDS.map((ground) => ['line-strong', ground]);

describe.each(Object.entries(themes))('contrast by %s', (_name, tokens) => {
  it.each(TEXT_PAIRS)('%s on %s is at least 4.5:1', (text, ground) => {
    expect(contrast(tokens.get(text)!, tokens.get(ground)!)).toBeGreaterThanOrEqual(4.5);
  });

  it.each(BOUNDARY_PAIRS)('%s on %s is at least 3:1', (edge, ground) => {
    expect(contrast(tokens.get(edge)!, tokens.get(ground)!)).toBeGreaterThanOrEqual(3);
  });
});

it('both themes define the same tokens', () => {
  expect([...themes['control room'].keys()].sort()).toEqual([...themes.day.keys()].sort());
  expect(themes.day.size).toBeGreaterThan(20);
});

it('black on white is 21:1, so the formula itself can fail', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
});

it('no token is green: its green channel never leads both others', () => {
  for (const tokens of Object.values(themes)) {
    for (const [name, hex] of tokens) {
      const [r, g, b] = [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16)) as [
        number,
        number,
        number,
      ];
      expect(g > r && g > b, `${name} ${hex}`).toBe(false);
    }
  }
});
