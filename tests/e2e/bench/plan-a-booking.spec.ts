import { accountOf, expect, test } from '@/tests/support/e2e/journey';
import { benchAnswers, openBench, sceneNodes, tabTo, verdict } from '@/tests/support/e2e/bench-page';

test('from verdict to adopted remedy, plan sheet in the scanner’s own form, and back unchanged', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await openBench(page, 'HB-2107');
  await expect(page.getByRole('list', { name: 'Sequences' }).getByRole('button')).toHaveCount(5);
  await expect(verdict(page)).toHaveText('Fold in the keep-clear area');
  expect((await sceneNodes(page, 'section')).filter((name) => name.endsWith('/in-keep-clear'))).not.toHaveLength(0);

  const first = page.locator('[data-remedy]').first();
  const title = (await first.getByRole('heading').innerText()).trim();
  await first.getByRole('button', { name: `Adopt: ${title}` }).click();
  await expect(verdict(page)).not.toHaveText('Fold in the keep-clear area');
  await benchAnswers(page);
  expect((await sceneNodes(page, 'section')).filter((name) => name.endsWith('/in-keep-clear'))).toHaveLength(0);
  const told = await page.getByText('Scanner takes', { exact: true }).locator('xpath=following-sibling::*[1]//span[contains(@class,"figures")]').first().innerText();

  await page.getByRole('button', { name: 'Save plan' }).click();
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();
  await page.getByRole('link', { name: 'Plan sheet' }).click();
  await expect(page.getByRole('heading', { name: 'HB-2107' })).toBeVisible();
  await expect(page.getByRole('row').nth(1)).toContainText(told);
  await expect(page.getByText('patient label here')).toBeVisible();
  await expect(page.getByText(/\/p\/[2-9A-Z]{8}\?v=1$/)).toBeVisible();

  await page.getByRole('link', { name: 'Back to the bench' }).click();
  await benchAnswers(page);
  await page.locator('[data-sequence]').first().click();
  await expect(verdict(page)).not.toHaveText('Fold in the keep-clear area');
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();
});

test('the same by keyboard alone', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bookings');
  await expect(page.getByRole('link', { name: /bench, HB-2112$/ })).toBeVisible();
  await tabTo(page, /bench, HB-2112$/);
  await page.keyboard.press('Enter');
  await benchAnswers(page);
  await expect(verdict(page)).toHaveText('Fold in the keep-clear area');

  const title = (await page.locator('[data-remedy]').first().getByRole('heading').innerText()).trim();
  await tabTo(page, new RegExp(`^${title.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')}$`));
  await page.keyboard.press('Enter');
  await expect.poll(() => sceneNodes(page, 'section')).toContain('tried-edge/low');
  await page.keyboard.press('Escape');
  await expect.poll(() => sceneNodes(page, 'section')).not.toContain('tried-edge/low');
  await tabTo(page, /^Adopt: /, 3);
  await page.keyboard.press('Enter');
  await expect(verdict(page)).not.toHaveText('Fold in the keep-clear area');

  await tabTo(page, /^Save plan$/);
  await page.keyboard.press('Enter');
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();
  await page.keyboard.press('Shift+Tab');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'HB-2112' })).toBeVisible();
});

test('first use: from the sign-in form to an adopted remedy in five interactions', async ({ page }) => {
  const { email, password } = await accountOf('radiographer');
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email); // 1
  await page.getByLabel('Password').fill(password); // 2
  await page.getByRole('button', { name: 'Sign in' }).click(); // 3
  await page.getByRole('link', { name: /(bench|plan, HB)/i }).first().click(); // 4
  await benchAnswers(page);
  await page.getByRole('button', { name: /^Adopt: / }).first().click(); // 5
  await expect(page.getByRole('status').filter({ hasText: 'Adopted:' })).toBeVisible();
});

test('unsaved edits survive leaving and coming back, and a lost connection loses nothing', async ({ signedIn, expectedErrors }) => {
  expectedErrors.push(/ERR_FAILED|Failed to load resource/);
  const page = await signedIn('radiographer');
  await openBench(page, 'HB-2116');
  const anterior = page.getByRole('form', { name: 'Patient' }).getByRole('spinbutton', { name: 'Anterior' });
  await anterior.fill('171');
  await expect(page.getByRole('button', { name: 'Undo' })).toBeEnabled();
  // Kept a moment after the edit, in this tab only.
  await expect.poll(() => page.evaluate(() => Object.keys(sessionStorage).some((key) => key.startsWith('selvedge/bench/')))).toBe(true);
  await page.reload();
  await expect(page.getByText('are back on the bench')).toBeVisible();
  await expect(anterior).toHaveValue('171');

  await page.route('**/api/v1/plans/*', (route) => route.abort());
  await page.getByRole('button', { name: 'Save plan' }).click();
  await expect(page.getByText('Not reached the server yet')).toBeVisible();
  await page.unroute('**/api/v1/plans/*');
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();
});
