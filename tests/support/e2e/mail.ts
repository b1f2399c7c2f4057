import { expect } from '@playwright/test';
import { type CaughtMail, listCaughtMail } from '@/lib/mail';
import { caughtMailFolder } from '@/lib/ops/local-database';

/** The newest caught mail to an address (under this subject, where one is given), as soon as the worker has sent it. */
export async function mailTo(address: string, subject?: string): Promise<CaughtMail> {
  const folder = caughtMailFolder(String(process.env.SELVEDGE_E2E_DATA_DIR));
  const find = async () => (await listCaughtMail(folder))?.find((mail) => mail.to === address && (subject === undefined || mail.subject === subject));
  await expect.poll(find, { message: `mail to ${address}`, timeout: 30_000 }).toBeTruthy();
  return (await find())!;
}

/** The one link of a mail; text and HTML must agree on it. */
export function linkIn(mail: CaughtMail): string {
  const links = [...new Set(mail.text.match(/https?:\/\/\S+/g) ?? [])];
  expect(links).toHaveLength(1);
  expect(mail.html).toContain(links[0]);
  return links[0]!;
}
