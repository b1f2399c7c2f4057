import { mkdir, open, readFile, rm } from 'node:fs/promises';
import path from 'node:path';
import { LocalError } from '@/db/local';

async function isOurs(pid: number): Promise<boolean> {
  // A process id may have been given to another program since: ours has the bootstrap on its command line.
  const words = await readFile(`/proc/${pid}/cmdline`, 'utf8').catch(() => null);
  if (words !== null) return words.includes('lib/ops/bootstrap.mjs');
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

/** One run at a time in a data folder. The lock of a run that died is taken over. */
export async function takeRunLock(dataDir: string): Promise<() => Promise<void>> {
  await mkdir(dataDir, { recursive: true });
  const file = path.join(dataDir, 'running.pid');
  for (let attempt = 0; attempt < 2; attempt++) {
    try {
      const handle = await open(file, 'wx', 0o600);
      await handle.writeFile(String(process.pid));
      await handle.close();
      return () => rm(file, { force: true });
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
      const pid = Number(await readFile(file, 'utf8').catch(() => ''));
      if (pid && pid !== process.pid && (await isOurs(pid))) {
        throw new LocalError(`Selvedge is already running from ${dataDir} (process ${pid}). Stop it first, or set SELVEDGE_DATA_DIR to another folder.`);
      }
      await rm(file, { force: true });
    }
  }
  throw new LocalError(`The lock ${file} could not be taken: another start is under way.`);
}
