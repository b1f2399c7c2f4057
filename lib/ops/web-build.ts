import { createHash } from 'node:crypto';
import { readFile, readdir, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { LocalError } from '@/db/local';
import { ROOT } from './local-files';
import { type Env, startService, stopService } from './supervise';

const SOURCES = [
  'app', 'components', 'db', 'lib', 'public', 'fixtures',
  'package-lock.json', 'next.config.mjs', 'postcss.config.mjs', 'tailwind.config.ts', 'tsconfig.json',
  'proxy.ts', 'instrumentation.ts',
];

export const NEXT_PROGRAM = path.join(ROOT, 'node_modules/next/dist/bin/next');

export function distFolder(env: Env = process.env): string {
  return path.join(ROOT, env.SELVEDGE_DIST_DIR ?? '.next');
}

async function filesUnder(name: string): Promise<string[]> {
  const entries = await readdir(path.join(ROOT, name), { recursive: true, withFileTypes: true }).catch(
    (error: NodeJS.ErrnoException) => {
      if (error.code === 'ENOTDIR') return null;
      if (error.code === 'ENOENT') return [];
      throw error;
    },
  );
  if (entries === null) return [name];
  return entries
    .filter((entry) => entry.isFile())
    .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name)))
    .filter((file) => (!file.startsWith('lib/ops/') || file === 'lib/ops/require-to-serve.ts') && !file.endsWith('tsconfig.tsbuildinfo'));
}

/** One hash of everything the built site is made of. */
export async function sourceHash(): Promise<string> {
  const hash = createHash('sha256').update(process.version);
  const files = (await Promise.all(SOURCES.map(filesUnder))).flat().sort();
  for (const file of files) hash.update(`\0${file}\0`).update(await readFile(path.join(ROOT, file)));
  return hash.digest('hex');
}

/** Builds the site unless the build that is there was made of the same sources. Returns whether it built. */
export async function ensureBuild(env: Env, signal?: AbortSignal): Promise<boolean> {
  const stamp = path.join(distFolder(env), 'selvedge-sources');
  const wanted = await sourceHash();
  if ((await readFile(stamp, 'utf8').catch(() => '')) === wanted) return false;
  await rm(stamp, { force: true });
  console.log('Building the site …');
  const build = startService(
    'build',
    [NEXT_PROGRAM, 'build'],
    { ...env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
    { quiet: true },
  );
  const stop = () => void stopService(build);
  signal?.addEventListener('abort', stop);
  const how = await build.gone;
  signal?.removeEventListener('abort', stop);
  signal?.throwIfAborted();
  if (how !== 'exit code 0') throw new LocalError(`The site could not be built (${how}):\n${build.lastWords()}`);
  await writeFile(stamp, wanted);
  return true;
}
