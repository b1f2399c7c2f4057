import { chmod, mkdir, mkdtemp, readFile, rm, stat } from 'node:fs/promises';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Cluster, startCluster } from '@/db/local';
import { placeForCluster } from '@/db/local/cluster-place';

const SECRETS = { superuserPassword: 'one', ownerPassword: 'two', appPassword: 'three' };

async function query<T extends object>(url: string, sql: string): Promise<T[]> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query<T>(sql)).rows;
  } finally {
    await client.end();
  }
}

describe('the local cluster', () => {
  let dataDir: string;
  let cluster: Cluster;
  const start = (secrets = SECRETS, port?: number) => startCluster({ dataDir, secrets, port, throwAway: true });

  beforeAll(async () => {
    dataDir = await mkdtemp(path.join(os.tmpdir(), 'selvedge-cluster-'));
    await chmod(dataDir, 0o755);
    cluster = await start();
  });
  afterAll(async () => {
    await cluster.stop();
    await rm(dataDir, { recursive: true, force: true });
  });

  it('listens on 127.0.0.1 alone, has no socket and asks for a password by scram', async () => {
    const superuser = cluster.url('superuser', 'postgres');
    const settings = await query<{ name: string; setting: string }>(
      superuser,
      `select name, setting from pg_settings where name in ('listen_addresses', 'unix_socket_directories') order by 1`,
    );
    expect(settings).toEqual([
      { name: 'listen_addresses', setting: '127.0.0.1' },
      { name: 'unix_socket_directories', setting: '' },
    ]);
    const methods = await query<{ auth_method: string }>(superuser, 'select distinct auth_method from pg_hba_file_rules');
    expect(methods).toEqual([{ auth_method: 'scram-sha-256' }]);
    await expect(query(superuser.replace(':one@', ':wrong@'), 'select 1')).rejects.toThrow('password authentication failed');
  });

  it('keeps its data folder shut and does not run as root', async () => {
    const folder = await stat(path.join(dataDir, 'postgres'));
    expect(folder.mode & 0o777).toBe(0o700);
    expect(folder.uid).not.toBe(0);
  });

  it('gives the owner no superuser’s rights', async () => {
    const rows = await query(
      cluster.url('owner', 'postgres'),
      'select rolsuper, rolbypassrls, rolcreaterole from pg_roles where rolname = current_user',
    );
    expect(rows).toEqual([{ rolsuper: false, rolbypassrls: false, rolcreaterole: true }]);
  });

  it('comes back on its port, and on another when that is taken', async () => {
    const { port } = cluster;
    await cluster.stop();
    cluster = await start(SECRETS, port);
    expect(cluster.port).toBe(port);
    await cluster.stop();

    const squatter = net.createServer();
    await new Promise<void>((resolve) => squatter.listen(port, '127.0.0.1', resolve));
    try {
      cluster = await start(SECRETS, port);
      expect(cluster.port).not.toBe(port);
    } finally {
      await new Promise((resolve) => squatter.close(resolve));
    }
  });

  it('takes over a server that a killed run left behind', async () => {
    const left = await readFile(path.join(dataDir, 'postgres/postmaster.pid'), 'utf8');
    cluster = await start(SECRETS, cluster.port);
    expect(await readFile(path.join(dataDir, 'postgres/postmaster.pid'), 'utf8')).not.toBe(left);
    expect(await query(cluster.url('app', 'postgres'), 'select 1 as one')).toEqual([{ one: 1 }]);
  });

  it('says in words when the passwords are not the ones it was made with', async () => {
    await cluster.stop();
    await expect(start({ ...SECRETS, superuserPassword: 'lost' })).rejects.toThrow('secrets.json');
    cluster = await start();
  });
});

describe('where the cluster lives', () => {
  it('is the data folder while the postgres account can enter it, else a folder of our own', async () => {
    const parent = await mkdtemp(path.join(os.tmpdir(), 'selvedge-place-'));
    const dataDir = path.join(parent, 'data');
    await mkdir(dataDir);
    try {
      await chmod(parent, 0o755);
      expect(await placeForCluster(dataDir, 'secret')).toBe(dataDir);
      await chmod(parent, 0o700);
      const place = await placeForCluster(dataDir, 'secret');
      // Only root hands the cluster to another account; anyone else is that account.
      if (process.getuid?.() === 0) {
        expect(place).toMatch(/^\/var\/lib\/selvedge\/[0-9a-f]{12}$/);
        expect(await placeForCluster(dataDir, 'another secret')).not.toBe(place);
      } else {
        expect(place).toBe(dataDir);
      }
    } finally {
      await rm(parent, { recursive: true, force: true });
      if (process.getuid?.() === 0) {
        const { createHash } = await import('node:crypto');
        for (const secret of ['secret', 'another secret']) {
          const name = createHash('sha256').update(`${dataDir}\0${secret}`).digest('hex').slice(0, 12);
          await rm(path.join('/var/lib/selvedge', name), { recursive: true, force: true });
        }
      }
    }
  });
});
