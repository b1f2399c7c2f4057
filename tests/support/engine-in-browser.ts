import path from 'node:path';
import { chromium, type Page } from '@playwright/test';
import { build, type Rolldown } from 'vite';

const ROOT = path.join(import.meta.dirname, '../..');

/** A module and everything it imports as one script that puts its exports into `globalThis[name]`. */
export async function browserScript(entry: string, name: string): Promise<string> {
  const built = (await build({
    root: ROOT,
    configFile: false,
    logLevel: 'error',
    resolve: { alias: { '@': ROOT } },
    build: { write: false, minify: false, lib: { entry, formats: ['iife'], name } },
  })) as Rolldown.RolldownOutput[];
  return built[0]!.output[0].code;
}

/** Runs `work` with Debian's Chromium on a page that holds the module's exports under `name`, and closes it after. */
export async function inChromium<T>(
  entry: string,
  name: string,
  work: (page: Page) => Promise<T>,
): Promise<T> {
  const script = await browserScript(entry, name);
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
  try {
    const page = await browser.newPage();
    await page.addScriptTag({ content: script });
    return await work(page);
  } finally {
    await browser.close();
  }
}
