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

export type Stage = 'section' | 'slab' | 'bore';

/** Names of the nodes a stage paints now: the scene is read instead of pixels. */
export function sceneNodes(page: Page, stage: Stage): Promise<string[]> {
  return page.evaluate((name) => {
    const shapes = window.selvedgeStages?.[name]?.find('Shape') ?? [];
    return shapes.map((shape) => shape.name());
  }, stage);
}

/** Text of a painted label; absent when it is not painted. */
export function sceneText(page: Page, name: string, stage: Stage = 'section'): Promise<string | undefined> {
  return page.evaluate(
    ([wanted, of]) => {
      const all = window.selvedgeStages?.[of]?.find('Text') ?? [];
      return all.find((each) => each.name() === wanted)?.getAttr('text') as string | undefined;
    },
    [name, stage] as const,
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

/** Every field's value, rolled-up groups included, and the verdict of each sequence: what must come back unchanged. */
export function benchValues(page: Page): Promise<{ fields: string[]; sequences: string[] }> {
  return page.evaluate(() => {
    const named = [...document.querySelectorAll<HTMLInputElement | HTMLSelectElement>('form [name], [data-field] [name]')];
    const valueOf = (field: HTMLInputElement | HTMLSelectElement) =>
      field instanceof HTMLInputElement && (field.type === 'checkbox' || field.type === 'radio') ? String(field.checked) : field.value;
    return {
      fields: named.map((field) => `${field.name} ${valueOf(field)}`),
      sequences: [...document.querySelectorAll('[data-sequence]')].map((each) => each.textContent ?? ''),
    };
  });
}
