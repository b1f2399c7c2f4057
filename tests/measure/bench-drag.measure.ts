import { chromium, type Browser, type Page } from '@playwright/test';
import { benchAnswers } from '@/tests/support/e2e/bench-page';
import { dragHandle } from '@/tests/support/e2e/drag-handle';
import { signIn } from '@/tests/support/e2e/journey';
import { demoAccountsOf, removeDataFolder, startSelvedge } from '@/tests/support/e2e/running-selvedge';
import playwright from '@/playwright.config';
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

interface TraceEvent {
  readonly name: string;
  readonly ph: string;
  readonly ts: number;
  readonly dur?: number;
  readonly tdur?: number;
  readonly pid: number;
  readonly tid: number;
}

interface FrameWork {
  /** Milliseconds of the page's main thread in each animation frame: by the clock, and of the processor. */
  readonly wall: readonly number[];
  readonly processor: readonly number[];
  readonly longTasks: number;
}

/** Tasks of the main thread, summed from one animation frame to the next. */
function frameWork(events: readonly TraceEvent[]): FrameWork {
  const frames = events.filter(({ name }) => name === 'FireAnimationFrame').sort((a, b) => a.ts - b.ts);
  const main = frames[0];
  if (!main) throw new Error('The trace holds no animation frame.');
  const tasks = events.filter(({ name, ph, pid, tid }) => name === 'RunTask' && ph === 'X' && pid === main.pid && tid === main.tid);
  // Several callbacks fire in one frame, in one task: its end is the frame's.
  const ends = tasks.filter(({ ts, dur = 0 }) => frames.some((frame) => frame.ts >= ts && frame.ts <= ts + dur)).map(({ ts, dur = 0 }) => ts + dur);
  const sums = (of: (task: TraceEvent) => number): number[] =>
    ends.slice(1).map((end, i) => tasks.filter(({ ts }) => ts >= ends[i]! && ts < end).reduce((sum, task) => sum + of(task) / 1_000, 0));
  return {
    wall: sums(({ dur = 0 }) => dur),
    processor: sums(({ tdur, dur = 0 }) => tdur ?? dur),
    longTasks: tasks.filter(({ dur = 0 }) => dur >= 50_000).length,
  };
}

async function dragged(browser: Browser, page: Page, id: string, by: readonly [number, number], begin?: Begin): Promise<FrameWork> {
  await page.reload();
  await benchAnswers(page);
  await begin?.(page);
  await browser.startTracing(page, { categories: ['toplevel', 'devtools.timeline', 'disabled-by-default-devtools.timeline'] });
  await dragHandle(page, id, by, DRAG_MS);
  const trace = JSON.parse((await browser.stopTracing()).toString()) as { traceEvents: TraceEvent[] };
  return frameWork(trace.traceEvents);
}

/** A Selvedge of its own, unless one is named as for the journeys. */
async function running() {
  const { SELVEDGE_E2E_URL: address, SELVEDGE_E2E_DATA_DIR: dataDir } = process.env;
  if (address && dataDir) return { address, dataDir, end: async () => {} };
  const own = await startSelvedge();
  return { ...own, end: async () => void (await own.stop(), await removeDataFolder(own.dataDir)) };
}

/** Work of the page's main thread while a handle is dragged for five seconds. */
export const measure: Measure = async () => {
  const selvedge = await running();
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
        { what: `tasks of 50 ms and more, ${id}`, value: longTasks, unit: 'tasks', against, aim: 'none' },
      );
    }
    return rows;
  } finally {
    await browser.close();
    await selvedge.end();
  }
};
