import { expect, type Page } from '@playwright/test';

/** Opens the bench of a demo booking from the list, as a person does, and waits until it answers. */
export async function openBench(page: Page, accession: string): Promise<void> {
  await page.goto('/bookings');
  await page.getByRole('link', { name: new RegExp(`(on|at) the bench, ${accession}$|plan, ${accession}$`) }).click();
  await benchAnswers(page);
}

/** The picture is painted and the remedies of the active sequence are the present ones. */
export async function benchAnswers(page: Page): Promise<void> {
  await expect(verdict(page)).toBeVisible();
  await expect.poll(() => sceneNodes(page, 'section')).toContain('fov');
  await expect(page.locator('[aria-busy="true"]')).toHaveCount(0);
}

/** The verdict of the active sequence, in the words on the screen. */
export const verdict = (page: Page) => page.locator('[data-verdict]:visible');

/** Names of the nodes a stage paints now: the scene is read instead of pixels. */
export function sceneNodes(page: Page, stage: 'section' | 'slab'): Promise<string[]> {
  return page.evaluate((name) => {
    const shapes = window.selvedgeStages?.[name]?.find('Shape') ?? [];
    return shapes.map((shape) => shape.name());
  }, stage);
}

/** Text of a painted label; absent when it is not painted. */
export function sceneText(page: Page, name: string): Promise<string | undefined> {
  return page.evaluate(
    (wanted) => {
      const node = window.selvedgeStages?.['section']?.findOne(`.${wanted.replace(/\//g, '\\/')}`);
      const all = window.selvedgeStages?.['section']?.find('Text') ?? [];
      const found = node ?? all.find((each) => each.name() === wanted);
      return found?.getAttr('text') as string | undefined;
    },
    name,
  );
}

/** Presses Tab until something of this name has the focus: what a keyboard can reach and what it is called. */
export async function tabTo(page: Page, name: RegExp, most = 150): Promise<void> {
  for (let presses = 0; presses < most; presses += 1) {
    await page.keyboard.press('Tab');
    const held = await page.evaluate(() => {
      const element = document.activeElement;
      return element?.getAttribute('aria-label') ?? element?.textContent ?? '';
    });
    if (name.test(held.trim())) return;
  }
  throw new Error(`No control called ${String(name)} within ${most} presses of Tab`);
}
