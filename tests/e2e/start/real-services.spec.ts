import { access } from 'node:fs/promises';
import path from 'node:path';
import { expect, test } from '@playwright/test';
import { freePort } from '@/db/local';
import { startThrowAwayCluster, TEMPLATE } from '@/tests/support/database/throw-away-cluster';
import { newDataFolder, removeDataFolder, spawnSelvedge } from '@/tests/support/e2e/running-selvedge';
import { startSmtpRecorder } from '@/tests/support/smtp-recorder';

test.describe.configure({ mode: 'serial' });

test('uses the services it is given, starts nothing local and makes no demo site', async () => {
  const cluster = await startThrowAwayCluster();
  const smtp = await startSmtpRecorder();
  const dataDir = await newDataFolder();
  const port = await freePort();
  try {
    const selvedge = spawnSelvedge({
      dataDir,
      port,
      env: {
        DATABASE_URL: cluster.url('app', TEMPLATE),
        MIGRATION_DATABASE_URL: cluster.url('owner', TEMPLATE),
        SMTP_URL: smtp.url,
        NEXTAUTH_URL: `http://127.0.0.1:${port}`,
        NEXTAUTH_SECRET: 'only-for-tests-only-for-tests-only-for-tests',
      },
    });
    await selvedge.prints('Ctrl-C stops everything.');
    expect((await fetch(`http://127.0.0.1:${port}`)).status).toBe(200);
    expect(selvedge.printed()).not.toMatch(/Demo accounts|catching mail|Starting the database/);
    for (const local of ['postgres', 'secrets.json', 'demo-accounts.json']) {
      await expect(access(path.join(dataDir, local)), local).rejects.toThrow('ENOENT');
    }
    expect(await selvedge.stop()).toBe(0);
  } finally {
    await smtp.close();
    await cluster.stop();
    await removeDataFolder(dataDir);
  }
});

for (const [what, env, words] of [
  ['only some services are given', { DATABASE_URL: 'postgres://a@127.0.0.1/b' }, 'without SMTP_URL and NEXTAUTH_URL'],
  [
    'a setting is wrong',
    { DATABASE_URL: 'mysql://a@127.0.0.1/b', SMTP_URL: 'smtp://127.0.0.1', NEXTAUTH_URL: 'http://127.0.0.1' },
    'DATABASE_URL must be a URL starting with postgres://',
  ],
] as const) {
  test(`says in words that ${what}`, async () => {
    const dataDir = await newDataFolder();
    const selvedge = spawnSelvedge({ dataDir, port: await freePort(), env });
    expect(await selvedge.exited).toBe(1);
    expect(selvedge.printed()).toContain(words);
    expect(selvedge.printed()).not.toContain('    at ');
    await removeDataFolder(dataDir);
  });
}

test('refuses to serve as a login that row-level security does not hold back', async () => {
  const cluster = await startThrowAwayCluster();
  const smtp = await startSmtpRecorder();
  const dataDir = await newDataFolder();
  const port = await freePort();
  try {
    const selvedge = spawnSelvedge({
      dataDir,
      port,
      env: {
        DATABASE_URL: cluster.url('owner', TEMPLATE),
        SMTP_URL: smtp.url,
        NEXTAUTH_URL: `http://127.0.0.1:${port}`,
        NEXTAUTH_SECRET: 'only-for-tests-only-for-tests-only-for-tests',
      },
    });
    expect(await selvedge.exited).toBe(1);
    expect(selvedge.printed()).toContain('signs in as "selvedge_owner", which row-level security does not hold back');
  } finally {
    await smtp.close();
    await cluster.stop();
    await removeDataFolder(dataDir);
  }
});
