import { chromium, type Browser, type Page } from '@playwright/test';
import { benchAnswers } from '@/tests/support/e2e/bench-page';
import { dragHandle } from '@/tests/support/e2e/drag-handle';
import { signIn } from '@/tests/support/e2e/journey';
import { demoAccountsOf } from '@/tests/support/e2e/running-selvedge';
import playwright from '@/playwright.config';
import { frameWork, type FrameWork } from './frame-work';
import { measuredSelvedge } from './measured-selvedge';
import { quantile, type Measure, type MeasureRow } from './row';

const DRAG_MS = 5_000;
type Begin = (page: Page) => Promise<void>;
const mustStay: Begin = (page) => page.getByRole('checkbox', { name: 'More must stay displayed' }).check();
const bore: Begin = (page) => page.getByRole('radio', { name: 'Bore', exact: true }).check();

/** One handle of each kind, with what puts it in sight. */
const HANDLES: readonly (readonly [id: string, by: readonly [number, number], begin?: Begin])[] = [
  ['fov-phase-low', [0, -30]],
  ['fov-readout-high', [30, 0]],
  ['fov-centre', [15, 20]],
  ['fov-rotation', [25, 25]],
  ['keep-clear-anterior', [0, 25]],
  ['must-stay-posterior', [0, 15], mustStay],
  ['extent-anterior', [0, -15]],
  ['lateral-offset', [25, 0], bore],
];

async function dragged(browser: Browser, page: Page, id: string, by: readonly [number, number], begin?: Begin): Promise<FrameWork> {
  await page.reload();
  await benchAnswers(page);
  await begin?.(page);
  return frameWork(browser, page, () => dragHandle(page, id, by, DRAG_MS));
}

/** Work of the page's main thread while a handle is dragged for five seconds. */
export const measure: Measure = async () => {
  const selvedge = await measuredSelvedge();
  const browser = await chromium.launch(playwright.use!.launchOptions);
  try {
    const context = await browser.newContext({ baseURL: selvedge.address, viewport: { width: 1440, height: 900 } });
    const account = (await demoAccountsOf(selvedge.dataDir)).find(({ roles }) => roles.length === 1 && roles[0] === 'radiographer')!;
    await signIn(context.request, account, selvedge.address);
    const page = await context.newPage();
    await page.goto('/bench');
    await benchAnswers(page);
    const rows: MeasureRow[] = [];
    for (const [id, by, begin] of HANDLES) {
      const { wall, processor, longTasks } = await dragged(browser, page, id, by, begin);
      const against = `${wall.length} frames of a 5 s drag`;
      rows.push(
        { what: `main thread per frame, p95, ${id}`, value: quantile(wall, 0.95), unit: 'ms', against, aim: 'at most 12 ms' },
        { what: `the same, processor time, ${id}`, value: quantile(processor, 0.95), unit: 'ms', against },
        { what: `the same, processor time, p50, ${id}`, value: quantile(processor, 0.5), unit: 'ms', against },
        { what: `tasks of 50 ms and more, ${id}`, value: longTasks, unit: 'tasks', against, aim: 'none' },
      );
    }
    return rows;
  } finally {
    await browser.close();
    await selvedge.end();
  }
};
