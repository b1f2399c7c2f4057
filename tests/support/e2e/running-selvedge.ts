import { spawn } from 'node:child_process';
import { chmod, mkdtemp, readFile, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { freePort } from '@/db/local';

const ROOT = fileURLToPath(new URL('../../..', import.meta.url));

export interface RunningSelvedge {
  readonly address: string;
  readonly dataDir: string;
  /** The process "npm start" itself becomes. */
  readonly pid: number;
  /** All it has printed so far. */
  printed(): string;
  stop(signal?: NodeJS.Signals): Promise<number | null>;
  /** Resolves with its exit code when it ends, by itself or asked to. */
  readonly ended: Promise<number | null>;
}

export interface StartOptions {
  /** A folder used before, to start again on the same data; else a new one. */
  readonly dataDir?: string;
  readonly port?: number;
}

export async function newDataFolder(): Promise<string> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'selvedge-e2e-'));
  // As a folder in a working copy is: the postgres account may pass through.
  await chmod(folder, 0o755);
  return folder;
}

export async function removeDataFolder(folder: string): Promise<void> {
  await rm(folder, { recursive: true, force: true });
}

export interface SpawnedSelvedge {
  readonly pid: number;
  readonly exited: Promise<number | null>;
  printed(): string;
  /** Resolves when it has printed these words; rejects when it ends without. */
  prints(words: string): Promise<void>;
  stop(signal?: NodeJS.Signals): Promise<number | null>;
}

const SERVICES = ['DATABASE_URL', 'MIGRATION_DATABASE_URL', 'SMTP_URL', 'NEXTAUTH_URL', 'NEXTAUTH_SECRET'];

/** Runs "npm start" on this folder and port, with no services but those given. */
export function spawnSelvedge(options: {
  readonly dataDir: string;
  readonly port: number;
  readonly env?: Readonly<Record<string, string>>;
}): SpawnedSelvedge {
  const inherited = Object.fromEntries(Object.entries(process.env).filter(([name]) => !SERVICES.includes(name)));
  const child = spawn(process.execPath, ['lib/ops/bootstrap.mjs', 'start'], {
    cwd: ROOT,
    env: { ...(inherited as NodeJS.ProcessEnv), ...options.env, SELVEDGE_DATA_DIR: options.dataDir, PORT: String(options.port) },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let text = '';
  const exited = new Promise<number | null>((resolve) => child.once('close', resolve));
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk: Buffer) => (text += chunk.toString()));
  return {
    pid: child.pid!,
    exited,
    printed: () => text,
    prints: (words) =>
      new Promise((resolve, reject) => {
        const look = () => text.includes(words) && resolve();
        for (const stream of [child.stdout, child.stderr]) stream.on('data', look);
        void exited.then((code) => reject(new Error(`"npm start" ended with ${code}:\n${text}`)));
        look();
      }),
    stop: (signal = 'SIGTERM') => {
      child.kill(signal);
      return exited;
    },
  };
}

/** Starts the product as a person does, on a folder and port of its own, and waits for it to announce itself. */
export async function startSelvedge(options: StartOptions = {}): Promise<RunningSelvedge> {
  const dataDir = options.dataDir ?? (await newDataFolder());
  const port = options.port ?? (await freePort());
  const { pid, printed, prints, stop, exited } = spawnSelvedge({ dataDir, port });
  await prints('Ctrl-C stops everything.');
  return { address: `http://127.0.0.1:${port}`, dataDir, pid, printed, stop, ended: exited };
}

export interface DemoAccount {
  readonly email: string;
  readonly password: string;
  readonly roles: readonly string[];
}

export async function demoAccountsOf(dataDir: string): Promise<DemoAccount[]> {
  return JSON.parse(await readFile(path.join(dataDir, 'demo-accounts.json'), 'utf8')) as DemoAccount[];
}
