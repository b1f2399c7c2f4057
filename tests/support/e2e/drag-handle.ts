import type { Page } from '@playwright/test';
import type { Stage } from './bench-page';

/** Swings there and back once in this time: a quick hand. */
const SWING_MS = 1_500;

/** Holds a handle of the bench and moves it to and fro for a time, by the mouse; returns how often it moved. */
export async function dragHandle(page: Page, id: string, [dx, dy]: readonly [number, number], forMs: number): Promise<number> {
  const box = await page.locator(`[data-handle="${id}"]`).boundingBox();
  if (!box) throw new Error(`No handle "${id}" in sight.`);
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  const begun = performance.now();
  let moves = 0;
  for (let at = 0; at < forMs; at = performance.now() - begun) {
    const share = Math.sin((2 * Math.PI * at) / SWING_MS);
    await page.mouse.move(x + dx * share, y + dy * share);
    moves += 1;
  }
  // Ends away from where it began, so that there is something to take back.
  await page.mouse.move(x + dx, y + dy);
  await page.mouse.up();
  return moves;
}

export interface DragCounts {
  readonly frames: number;
  readonly assessments: number;
  /** Most assessments that fell between two animation frames. */
  readonly mostInAFrame: number;
  readonly draws: number;
  /** Most nodes painted in one draw of the picture. */
  readonly mostNodes: number;
  /** Changes of the page inside a panel. */
  readonly changes: Readonly<Record<'patient' | 'prescription' | 'keepClear', number>>;
}

/** Begins to count what the page does while one of its pictures is dragged; `countsSoFar` reads it. */
export async function watchDrags(page: Page, picture: Stage = 'section'): Promise<void> {
  await page.evaluate((name) => {
    const counts = { frames: 0, assessments: 0, mostInAFrame: 0, draws: 0, mostNodes: 0, changes: { patient: 0, prescription: 0, keepClear: 0 } };
    Object.assign(window, { dragCounts: counts });
    const frameTimes: number[] = [0];
    const inFrame = new Map<number, number>();
    const tick = () => {
      counts.frames += 1;
      frameTimes.push(performance.now());
      requestAnimationFrame(tick);
    };
    requestAnimationFrame(tick);
    new PerformanceObserver((list) => {
      for (const { startTime } of list.getEntriesByName('selvedge:assess')) {
        const frame = frameTimes.findLastIndex((at) => at <= startTime);
        const count = (inFrame.get(frame) ?? 0) + 1;
        inFrame.set(frame, count);
        counts.assessments += 1;
        counts.mostInAFrame = Math.max(counts.mostInAFrame, count);
      }
    }).observe({ type: 'measure' });
    const stage = window.selvedgeStages?.[name];
    if (!stage) throw new Error(`No picture "${name}" in sight.`);
    stage.getLayers()[0]?.on('draw', () => {
      counts.draws += 1;
      counts.mostNodes = Math.max(counts.mostNodes, stage.find('Shape').length);
    });
    const panels = {
      patient: document.querySelector('form[aria-label="Patient"]'),
      prescription: document.querySelector('form[aria-label^="Prescription,"]'),
      keepClear: document.querySelector('[data-field="mustStayDisplayed"]')?.closest('section') ?? null,
    };
    for (const side of ['patient', 'prescription', 'keepClear'] as const) {
      const panel = panels[side];
      if (!panel) throw new Error(`No panel "${side}".`);
      new MutationObserver((changes) => {
        counts.changes[side] += changes.length;
      }).observe(panel, { attributes: true, characterData: true, childList: true, subtree: true });
    }
  }, picture);
}

export function countsSoFar(page: Page): Promise<DragCounts> {
  return page.evaluate(() => structuredClone((window as unknown as { dragCounts: DragCounts }).dragCounts));
}
