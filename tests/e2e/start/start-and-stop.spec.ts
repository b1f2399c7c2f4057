import { readdir, readFile, stat } from 'node:fs/promises';
import net from 'node:net';
import path from 'node:path';
import { expect, test } from '@playwright/test';
import { freePort } from '@/db/local';
import {
  demoAccountsOf,
  newDataFolder,
  removeDataFolder,
  type RunningSelvedge,
  spawnSelvedge,
  startSelvedge,
} from '@/tests/support/e2e/running-selvedge';

/** These start Selvedges of their own; one after another, so that two cores are enough. */
test.describe.configure({ mode: 'serial' });

let dataDir: string;
test.beforeAll(async () => {
  dataDir = await newDataFolder();
});
test.afterAll(() => removeDataFolder(dataDir));

/** Process ids whose environment or command line names the folder: all that a start on it has begun. */
async function processesOf(folder: string): Promise<string[]> {
  const found: string[] = [];
  for (const pid of (await readdir('/proc')).filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)) {
    const text = await Promise.all(
      ['cmdline', 'environ'].map((file) => readFile(`/proc/${pid}/${file}`, 'utf8').catch(() => '')),
    );
    // The browsers and workers of this test run have the other folder in theirs.
    if (text[0]!.includes(folder) || text[1]!.includes(`SELVEDGE_DATA_DIR=${folder}\0`)) found.push(`${pid} ${text[0]}`);
  }
  return found;
}

const listens = (port: number) =>
  new Promise<boolean>((resolve) => {
    const socket = net.connect({ port, host: '127.0.0.1' });
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });

async function ports(): Promise<{ postgres: number; web: number; mail: number }> {
  return JSON.parse(await readFile(path.join(dataDir, 'ports.json'), 'utf8')) as { postgres: number; web: number; mail: number };
}

async function expectNothingLeft(): Promise<void> {
  const { postgres, web, mail } = await ports();
  expect(await processesOf(dataDir)).toEqual([]);
  for (const port of [postgres, web, mail]) expect(await listens(port), `port ${port}`).toBe(false);
}

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  test(`stops everything on ${signal} and leaves nothing running`, async () => {
    const selvedge = await startSelvedge({ dataDir });
    expect((await fetch(selvedge.address)).status).toBe(200);
    expect((await processesOf(dataDir)).length).toBeGreaterThanOrEqual(5);
    expect(await selvedge.stop(signal)).toBe(0);
    await expectNothingLeft();
  });
}

test('finds accounts, secrets and port again, and prints the accounts it made', async () => {
  const before = await demoAccountsOf(dataDir);
  const { postgres } = await ports();
  const selvedge = await startSelvedge({ dataDir });
  try {
    expect(await demoAccountsOf(dataDir)).toEqual(before);
    expect((await ports()).postgres).toBe(postgres);
    for (const { email, password } of before) expect(selvedge.printed()).toMatch(new RegExp(`${email} +${password}`));
  } finally {
    await selvedge.stop();
  }
});

test('keeps secrets and accounts for the owner’s eyes only', async () => {
  for (const file of ['secrets.json', 'demo-accounts.json', 'ports.json']) {
    expect((await stat(path.join(dataDir, file))).mode & 0o777, file).toBe(0o600);
  }
  expect((await stat(path.join(dataDir, 'postgres'))).mode & 0o777).toBe(0o700);
});

test('does not disturb a PostgreSQL that is running elsewhere, and is not disturbed by it', async () => {
  const elsewhere = await newDataFolder();
  let other: RunningSelvedge | undefined;
  let selvedge: RunningSelvedge | undefined;
  try {
    other = await startSelvedge({ dataDir: elsewhere });
    const pidFile = path.join(elsewhere, 'postgres/postmaster.pid');
    const before = await readFile(pidFile, 'utf8');
    selvedge = await startSelvedge({ dataDir });
    await selvedge.stop();
    expect(await readFile(pidFile, 'utf8')).toBe(before);
    expect((await fetch(other.address)).status).toBe(200);
  } finally {
    await other?.stop();
    await removeDataFolder(elsewhere);
  }
  await expectNothingLeft();
});

test('takes over from a run that was killed outright', async () => {
  const killed = await startSelvedge({ dataDir });
  expect(await killed.stop('SIGKILL')).toBeNull();
  const again = await startSelvedge({ dataDir });
  expect((await fetch(again.address)).status).toBe(200);
  await again.stop();
  await expectNothingLeft();
});

test('says in words that it is already running', async () => {
  const selvedge = await startSelvedge({ dataDir });
  try {
    await expect(startSelvedge({ dataDir })).rejects.toThrow(`already running from ${dataDir} (process ${selvedge.pid})`);
  } finally {
    await selvedge.stop();
  }
});

test('says in words that the port asked for is taken, and leaves nothing running', async () => {
  const server = net.createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as net.AddressInfo;
  try {
    await expect(startSelvedge({ dataDir, port })).rejects.toThrow(`Port ${port} is taken by another program`);
    expect(await processesOf(dataDir)).toEqual([]);
  } finally {
    await new Promise((resolve) => server.close(resolve));
  }
});

test('stops as asked while it is still starting', async () => {
  const child = spawnSelvedge({ dataDir, port: await freePort() });
  await child.prints('Starting the database');
  expect(await child.stop()).toBe(0);
  expect(await processesOf(dataDir)).toEqual([]);
});
