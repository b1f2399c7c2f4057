import type { Page } from '@playwright/test';
import { expect, signIn, test } from '@/tests/support/e2e/journey';
import { benchAnswers, benchValues, sceneNodes, tabTo, verdict } from '@/tests/support/e2e/bench-page';
import { demoAccountsOf, removeDataFolder, startSelvedge } from '@/tests/support/e2e/running-selvedge';

const FAILS = /Fold in the keep-clear area|Cannot be scanned as planned/;
const KEPT = 'Saved: draft, version 1';

/** Chooses each sequence in turn and adopts the first remedy of those that fail; returns how many did. */
async function adoptFirstRemedyWherePossible(page: Page): Promise<number> {
  const sequences = page.locator('[data-sequence]');
  const count = await sequences.count();
  let failing = 0;
  for (let i = 0; i < count; i += 1) {
    await sequences.nth(i).click();
    await benchAnswers(page);
    if (FAILS.test(await verdict(page).innerText())) {
      failing += 1;
      await page.getByRole('button', { name: /^Adopt: / }).first().click();
      await expect(verdict(page)).not.toHaveText(FAILS);
      await benchAnswers(page);
    }
    const inside = (await sceneNodes(page, 'section')).filter((name) => name.includes('/in-keep-clear'));
    expect(inside, `sequence ${i + 1} of ${count}`).toEqual([]);
  }
  return failing;
}

test('the first booking, planned by its first remedies, and another planned by keyboard are unchanged after a restart of the whole service', async ({ context }) => {
  // Two starts of the whole service, on a folder of its own, come on top of the journey.
  test.setTimeout(240_000);
  let running = await startSelvedge();
  const { dataDir } = running;
  const port = Number(new URL(running.address).port);
  try {
    const account = (await demoAccountsOf(dataDir)).find(({ roles }) => roles.length === 1 && roles[0] === 'radiographer')!;
    await signIn(context.request, account, running.address);

    const page = await context.newPage();
    await page.goto(`${running.address}/bookings`);
    await page.getByRole('link', { name: /(on|at) the bench, / }).first().click();
    await benchAnswers(page);
    await page.getByRole('form', { name: 'Patient' }).getByRole('spinbutton', { name: 'Hold' }).fill('15.5');
    expect(await adoptFirstRemedyWherePossible(page)).toBeGreaterThan(0);
    await page.locator('[data-sequence]').first().click();
    await benchAnswers(page);
    await expect(page.locator('[data-sequence]').filter({ hasText: FAILS })).toHaveCount(0);
    await page.getByRole('button', { name: 'Save plan' }).click();
    await expect(page.getByText(KEPT)).toBeVisible();
    const planned = await benchValues(page);
    const plannedAt = page.url();
    await page.close();

    const keys = await context.newPage();
    await keys.goto(`${running.address}/bookings`);
    await tabTo(keys, /bench, HB-2116$/);
    await keys.keyboard.press('Enter');
    await benchAnswers(keys);
    await tabTo(keys, /^Adopt: /);
    await keys.keyboard.press('Enter');
    await expect(verdict(keys)).not.toHaveText(FAILS);
    await tabTo(keys, /^Save plan$/);
    await keys.keyboard.press('Enter');
    await expect(keys.getByText(KEPT)).toBeVisible();
    // The bench opens on the first sequence that still folds: look at the same one before and after.
    await keys.locator('[data-sequence]').first().click();
    await benchAnswers(keys);
    const byKeys = await benchValues(keys);
    await keys.close();

    await running.stop();
    running = await startSelvedge({ dataDir, port });

    // A new tab holds no edits of its own: what is shown comes from the server. The session outlives the restart.
    const again = await context.newPage();
    await again.goto(plannedAt);
    await benchAnswers(again);
    await again.locator('[data-sequence]').first().click();
    await expect(again.getByText(KEPT)).toBeVisible();
    await expect.poll(() => benchValues(again)).toEqual(planned);

    await again.goto(`${running.address}/bookings`);
    await tabTo(again, /(bench|plan), HB-2116$/);
    await again.keyboard.press('Enter');
    await benchAnswers(again);
    await again.locator('[data-sequence]').first().click();
    await expect(again.getByText(KEPT)).toBeVisible();
    await expect.poll(() => benchValues(again)).toEqual(byKeys);
  } finally {
    await running.stop();
    await removeDataFolder(dataDir);
  }
});
