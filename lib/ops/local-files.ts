import { randomBytes } from 'node:crypto';
import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { ClusterSecrets } from '@/db/local';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

/** Where this installation keeps everything that is not source: .data/ unless SELVEDGE_DATA_DIR says otherwise. */
export function dataFolder(): string {
  return path.resolve(ROOT, process.env.SELVEDGE_DATA_DIR || '.data');
}

export async function readJson<T>(file: string): Promise<T | null> {
  const text = await readFile(file, 'utf8').catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return null;
    throw error;
  });
  return text === null ? null : (JSON.parse(text) as T);
}

/** Written beside and moved into place, so that a crash leaves the old file or the new one; for our eyes only. */
export async function writePrivateJson(file: string, value: unknown): Promise<void> {
  await mkdir(path.dirname(file), { recursive: true });
  const draft = `${file}.${process.pid}`;
  await writeFile(draft, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  await rename(draft, file);
}

const secret = (bytes: number) => randomBytes(bytes).toString('base64url');

export interface LocalSecrets extends ClusterSecrets {
  readonly sessionSecret: string;
  /** AES key of Next's server actions: without it a restart or second process refuses forms already open. */
  readonly serverActionsKey: string;
}

/** This installation's secrets, made once. */
export async function localSecrets(folder: string): Promise<LocalSecrets> {
  const file = path.join(folder, 'secrets.json');
  const known = await readJson<LocalSecrets>(file);
  const secrets: LocalSecrets = {
    superuserPassword: secret(24),
    ownerPassword: secret(24),
    appPassword: secret(24),
    sessionSecret: secret(32),
    serverActionsKey: randomBytes(32).toString('base64'),
    ...known,
  };
  if (!known || Object.keys(secrets).some((key) => !(key in known))) await writePrivateJson(file, secrets);
  return secrets;
}

export interface LocalPorts {
  postgres?: number;
  web?: number;
  mail?: number;
}

const portsFile = (folder: string) => path.join(folder, 'ports.json');

export async function rememberedPorts(folder: string): Promise<LocalPorts> {
  return (await readJson<LocalPorts>(portsFile(folder))) ?? {};
}

export async function rememberPorts(folder: string, ports: LocalPorts): Promise<void> {
  await writePrivateJson(portsFile(folder), ports);
}
