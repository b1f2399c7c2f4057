import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const ROOT = fileURLToPath(new URL('../../../', import.meta.url));

function sources(folder: string): string[] {
  return readdirSync(path.join(ROOT, folder), { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && /\.tsx?$/.test(entry.name))
    .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name)));
}

const files = [...sources('app'), ...sources('components')];

// A colour outside the tokens would have no control-room twin; a style attribute is refused by the page's policy.
const FORBIDDEN: [string, RegExp][] = [
  ['a hex colour', /["'`[\s(:]#(?:[0-9a-f]{3,4}|[0-9a-f]{6}|[0-9a-f]{8})(?=["'`\]\s;,)])/i],
  ['a colour function', /\b(?:rgba?|hsla?|oklch|oklab|lab|lch)\(\s*\d/i],
  [
    'a colour of another palette',
    /\b(?:bg|text|border|fill|stroke|outline|ring|from|to|via)-(?:red|green|emerald|lime|teal|rose|amber|orange|yellow|slate|gray|zinc|white|black)\b/,
  ],
  ['a style attribute', /\sstyle=\{/],
];

it('there are sources to look at', () => expect(files.length).toBeGreaterThan(80));

// The PDF's own boxes are no elements of a page: no policy applies and there is no other way to lay them out.
const onPages = (file: string) => !file.split(path.sep).includes('pdf');

describe.each(FORBIDDEN)('no component holds %s', (_what, pattern) => {
  it('in any file', () => {
    expect(
      files.filter(onPages).filter((file) => pattern.test(readFileSync(path.join(ROOT, file), 'utf8'))),
    ).toEqual([]);
  });
});

it('the patterns do find what they are for', () => {
  expect(`className="text-[#ff0000]"`).toMatch(FORBIDDEN[0]![1]);
  expect('fill="#abc"').toMatch(FORBIDDEN[0]![1]);
  expect('href="#sizes"').not.toMatch(FORBIDDEN[0]![1]);
  expect('rgb(10, 20, 30)').toMatch(FORBIDDEN[1]![1]);
  expect('bg-green-500').toMatch(FORBIDDEN[2]![1]);
  expect('<p style={{}}>').toMatch(FORBIDDEN[3]![1]);
});
