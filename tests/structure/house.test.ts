import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { filesEnding, ROOT } from './import-graph';

const tracked = execFileSync('git', ['ls-files', '-z'], { cwd: ROOT, encoding: 'utf8' }).split('\0').filter(Boolean);
const lines = (file: string) => readFileSync(path.join(ROOT, file), 'utf8').split('\n').length;

describe('the top level', () => {
  const FOLDERS = ['.ci', 'app', 'components', 'db', 'fixtures', 'lib', 'migrations', 'public', 'tests'];
  const FILES = [
    '.gitignore', '.npmrc', 'DEVELOPERS.md', 'README.md', 'eslint.config.mjs', 'instrumentation.ts', 'next-env.d.ts',
    'next.config.mjs', 'package-lock.json', 'package.json', 'playwright.config.ts', 'postcss.config.mjs', 'proxy.ts',
    'tailwind.config.ts', 'tsconfig.json', 'vitest.config.ts',
  ];

  it('has the folders and files that were agreed and no others', () => {
    const top = [...new Set(tracked.map((file) => file.split('/')[0]!))];
    expect(top.filter((name) => !FOLDERS.includes(name) && !FILES.includes(name))).toEqual([]);
  });
});

describe('names', () => {
  it('has no folder that says nothing about what is in it', () => {
    const vague = new Set(['utils', 'util', 'misc', 'helpers', 'common', 'shared', 'stuff']);
    expect(tracked.filter((file) => file.split('/').slice(0, -1).some((folder) => vague.has(folder)))).toEqual([]);
  });

  it('has source files in kebab-case', () => {
    const ours = filesEnding('.ts', '.tsx', '.mjs');
    const kebab = /^[a-z0-9]+(-[a-z0-9]+)*(\.(test|spec|d|setup|worker|measure))*\.(ts|tsx|mts|mjs)$/;
    expect(ours.filter((file) => !kebab.test(path.basename(file)))).toEqual([]);
  });

  it('names migrations by time, verb and noun', () => {
    const migrations = tracked.filter((file) => file.startsWith('migrations/'));
    expect(migrations.filter((file) => !/^migrations\/\d{14}-[a-z]+(-[a-z]+)+\.ts$/.test(file))).toEqual([]);
  });
});

describe('lengths', () => {
  // Ceilings above the lengths we aim at (60, 120, 250, 300): a file over its ceiling does more than one thing.
  const CEILINGS: [string, (file: string) => boolean, number][] = [
    ['pages and routes', (file) => /^app\/.*\/(page|layout|route|loading|error|actions)\.tsx?$/.test(file), 100],
    ['use-cases', (file) => file.startsWith('lib/services/'), 200],
    ['components', (file) => file.startsWith('components/'), 400],
    ['physics', (file) => file.startsWith('lib/physics/'), 400],
    ['everything', () => true, 500],
  ];

  it.each(CEILINGS)('%s', (_, belongs, ceiling) => {
    const source = filesEnding('.ts', '.tsx', '.mjs').filter((file) => file !== 'db/types/tables.ts');
    expect(source.filter((file) => belongs(file) && lines(file) > ceiling).map((file) => `${file}: ${lines(file)}`)).toEqual([]);
  });
});

describe('what the page policy and the look forbid', () => {
  // What paints a PDF is no page: there `style` is the PDF library's own word.
  const screens = filesEnding('.tsx').filter(
    (file) => (file.startsWith('app/') || file.startsWith('components/')) && !file.includes('/pdf/'),
  );
  const using = (pattern: RegExp) => screens.filter((file) => pattern.test(readFileSync(path.join(ROOT, file), 'utf8')));

  it('no style attribute', () => expect(using(/\sstyle=[{"']/)).toEqual([]));
  it('no next/image', () => expect(using(/from 'next\/image'/)).toEqual([]));
  it('no inline script without the nonce', () => expect(using(/dangerouslySetInnerHTML(?![^>]*nonce)/s)).toEqual([]));
});

it('has no test that is skipped, focused or left for later', () => {
  const tests = filesEnding('.test.ts', '.test.tsx', '.spec.ts');
  const idle = /\b(describe|it|test)\s*\.\s*(skip|only|todo|fixme|skipIf|runIf)\b/;
  expect(tests.filter((file) => idle.test(readFileSync(path.join(ROOT, file), 'utf8')))).toEqual([]);
});
