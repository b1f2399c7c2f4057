import { existsSync } from 'node:fs';
import path from 'node:path';
import { expect, it } from 'vitest';
import { importGraph, ROOT } from './import-graph';

const ENTRY = 'components/demonstration/share/shared-show.tsx';
const fileOf = (to: string) =>
  [`${to}.ts`, `${to}.tsx`, `${to}/index.ts`, to].find((file) => /\.tsx?$/.test(file) && existsSync(path.join(ROOT, file)));

/** Everything the browser is sent for a page that begins with this file; what is imported as a type alone is not. */
function reached(entry: string) {
  const imports = importGraph().filter(({ typeOnly }) => !typeOnly);
  const files = new Set([entry]);
  const packages = new Set<string>();
  for (const file of files) {
    for (const { to, isPackage } of imports.filter(({ from }) => from === file)) {
      const next = isPackage ? undefined : fileOf(to);
      if (isPackage) packages.add(to);
      else if (next) files.add(next);
    }
  }
  return { files: [...files], packages: [...packages].sort() };
}

it('a shared demonstration brings the engine and no zod, form, query or canvas library', () => {
  const { files, packages } = reached(ENTRY);
  expect(files).toContain('lib/physics/assess/assess.ts');
  expect(files).toContain('components/schematic/svg/scene-svg.tsx');
  expect(packages).toEqual(['comlink', 'next', 'react']);
  expect(files.filter((file) => file.startsWith('lib/schemas/') || file.startsWith('lib/services/'))).toEqual([]);
});
