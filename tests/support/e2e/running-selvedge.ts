import { type ChildProcess, spawn } from 'node:child_process';
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

/** Starts the product as a person does, on a folder and port of its own, and waits for it to announce itself. */
export async function startSelvedge(options: StartOptions = {}): Promise<RunningSelvedge> {
  const dataDir = options.dataDir ?? (await newDataFolder());
  const port = options.port ?? (await freePort());
  const { DATABASE_URL, SMTP_URL, NEXTAUTH_URL, NEXTAUTH_SECRET, MIGRATION_DATABASE_URL, ...env } = process.env;
  void [DATABASE_URL, SMTP_URL, NEXTAUTH_URL, NEXTAUTH_SECRET, MIGRATION_DATABASE_URL];
  const child = spawn(process.execPath, ['lib/ops/bootstrap.mjs', 'start'], {
    cwd: ROOT,
    env: { ...env, SELVEDGE_DATA_DIR: dataDir, PORT: String(port) },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let printed = '';
  const exited = new Promise<number | null>((resolve) => child.once('exit', resolve));
  await new Promise<void>((resolve, reject) => {
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (text: Buffer) => {
        printed += text.toString();
        if (printed.includes('Ctrl-C stops everything.')) resolve();
      });
    }
    child.once('error', reject);
    child.once('exit', (code) => reject(new Error(`"npm start" ended with ${code}:\n${printed}`)));
  });
  return {
    address: `http://127.0.0.1:${port}`,
    dataDir,
    pid: child.pid!,
    printed: () => printed,
    stop: (signal = 'SIGTERM') => stop(child, exited, signal),
  };
}

async function stop(child: ChildProcess, exited: Promise<number | null>, signal: NodeJS.Signals): Promise<number | null> {
  child.kill(signal);
  return exited;
}

export interface DemoAccount {
  readonly email: string;
  readonly password: string;
  readonly roles: readonly string[];
}

export async function demoAccountsOf(dataDir: string): Promise<DemoAccount[]> {
  return JSON.parse(await readFile(path.join(dataDir, 'demo-accounts.json'), 'utf8')) as DemoAccount[];
}
