import { createHash } from 'node:crypto';
import { mkdir, readFile, readdir, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { environment } from '@/lib/env';

/** One message as the local mail catcher kept it. */
export interface CaughtMail {
  readonly messageId: string;
  readonly receivedAt: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  /** How often this Message-ID came in: delivery is at least once. */
  readonly deliveries: number;
}

const fileOf = (folder: string, messageId: string) =>
  path.join(folder, `${createHash('sha256').update(messageId).digest('hex').slice(0, 32)}.json`);

/** Keeps a message; one that came before under its Message-ID only counts up. */
export async function keepCaughtMail(folder: string, mail: Omit<CaughtMail, 'deliveries'>): Promise<void> {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const file = fileOf(folder, mail.messageId);
  const before = await readFile(file, 'utf8').then((text) => JSON.parse(text) as CaughtMail, () => null);
  const kept: CaughtMail = { ...mail, deliveries: (before?.deliveries ?? 0) + 1 };
  await writeFile(`${file}.draft`, JSON.stringify(kept), { mode: 0o600 });
  await rename(`${file}.draft`, file);
}

/** What the local catcher holds, newest first; null where mail goes to a real server and nothing may be read back. */
export async function listCaughtMail(
  folder: string | null = environment().caughtMailFolder,
): Promise<CaughtMail[] | null> {
  if (folder === null) return null;
  const files = await readdir(folder).catch(() => [] as string[]);
  const mails = await Promise.all(
    files
      .filter((file) => file.endsWith('.json'))
      .map(async (file) => JSON.parse(await readFile(path.join(folder, file), 'utf8')) as CaughtMail),
  );
  return mails.sort((a, b) => b.receivedAt.localeCompare(a.receivedAt) || a.messageId.localeCompare(b.messageId));
}
