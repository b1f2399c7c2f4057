import { mkdtemp, writeFile } from 'node:fs/promises';
import { readdirSync, readFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import ts from 'typescript';
import { build, type Plugin } from 'vite';
import { findMutants, type Mutant } from './find-mutants';

export const ROOT = path.join(import.meta.dirname, '../..');
const PHYSICS = path.join(ROOT, 'lib/physics');

/** Sources, and words only: nothing in them can be wrong by an operator. */
const NOT_MUTATED = /lib\/physics\/(references|assess\/engine-version|assess\/words)\.ts$/;

/** Run other programs, or bundle the engine themselves: they would not see a mutant. */
const NOT_PLAYED = /tests\/external\/(parity|dicom-dictionary)\//;
const TEST_FOLDERS = ['tests/physics', 'tests/external'];
const MORE_TESTS = ['tests/schemas/reference-tables.test.ts'];

const filesUnder = (folder: string): string[] =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .map((name) => path.join(folder, name))
    .filter((file) => file.endsWith('.ts'))
    .sort();

export interface Instrumented {
  readonly mutants: readonly Mutant[];
  readonly codeOf: ReadonlyMap<string, string>;
}

/** Every mutant of lib/physics, and the code that holds them all. */
export function instrumentPhysics(): Instrumented {
  const files = filesUnder(PHYSICS);
  const program = ts.createProgram(files, {
    target: ts.ScriptTarget.ES2022,
    module: ts.ModuleKind.ESNext,
    moduleResolution: ts.ModuleResolutionKind.Bundler,
    strict: true,
    noUncheckedIndexedAccess: true,
    types: [],
  });
  const checker = program.getTypeChecker();
  const mutants: Mutant[] = [];
  const codeOf = new Map<string, string>();
  for (const file of files) {
    if (NOT_MUTATED.test(file)) continue;
    const found = findMutants(
      program.getSourceFile(file)!,
      path.relative(ROOT, file),
      checker,
      mutants.length,
    );
    if (found.mutants.length === 0) continue;
    mutants.push(...found.mutants);
    codeOf.set(file, found.code);
  }
  return { mutants, codeOf };
}

export const testFiles = (): string[] =>
  [
    ...TEST_FOLDERS.flatMap((folder) => filesUnder(path.join(ROOT, folder))),
    ...MORE_TESTS.map((file) => path.join(ROOT, file)),
  ].filter((file) => file.endsWith('.test.ts') && !NOT_PLAYED.test(file));

export interface Bundle {
  readonly testFile: string;
  readonly bundle: string;
}

/** Bundles each test file with the instrumented physics into a folder of its own; the tree is left alone. */
export async function bundleTests(
  codeOf: ReadonlyMap<string, string>,
): Promise<{ folder: string; bundles: Bundle[] }> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'selvedge-mutation-'));
  const instrument: Plugin = {
    name: 'mutants',
    enforce: 'pre',
    load: (id) => codeOf.get(id),
    transform(code, id) {
      if (codeOf.has(id) || !id.startsWith(ROOT) || id.includes('node_modules')) return undefined;
      // A bundle lies elsewhere: what a test reads stays beside the test.
      return code
        .replaceAll('import.meta.url', JSON.stringify(pathToFileURL(id).href))
        .replaceAll('import.meta.dirname', JSON.stringify(path.dirname(id)));
    },
  };
  const bundles: Bundle[] = [];
  for (const testFile of testFiles()) {
    const built = await build({
      configFile: false,
      root: ROOT,
      logLevel: 'error',
      resolve: { alias: { '@': ROOT } },
      plugins: [instrument],
      build: {
        ssr: testFile,
        write: false,
        minify: false,
        target: 'node20',
        rollupOptions: { output: { format: 'cjs', codeSplitting: false } },
      },
    });
    const output = (Array.isArray(built) ? built[0]! : built) as { output: { code?: string }[] };
    const bundle = path.join(folder, `${path.relative(ROOT, testFile).replaceAll('/', '-')}.cjs`);
    await writeFile(bundle, output.output.map(({ code }) => code ?? '').join('\n'));
    bundles.push({ testFile: path.relative(ROOT, testFile), bundle });
  }
  return { folder, bundles };
}

export const sourceText = (file: string): string => readFileSync(path.join(ROOT, file), 'utf8');
