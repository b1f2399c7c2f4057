import { execFile } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import { promisify } from 'node:util';

const execFileAsync = promisify(execFile);

/**
 * The data folder itself, unless root started us in a place that the postgres account cannot enter
 * (root's home is closed to others): then a folder of our own under /var/lib, named after the data folder and its
 * secrets, so that a data folder made anew does not meet the old one's passwords.
 */
export async function placeForCluster(dataDir: string, secret: string): Promise<string> {
  if (process.getuid?.() !== 0) return dataDir;
  const reachable = await execFileAsync('runuser', ['-u', 'postgres', '--', 'test', '-x', dataDir], { cwd: '/' }).then(
    () => true,
    () => false,
  );
  if (reachable) return dataDir;
  const name = createHash('sha256').update(`${path.resolve(dataDir)}\0${secret}`).digest('hex').slice(0, 12);
  const place = path.join('/var/lib/selvedge', name);
  await mkdir(place, { recursive: true, mode: 0o755 });
  return place;
}
