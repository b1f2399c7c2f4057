import { type Browser, type BrowserContext, chromium, type Page } from '@playwright/test';
import playwright from '@/playwright.config';
import { CONTROLS } from '@/lib/domain/demonstration/controls';
import type { ControlId } from '@/lib/domain/demonstration/scene';
import { signIn } from '@/tests/support/e2e/journey';
import { demoAccountsOf } from '@/tests/support/e2e/running-selvedge';
import { frameWork, type FrameWork } from './frame-work';
import { measuredSelvedge } from './measured-selvedge';
import { quantile, type Measure, type MeasureRow } from './row';

/** Moves of one control: enough frames for a quantile. */
const MOVES = 60;

async function copySetPiece(page: Page, text: string): Promise<string> {
  await page.goto('/demonstrations');
  await page.getByRole('listitem').filter({ hasText: text }).getByRole('button', { name: 'Copy' }).click();
  await page.waitForURL(/\/demonstrations\/[0-9a-f-]{36}$/);
  return page.url();
}

function rowsOf(what: string, { wall, processor, longTasks }: FrameWork): MeasureRow[] {
  const against = `${wall.length} frames`;
  return [
    { what: `main thread per frame, p95, ${what}`, value: quantile(wall, 0.95), unit: 'ms', against, aim: 'below 12 ms' },
    { what: `the same, processor time, ${what}`, value: quantile(processor, 0.95), unit: 'ms', against },
    { what: `tasks of 50 ms and more, ${what}`, value: longTasks, unit: 'tasks', against, aim: 'none' },
  ];
}

async function openPresentation(page: Page, address: string): Promise<void> {
  await page.goto(`${address}/present`);
  await page.getByRole('button', { name: 'Start without it' }).click();
  await page.locator('[data-scene="1"]').waitFor();
  await page.waitForLoadState('networkidle');
}

/** Every scene forth and back, each step after the one before has come to rest. */
async function transitions(browser: Browser, page: Page, address: string, steps: number): Promise<FrameWork> {
  await openPresentation(page, address);
  return frameWork(browser, page, async () => {
    for (const key of [...Array<string>(steps).fill('PageDown'), ...Array<string>(steps).fill('PageUp')]) {
      await page.keyboard.press(key);
      await page.waitForTimeout(700);
    }
  });
}

/** One control stepped by its slider's arrow keys, a step a frame. */
async function moveControl(browser: Browser, page: Page, id: ControlId): Promise<FrameWork> {
  const slider = page.getByLabel(`${CONTROLS[id].label}, slider`);
  await slider.focus();
  return frameWork(browser, page, async () => {
    for (let i = 0; i < MOVES; i += 1) {
      await slider.press(i < MOVES / 2 ? 'ArrowRight' : 'ArrowLeft');
      await page.evaluate(() => new Promise((resolve) => requestAnimationFrame(resolve)));
    }
  });
}

/** Script bytes as they come over the wire until the network rests, in a browser that has none of them. */
async function firstLoadScripts(browser: Browser, address: string): Promise<number> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
  try {
    const page = await context.newPage();
    const session = await context.newCDPSession(page);
    await session.send('Network.enable');
    const scripts = new Set<string>();
    let bytes = 0;
    session.on('Network.responseReceived', ({ requestId, type, response }) => {
      if (type === 'Script' || response.mimeType.includes('javascript')) scripts.add(requestId);
    });
    session.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
      if (scripts.has(requestId)) bytes += encodedDataLength;
    });
    await page.goto(address, { waitUntil: 'networkidle' });
    return bytes;
  } finally {
    await context.close();
  }
}

async function makeLink(page: Page, address: string): Promise<string> {
  await page.goto(address);
  await page.getByRole('button', { name: 'Make a link' }).click();
  return page.getByLabel('Link to the demonstration').inputValue();
}

async function educator(context: BrowserContext, dataDir: string, address: string): Promise<Page> {
  const account = (await demoAccountsOf(dataDir)).find(({ roles }) => roles.length === 1 && roles[0] === 'educator')!;
  await signIn(context.request, account, address);
  return context.newPage();
}

/** Work of the page's main thread in transitions and controls, and what a shared page loads before it can be used. */
export const measure: Measure = async () => {
  const selvedge = await measuredSelvedge();
  const browser = await chromium.launch(playwright.use!.launchOptions);
  try {
    const context = await browser.newContext({ baseURL: selvedge.address, viewport: { width: 1440, height: 900 } });
    const page = await educator(context, selvedge.dataDir, selvedge.address);
    const slab = await copySetPiece(page, 'Wrap between the ends');
    const axial = await copySetPiece(page, 'Fold across an axial');
    const rows = [
      ...rowsOf('transitions of the slab', await transitions(browser, page, slab, 4)),
      ...rowsOf('transitions of the section', await transitions(browser, page, axial, 2)),
    ];
    await openPresentation(page, slab);
    await page.getByRole('button', { name: 'Controls' }).click();
    for (const id of ['slice-oversampling', 'pulse-sharpness', 'slab-thickness', 'partitions', 'flip'] as const) {
      rows.push(...rowsOf(CONTROLS[id].label, await moveControl(browser, page, id)));
    }
    await openPresentation(page, axial);
    await page.getByRole('button', { name: 'Controls' }).click();
    rows.push(...rowsOf(CONTROLS['phase-oversampling'].label, await moveControl(browser, page, 'phase-oversampling')));
    const shared = await firstLoadScripts(browser, await makeLink(page, slab));
    const bare = await firstLoadScripts(browser, `${selvedge.address}/sign-in/no-such-page`);
    return [
      ...rows,
      { what: 'first-load scripts of a shared page', value: shared / 1024, unit: 'kB', against: 'cold, until the network rests' },
      { what: 'first-load scripts of a bare page', value: bare / 1024, unit: 'kB', against: 'the page that says there is nothing' },
      { what: 'shared page against bare page', value: shared / bare, unit: '×', against: 'of the same app', aim: 'at most 1.6' },
    ];
  } finally {
    await browser.close();
    await selvedge.end();
  }
};
